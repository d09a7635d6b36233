import { Pipe, type PipeTransform } from '@angular/core';
import { type ValidationErrors, type ValidatorFn } from '@angular/forms';
import type * as z from 'zod';

/** First message of a control's errors, as one sentence under the field. */
export function messageOf(errors: ValidationErrors | null): string {
  if (!errors) return '';
  if (typeof errors['server'] === 'string') return errors['server'];
  if (typeof errors['contract'] === 'string') return errors['contract'];
  if (errors['required']) return 'Fill this in.';
  if (errors['matDatepickerParse']) return 'Write a date such as 12/3/2026.';
  return 'Check this entry.';
}

/** `{{ form.controls.name.errors | kbMessage }}` */
@Pipe({ name: 'kbMessage' })
export class FieldMessage implements PipeTransform {
  transform(errors: ValidationErrors | null): string {
    return messageOf(errors);
  }
}

/** Checks a control by the contract's own schema, so that a page and the server refuse in the same words. */
export function contractValidator(schema: z.ZodType): ValidatorFn {
  return ({ value }) => {
    const result = schema.safeParse(value);
    return result.success ? null : { contract: result.error.issues[0]?.message ?? 'Check this entry.' };
  };
}
