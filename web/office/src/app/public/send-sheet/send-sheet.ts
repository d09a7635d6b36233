import { ChangeDetectionStrategy, Component, computed, effect, inject, signal, untracked } from '@angular/core';
import { lastValueFrom, firstValueFrom, tap } from 'rxjs';
import { type Problem } from '#shared/common';
import { LinkToken, type OpenRequest } from '#shared/library';
import { Empty } from '#ui/empty';
import { FileDrop } from '#ui/file-drop';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { localDateOf } from '../../pieces/dates';
import { linkToken } from '../link-token';
import { PublicFrame } from '../public-frame';
import { ReaderLanguage } from '../reader-language';
import { SendSheetApi } from './send-sheet-api';
import { sendSheetWords } from './send-sheet-words';

/** A supplier's page: who asks for which product, one PDF, and whether it arrived. It shows nothing else. */
@Component({
  selector: 'kb-send-sheet',
  imports: [Empty, FileDrop, Note, PublicFrame],
  templateUrl: './send-sheet.html',
  styles: `
    progress {
      width: 100%;
      accent-color: var(--kb-pigment);
    }

    .message {
      white-space: pre-line;
    }

    .product {
      font-size: 1.25rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SendSheet {
  private readonly api = inject(SendSheetApi);
  protected readonly language = inject(ReaderLanguage).language;

  private readonly token = linkToken();
  protected readonly words = computed(() => sendSheetWords[this.language()]);
  protected readonly request = signal<OpenRequest | null>(null);
  private readonly problem = signal<Problem | null>(null);
  /** Why the last file was not taken. */
  protected readonly refusal = signal('');
  protected readonly isSending = signal(false);
  protected readonly percent = signal(0);
  protected readonly isSent = signal(false);
  protected readonly until = computed(() => localDateOf(this.request()?.expiresAt ?? new Date()));
  protected readonly trouble = computed(() => {
    const [words, problem] = [this.words(), this.problem()];
    if (this.token() === null) return { heading: words.bare, detail: words.bareNext, mayRetry: false };
    if (!problem) return null;
    if (problem.status === 404) return { heading: words.dead, detail: words.deadNext, mayRetry: false };
    if (problem.status === 0) return { heading: words.offline, detail: words.offlineNext, mayRetry: true };
    return { heading: words.failed, detail: problemWords(problem), mayRetry: true };
  });

  constructor() {
    effect(() => {
      if (this.token() !== null) untracked(() => void this.open());
    });
  }

  protected async open(): Promise<void> {
    const token = this.token();
    if (token === null) return;
    this.problem.set(null);
    this.request.set(null);
    this.isSent.set(false);
    if (!LinkToken.safeParse(token).success) return this.problem.set({ type: 'about:blank', title: '', status: 404 });
    try {
      this.request.set(await firstValueFrom(this.api.open(token)));
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  protected async send([file]: readonly File[]): Promise<void> {
    const token = this.token();
    if (!file || token === null || this.isSending()) return;
    this.isSending.set(true);
    this.percent.set(0);
    this.refusal.set('');
    try {
      await lastValueFrom(this.api.send(token, file).pipe(tap((step) => step !== 'done' && this.percent.set(step))));
      this.isSent.set(true);
    } catch (error) {
      const problem = problemOf(error);
      if (problem.status === 404) this.problem.set(problem);
      else this.refusal.set(problem.status === 0 ? `${this.words().offline} ${this.words().offlineNext}` : [problem.title, ...(problem.errors ?? []).map(({ message }) => message)].join(' '));
    } finally {
      this.isSending.set(false);
    }
  }
}
