import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { type Person, type PersonEdit, type PinEvent, type SetLogin, type StartPin } from '#shared/people';
import { allPages } from '../contract/all-pages';
import { ContractClient } from '../contract/contract-client';

/** Everybody of the organisation. */
@Injectable({ providedIn: 'root' })
export class PeopleApi {
  private readonly client = inject(ContractClient);

  list(q: string, after?: string): Observable<Page<Person>> {
    return this.client.call('listPeople', { query: { q: q || undefined, after } });
  }

  all(): Observable<readonly Person[]> {
    return allPages((after) => this.client.call('listPeople', { query: { after, limit: 100 } }));
  }

  read(personId: string): Observable<Person> {
    return this.client.call('readPerson', { params: { personId } });
  }

  add(person: PersonEdit): Observable<Person> {
    return this.client.call('addPerson', { body: person });
  }

  edit(personId: string, person: PersonEdit, version: number): Observable<Person> {
    return this.client.call('editPerson', { params: { personId }, body: person, version });
  }

  setLogin(personId: string, login: SetLogin['login']): Observable<Person> {
    return this.client.call('setLogin', { params: { personId }, body: { login } });
  }

  giveStartPin(personId: string): Observable<StartPin> {
    return this.client.call('giveStartPin', { params: { personId } });
  }

  listPinEvents(personId: string | undefined, after?: string): Observable<Page<PinEvent>> {
    return this.client.call('listPinEvents', { query: { personId, after } });
  }

  resetPin(personId: string): Observable<Person> {
    return this.client.call('resetPin', { params: { personId } });
  }
}
