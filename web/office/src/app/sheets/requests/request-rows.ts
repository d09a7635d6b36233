import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type SheetRequest } from '#shared/library';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { State, type StateKind } from '#ui/state';
import { Access } from '../../contract/access';
import { Confirmation } from '../../pieces/confirmation';
import { dayOf, localDateOf, momentShort } from '../../pieces/dates';
import { LibraryApi } from '../library-api';

/** Requests to suppliers: whom, for what, how it stands; an open one can be withdrawn. */
@Component({
  selector: 'kb-request-rows',
  imports: [Note, RouterLink, State],
  template: `
    @if (refusal()) {
      <kb-note kind="stop" [announce]="true">{{ refusal() }}</kb-note>
    }
    <ul class="kb-rows" style="--kb-columns: minmax(11rem, 1.3fr) minmax(10rem, 1.2fr) minmax(9rem, 1fr) 6rem" aria-label="Requests to suppliers">
      @for (row of rows(); track row.request.id) {
        <li>
          <span>
            @if (row.request.productId; as productId) {
              <a [routerLink]="['/products', productId]"><b>{{ row.request.productName }}</b></a>
            } @else {
              <b>{{ row.request.productName }}</b>
            }
            @if (row.request.aboutRevisionId; as aboutId) {
              <span class="kb-quiet block"><a [routerLink]="['/sheets', aboutId]">sent back<span class="kb-visually-hidden">: {{ row.request.productName }}</span></a></span>
            }
          </span>
          <span>{{ row.request.email }}<span class="kb-quiet block">{{ row.asked }}</span></span>
          <span><kb-state [kind]="row.kind">{{ row.words }}</kb-state><span class="kb-quiet block">{{ row.detail }}</span></span>
          <span>
            @if (row.request.revisionId; as revisionId) {
              <a [routerLink]="['/sheets', revisionId]">The sheet<span class="kb-visually-hidden"> of {{ row.request.productName }}</span></a>
            } @else if (row.request.state === 'open' && mayWithdraw()) {
              <button type="button" class="kb-link" (click)="withdraw(row.request)">Withdraw<span class="kb-visually-hidden"> the request for {{ row.request.productName }}</span></button>
            }
          </span>
        </li>
      }
    </ul>
  `,
  styles: `
    .block {
      display: block;
      font-size: var(--kb-small);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RequestRows {
  private readonly api = inject(LibraryApi);
  private readonly access = inject(Access);
  private readonly confirmation = inject(Confirmation);

  readonly requests = input.required<readonly SheetRequest[]>();
  readonly changed = output<void>();

  protected readonly mayWithdraw = computed(() => this.access.may('withdrawRequest'));
  protected readonly refusal = signal('');
  protected readonly rows = computed(() => this.requests().map((request) => ({ request, asked: `${request.askedBy}, ${momentShort(request.askedAt)}`, ...standing(request) })));

  protected async withdraw(request: SheetRequest): Promise<void> {
    if (!(await this.confirmation.ask({ heading: 'Withdraw the request', text: `The link sent to ${request.email} stops working at once.`, action: 'Withdraw the request', isDanger: true }))) return;
    this.refusal.set('');
    try {
      await firstValueFrom(this.api.withdraw(request.id));
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    }
    this.changed.emit();
  }
}

function standing({ state, mailedAt, expiresAt, answeredAt, revisionId, aboutRevisionId }: SheetRequest): { readonly kind: StateKind; readonly words: string; readonly detail: string } {
  switch (state) {
    case 'open':
      return mailedAt === null ? { kind: 'plain', words: 'being sent', detail: '' } : { kind: 'caution', words: 'waiting', detail: `link good until ${dayOf(localDateOf(expiresAt))}` };
    case 'answered':
      if (revisionId !== null && revisionId === aboutRevisionId) return { kind: 'caution', words: 'same file again', detail: answeredAt ? momentShort(answeredAt) : '' };
      return { kind: 'done', words: 'answered', detail: answeredAt ? momentShort(answeredAt) : '' };
    case 'withdrawn':
      return { kind: 'plain', words: 'withdrawn', detail: 'the link is dead' };
    case 'expired':
      return { kind: 'stop', words: 'no answer', detail: `link ended ${dayOf(localDateOf(expiresAt))}` };
  }
}
