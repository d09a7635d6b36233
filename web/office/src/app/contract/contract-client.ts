import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { map, type Observable } from 'rxjs';
import { type EndpointName } from '#shared/endpoints';
import { answerOf, paramsOf, pathOf, requestOf, type AnswerOf, type CallOf } from './contract-request';

/** Calls a row of the contract by its name; the answer is parsed by the row's own schema. */
@Injectable({ providedIn: 'root' })
export class ContractClient {
  private readonly http = inject(HttpClient);

  call<N extends EndpointName>(name: N, call: CallOf<N>): Observable<AnswerOf<N>> {
    const { method, url, params, body, headers } = requestOf(name, call);
    return this.http.request(method, url, { params, body, headers }).pipe(map(answerOf(name)));
  }

  /** A row that answers bytes, as it came. */
  bytes(name: EndpointName, params: Readonly<Record<string, string>>): Observable<ArrayBuffer> {
    return this.http.get(pathOf(name, params), { responseType: 'arraybuffer' });
  }

  /** The address of a row that answers bytes, for a link: a download never passes through this page. */
  hrefOf(name: EndpointName, params: Readonly<Record<string, string>> = {}, query: Readonly<Record<string, unknown>> = {}): string {
    const text = paramsOf(query).toString();
    return text === '' ? pathOf(name, params) : `${pathOf(name, params)}?${text}`;
  }
}
