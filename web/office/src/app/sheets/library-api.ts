import { httpResource } from '@angular/common/http';
import { inject, Injectable, type Signal } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { type AppliedRevision, type AskSupplier, type LibraryPolicy, type LibraryTask, type ProductUse, type Reach, type ReturnSheet, type SheetRequest, type SheetReturnDraft } from '#shared/library';
import type * as z from 'zod';
import { ContractClient } from '../contract/contract-client';
import { answerOf, requestOf } from '../contract/contract-request';

/** Keeping the library current: what a revision reaches, what to do next, requests to suppliers, where products were used. */
@Injectable({ providedIn: 'root' })
export class LibraryApi {
  private readonly client = inject(ContractClient);

  /** Reads nothing while there is no revision, and again with each of its versions. */
  reachResource(revision: Signal<{ readonly id: string; readonly version: number } | undefined>) {
    return httpResource<Reach>(
      () => {
        const id = revision()?.id;
        return id === undefined ? undefined : requestOf('readReach', { params: { revisionId: id } });
      },
      { parse: answerOf('readReach') },
    );
  }

  apply(revisionId: string): Observable<AppliedRevision> {
    return this.client.call('applyRevision', { params: { revisionId } });
  }

  tasks(after?: string): Observable<Page<LibraryTask>> {
    return this.client.call('listLibraryTasks', { query: { after } });
  }

  policy(): Observable<LibraryPolicy> {
    return this.client.call('readLibraryPolicy', {});
  }

  setPolicy(policy: LibraryPolicy): Observable<LibraryPolicy> {
    return this.client.call('setLibraryPolicy', { body: policy });
  }

  requests(filter: { readonly productId?: string | undefined; readonly revisionId?: string | undefined; readonly state?: SheetRequest['state'] | undefined }, after?: string): Observable<Page<SheetRequest>> {
    return this.client.call('listRequests', { query: { ...filter, after } });
  }

  ask(request: z.input<typeof AskSupplier>): Observable<SheetRequest> {
    return this.client.call('askSupplier', { body: request });
  }

  draftReturn(revisionId: string): Observable<SheetReturnDraft> {
    return this.client.call('draftReturn', { params: { revisionId } });
  }

  returnSheet(revisionId: string, version: number, sheet: ReturnSheet): Observable<SheetRequest> {
    return this.client.call('returnSheet', { params: { revisionId }, version, body: sheet });
  }

  withdraw(requestId: string): Observable<SheetRequest> {
    return this.client.call('withdrawRequest', { params: { requestId } });
  }

  uses(productId: string, after?: string): Observable<Page<ProductUse>> {
    return this.client.call('listProductUses', { query: { productId, after } });
  }
}
