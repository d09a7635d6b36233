import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type CorrectiveAction } from '#shared/actions';
import { allPages } from '../contract/all-pages';
import { ContractClient } from '../contract/contract-client';

/** Corrective actions: opened by a "No", closed by evidence. */
@Injectable({ providedIn: 'root' })
export class ActionsApi {
  private readonly client = inject(ContractClient);

  ofShift(shiftId: string): Observable<readonly CorrectiveAction[]> {
    return allPages((after) => this.client.call('listActions', { query: { shiftId, after, limit: 100 } }));
  }

  open(): Observable<readonly CorrectiveAction[]> {
    return allPages((after) => this.client.call('listActions', { query: { state: 'open', after, limit: 100 } }));
  }

  assign(action: CorrectiveAction, ownerPersonId: string): Observable<CorrectiveAction> {
    return this.client.call('assignAction', { params: { actionId: action.id }, body: { ownerPersonId }, version: action.version });
  }

  resolve(action: CorrectiveAction, evidence: string): Observable<CorrectiveAction> {
    return this.client.call('resolveAction', { params: { actionId: action.id }, body: { evidence }, version: action.version });
  }
}
