import { inject, Injectable } from '@angular/core';
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

/**
 * The only place that knows the tablet's addresses. Every call tells the connection how it went. By fetch and not HttpClient:
 * five calls, all of them promises, are not worth 6 kB of Brotli on a weak signal.
 */
@Injectable({ providedIn: 'root' })
export class TabletApi {
  private readonly connection = inject(Connection);

  pair(request: { readonly code: string }): Promise<PairedTablet> {
    return this.call('/api/tablet/pairing', 15_000, (answer) => this.parse(PairedTablet, answer), request);
  }

  readDay(): Promise<TabletDay> {
    return this.call('/api/tablet/day', 20_000, (answer) => this.parse(TabletDay, answer));
  }

  checkPin(request: CheckPin): Promise<void> {
    return this.call('/api/tablet/pin-checks', 6_000, () => Promise.resolve(), request);
  }

  deliver(request: Deliveries): Promise<Receipts> {
    return this.call('/api/tablet/deliveries', 30_000, (answer) => this.parse(Receipts, answer), request);
  }

  readSheetFile(revisionId: string): Promise<ArrayBuffer> {
    return this.call(`/api/tablet/sheets/${encodeURIComponent(revisionId)}/file`, 60_000, (answer) => answer.arrayBuffer());
  }

  /** @throws CallFailed, nothing else */
  private async call<T>(path: string, withinMs: number, read: (answer: Response) => Promise<T>, body?: unknown): Promise<T> {
    try {
      const result = await this.ask(path, withinMs, read, body);
      this.connection.heard();
      return result;
    } catch (error) {
      // A network that broke off, at the first byte or in the middle of the answer.
      const failure = error instanceof CallFailed ? error : new CallFailed('no-signal', 0, null);
      if (failure.trouble === 'refused') this.connection.refused();
      else this.connection.lost(failure.trouble);
      throw failure;
    }
  }

  private async ask<T>(path: string, withinMs: number, read: (answer: Response) => Promise<T>, body: unknown): Promise<T> {
    const answer = await fetch(path, {
      method: body === undefined ? 'GET' : 'POST',
      // The service worker answers 504 by itself when there is no network: these calls go past it.
      headers: { 'ngsw-bypass': 'true', ...(body === undefined ? {} : { 'content-type': 'application/json' }) },
      body: body === undefined ? null : JSON.stringify(body),
      cache: 'no-store',
      signal: AbortSignal.timeout(withinMs),
    });
    if (answer.ok) return read(answer);
    const problem = Problem.safeParse(await answer.json().catch(() => null)).data ?? null;
    if (answer.status === 401) throw new CallFailed('not-paired', 401, problem);
    if (answer.status === 504) throw new CallFailed('no-signal', 504, null);
    throw new CallFailed(answer.status >= 500 ? 'no-answer' : 'refused', answer.status, problem);
  }

  /** An answer that is not what the contract says comes from a page in between (a hotel's sign-in) or a newer service. */
  private async parse<S extends z.ZodType>(schema: S, answer: Response): Promise<z.infer<S>> {
    const text = await answer.text();
    try {
      return schema.parse(JSON.parse(text));
    } catch (error) {
      console.error(error);
      throw new CallFailed('no-answer', answer.status, null);
    }
  }
}
