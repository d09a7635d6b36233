import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { listed } from '#compliance/words';
import { type Job, type PublishedVersion, type Shift } from '#shared/jobs';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemWords } from '#ui/problem';
import { ActionList } from '../../actions/action-list';
import { Access } from '../../contract/access';
import { Conflict } from '../../pieces/conflict';
import { dayName } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { FactsDialog } from '../job-form/facts-dialog';
import { floorWords, settingWords } from '../job-form/site-words';
import { JobsApi } from '../jobs-api';
import { heldTasks, metLines, openLines, publishLabel } from './answer-rows';
import { Consumables } from './consumables';
import { LineRows } from './line-rows';
import { planDifferences } from './plan-differences';
import { PublishDialog, type PublishQuestion } from './publish-dialog';
import { ShiftBoard } from './shift-board';
import { ShiftEditor } from './shift-editor';
import { ShiftFoot } from './shift-foot';
import { namesFor } from './shift-names';
import { setRate, type StatedRate } from './shift-plan';
import { ShiftSurroundings } from './shift-surroundings';
import { ShiftVersions } from './shift-versions';
import { SignBasisDialog, type BasisQuestion } from './sign-basis-dialog';
import { TaskRows } from './task-rows';

/** One day's work: the strip, what the rules answer to it, and its checklist. */
@Component({
  selector: 'kb-shift-page',
  imports: [ActionList, Conflict, Consumables, LineRows, MatButton, Note, PageHeader, RouterLink, ShiftBoard, ShiftFoot, ShiftVersions, TaskRows, Unready],
  providers: [ShiftEditor, ShiftSurroundings],
  templateUrl: './shift-page.html',
  styleUrl: './shift-page.scss',
  host: { '(window:beforeunload)': 'warnOfUnsaved($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShiftPage {
  private readonly api = inject(JobsApi);
  private readonly access = inject(Access);
  private readonly dialogs = inject(MatDialog);
  private readonly title = inject(Title);
  protected readonly editor = inject(ShiftEditor);
  protected readonly around = inject(ShiftSurroundings);

  readonly jobId = input.required<string>();
  readonly shiftId = input.required<string>();

  protected readonly job = this.api.jobResource(this.jobId);
  protected readonly openTaskId = signal<string | null>(null);

  protected readonly mayEdit = computed(() => this.access.may('editShiftPlan'));
  protected readonly mayPublish = computed(() => this.access.may('publishShift'));
  protected readonly mayChangeFacts = computed(() => this.access.may('editJob') && this.job.hasValue());
  protected readonly mayDecide = computed(() => this.access.may('signBasis'));

  protected readonly kicker = computed(() => {
    const shift = this.editor.shift();
    const pack = this.editor.answer()?.pack.name.en ?? '';
    return shift ? [shift.job.siteName, pack, settingWords(shift.job.site), floorWords(shift.job.site)].filter(Boolean).join(' · ') : 'Jobs';
  });
  /** "Process hall floor, day 3": the place of this date among the job's shifts. */
  protected readonly heading = computed(() => {
    const shift = this.editor.shift();
    if (!shift) return '';
    const dates = this.job.hasValue() ? this.job.value().shifts.map(({ date }) => date).sort() : [];
    const day = dates.indexOf(shift.date) + 1;
    return dates.length > 1 && day > 0 ? `${shift.job.name}, day ${day}` : shift.job.name;
  });
  protected readonly newest = computed<PublishedVersion | null>(() => [...(this.editor.shift()?.versions ?? [])].sort((a, b) => b.number - a.number)[0] ?? null);
  protected readonly held = computed(() => {
    const answer = this.editor.answer();
    return answer ? heldTasks(answer) : [];
  });
  /** Held tasks a basis would open. */
  protected readonly undecided = computed(() => this.held().filter((task) => task.silicaBasis === 'held'));
  protected readonly undecidedNames = computed(() => listed(this.undecided().map((task, index) => (index === 0 ? task.name.en : task.name.en.toLowerCase()))).en);
  protected readonly openLines = computed(() => {
    const answer = this.editor.answer();
    return answer ? openLines(answer) : [];
  });
  protected readonly metLines = computed(() => {
    const answer = this.editor.answer();
    return answer ? metLines(answer) : [];
  });
  protected readonly isPublished = computed(() => this.newest() !== null && !this.editor.hasUnpublishedChanges());
  protected readonly publishLabel = computed(() => publishLabel(this.held().length, this.newest()?.number ?? null));
  protected readonly nameOf = computed(() => namesFor(this.editor.shift(), this.around.things()));
  protected readonly differences = computed(() => {
    const [mine, theirs] = [this.editor.plan(), this.editor.theirs()];
    return mine && theirs ? planDifferences(mine, theirs.plan, this.nameOf()) : [];
  });
  protected readonly saveTrouble = computed(() => {
    const problem = this.editor.problem();
    if (!problem || this.editor.saveState() !== 'failed') return '';
    return [problemWords(problem), ...(problem.errors ?? []).map(({ message }) => message)].join(' ');
  });
  protected readonly owners = computed(() => this.around.things().people.filter(({ isActive }) => isActive));

  constructor() {
    effect(() => {
      const id = this.shiftId();
      untracked(() => {
        void this.editor.load(id);
        void this.around.load(id);
      });
    });
    effect(() => {
      this.editor.knownPeople.set(this.around.things().people);
      this.editor.knownEquipment.set(this.around.things().equipment);
    });
    effect(() => {
      const shift = this.editor.shift();
      if (shift) this.title.setTitle(`${shift.job.name}, ${dayName(shift.date)}, Kneeboard`);
    });
  }

  async mayLeave(): Promise<boolean> {
    return (await this.editor.flush()) || window.confirm('Not everything is saved. Leave this shift and lose the last changes?');
  }

  protected warnOfUnsaved(event: BeforeUnloadEvent): void {
    if (this.editor.isUnsaved()) event.preventDefault();
  }

  protected print(): void {
    window.print();
  }

  protected reload(): void {
    void this.editor.load(this.shiftId());
    void this.around.load(this.shiftId());
  }

  protected setRate(item: StatedRate['item'], rate: StatedRate | null): void {
    this.editor.change((plan) => setRate(plan, item, rate));
  }

  protected async changeFacts(): Promise<void> {
    if (!this.job.hasValue() || !(await this.editor.flush())) return;
    const saved = await firstValueFrom(this.dialogs.open<FactsDialog, Job, Job>(FactsDialog, { data: this.job.value(), width: '56rem', maxWidth: '96vw' }).afterClosed());
    if (!saved) return;
    this.job.reload();
    await this.editor.load(this.shiftId());
  }

  protected async decide(taskId: string): Promise<void> {
    const shift = this.editor.shift();
    const task = this.editor.plan()?.tasks.find(({ id }) => id === taskId);
    const answer = this.held().find((held) => held.taskId === taskId);
    if (!shift || !task || !answer || !(await this.editor.flush())) return;
    const data: BasisQuestion = { shiftId: shift.id, date: shift.date, taskKind: task.kind, taskName: answer.name.en };
    const signed = await firstValueFrom(this.dialogs.open<SignBasisDialog, BasisQuestion, Shift>(SignBasisDialog, { data, width: '38rem', maxWidth: '96vw' }).afterClosed());
    if (signed) this.editor.take(signed);
  }

  protected async publish(): Promise<void> {
    if (!(await this.editor.flush())) return;
    const shift = this.editor.shift();
    if (!shift) return;
    const newest = this.newest();
    const data: PublishQuestion = {
      shiftId: shift.id,
      version: shift.version,
      day: dayName(shift.date),
      nextNumber: (newest?.number ?? 0) + 1,
      asked: shift.plan.personIds.map(this.nameOf()),
      signedBefore: newest?.asked.filter(({ state }) => state === 'signed').length ?? 0,
      held: this.held(),
      holding: this.openLines().filter(({ isHolding, taskId }) => isHolding && taskId === null),
      label: this.publishLabel(),
    };
    const published = await firstValueFrom(this.dialogs.open<PublishDialog, PublishQuestion, PublishedVersion>(PublishDialog, { data, width: '38rem', maxWidth: '96vw' }).afterClosed());
    if (published) this.reload();
  }
}
