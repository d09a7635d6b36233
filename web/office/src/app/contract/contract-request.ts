import { HttpParams } from '@angular/common/http';
import type * as z from 'zod';
import { endpoints, type Endpoint, type EndpointName } from '#shared/endpoints';

type Row<N extends EndpointName> = (typeof endpoints)[N];
type ParamNames<Path extends string> = Path extends `${string}:${infer Name}/${infer Rest}` ? Name | ParamNames<`/${Rest}`> : Path extends `${string}:${infer Name}` ? Name : never;

/** What the contract wants of a call: path parameters, query and body by the names of its own schemas. */
export type CallOf<N extends EndpointName> = ([ParamNames<Row<N>['path']>] extends [never] ? { params?: never } : { params: Readonly<Record<ParamNames<Row<N>['path']>, string>> }) &
  (Row<N> extends { query: infer Q extends z.ZodType } ? { query?: Partial<z.input<Q>> } : { query?: never }) &
  (Row<N> extends { body: infer B extends z.ZodType } ? { body: z.input<B> } : { body?: never }) &
  (Row<N> extends { needsVersion: true } ? { version: number } : { version?: never });

export type AnswerOf<N extends EndpointName> = Row<N> extends { answer: infer A extends z.ZodType } ? z.infer<A> : void;

interface LooseCall {
  readonly params?: Readonly<Record<string, string>>;
  readonly query?: Readonly<Record<string, unknown>>;
  readonly body?: unknown;
  readonly version?: number;
}

/** The path of a contract row with its parameters filled in and escaped. */
export function pathOf(name: EndpointName, params: Readonly<Record<string, string>> = {}): string {
  return endpoints[name].path.replace(/:(\w+)/g, (_whole, key: string) => {
    const value = params[key];
    if (value === undefined) throw new Error(`${name} needs ${key}`);
    return encodeURIComponent(value);
  });
}

/** Query as HTTP parameters: empty and missing values are left out, because "no filter" is not a filter. */
export function paramsOf(query: Readonly<Record<string, unknown>> = {}): HttpParams {
  return Object.entries(query).reduce((params, [key, value]) => (value === undefined || value === null || value === '' ? params : params.set(key, String(value))), new HttpParams());
}

/** What Angular needs to send a request; fits both its client and its resources. */
interface ContractRequest {
  readonly url: string;
  readonly method: string;
  readonly params: HttpParams;
  readonly body?: unknown;
  readonly headers: Record<string, string>;
}

/** One request as Angular sends it. An edit carries the version it saw. */
export function requestOf<N extends EndpointName>(name: N, call: CallOf<N>): ContractRequest {
  const { params, query, body, version } = call as LooseCall;
  return {
    url: pathOf(name, params),
    method: endpoints[name].method,
    params: paramsOf(query),
    ...(body === undefined ? {} : { body }),
    headers: version === undefined ? {} : { 'If-Match': `"${version}"` },
  };
}

/** Checks an answer against the contract, so that drift is a clear message and not `undefined` on a page. */
export function answerOf<N extends EndpointName>(name: N): (raw: unknown) => AnswerOf<N> {
  const { answer }: Endpoint = endpoints[name];
  return (raw) => (typeof answer === 'string' ? undefined : answer.parse(raw)) as AnswerOf<N>;
}
