import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { map, type Observable } from 'rxjs';
import { type EndpointName } from '#shared/endpoints';
import { answerOf, requestOf, type AnswerOf, type CallOf } from './contract-request';

/** Calls a row of the contract by its name; the answer is parsed by the row's own schema. */
@Injectable({ providedIn: 'root' })
export class ContractClient {
  private readonly http = inject(HttpClient);

  call<N extends EndpointName>(name: N, call: CallOf<N>): Observable<AnswerOf<N>> {
    const { method, url, params, body, headers } = requestOf(name, call);
    return this.http.request(method ?? 'GET', url, { params, body, headers }).pipe(map(answerOf(name)));
  }
}
