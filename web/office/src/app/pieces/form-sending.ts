import { signal } from '@angular/core';
import { type FormGroup } from '@angular/forms';
import type * as z from 'zod';
import { type Problem } from '#shared/common';
import { parseForm } from '#ui/form-schema';
import { problemOf, problemWords, showFieldProblems } from '#ui/problem';

/** One form on its way to the server: checked by the contract, sent once, refused in words; nothing typed is lost. */
export class FormSending {
  readonly isSending = signal(false);
  /** What the form says above its fields; empty when all is well. */
  readonly refusal = signal('');
  /** The last refusal with all it carried, for example what is stored now (a conflict). */
  readonly problem = signal<Problem | null>(null);

  constructor(private readonly form: FormGroup) {}

  /** Sends the checked value; null when it was not sent or was refused. */
  async send<S extends z.ZodType, T>(schema: S, sent: (value: z.infer<S>) => Promise<T>): Promise<T | null> {
    if (this.isSending()) return null;
    this.refusal.set('');
    this.problem.set(null);
    const value = parseForm(this.form, schema);
    if (value === null) {
      this.refusal.set('Some entries need another look. They are marked below.');
      return null;
    }
    this.isSending.set(true);
    try {
      return await sent(value);
    } catch (error) {
      this.refuse(problemOf(error));
      return null;
    } finally {
      this.isSending.set(false);
    }
  }

  private refuse(problem: Problem): void {
    this.problem.set(problem);
    const left = showFieldProblems(this.form, problem);
    this.refusal.set(left.length > 0 ? `${problem.title} ${left.join(' ')}` : problemWords(problem));
  }
}
