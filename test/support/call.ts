import { expect } from '@jest/globals';
import { type Response } from 'superagent';
import type supertest from 'supertest';
import type * as z from 'zod';
import { endpoints, type Endpoint, type EndpointName } from '#shared/endpoints';

export type Agent = ReturnType<typeof supertest.agent>;
export interface CallInput {
  readonly params?: Readonly<Record<string, string>>;
  readonly query?: Readonly<Record<string, string | number>>;
  readonly body?: unknown;
  readonly file?: { readonly bytes: Uint8Array; readonly fileName: string };
  readonly headers?: Readonly<Record<string, string>>;
  /** Sent as If-Match. */
  readonly version?: number | undefined;
}
type AnswerOf<N extends EndpointName> = (typeof endpoints)[N]['answer'] extends infer A ? (A extends z.ZodType ? z.output<A> : A extends 'bytes' ? Buffer : undefined) : never;

/** The address of a row of the contract with its parameters filled in. */
export function pathOf(name: EndpointName, params: Readonly<Record<string, string>> = {}): string {
  return endpoints[name].path.replace(/:(\w+)/g, (_, param: string) => encodeURIComponent(params[param] ?? `no-${param}`));
}

/** Calls one row of the contract and gives back whatever came. */
export async function call(agent: Agent, name: EndpointName, input: CallInput = {}): Promise<Response> {
  const endpoint: Endpoint = endpoints[name];
  const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'put' | 'delete';
  let request = agent[method](pathOf(name, input.params));
  if (input.headers) request = request.set({ ...input.headers });
  if (input.query) request = request.query(input.query);
  if (input.version !== undefined) request = request.set('If-Match', `"${input.version}"`);
  if (endpoint.answer === 'bytes') request = request.buffer(true).parse(collect);
  if (input.file) return request.attach('file', Buffer.from(input.file.bytes), input.file.fileName);
  return input.body === undefined ? request : request.send(input.body as object);
}

/** Bytes as they came; problems are still JSON. */
function collect(response: { on(event: string, listener: (piece: Buffer) => void): unknown; headers?: Record<string, string> }, done: (error: Error | null, body: unknown) => void): void {
  const pieces: Buffer[] = [];
  response.on('data', (piece) => pieces.push(piece));
  response.on('end', () => {
    const bytes = Buffer.concat(pieces);
    done(null, response.headers?.['content-type']?.startsWith('application/problem+json') ? JSON.parse(bytes.toString()) : bytes);
  });
}

/** Calls, expects success, and gives the answer as the contract's own schema reads it. */
export async function ok<N extends EndpointName>(agent: Agent, name: N, input: CallInput = {}): Promise<AnswerOf<N>> {
  const response = await call(agent, name, input);
  if (response.status >= 300) throw new Error(`${name} answered ${response.status}: ${JSON.stringify(response.body)}`);
  return readAnswer(name, response);
}

export function readAnswer<N extends EndpointName>(name: N, response: Response): AnswerOf<N> {
  const { answer }: Endpoint = endpoints[name];
  if (answer === 'nothing') {
    expect(response.status).toBe(204);
    return undefined as AnswerOf<N>;
  }
  if (answer === 'bytes') return response.body as AnswerOf<N>;
  const parsed = answer.safeParse(response.body);
  if (!parsed.success) throw new Error(`${name} does not keep its contract: ${JSON.stringify(parsed.error.issues)}`);
  return parsed.data as AnswerOf<N>;
}

/** Expects a problem in the form of RFC 9457 with this status, and gives it back. */
export function expectProblem(response: Response, status: number): { title: string; detail: string; errors: { path: string; message: string }[]; current?: unknown; [extra: string]: unknown } {
  expect({ status: response.status, body: response.body }).toMatchObject({ status, body: { status, type: expect.any(String), title: expect.any(String), detail: expect.any(String) } });
  expect(response.headers['content-type']).toMatch(/^application\/problem\+json/);
  return { errors: [], ...response.body };
}
