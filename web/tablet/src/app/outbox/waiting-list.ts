import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { Empty } from '#ui/empty';
import { State, type StateKind } from '#ui/state';
import { Day } from '../day/day';
import { Frame } from '../frame/frame';
import { whenTime } from '../words/dates';
import { Words } from '../words/words';
import { Outbox, type Posted } from './outbox';
import { Sender } from './sender';
import { Storage } from './storage';

/** Everything this tablet wrote in the last day and whether the office has it. Reasons and strokes stay out of sight. */
@Component({
  selector: 'kb-waiting-list',
  imports: [Frame, Empty, State],
  template: `
    @let say = words.say();
    <kb-frame [title]="say.outbox.heading" [kicker]="tablet()" back="/" [backLabel]="say.outbox.back">
      <div class="body">
        <p>{{ say.outbox.intro }}</p>
        @if (outbox.waitingCount() > 0) {
          <div><button type="button" class="kb-button filled" [disabled]="sender.isSending()" (click)="sender.sendNow()">{{ say.outbox.sendNow }}</button></div>
        }
        @if (lines().length > 0) {
          <ul class="kb-rows">
            @for (line of lines(); track line.id) {
              <li>
                <span>{{ line.at }}</span>
                <span><b>{{ line.what }}</b> {{ line.who }}</span>
                <span><kb-state [kind]="line.kind">{{ line.state }}</kb-state> {{ line.remarks }}</span>
              </li>
            }
          </ul>
        } @else {
          <kb-empty [heading]="say.outbox.none" />
        }
      </div>
      <p kbFoot>{{ persistence() }}</p>
    </kb-frame>
  `,
  styles: `
    .body {
      display: flex;
      flex-direction: column;
      gap: 1rem;
      padding-block: 1rem;
    }

    .kb-rows {
      --kb-columns: 8.5rem minmax(0, 1fr) minmax(0, 1.2fr);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WaitingList {
  private readonly day = inject(Day);
  private readonly storage = inject(Storage);
  protected readonly outbox = inject(Outbox);
  protected readonly sender = inject(Sender);
  protected readonly words = inject(Words);

  protected readonly tablet = computed(() => {
    const name = this.day.day()?.tablet.name;
    return name ? this.words.say().outbox.tablet(name) : '';
  });
  protected readonly persistence = computed(() => {
    const isPersistent = this.storage.isPersistent();
    if (isPersistent === null) return '';
    return isPersistent ? this.words.say().outbox.persistent : this.words.say().outbox.notPersistent;
  });
  protected readonly lines = computed(() => [...this.outbox.posted()].reverse().map((posted) => this.lineOf(posted)));

  private lineOf({ row, envelope }: Posted): { readonly id: string; readonly at: string; readonly what: string; readonly who: string; readonly kind: StateKind; readonly state: string; readonly remarks: string } {
    const say = this.words.say().outbox;
    const { receipt } = row;
    return {
      id: row.id,
      at: envelope ? whenTime(envelope.capturedAt, this.words.language()) : '',
      what: envelope ? say.kinds[envelope.kind] : say.unknown,
      who: envelope ? this.nameOf(envelope.personId) : '',
      kind: !receipt ? 'caution' : receipt.outcome === 'kept-aside' ? 'plain' : 'done',
      state: receipt ? say.done[receipt.outcome] : say.waiting,
      remarks: [receipt?.isSuperseded ? say.superseded : '', receipt?.isUnwitnessed ? say.noWitness : receipt?.pinState === 'not-confirmed' ? say.notConfirmed : receipt?.pinState === 'not-set' ? say.noPin : ''].join(' ').trim(),
    };
  }

  private nameOf(personId: string): string {
    const people = this.day.jobs().flatMap(({ job }) => job.people);
    return people.find(({ id }) => id === personId)?.name ?? '';
  }
}
