import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { type JobSummary } from '#shared/jobs';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';
import { State, type StateKind } from '#ui/state';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { dayShort } from '../../pieces/dates';
import { SearchField } from '../../pieces/search-field';
import { Unready } from '../../pieces/unready';
import { JobsApi, type JobFilter } from '../jobs-api';

/** Every job with its newest shift; the filter stands in the address. */
@Component({
  selector: 'kb-job-list',
  imports: [Empty, MatButton, PageHeader, RouterLink, SearchField, State, Unready],
  templateUrl: './job-list.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobList {
  private readonly api = inject(JobsApi);
  private readonly router = inject(Router);
  private readonly access = inject(Access);

  readonly q = input('', { transform: (value: string | undefined) => value ?? '' });
  readonly show = input<'open' | 'closed' | 'all', string | undefined>('open', { transform: (value) => (value === 'closed' || value === 'all' ? value : 'open') });

  private readonly filter = computed<JobFilter>(() => ({ q: this.q(), isOpen: this.show() === 'all' ? '' : this.show() === 'open' ? 'true' : 'false' }));
  protected readonly jobs = new PagedList(this.filter, (filter: JobFilter, after) => this.api.list(filter, after));
  protected readonly mayAdd = computed(() => this.access.may('addJob'));
  protected readonly shows = ['open', 'closed', 'all'] as const;
  protected readonly dayShort = dayShort;

  protected search(q: string): void {
    void this.router.navigate([], { queryParams: { q: q || null }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  /** Signing of the newest shift, in words. */
  protected signing({ latestShift: shift }: JobSummary): { readonly kind: StateKind; readonly words: string } {
    if (!shift) return { kind: 'plain', words: 'no shift yet' };
    if (shift.openActions > 0) return { kind: 'stop', words: shift.openActions === 1 ? '1 open action' : `${shift.openActions} open actions` };
    if (shift.publishedVersion === null) return { kind: 'plain', words: 'not published' };
    return { kind: shift.signed < shift.asked ? 'caution' : 'done', words: `${shift.signed} of ${shift.asked} signed` };
  }
}
