import { HttpErrorResponse } from '@angular/common/http';
import { type FormGroup } from '@angular/forms';
import { Problem } from '#shared/common';

/**
 * What went wrong, in words for a person: the server's problem details (RFC 9457) when it sent them,
 * `status: 0` when it could not be reached at all. Never throws.
 */
export function problemOf(error: unknown): Problem {
  if (error instanceof HttpErrorResponse) {
    if (error.status === 0 || error.status === 502 || error.status === 504) {
      return { type: 'about:blank', title: 'Kneeboard cannot be reached.', status: 0, detail: 'Check the network, then try again. Nothing was changed.' };
    }
    const parsed = Problem.safeParse(readBody(error.error));
    if (parsed.success) return parsed.data;
    return { type: 'about:blank', title: 'That did not work.', status: error.status, detail: `The server answered ${error.status}. Try again; if it stays, tell the owner.` };
  }
  return { type: 'about:blank', title: 'Something on this page failed.', status: -1, detail: 'Load the page again. If it stays, tell the owner.' };
}

/** Title and detail as one sentence or two. */
export function problemWords(problem: Problem): string {
  return problem.detail ? `${problem.title} ${problem.detail}` : problem.title;
}

/** Puts each field message of a problem on its control (as error `server`); returns the messages that found no control. */
export function showFieldProblems(form: FormGroup, problem: Problem): readonly string[] {
  const left: string[] = [];
  for (const { path, message } of problem.errors ?? []) {
    const control = form.get(path);
    if (control) {
      control.setErrors({ server: message });
      control.markAsTouched();
    } else {
      left.push(message);
    }
  }
  return left;
}

/** Error bodies arrive as text when the answer was expected as something else. */
function readBody(body: unknown): unknown {
  if (typeof body !== 'string') return body;
  try {
    return JSON.parse(body) as unknown;
  } catch {
    return null;
  }
}
