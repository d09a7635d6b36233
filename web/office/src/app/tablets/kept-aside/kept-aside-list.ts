import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { PagedList } from '../../contract/paged-list';
import { momentShort } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { TabletsApi } from '../tablets-api';

/** What tablets sent and nobody could record: kept byte for byte, with the reason. */
@Component({
  selector: 'kb-kept-aside-list',
  imports: [MatButton, Unready],
  template: `
    @if (list.items().length > 0) {
      <section class="kb-stack" aria-labelledby="kept-aside">
        <h2 id="kept-aside">Kept aside</h2>
        <p class="kb-quiet">These deliveries arrived and are stored, but could not be recorded. Ask the lead what was meant; nothing is lost.</p>
        <ul class="kb-rows" style="--kb-columns: 9rem 10rem 9rem minmax(12rem, 1fr)" aria-label="Kept aside">
          @for (delivery of list.items(); track delivery.id) {
            <li>
              <span>{{ momentShort(delivery.receivedAt) }}</span>
              <span>{{ delivery.tabletName }}</span>
              <span class="kb-quiet">{{ delivery.kind ?? 'unknown kind' }}</span>
              <span>{{ delivery.because }}</span>
            </li>
          }
        </ul>
        @if (list.next()) {
          <div class="kb-actions"><button type="button" matButton="outlined" (click)="list.more()">Show more deliveries</button></div>
        }
      </section>
    } @else if (list.problem()) {
      <kb-unready what="deliveries" [error]="list.problem()" (retry)="list.reload()" />
    }
  `,
  styles: `
    :host:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KeptAsideList {
  private readonly api = inject(TabletsApi);
  protected readonly list = new PagedList(signal(null).asReadonly(), (_query: null, after) => this.api.keptAside(after));
  protected readonly momentShort = momentShort;
}
