/** Errors a caller can act on: each names what is wrong and what to do next. Anything else is a fault and answers 500 without details. */
export class KneeboardError extends Error {
  constructor(
    readonly status: number,
    readonly title: string,
    detail: string,
    readonly extra: Readonly<Record<string, unknown>> = {},
  ) {
    super(detail);
  }
}

/** Also said of another organisation's thing. */
export class NotFoundError extends KneeboardError {
  constructor(what: string) {
    super(404, 'Not found', `There is no such ${what} here. It may have been removed, or the link is old.`);
  }
}
export class SignedOutError extends KneeboardError {
  constructor(detail = 'Sign in first.') {
    super(401, 'Not signed in', detail);
  }
}
export class ForbiddenError extends KneeboardError {
  constructor(detail: string) {
    super(403, 'Not yours to do', detail);
  }
}
/** Somebody changed the thing meanwhile: `current` is what is stored now. */
export class ConflictError extends KneeboardError {
  constructor(detail: string, current: unknown) {
    super(412, 'Changed meanwhile', detail, { current });
  }
}
export class InputError extends KneeboardError {
  constructor(detail: string, errors: readonly { path: string; message: string }[] = []) {
    super(400, 'Check what was sent', detail, { errors });
  }
}
/** The input is well formed but cannot be done as things stand. */
export class RefusedError extends KneeboardError {
  constructor(detail: string, extra: Readonly<Record<string, unknown>> = {}) {
    super(422, 'Cannot be done', detail, extra);
  }
}
export class SlowDownError extends KneeboardError {
  constructor(
    detail: string,
    readonly retryAfterSeconds: number,
  ) {
    super(429, 'Too many tries', detail, { retryAfterSeconds });
  }
}
export class UnavailableError extends KneeboardError {
  constructor(detail: string) {
    super(503, 'Not available now', detail);
  }
}
