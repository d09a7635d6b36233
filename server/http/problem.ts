import { type ErrorRequestHandler, type RequestHandler } from 'express';
import { KneeboardError, NotFoundError, SlowDownError, UnavailableError } from '../errors';
import { databaseTrouble } from '../platform/database';
import { type Log } from '../platform/log';

export const unknownRoute: RequestHandler = (request) => {
  throw new NotFoundError(request.path.startsWith('/api/') ? 'service address' : 'page');
};

/** Problem details (RFC 9457) for errors a caller can act on; a bare 500 for faults, with the details in the log only. */
export const answerProblem =
  (log: Log): ErrorRequestHandler =>
  (error, request, response, next) => {
    if (response.headersSent) {
      log.error({ err: error, path: request.path }, 'failed while answering');
      next(error);
      return;
    }
    const trouble = error instanceof KneeboardError ? undefined : databaseTrouble(error);
    if (trouble) log.warn({ err: error, path: request.path }, `the database is ${trouble}`);
    const known = error instanceof KneeboardError ? error : trouble ? new UnavailableError(troubleWords[trouble]) : fromExpress(error);
    if (known) {
      if (known instanceof SlowDownError) response.set('Retry-After', String(known.retryAfterSeconds));
      response.status(known.status).type('application/problem+json').json({ type: 'about:blank', title: known.title, status: known.status, detail: known.message, ...known.extra });
      return;
    }
    log.error({ err: error, path: request.path, method: request.method }, 'request failed');
    response.status(500).type('application/problem+json').json({ type: 'about:blank', title: 'Something failed here', status: 500, detail: 'Nothing was changed. Try again; if it fails again, tell whoever runs this service.' });
  };

const troubleWords = {
  away: 'The database does not answer. Nothing was changed; try again in a minute.',
  full: 'There is no room left to store this. Nothing was changed; tell whoever runs this service, then try again.',
} as const;

function fromExpress(error: unknown): KneeboardError | undefined {
  if (!(error instanceof Error) || !('status' in error) || typeof error.status !== 'number' || error.status >= 500) return undefined;
  return new KneeboardError(error.status, 'Check what was sent', 'The request could not be read.');
}
