import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { type PinEvent } from '#shared/people';
import { State } from '#ui/state';
import { PagedList } from '../../contract/paged-list';
import { momentShort } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { PeopleApi } from '../people-api';

/** What happened to PINs, newest first, of one person or of everybody: each is an entry of the record log. No PIN stands here. */
@Component({
  selector: 'kb-pin-events',
  imports: [MatButton, State, Unready],
  template: `
    @if (list.items().length > 0) {
      <ul class="kb-rows" style="--kb-columns: 7rem minmax(0, 1fr) 5rem" aria-label="What happened to PINs">
        @for (event of list.items(); track event.id) {
          <li>
            <span>{{ momentShort(event.at) }}</span>
            @if (event.proof === 'none') {
              <kb-state kind="caution">{{ words(event) }}</kb-state>
            } @else {
              <span>{{ words(event) }}</span>
            }
            <span class="kb-quiet kb-figure">entry {{ event.entryIndex.toLocaleString('en-US') }}</span>
          </li>
        }
      </ul>
      @if (list.next()) {
        <div class="kb-actions"><button type="button" matButton="outlined" (click)="list.more()">Show older</button></div>
      }
    } @else if (list.status() === 'ready') {
      <p class="kb-quiet">Nothing has happened to a PIN yet.</p>
    }
    @if (list.status() !== 'ready') {
      <kb-unready what="what happened to PINs" [error]="list.problem()" (retry)="list.reload()" />
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PinEvents {
  private readonly api = inject(PeopleApi);

  /** Everybody's where it is not given. */
  readonly personId = input<string | undefined>(undefined);
  protected readonly list = new PagedList(this.personId, (personId: string | undefined, after) => this.api.listPinEvents(personId, after));
  protected readonly momentShort = momentShort;

  protected words({ event, personName, proof, byName, tabletName }: PinEvent): string {
    if (event === 'reset') return `PIN of ${personName} reset by ${byName}`;
    if (event === 'start-pin-given') return `Start PIN for ${personName} given by ${byName}`;
    const who = proof === 'lead' ? `, witnessed by ${byName}` : proof === 'office' ? `, with the start PIN from ${byName}` : byName ? `; ${byName} watched, whose own PIN had no witness` : ', without a witness';
    return `${personName} set a PIN on ${tabletName}${who}`;
  }
}
