import { inject, Injectable } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Acknowledgement, type HistoryPage, type HistoryQuery, type RecordCheck } from '#shared/acknowledgements';
import { ContractClient } from '../contract/contract-client';

export type HistoryFilter = Pick<HistoryQuery, 'jobId' | 'personId' | 'from' | 'to' | 'kind'>;

/** What was acknowledged, and the record that proves it. */
@Injectable({ providedIn: 'root' })
export class HistoryApi {
  private readonly client = inject(ContractClient);

  list(filter: HistoryFilter, after?: string): Observable<HistoryPage> {
    return this.client.call('listHistory', { query: { ...filter, after } });
  }

  read(acknowledgementId: string): Observable<Acknowledgement> {
    return this.client.call('readAcknowledgement', { params: { acknowledgementId } });
  }

  checkRecord(): Observable<RecordCheck> {
    return this.client.call('checkRecord', {});
  }

  /** The whole result of a filter as CSV. */
  csvHref(filter: HistoryFilter): string {
    return this.client.hrefOf('exportHistory', {}, filter);
  }

  recordHref(): string {
    return this.client.hrefOf('exportRecord');
  }

  receiptHref(acknowledgementId: string): string {
    return this.client.hrefOf('exportEntry', { acknowledgementId });
  }
}
