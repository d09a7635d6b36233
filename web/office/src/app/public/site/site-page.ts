import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { ActivatedRoute, Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { parseChecklistText, type ChecklistText } from '#compliance';
import { type Problem } from '#shared/common';
import { LinkToken, type SitePage as SiteAnswer } from '#shared/library';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { Pictogram } from '#ui/pictogram';
import { problemOf } from '#ui/problem';
import { SignedText } from '../../history/signed-text';
import { sha256Hex } from '../../pieces/sha256';
import { timeOf } from '../../pieces/dates';
import { linkToken } from '../link-token';
import { PublicFrame } from '../public-frame';
import { ReaderLanguage } from '../reader-language';
import { SiteApi } from './site-api';
import { siteProducts } from './site-products';
import { SiteSheet } from './site-sheet';
import { siteWords } from './site-words';

/** The page behind a job's printed code, made for a phone: emergency first, then every sheet; read-only. */
@Component({
  selector: 'kb-site-page',
  imports: [Empty, Note, Pictogram, PublicFrame, SignedText, SiteSheet],
  templateUrl: './site-page.html',
  styleUrl: './site-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SitePage {
  private readonly api = inject(SiteApi);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly reader = inject(ReaderLanguage);

  /** The sheet that is open, so that a phone's own way back leads to the list. */
  readonly sheet = input<string>();

  protected readonly token = linkToken('kneeboard-site-code');
  protected readonly page = signal<SiteAnswer | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isListOpen = signal(false);
  private readonly readAt = signal('');
  private readonly texts = signal<readonly { readonly language: string; readonly text: ChecklistText | null }[]>([]);

  protected readonly language = this.reader.language;
  protected readonly words = computed(() => siteWords[this.language()]);
  protected readonly products = computed(() => siteProducts(this.page()?.sheets ?? [], this.language()));
  protected readonly readWords = computed(() => this.words().readAt(this.readAt()));
  protected readonly opened = computed(() => this.page()?.sheets.find(({ revisionId }) => revisionId === this.sheet()) ?? null);
  /** In the reader's language, or as it was published; null when its bytes are not the published ones. */
  protected readonly checklist = computed(() => (this.texts().find(({ language }) => language === this.language()) ?? this.texts()[0])?.text ?? null);
  protected readonly trouble = computed(() => {
    const [words, problem] = [this.words(), this.problem()];
    if (this.token() === null) return { heading: words.bare, detail: words.bareNext, mayRetry: false };
    if (!problem) return null;
    if (problem.status === 0) return { heading: words.offline, detail: words.offlineNext, mayRetry: true };
    if (problem.status === 404) return { heading: words.dead, detail: words.deadNext, mayRetry: false };
    return { heading: words.failed, detail: problem.detail ?? problem.title, mayRetry: true };
  });

  constructor() {
    effect(() => {
      const token = this.token();
      untracked(() => token !== null && void this.load(token));
    });
  }

  protected async load(token: string): Promise<void> {
    this.problem.set(null);
    if (!LinkToken.safeParse(token).success) {
      this.problem.set({ type: 'about:blank', title: '', status: 404 });
      return;
    }
    try {
      const page = await firstValueFrom(this.api.open(token));
      this.texts.set(await Promise.all((page.checklist?.texts ?? []).map(async ({ language, sha256, text }) => ({ language, text: await opened(text, sha256) }))));
      this.readAt.set(timeOf(new Date()));
      this.page.set(page);
    } catch (error) {
      const problem = problemOf(error);
      // A code that was revoked meanwhile shows nothing more; without signal what was read stays.
      if (problem.status === 404) this.page.set(null);
      this.problem.set(problem);
    }
  }

  protected retry(): void {
    const token = this.token();
    if (token !== null) void this.load(token);
  }

  protected open(revisionId: string): void {
    void this.router.navigate([], { relativeTo: this.route, queryParams: { sheet: revisionId } });
  }

  protected close(): void {
    void this.router.navigate([], { relativeTo: this.route });
  }

  protected print(): void {
    window.print();
  }
}

/** The checklist, if its bytes are the published ones (not checked where the browser may not hash: plain http). */
async function opened(text: string, sha256: string): Promise<ChecklistText | null> {
  const computedHash = await sha256Hex(text);
  if (computedHash !== null && computedHash !== sha256) return null;
  try {
    return parseChecklistText(text);
  } catch {
    return null;
  }
}
