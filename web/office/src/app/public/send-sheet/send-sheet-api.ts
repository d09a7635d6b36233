import { HttpClient, HttpEventType } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { filter, map, type Observable } from 'rxjs';
import { type OpenRequest } from '#shared/library';
import { ContractClient } from '../../contract/contract-client';
import { pathOf } from '../../contract/contract-request';

/** What a supplier's link opens, and the one answer it takes. */
@Injectable({ providedIn: 'root' })
export class SendSheetApi {
  private readonly client = inject(ContractClient);
  private readonly http = inject(HttpClient);

  open(token: string): Observable<OpenRequest> {
    return this.client.call('openRequest', { body: { token } });
  }

  /** Percent sent, then 'done'. */
  send(token: string, file: File): Observable<number | 'done'> {
    const body = new FormData();
    body.append('file', file, file.name);
    return this.http.post(pathOf('answerRequest'), body, { headers: { 'X-Kneeboard-Link': token }, reportProgress: true, observe: 'events' }).pipe(
      map((event) => {
        if (event.type === HttpEventType.UploadProgress) return event.total ? Math.round((100 * event.loaded) / event.total) : 0;
        return event.type === HttpEventType.Response ? ('done' as const) : null;
      }),
      filter((step) => step !== null),
    );
  }
}
