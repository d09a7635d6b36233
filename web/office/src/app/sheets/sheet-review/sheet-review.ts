import { ChangeDetectionStrategy, Component, computed, DestroyRef, effect, inject, Injector, input, afterNextRender, signal, untracked, viewChild } from '@angular/core';
import { NonNullableFormBuilder } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { firstValueFrom, startWith, type Subscription } from 'rxjs';
import { type Problem } from '#shared/common';
import { Revision } from '#shared/sheets';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { PageViewer } from '#ui/page-viewer/page-viewer';
import { problemOf, problemWords } from '#ui/problem';
import { Access } from '../../contract/access';
import { momentShort } from '../../pieces/dates';
import { FormTrouble } from '../../pieces/form-trouble';
import { Unready } from '../../pieces/unready';
import { NavigationCounts } from '../../shell/navigation-counts';
import { ReachPanel } from '../reach/reach-panel';
import { CorrectionsApi } from '../corrections/corrections-api';
import { SheetReturns } from '../requests/sheet-returns';
import { pageUnderWay, picturesWords, readerTrouble } from '../sheet-words';
import { SheetsApi } from '../sheets-api';
import { ConfirmDialog, type ConfirmOutcome, type ConfirmQuestion } from './confirm-dialog';
import { ReviewList } from './review-list';
import { ReviewProgress } from './review-progress';
import { reviewRows, type ReviewKey, type Suggestion } from './review-rows';
import { checkedEdit, hasAllNeeded, placeMessage, sheetForm, type SheetForm } from './sheet-form';

const pollMilliseconds = 1500;

/** One sheet: the page on one side, what was read from it on the other; a person confirms it value by value. */
@Component({
  selector: 'kb-sheet-review',
  imports: [FormTrouble, MatButton, Note, PageHeader, PageViewer, ReachPanel, ReviewList, RouterLink, SheetReturns, Unready],
  templateUrl: './sheet-review.html',
  styleUrl: './sheet-review.scss',
  host: { '(document:keydown)': 'key($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetReview {
  private readonly api = inject(SheetsApi);
  private readonly corrections = inject(CorrectionsApi);
  private readonly access = inject(Access);
  private readonly builder = inject(NonNullableFormBuilder);
  private readonly dialogs = inject(MatDialog);
  private readonly counts = inject(NavigationCounts);
  private readonly injector = inject(Injector);
  private readonly list = viewChild(ReviewList);
  private readonly returns = viewChild(SheetReturns);

  readonly revisionId = input.required<string>();

  protected readonly revision = signal<Revision | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly refusal = signal('');
  protected readonly isSending = signal(false);
  protected readonly form = signal<SheetForm | null>(null);
  /** What earlier corrections say of this sheet: beside the reading, never in its place. */
  private readonly suggestions = signal<readonly Suggestion[]>([]);
  private readonly value = signal<ReturnType<SheetForm['getRawValue']> | null>(null);

  protected readonly rows = computed(() => {
    const [revision, value] = [this.revision(), this.value()];
    return revision && value ? reviewRows(revision.fields, value, this.suggestions()) : [];
  });
  protected readonly progress = new ReviewProgress(this.rows);
  protected readonly place = computed(() => this.rows().find(({ key }) => key === this.progress.activeKey())?.place ?? null);
  protected readonly trouble = computed(() => {
    const revision = this.revision();
    return revision ? readerTrouble(revision) : null;
  });
  protected readonly picturesWords = picturesWords;
  protected readonly waitingWords = computed(() => {
    const revision = this.revision();
    if (!revision || revision.pagesRead === null) return 'This sheet is being read. What is found shows here in a moment; you may leave.';
    return `This sheet has no text, so its pages are read as pictures: ${pageUnderWay(revision)}. It takes some minutes; you may leave.`;
  });
  protected readonly isOpen = computed(() => this.revision()?.state === 'read' || this.revision()?.state === 'needs-entry');
  protected readonly isByHand = computed(() => this.revision()?.state === 'needs-entry');
  protected readonly mayConfirm = computed(() => this.isOpen() && this.access.may('confirmRevision'));
  protected readonly mayReadAgain = computed(() => this.access.may('readRevisionAgain'));
  protected readonly mayReturn = computed(() => this.revision()?.state !== 'waiting' && this.access.may('returnSheet'));
  protected readonly mayTakeBack = computed(() => this.revision()?.state === 'set-aside' && this.access.may('takeRevisionBack'));
  protected readonly name = computed(() => this.revision()?.productName ?? this.revision()?.fileName ?? 'sheet');
  protected readonly fileHref = computed(() => this.api.fileHref(this.revisionId()));
  protected readonly heading = computed(() => (this.isByHand() ? 'Enter what the sheet says' : this.mayConfirm() ? 'Check what was read' : this.name()));
  protected readonly hint = computed(() => {
    const { length } = this.progress.pending();
    const looks = length === 0 ? 'Nothing more wants a look.' : `${length} of ${this.rows().length} ${length === 1 ? 'wants' : 'want'} a look.`;
    return looks;
  });
  protected readonly confirmedWords = computed(() => {
    const revision = this.revision();
    return revision?.confirmedAt ? `Confirmed ${momentShort(revision.confirmedAt)} by ${revision.confirmedBy ?? 'somebody'}` : '';
  });

  private watching: Subscription | undefined;

  constructor() {
    effect(() => {
      const id = this.revisionId();
      untracked(() => void this.load(id));
    });
    const timer = setInterval(() => {
      if (this.revision()?.state === 'waiting') void this.load(this.revisionId());
    }, pollMilliseconds);
    inject(DestroyRef).onDestroy(() => {
      clearInterval(timer);
      this.watching?.unsubscribe();
    });
  }

  mayLeave(): boolean {
    return !this.mayConfirm() || !this.form()?.dirty || window.confirm('What you changed is not saved. Leave this sheet and lose it?');
  }

  protected async load(id: string): Promise<void> {
    this.problem.set(null);
    try {
      this.take(await firstValueFrom(this.api.read(id)));
      await this.loadSuggestions(id);
    } catch (error) {
      if (this.revision() === null) this.problem.set(problemOf(error));
    }
  }

  /** Without them the sheet is checked as before. */
  private async loadSuggestions(id: string): Promise<void> {
    if (!this.mayConfirm() || this.isByHand()) return;
    try {
      this.suggestions.set((await firstValueFrom(this.corrections.suggestions(id))).items);
      this.progress.beginUnlessUnderWay();
    } catch {
      this.suggestions.set([]);
    }
  }

  /** Enter matches, E changes, U uses what an earlier correction says, arrows move; not while somebody types or presses a button. */
  protected key(event: KeyboardEvent): void {
    if (!this.mayConfirm() || this.isByHand() || event.ctrlKey || event.metaKey || event.altKey || this.dialogs.openDialogs.length > 0) return;
    const target = event.target instanceof Element ? event.target : null;
    if (target?.closest('input, textarea, select, button:not([data-line]), a, [role="button"], [role="region"], summary')) return;
    const active = this.progress.activeKey();
    if (event.key === 'Enter') this.matches(active);
    else if (event.key === 'e' || event.key === 'E') this.change(active);
    else if (event.key === 'u' || event.key === 'U') this.useSuggestion(active);
    else if (event.key === 'ArrowDown') this.move(1);
    else if (event.key === 'ArrowUp') this.move(-1);
    else return;
    event.preventDefault();
  }

  protected matches(key: ReviewKey): void {
    this.progress.matches(key);
    this.focusLine();
  }

  protected takeOver({ field, value }: Suggestion): void {
    const control = this.form()?.controls[field];
    control?.setValue(value);
    control?.markAsDirty();
    this.matches(field);
  }

  private useSuggestion(key: ReviewKey): void {
    const suggestion = this.rows().find((row) => row.key === key)?.suggestion;
    if (suggestion) this.takeOver(suggestion);
  }

  protected change(key: ReviewKey): void {
    this.progress.change(key);
    afterNextRender(() => this.list()?.focusEditor(), { injector: this.injector });
  }

  protected async confirm(): Promise<void> {
    const [revision, form] = [this.revision(), this.form()];
    if (!revision || !form) return;
    const pending = this.progress.pending()[0];
    if (pending && !this.isByHand()) {
      this.refusal.set(`First look at “${pending.label}”: say that it matches, or change it.`);
      this.progress.open(pending.key);
      this.focusLine();
      return;
    }
    const fields = checkedEdit(form);
    if (!hasAllNeeded(form) || !fields) return this.showBad('Some values need another look. They are marked.');
    this.refusal.set('');
    const data: ConfirmQuestion = { revision, fields };
    const outcome = await firstValueFrom(this.dialogs.open<ConfirmDialog, ConfirmQuestion, ConfirmOutcome>(ConfirmDialog, { data, width: '38rem', maxWidth: '96vw' }).afterClosed());
    if (!outcome) return;
    if ('problem' in outcome) return this.refuse(outcome.problem);
    form.markAsPristine();
    this.take(outcome.confirmed);
    this.refreshCounts();
  }

  protected refreshCounts(): void {
    void this.counts.refresh();
  }

  protected async save(): Promise<void> {
    const [revision, form] = [this.revision(), this.form()];
    if (!revision || !form) return;
    const fields = checkedEdit(form);
    if (!fields) return this.showBad('Some values need another look. They are marked.');
    await this.send(async () => this.take(await firstValueFrom(this.api.save(revision.id, fields, revision.version))));
  }

  protected setAside(): Promise<void> {
    return this.send(async (revision) => this.take(await firstValueFrom(this.api.setAside(revision.id, revision.version))));
  }

  /** With what was typed here saved first: the mail is written from what is stored. */
  protected async sendBack(): Promise<void> {
    if (this.mayConfirm() && this.form()?.dirty) await this.save();
    if (!this.form()?.dirty || !this.mayConfirm()) await this.returns()?.sendBack();
  }

  protected reread(): void {
    void this.load(this.revisionId());
    this.refreshCounts();
  }

  protected takeBack(): Promise<void> {
    return this.send(async (revision) => this.take(await firstValueFrom(this.api.takeBack(revision.id, revision.version))));
  }

  protected readAgain(): Promise<void> {
    return this.send(async (revision) => this.take(await firstValueFrom(this.api.readAgain(revision.id))));
  }

  private move(by: 1 | -1): void {
    this.progress.move(by);
    this.focusLine();
  }

  private focusLine(): void {
    afterNextRender(() => this.list()?.focusActive(), { injector: this.injector });
  }

  private async send(action: (revision: Revision) => Promise<void>): Promise<void> {
    const revision = this.revision();
    if (!revision || this.isSending()) return;
    this.isSending.set(true);
    this.refusal.set('');
    try {
      await action(revision);
    } catch (error) {
      this.refuse(problemOf(error));
    } finally {
      this.isSending.set(false);
    }
  }

  private refuse(problem: Problem): void {
    const current = Revision.safeParse(problem.current);
    if (current.success && current.data.state !== this.revision()?.state) this.take(current.data);
    // Values typed here stay; only the version moves on, so that the next try says what it overwrites.
    else if (current.success) this.revision.set({ ...current.data, fields: this.revision()?.fields ?? current.data.fields });
    const form = this.form();
    const left = (problem.errors ?? []).filter(({ path, message }) => !form || !placeMessage(form, path.split(/[./]/), message, 'server')).map(({ message }) => message);
    this.showBad([problemWords(problem), ...left].join(' '));
  }

  /** Opens the first line with a bad value, so that its message is seen. */
  private showBad(words: string): void {
    this.refusal.set(words);
    const controls = this.form()?.controls;
    const bad = controls && (Object.keys(controls) as (keyof typeof controls)[]).find((key) => controls[key].invalid);
    if (bad && !this.isByHand()) this.progress.change(bad);
  }

  private take(revision: Revision): void {
    const isFirst = this.revision()?.id !== revision.id || this.revision()?.state !== revision.state;
    this.revision.set(revision);
    const form = sheetForm(this.builder, revision.fields);
    this.watching?.unsubscribe();
    this.watching = form.valueChanges.pipe(startWith(null)).subscribe(() => this.value.set(form.getRawValue()));
    this.form.set(form);
    if (isFirst) this.progress.begin();
  }
}
