import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type Job, type JobSummary } from '#shared/jobs';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords } from '#ui/problem';
import { State, type StateKind } from '#ui/state';
import { Access } from '../../contract/access';
import { dayName, daysAfter, localDateOf } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { FactsDialog } from '../job-form/facts-dialog';
import { floorWords, jurisdictionName, settingWords } from '../job-form/site-words';
import { JobsApi } from '../jobs-api';
import { SiteCodeLine } from '../site-code/site-code-line';

type ShiftLine = NonNullable<JobSummary['latestShift']>;

/** One job: what is known of the place, and its shifts by date. */
@Component({
  selector: 'kb-job-page',
  imports: [Empty, MatButton, Note, PageHeader, RouterLink, SiteCodeLine, State, Unready],
  templateUrl: './job-page.html',
  styleUrl: './job-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobPage {
  private readonly api = inject(JobsApi);
  private readonly access = inject(Access);
  private readonly router = inject(Router);
  private readonly dialogs = inject(MatDialog);
  private readonly title = inject(Title);

  readonly jobId = input.required<string>();

  protected readonly job = this.api.jobResource(this.jobId);
  protected readonly mayEdit = computed(() => this.access.may('editJob'));
  protected readonly mayAddShift = computed(() => this.access.may('addShift'));
  protected readonly isAdding = signal(false);
  protected readonly refusal = signal('');
  protected readonly dayName = dayName;

  protected readonly kicker = computed(() => {
    const job = this.job.hasValue() ? this.job.value() : null;
    return job ? [job.siteName, jurisdictionName(job.jurisdictionId), settingWords(job.site), floorWords(job.site)].filter(Boolean).join(' · ') : 'Jobs';
  });
  protected readonly shifts = computed(() => (this.job.hasValue() ? [...this.job.value().shifts].sort((a, b) => b.date.localeCompare(a.date)) : []));
  /** Today at the site, or the day after the newest shift when today is taken. */
  protected readonly proposedDate = computed(() => {
    const today = localDateOf(new Date(), this.job.hasValue() ? this.job.value().timeZone : undefined);
    const newest = this.shifts()[0]?.date;
    return newest !== undefined && newest >= today ? daysAfter(newest, 1) : today;
  });

  constructor() {
    effect(() => {
      if (this.job.hasValue()) this.title.setTitle(`${this.job.value().name}, Kneeboard`);
    });
  }

  protected signing(shift: ShiftLine): { readonly kind: StateKind; readonly words: string } {
    if (shift.openActions > 0) return { kind: 'stop', words: shift.openActions === 1 ? '1 open action' : `${shift.openActions} open actions` };
    if (shift.publishedVersion === null) return { kind: 'plain', words: 'not published' };
    return { kind: shift.signed < shift.asked ? 'caution' : 'done', words: `${shift.signed} of ${shift.asked} signed` };
  }

  protected async addShift(date: string, copyFromShiftId: string | null): Promise<void> {
    if (this.isAdding() || !date) return;
    this.isAdding.set(true);
    this.refusal.set('');
    try {
      const shift = await firstValueFrom(this.api.addShift(this.jobId(), date, copyFromShiftId));
      await this.router.navigate(['/jobs', this.jobId(), 'shifts', shift.id]);
    } catch (error) {
      const problem = problemOf(error);
      this.refusal.set([problemWords(problem), ...(problem.errors ?? []).map(({ message }) => message)].join(' '));
    } finally {
      this.isAdding.set(false);
    }
  }

  protected async changeFacts(job: Job): Promise<void> {
    const saved = await firstValueFrom(this.dialogs.open<FactsDialog, Job, Job>(FactsDialog, { data: job, width: '56rem', maxWidth: '96vw' }).afterClosed());
    if (saved) this.job.reload();
  }
}
