import { HttpClient, HttpEventType } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { filter, map, type Observable } from 'rxjs';
import { type Page } from '#shared/common';
import { ZipOutcome } from '#shared/library';
import { UploadedSheet, type ConfirmSheet, type Revision, type RevisionSummary, type SheetEdit } from '#shared/sheets';
import { ContractClient } from '../contract/contract-client';
import { pathOf } from '../contract/contract-request';

export type RevisionState = RevisionSummary['state'];

/** How far one upload is: sent of total, then the server's answer. */
export type UploadStep = { readonly percent: number } | { readonly uploaded: UploadedSheet } | { readonly unpacked: ZipOutcome };

/** Safety data sheets: the files, what was read from them, what a person confirmed. */
@Injectable({ providedIn: 'root' })
export class SheetsApi {
  private readonly client = inject(ContractClient);
  private readonly http = inject(HttpClient);

  ofProduct(productId: string, after?: string): Observable<Page<RevisionSummary>> {
    return this.client.call('listSheets', { query: { productId, after } });
  }

  list(state: RevisionState, q: string, after?: string): Observable<Page<RevisionSummary>> {
    return this.client.call('listSheets', { query: { state, q: q || undefined, after } });
  }

  upload(file: File): Observable<UploadStep> {
    return this.sendFile('uploadSheet', file, (answer) => ({ uploaded: UploadedSheet.parse(answer) }));
  }

  /** Each file inside goes the way of a single upload. */
  uploadZip(file: File): Observable<UploadStep> {
    return this.sendFile('uploadZip', file, (answer) => ({ unpacked: ZipOutcome.parse(answer) }));
  }

  private sendFile(name: 'uploadSheet' | 'uploadZip', file: File, stepOf: (answer: unknown) => UploadStep): Observable<UploadStep> {
    const body = new FormData();
    body.append('file', file, file.name);
    return this.http.post(pathOf(name), body, { reportProgress: true, observe: 'events' }).pipe(
      map((event): UploadStep | null => {
        if (event.type === HttpEventType.UploadProgress) return { percent: event.total ? Math.round((100 * event.loaded) / event.total) : 0 };
        return event.type === HttpEventType.Response ? stepOf(event.body) : null;
      }),
      filter((step) => step !== null),
    );
  }

  read(revisionId: string): Observable<Revision> {
    return this.client.call('readRevision', { params: { revisionId } });
  }

  fileHref(revisionId: string): string {
    return this.client.hrefOf('readRevisionFile', { revisionId });
  }

  save(revisionId: string, fields: SheetEdit, version: number): Observable<Revision> {
    return this.client.call('saveRevision', { params: { revisionId }, body: fields, version });
  }

  confirm(revisionId: string, fields: SheetEdit, product: ConfirmSheet['product'], version: number): Observable<Revision> {
    return this.client.call('confirmRevision', { params: { revisionId }, body: { fields, product }, version });
  }

  setAside(revisionId: string, version: number): Observable<Revision> {
    return this.client.call('setRevisionAside', { params: { revisionId }, version });
  }

  takeBack(revisionId: string, version: number): Observable<Revision> {
    return this.client.call('takeRevisionBack', { params: { revisionId }, version });
  }

  readAgain(revisionId: string): Observable<Revision> {
    return this.client.call('readRevisionAgain', { params: { revisionId } });
  }
}
