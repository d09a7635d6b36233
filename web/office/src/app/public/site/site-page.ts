import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { ActivatedRoute, Router } from '@angular/router';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { Pictogram } from '#ui/pictogram';
import { linkToken } from '../link-token';
import { PublicFrame } from '../public-frame';
import { ReaderLanguage } from '../reader-language';
import { dateIn, dayIn, momentIn } from './site-dates';
import { SitePlan } from './site-plan';
import { siteProducts } from './site-products';
import { SiteSheet } from './site-sheet';
import { SiteVisit } from './site-visit';
import { siteWords } from './site-words';

/** The page behind a job's printed code, made for a phone: emergency first, then every sheet and the plan; read-only, nobody's name. */
@Component({
  selector: 'kb-site-page',
  imports: [Empty, Note, Pictogram, PublicFrame, SitePlan, SiteSheet],
  providers: [SiteVisit],
  templateUrl: './site-page.html',
  styleUrl: './site-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SitePage {
  private readonly visit = inject(SiteVisit);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly reader = inject(ReaderLanguage);

  /** The sheet that is open, so that a phone's own way back leads to the list. */
  readonly sheet = input<string>();

  private readonly scanned = linkToken('kneeboard-site-code');
  private readonly hasCode = signal(true);
  protected readonly page = this.visit.page;
  protected readonly isPlanOpen = signal(false);

  protected readonly language = this.reader.language;
  protected readonly words = computed(() => siteWords[this.language()]);
  protected readonly products = computed(() => siteProducts(this.page()?.sheets ?? [], this.language()));
  private readonly heard = computed(() => momentIn(this.language(), this.visit.heardAt()));
  protected readonly readWords = computed(() => this.words().readAt(this.heard()));
  protected readonly opened = computed(() => this.page()?.sheets.find(({ revisionId }) => revisionId === this.sheet()) ?? null);
  protected readonly planHeading = computed(() => {
    const plan = this.page()?.plan;
    return plan ? this.words().planOf(dayIn(this.language(), plan.date)) : this.words().plan;
  });
  protected readonly planState = computed(() => {
    const plan = this.page()?.plan;
    if (!plan) return '';
    // A kept copy of another day is not today's, whatever it was when it was kept.
    const isToday = plan.isToday && new Date(this.visit.heardAt()).toDateString() === new Date().toDateString();
    const at = momentIn(this.language(), plan.publishedAt);
    return isToday ? this.words().planIsToday(plan.number, at) : this.words().planIsNot(plan.number, at);
  });
  /** Said above everything else while what is shown may be old. */
  protected readonly age = computed(() => {
    const [words, contact] = [this.words(), this.visit.contact()];
    return contact === 'fresh' ? '' : `${words.asOf(this.heard())} ${contact === 'none' ? words.noSignal : words.stillAsking}`;
  });
  protected readonly keptWords = computed(() => {
    const [words, keeping] = [this.words(), this.visit.keeping()];
    if (!keeping) return '';
    if (keeping.opensOffline === null) return words.keeping(keeping.kept, keeping.all);
    return keeping.opensOffline ? words.kept : words.notKept;
  });
  protected readonly trouble = computed(() => {
    const [words, problem] = [this.words(), this.visit.problem()];
    if (!this.hasCode()) return { heading: words.bare, detail: words.bareNext, mayRetry: false };
    if (!problem) return null;
    if (problem.status === 0) return { heading: words.offline, detail: words.offlineNext, mayRetry: true };
    if (problem.status === 404) return { heading: words.dead, detail: words.deadNext, mayRetry: false };
    return { heading: words.failed, detail: problem.detail ?? problem.title, mayRetry: true };
  });

  constructor() {
    effect(() => {
      const token = this.scanned();
      untracked(() => void this.visit.open(token).then((hasCode) => this.hasCode.set(hasCode)));
    });
  }

  protected dateOf(isoDate: string): string {
    return dateIn(this.language(), isoDate);
  }

  protected retry(): void {
    void this.visit.ask();
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
