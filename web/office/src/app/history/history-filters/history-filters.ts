import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { firstValueFrom, forkJoin } from 'rxjs';
import { acknowledgementKinds } from '#shared/acknowledgements';
import { type JobSummary } from '#shared/jobs';
import { type Person } from '#shared/people';
import { allPages } from '../../contract/all-pages';
import { JobsApi } from '../../jobs/jobs-api';
import { PeopleApi } from '../../people/people-api';
import { type HistoryFilter } from '../history-api';
import { kindNames } from '../history-words';

/** Job, person, days and kind. Emits what changed; `null` takes a filter away. */
@Component({
  selector: 'kb-history-filters',
  template: `
    <div><label for="history-job">Job</label><select class="kb-field" id="history-job" (change)="changed.emit({ jobId: $any($event.target).value || null })">
        <option value="">all</option>
        @for (job of jobs(); track job.id) {
          <option [value]="job.id" [selected]="job.id === filter().jobId">{{ job.name }}</option>
        }
      </select></div>
    <div><label for="history-person">Person</label><select class="kb-field" id="history-person" (change)="changed.emit({ personId: $any($event.target).value || null })">
        <option value="">all</option>
        @for (person of people(); track person.id) {
          <option [value]="person.id" [selected]="person.id === filter().personId">{{ person.name }}</option>
        }
      </select></div>
    <div><label for="history-from">From</label><input class="kb-field" id="history-from" type="date" [value]="filter().from ?? ''" [max]="filter().to ?? ''" (change)="changed.emit({ from: $any($event.target).value || null })" /></div>
    <div><label for="history-to">To</label><input class="kb-field" id="history-to" type="date" [value]="filter().to ?? ''" [min]="filter().from ?? ''" (change)="changed.emit({ to: $any($event.target).value || null })" /></div>
    <div><label for="history-kind">Kind</label><select class="kb-field" id="history-kind" (change)="changed.emit({ kind: $any($event.target).value || null })">
        <option value="">all</option>
        @for (kind of kinds; track kind) {
          <option [value]="kind" [selected]="kind === filter().kind">{{ kindNames[kind] }}</option>
        }
      </select></div>
    @if (isFiltered()) {
      <button type="button" class="kb-link" (click)="changed.emit(none)">Show everything</button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem 1rem;
      align-items: end;
    }

    label {
      display: block;
      font-size: var(--kb-small);
      color: var(--kb-ink-2);
      margin-bottom: 3px;
    }

    select {
      max-width: 12rem;
    }

    .kb-link {
      margin-bottom: 6px;
    }

    @media (max-width: 700px) {
      :host {
        display: grid;
        grid-template-columns: repeat(2, minmax(0, 1fr));
      }

      .kb-field {
        width: 100%;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HistoryFilters {
  private readonly jobsApi = inject(JobsApi);
  private readonly peopleApi = inject(PeopleApi);

  readonly filter = input.required<HistoryFilter>();
  readonly changed = output<Partial<Record<keyof HistoryFilter, string | null>>>();

  protected readonly jobs = signal<readonly JobSummary[]>([]);
  protected readonly people = signal<readonly Person[]>([]);
  protected readonly kinds = acknowledgementKinds;
  protected readonly kindNames = kindNames;
  protected readonly none = { jobId: null, personId: null, from: null, to: null, kind: null };
  protected readonly isFiltered = computed(() => Object.values(this.filter()).some((value) => value !== undefined));

  constructor() {
    void this.load();
  }

  /** Without the lists the page still filters by its address; the list itself says when the server is away. */
  private async load(): Promise<void> {
    try {
      const { jobs, people } = await firstValueFrom(forkJoin({ jobs: allPages((after) => this.jobsApi.list({ q: '', isOpen: '' }, after)), people: this.peopleApi.all() }));
      this.jobs.set(jobs);
      this.people.set(people);
    } catch {
      return;
    }
  }
}
