import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type Problem, roleNames } from '#shared/common';
import { type Person } from '#shared/people';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';
import { problemOf } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { SearchField } from '../../pieces/search-field';
import { Unready } from '../../pieces/unready';
import { PeopleApi } from '../people-api';
import { PersonAccess } from '../person-access/person-access';
import { PersonEditor } from '../person-editor/person-editor';
import { PersonFacts } from '../person-facts/person-facts';

/** Everybody, with one person open beside the list. */
@Component({
  selector: 'kb-people-page',
  imports: [Empty, MatButton, PageHeader, PersonAccess, PersonEditor, PersonFacts, RouterLink, SearchField, State, Unready],
  templateUrl: './people-page.html',
  styleUrl: './people-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeoplePage {
  private readonly api = inject(PeopleApi);
  private readonly access = inject(Access);
  private readonly router = inject(Router);

  readonly personId = input<string>();
  readonly q = input('', { transform: (value: string | undefined) => value ?? '' });

  protected readonly people = new PagedList(this.q, (q: string, after) => this.api.list(q, after));
  protected readonly mayAdd = computed(() => this.access.may('addPerson'));
  protected readonly mayEdit = computed(() => this.access.may('editPerson'));
  protected readonly isNew = computed(() => this.personId() === 'new' && this.mayAdd());
  protected readonly person = signal<Person | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isEditing = signal(false);
  protected readonly roleNames = roleNames;

  constructor() {
    effect(() => {
      const id = this.personId();
      untracked(() => void this.open(id));
    });
  }

  /** What keeps a person from work, in a word; training and masks in one look. */
  protected gap(person: Person): string {
    if (!person.isActive || !this.isCrew(person)) return '';
    const gaps = [person.silicaTrainedOn === null ? 'silica training' : '', person.hazcomTrainedOn === null ? 'hazard training' : '', person.respirators.some(({ clearedOn, fitTestedOn }) => clearedOn && fitTestedOn) ? '' : 'fitted mask', person.isAdultConfirmed ? '' : 'age'];
    const open = gaps.filter(Boolean);
    return open.length === 0 ? '' : `not on file: ${open.join(', ')}`;
  }

  /** Who works on the floor: everybody without a sign-in, and the leads. */
  protected isCrew({ login }: Person): boolean {
    return login === null || login.role === 'crew-lead';
  }

  protected search(q: string): void {
    void this.router.navigate([], { queryParams: { q: q || null }, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected close(): void {
    void this.router.navigate(['/people'], { queryParamsHandling: 'preserve' });
  }

  protected async open(id: string | undefined): Promise<void> {
    this.isEditing.set(false);
    this.problem.set(null);
    if (this.person()?.id === id) return;
    this.person.set(null);
    if (id === undefined || id === 'new') return;
    try {
      const person = await firstValueFrom(this.api.read(id));
      if (this.personId() === id) this.person.set(person);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  protected take(person: Person): void {
    this.person.set(person);
    this.isEditing.set(false);
    this.people.items.update((people) => people.map((other) => (other.id === person.id ? person : other)));
  }

  protected async takeNew(person: Person): Promise<void> {
    this.person.set(person);
    this.people.reload();
    await this.router.navigate(['/people', person.id], { queryParamsHandling: 'preserve' });
  }
}
