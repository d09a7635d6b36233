import { type FormGroup } from '@angular/forms';
import type * as z from 'zod';

/**
 * Checks a form against the same schema the server uses. Returns the parsed value, or null after putting
 * each message on its control (as error `schema`) so that the field shows it.
 */
export function parseForm<T extends z.ZodType>(form: FormGroup, schema: T): z.infer<T> | null {
  const parsed = schema.safeParse(form.getRawValue());
  if (parsed.success) return parsed.data;
  for (const issue of parsed.error.issues) {
    const control = form.get(issue.path.map(String));
    control?.setErrors({ schema: issue.message });
    control?.markAsTouched();
  }
  return null;
}

/** The message of a control's `schema` or `server` error, or null. */
export function fieldMessage(errors: Readonly<Record<string, unknown>> | null | undefined): string | null {
  const message = errors?.['schema'] ?? errors?.['server'];
  return typeof message === 'string' ? message : null;
}
