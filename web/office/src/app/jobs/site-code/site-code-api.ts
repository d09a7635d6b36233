import { httpResource } from '@angular/common/http';
import { inject, Injectable, type Signal } from '@angular/core';
import { type Observable } from 'rxjs';
import { type SiteCode } from '#shared/library';
import { ContractClient } from '../../contract/contract-client';
import { answerOf, requestOf } from '../../contract/contract-request';

/** The printed code of a job. Its address is answered once, when it is made. */
@Injectable({ providedIn: 'root' })
export class SiteCodeApi {
  private readonly client = inject(ContractClient);

  /** Reads nothing while there is no job. */
  codeResource(jobId: Signal<string | undefined>) {
    return httpResource<SiteCode>(
      () => {
        const id = jobId();
        return id === undefined ? undefined : requestOf('readSiteCode', { params: { jobId: id } });
      },
      { parse: answerOf('readSiteCode') },
    );
  }

  make(jobId: string): Observable<SiteCode> {
    return this.client.call('makeSiteCode', { params: { jobId } });
  }

  revoke(jobId: string): Observable<SiteCode> {
    return this.client.call('revokeSiteCode', { params: { jobId } });
  }
}
