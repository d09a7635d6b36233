import { ChangeDetectionStrategy, Component, computed, effect, inject, input, output, signal, untracked } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type SheetRequest } from '#shared/library';
import { type Revision } from '#shared/sheets';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { Access } from '../../contract/access';
import { dayOf, localDateOf, momentShort } from '../../pieces/dates';
import { LibraryApi } from '../library-api';
import { ReturnDialog, type ReturnQuestion } from './return-dialog';

/** On the page of a sheet: that it was sent back and what came of it, or which request it answers. */
@Component({
  selector: 'kb-sheet-returns',
  imports: [Note, RouterLink],
  template: `
    @if (refusal()) {
      <kb-note kind="stop" [announce]="true">{{ refusal() }}</kb-note>
    }
    @for (row of rows(); track row.request.id) {
      <kb-note [kind]="row.kind" [announce]="true">
        {{ row.words }}
        @if (row.otherId; as otherId) {
          <a [routerLink]="['/sheets', otherId]">{{ row.linkWords }}</a>
        }
      </kb-note>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.75rem;
    }

    :host:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetReturns {
  private readonly api = inject(LibraryApi);
  private readonly access = inject(Access);
  private readonly dialogs = inject(MatDialog);

  readonly revision = input.required<Revision>();
  /** The sheet may be set aside now: read it again. */
  readonly returned = output<void>();

  private readonly requests = signal<readonly SheetRequest[]>([]);
  protected readonly refusal = signal('');
  protected readonly rows = computed(() => this.requests().map((request) => ({ request, ...wordsOf(request, this.revision().id) })));
  private readonly asked = computed(() => ({ id: this.revision().id, version: this.revision().version }), { equal: (a, b) => a.id === b.id && a.version === b.version });

  constructor() {
    effect(() => {
      const { id } = this.asked();
      untracked(() => void this.load(id));
    });
  }

  async sendBack(): Promise<void> {
    const revision = this.revision();
    this.refusal.set('');
    try {
      const draft = await firstValueFrom(this.api.draftReturn(revision.id));
      const request = await firstValueFrom(this.dialogs.open<ReturnDialog, ReturnQuestion, SheetRequest>(ReturnDialog, { data: { revision, draft }, width: '46rem', maxWidth: '96vw' }).afterClosed());
      if (!request) return;
      this.requests.update((requests) => [request, ...requests]);
      this.returned.emit();
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    }
  }

  private async load(id: string): Promise<void> {
    if (!this.access.may('listRequests')) return;
    try {
      this.requests.set((await firstValueFrom(this.api.requests({ revisionId: id }))).items);
    } catch {
      // The page itself says when the office cannot be reached; without these lines the sheet is as good.
    }
  }
}

interface Line {
  readonly kind: 'plain' | 'caution' | 'done';
  readonly words: string;
  readonly otherId: string | null;
  readonly linkWords: string;
}

function wordsOf({ aboutRevisionId, revisionId, email, askedAt, askedBy, answeredAt, state, expiresAt }: SheetRequest, here: string): Line {
  const nothing = { otherId: null, linkWords: '' };
  const asked = `${momentShort(askedAt)} by ${askedBy}`;
  if (aboutRevisionId !== here) {
    const words = aboutRevisionId === null ? `This sheet came from ${email} as the answer to the request of ${asked}.` : `This sheet came from ${email} as the answer to one that was sent back ${asked}.`;
    return { kind: 'plain', words, otherId: aboutRevisionId, linkWords: 'The sheet that was sent back' };
  }
  switch (state) {
    case 'open':
      return { kind: 'caution', words: `Sent back to ${email} ${asked}. Waiting for the answer; the link is good until ${dayOf(localDateOf(expiresAt))}.`, ...nothing };
    case 'expired':
      return { kind: 'caution', words: `Sent back to ${email} ${asked}. No answer came and the link has ended: send it back again, or telephone.`, ...nothing };
    case 'withdrawn':
      return { kind: 'plain', words: `Sent back to ${email} ${asked}, then withdrawn.`, ...nothing };
    case 'answered':
      if (revisionId === here) return { kind: 'caution', words: `Sent back to ${email} ${asked}. The supplier sent the very same file again ${answeredAt ? momentShort(answeredAt) : ''}.`, ...nothing };
      return { kind: 'done', words: `Sent back to ${email} ${asked}. Answered ${answeredAt ? momentShort(answeredAt) : ''}.`, otherId: revisionId, linkWords: 'The sheet that came' };
  }
}
