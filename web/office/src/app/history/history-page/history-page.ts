import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { acknowledgementKinds, type Acknowledgement, type AcknowledgementRow, type RecordCheck } from '#shared/acknowledgements';
import { type Problem } from '#shared/common';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';
import { problemOf } from '#ui/problem';
import { State } from '#ui/state';
import { PagedList } from '../../contract/paged-list';
import { momentShort } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { SessionApi } from '../../session/session-api';
import { PinEvents } from '../../people/pin-events/pin-events';
import { EntryDetail } from '../entry-detail/entry-detail';
import { HistoryApi, type HistoryFilter } from '../history-api';
import { HistoryFilters } from '../history-filters/history-filters';
import { howKind, howWords, languageNames } from '../history-words';
import { RecordResult } from '../record-result/record-result';

const text = (value: string | undefined): string | undefined => value || undefined;

/** Every acknowledgement, newest first. Filters and the open entry stand in the address, so that a link shows the same. */
@Component({
  selector: 'kb-history-page',
  imports: [Empty, EntryDetail, HistoryFilters, MatButton, PageHeader, PinEvents, RecordResult, State, Unready],
  templateUrl: './history-page.html',
  styleUrl: './history-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HistoryPage {
  private readonly api = inject(HistoryApi);
  private readonly router = inject(Router);
  private readonly session = inject(SessionApi).session;

  readonly jobId = input<string | undefined, string | undefined>(undefined, { transform: text });
  readonly personId = input<string | undefined, string | undefined>(undefined, { transform: text });
  readonly from = input<string | undefined, string | undefined>(undefined, { transform: text });
  readonly to = input<string | undefined, string | undefined>(undefined, { transform: text });
  readonly kind = input<string | undefined, string | undefined>(undefined, { transform: text });
  readonly entry = input<string | undefined, string | undefined>(undefined, { transform: text });

  protected readonly filter = computed<HistoryFilter>(() => ({
    jobId: this.jobId(),
    personId: this.personId(),
    from: this.from(),
    to: this.to(),
    kind: acknowledgementKinds.find((kind) => kind === this.kind()),
  }));
  protected readonly isFiltered = computed(() => Object.values(this.filter()).some((value) => value !== undefined));
  protected readonly list = new PagedList(this.filter, (filter: HistoryFilter, after) => this.api.list(filter, after));
  protected readonly countWords = computed(() => {
    const page = this.list.page();
    if (!page) return '';
    const total = page.total.toLocaleString('en-US');
    return this.isFiltered() ? `${page.found.toLocaleString('en-US')}${page.isFoundCapped ? '+' : ''} of ${total}` : total;
  });
  protected readonly kicker = computed(() => this.session()?.organisation.name ?? '');
  protected readonly csvHref = computed(() => this.api.csvHref(this.filter()));
  protected readonly recordHref = this.api.recordHref();

  protected readonly opened = signal<Acknowledgement | null>(null);
  protected readonly openProblem = signal<Problem | null>(null);
  protected readonly isPinListOpen = signal(false);
  protected readonly isChecking = signal(false);
  protected readonly check = signal<RecordCheck | null>(null);
  protected readonly checkProblem = signal<Problem | null>(null);

  protected readonly momentShort = momentShort;
  protected readonly howWords = howWords;
  protected readonly howKind = howKind;
  protected readonly languageNames = languageNames;

  constructor() {
    effect(() => {
      const id = this.entry();
      untracked(() => void this.open(id));
    });
  }

  protected setFilter(change: Partial<Record<keyof HistoryFilter, string | null>>): void {
    void this.router.navigate([], { queryParams: { ...change, entry: null }, queryParamsHandling: 'merge' });
  }

  protected clearFilters(): void {
    void this.router.navigate([], { queryParams: {} });
  }

  protected show(row: AcknowledgementRow): void {
    void this.router.navigate([], { queryParams: { entry: row.id }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected close(): void {
    void this.router.navigate([], { queryParams: { entry: null }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected async checkRecord(): Promise<void> {
    if (this.isChecking()) return;
    this.isChecking.set(true);
    this.check.set(null);
    this.checkProblem.set(null);
    try {
      this.check.set(await firstValueFrom(this.api.checkRecord()));
    } catch (error) {
      this.checkProblem.set(problemOf(error));
    } finally {
      this.isChecking.set(false);
    }
  }

  protected async open(id: string | undefined): Promise<void> {
    this.openProblem.set(null);
    if (id === undefined) return this.opened.set(null);
    try {
      const entry = await firstValueFrom(this.api.read(id));
      // A slower answer for an entry that is no longer open is dropped.
      if (this.entry() === id) this.opened.set(entry);
    } catch (error) {
      this.opened.set(null);
      this.openProblem.set(problemOf(error));
    }
  }
}
