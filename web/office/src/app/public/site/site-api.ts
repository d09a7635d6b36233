import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type SitePage } from '#shared/library';
import { ContractClient } from '../../contract/contract-client';
import { pathOf } from '../../contract/contract-request';

/** What a job's printed code opens. The secret goes in the body or a header, never in an address. */
@Injectable({ providedIn: 'root' })
export class SiteApi {
  private readonly client = inject(ContractClient);
  private readonly http = inject(HttpClient);

  open(token: string): Observable<SitePage> {
    return this.client.call('openSite', { body: { token } });
  }

  sheet(token: string, revisionId: string): Observable<ArrayBuffer> {
    return this.http.get(pathOf('readSiteSheet', { revisionId }), { headers: { 'X-Kneeboard-Link': token }, responseType: 'arraybuffer' });
  }
}
