import { json, type Request, type Response, type Router } from 'express';
import type * as z from 'zod';
import { endpoints, type Endpoint, type EndpointName } from '#shared/endpoints';
import { ForbiddenError, InputError, KneeboardError, NotFoundError, SignedOutError } from '../errors';
import { type Actor, type PersonActor, type TabletActor } from './actor';

type Table = typeof endpoints;
type Parsed<T> = T extends z.ZodType ? z.output<T> : undefined;
type QueryOf<N extends EndpointName> = Table[N] extends { query: infer Q } ? Parsed<Q> : undefined;
type BodyOf<N extends EndpointName> = Table[N] extends { body: infer B } ? (B extends 'file' ? UploadedFile : Parsed<B>) : undefined;
type AnswerOf<N extends EndpointName> = Table[N]['answer'] extends z.ZodType ? z.input<Table[N]['answer']> : undefined;
type ActorOf<N extends EndpointName> = Table[N]['access'] extends 'public' ? null : Table[N]['access'] extends 'tablet' ? TabletActor : PersonActor;

type ParamsOf<P extends string> = P extends `${string}:${infer Name}/${infer Rest}` ? Record<Name, string> & ParamsOf<`/${Rest}`> : P extends `${string}:${infer Name}` ? Record<Name, string> : unknown;

/** A file on disk in the upload folder; the route's owner removes it. */
export interface UploadedFile {
  readonly path: string;
  readonly byteLength: number;
  readonly fileName: string;
}

export interface Call<N extends EndpointName> {
  readonly actor: ActorOf<N>;
  readonly params: ParamsOf<Table[N]['path']>;
  readonly query: QueryOf<N>;
  readonly body: BodyOf<N>;
  /** From If-Match; 0 where the contract asks for none. */
  readonly version: number;
  readonly request: Request;
  readonly response: Response;
}

/** Handlers return the answer; those whose answer is bytes write to `response` themselves. */
export type Handler<N extends EndpointName> = (call: Call<N>) => Promise<AnswerOf<N>>;

export interface Uploads {
  receive(request: Request, response: Response): Promise<UploadedFile>;
}

const parseJson = json({ limit: '1mb', strict: true });
const parseDeliveries = json({ limit: '21mb', strict: true });

/** Mounts one row of the contract: access, input, version, handler, answer; in this order, so that a stranger learns nothing from a refusal. */
export function mount<N extends EndpointName>(router: Router, name: N, handler: Handler<N>, uploads?: Uploads): void {
  const endpoint: Endpoint = endpoints[name];
  const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'put' | 'delete';
  router[method](endpoint.path, async (request, response) => {
    const actor = demandAccess(endpoint, request);
    for (const [param, value] of Object.entries(request.params)) demandParam(param, String(value));
    const query = endpoint.query ? parseWith(endpoint.query, request.query, 'The address') : undefined;
    const version = endpoint.needsVersion ? readVersion(request) : 0;
    const body = await readBody(endpoint, name, request, response, uploads);
    const answer = await handler({ actor, params: request.params, query, body, version, request, response } as Call<N>);
    if (endpoint.answer === 'bytes') return;
    if (endpoint.answer === 'nothing') response.status(204).end();
    else response.json(answer);
  });
}

function demandAccess({ access }: Endpoint, request: Request): Actor | null {
  if (access === 'public') return null;
  const actor = request.actor;
  if (access === 'tablet') {
    if (actor?.kind !== 'tablet') throw new SignedOutError('This tablet is not paired, or was withdrawn. Ask the office for a code. What waits to be sent stays on the tablet.');
    return actor;
  }
  if (actor?.kind !== 'person') throw new SignedOutError();
  if (!access.includes(actor.role)) throw new ForbiddenError('Your role cannot do this.');
  return actor;
}

const uuid = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;
function demandParam(param: string, value: string): void {
  if (param.endsWith('Id') && !uuid.test(value)) throw new NotFoundError('thing');
  if (param === 'language' && !/^(?:en|es)$/.test(value)) throw new NotFoundError('text');
}

function readVersion(request: Request): number {
  const sent = request.headers['if-match'];
  const found = /^"(\d{1,9})"$/.exec(sent ?? '');
  if (!found) throw new KneeboardError(428, 'Version missing', 'Send If-Match with the version you saw, in quotes, so that nobody’s change is lost.');
  return Number(found[1]);
}

async function readBody(endpoint: Endpoint, name: EndpointName, request: Request, response: Response, uploads: Uploads | undefined): Promise<unknown> {
  if (!endpoint.body) return undefined;
  if (endpoint.body === 'file') {
    if (!uploads) throw new Error(`${name} takes a file but was mounted without uploads`);
    return uploads.receive(request, response);
  }
  await new Promise<void>((resolve, reject) => (name === 'deliver' ? parseDeliveries : parseJson)(request, response, (error?: unknown) => (error ? reject(badJson(error)) : resolve())));
  return parseWith(endpoint.body, request.body, 'What was sent');
}

function badJson(error: unknown): Error {
  const status = error instanceof Error && 'status' in error ? Number(error.status) : 400;
  return status === 413 ? new KneeboardError(413, 'Too large', 'This is more than the service takes in one request.') : new InputError('The request is not readable JSON.');
}

function parseWith(schema: z.ZodType, value: unknown, what: string): unknown {
  const parsed = schema.safeParse(value ?? {});
  if (parsed.success) return parsed.data;
  const errors = parsed.error.issues.slice(0, 20).flatMap((issue) =>
    issue.code === 'unrecognized_keys' ? issue.keys.map((key) => ({ path: [...issue.path, key].join('.'), message: 'This field is not known here.' })) : [{ path: issue.path.join('.'), message: issue.message }],
  );
  throw new InputError(`${what} has ${errors.length === 1 ? 'a field' : 'fields'} to correct: ${errors.map((e) => e.path || 'the whole').join(', ')}.`, errors);
}
