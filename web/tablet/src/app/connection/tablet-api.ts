import { HttpClient, HttpErrorResponse } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { firstValueFrom, type Observable, timeout, TimeoutError } from 'rxjs';
import type * as z from 'zod';
import { Problem } from '#shared/common';
import { type CheckPin, type Deliveries, Receipts, TabletDay } from '#shared/envelopes';
import { PairedTablet } from '#shared/tablets';
import { Connection } from './connection';

/**
 * no-signal: nothing answered; no-answer: something answered, but not the service; not-paired: the tablet was withdrawn or never paired;
 * refused: the service answered no, with its reason.
 */
export type CallTrouble = 'no-signal' | 'no-answer' | 'not-paired' | 'refused';

/** A call to the office that did not do what was asked. */
export class CallFailed extends Error {
  constructor(
    readonly trouble: CallTrouble,
    readonly status: number,
    readonly problem: Problem | null,
  ) {
    super(`${trouble} (${status})`);
    this.name = 'CallFailed';
  }
}

// The service worker answers 504 by itself when there is no network: these calls go past it.
const headers = { 'ngsw-bypass': 'true' };

/** The only place that knows the tablet's addresses. Every call tells the connection how it went. */
@Injectable({ providedIn: 'root' })
export class TabletApi {
  private readonly http = inject(HttpClient);
  private readonly connection = inject(Connection);

  async pair(request: { readonly code: string }): Promise<PairedTablet> {
    return this.parse(PairedTablet, await this.call(this.http.post('/api/tablet/pairing', request, { headers }), 15_000));
  }

  async readDay(): Promise<TabletDay> {
    return this.parse(TabletDay, await this.call(this.http.get('/api/tablet/day', { headers }), 20_000));
  }

  async checkPin(request: CheckPin): Promise<void> {
    await this.call(this.http.post('/api/tablet/pin-checks', request, { headers }), 6_000);
  }

  async deliver(request: Deliveries): Promise<Receipts> {
    return this.parse(Receipts, await this.call(this.http.post('/api/tablet/deliveries', request, { headers }), 30_000));
  }

  async readSheetFile(revisionId: string): Promise<Uint8Array> {
    const bytes = await this.call(this.http.get(`/api/tablet/sheets/${encodeURIComponent(revisionId)}/file`, { headers, responseType: 'arraybuffer' }), 60_000);
    return new Uint8Array(bytes);
  }

  private async call<T>(request: Observable<T>, withinMs: number): Promise<T> {
    try {
      const answer = await firstValueFrom(request.pipe(timeout(withinMs)));
      this.connection.heard();
      return answer;
    } catch (error) {
      const failure = failureOf(error);
      if (failure.trouble === 'refused') this.connection.heard();
      else this.connection.lost(failure.trouble);
      throw failure;
    }
  }

  private parse<S extends z.ZodType>(schema: S, answer: unknown): z.infer<S> {
    const result = schema.safeParse(answer);
    if (result.success) return result.data;
    console.error(result.error);
    this.connection.lost('no-answer');
    throw new CallFailed('no-answer', 200, null);
  }
}

function failureOf(error: unknown): CallFailed {
  if (error instanceof TimeoutError) return new CallFailed('no-signal', 0, null);
  if (!(error instanceof HttpErrorResponse)) throw error;
  if (error.status === 0 || error.status === 504) return new CallFailed('no-signal', error.status, null);
  const problem = Problem.safeParse(error.error);
  if (error.status === 401) return new CallFailed('not-paired', 401, problem.data ?? null);
  return new CallFailed(error.status >= 500 || error.status === 200 ? 'no-answer' : 'refused', error.status, problem.data ?? null);
}
