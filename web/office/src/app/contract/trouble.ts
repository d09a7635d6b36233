import { HttpErrorResponse } from '@angular/common/http';
import { type AbstractControl, type FormArray, type FormGroup } from '@angular/forms';
import { Problem } from '#shared/common';

export type TroubleKind = 'offline' | 'conflict' | 'invalid' | 'refused' | 'not-found' | 'failed';

/** What went wrong with a call, in words a person can act on. */
export interface Trouble {
  readonly kind: TroubleKind;
  readonly title: string;
  readonly detail: string;
  readonly errors: readonly { readonly path: string; readonly message: string }[];
  /** With a conflict: what is stored now, still to be parsed by the caller. */
  readonly current: unknown;
}

const words: Readonly<Record<TroubleKind, { readonly title: string; readonly detail: string }>> = {
  offline: { title: 'No connection to the server.', detail: 'What you typed is still here. Try again when the connection is back.' },
  conflict: { title: 'Somebody changed this after you opened it.', detail: 'Your entries are still here.' },
  invalid: { title: 'Some entries need another look.', detail: '' },
  refused: { title: 'Your role does not allow this.', detail: 'Ask the owner or the safety officer.' },
  'not-found': { title: 'Not found.', detail: 'It may have been removed, or the address is wrong.' },
  failed: { title: 'This did not work.', detail: 'What you typed is still here. Try again; if it fails again, tell whoever runs Kneeboard.' },
};

function kindOf(status: number): TroubleKind {
  if (status === 0 || status === 502 || status === 503 || status === 504) return 'offline';
  if (status === 409 || status === 412) return 'conflict';
  if (status === 400 || status === 413 || status === 415 || status === 422) return 'invalid';
  if (status === 401 || status === 403) return 'refused';
  return status === 404 ? 'not-found' : 'failed';
}

/** Reads any error of a call; the server's own words win where it sent problem details. */
export function troubleOf(error: unknown): Trouble {
  const response = error instanceof HttpErrorResponse ? error : null;
  const kind = response ? kindOf(response.status) : 'failed';
  const problem = Problem.safeParse(response?.error);
  return {
    kind,
    title: (problem.success && kind !== 'offline' && problem.data.title) || words[kind].title,
    detail: (problem.success && problem.data.detail) || words[kind].detail,
    errors: (problem.success && problem.data.errors) || [],
    current: problem.success ? problem.data.current : undefined,
  };
}

/**
 * Puts the server's field errors on the controls they name ("parts.0.part"). Returns the messages that no control took,
 * so that they are shown above the form instead of being lost.
 */
export function placeErrors(form: FormGroup | FormArray, trouble: Trouble): readonly string[] {
  return trouble.errors.flatMap(({ path, message }) => {
    const control = controlAt(form, path);
    if (!control || control === form) return [message];
    control.setErrors({ ...control.errors, server: message });
    control.markAsTouched();
    return [];
  });
}

/** The control a path names, or the nearest one above it. */
function controlAt(form: FormGroup | FormArray, path: string): AbstractControl | null {
  const steps = path.split(/[./]/).filter((step) => step !== '' && step !== 'body');
  for (let length = steps.length; length > 0; length -= 1) {
    const control = form.get(steps.slice(0, length));
    if (control) return control;
  }
  return null;
}
