import * as z from 'zod';
import { Id, Line, Role } from './common';

export const Session = z.object({
  person: z.object({ id: Id, name: z.string() }),
  role: Role,
  organisation: z.object({ id: Id, name: z.string() }),
  /** The unit each quantity was last typed in, by quantity: the person's, on every machine. */
  units: z.record(z.string(), z.string()).default({}),
});
export type Session = z.infer<typeof Session>;

const Word = z.string().regex(/^[a-z][a-z0-9-]{0,19}$/);
/** Which unit this person types a quantity in; figures are stored in SI all the same. */
export const KeepUnit = z.strictObject({ quantity: Word, unit: Word });
export type KeepUnit = z.infer<typeof KeepUnit>;

export const SignIn = z.strictObject({ email: z.email('Write an e-mail address.').max(200), password: z.string().min(1, 'Fill this in.').max(200) });
export type SignIn = z.infer<typeof SignIn>;

/** NIST SP 800-63B: length over composition; the server also refuses the commonest passwords. */
export const NewPassword = z.string().min(12, 'Use at least 12 characters.').max(200);
export const ChangePassword = z.strictObject({ current: z.string().min(1, 'Fill this in.').max(200), next: NewPassword });
export type ChangePassword = z.infer<typeof ChangePassword>;

export const OrganisationName = Line(120);
