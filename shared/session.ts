import * as z from 'zod';
import { Id, Line, Role } from './common';

export const Session = z.object({
  person: z.object({ id: Id, name: z.string() }),
  role: Role,
  organisation: z.object({ id: Id, name: z.string() }),
});
export type Session = z.infer<typeof Session>;

export const SignIn = z.strictObject({ email: z.email('Write an e-mail address.').max(200), password: z.string().min(1, 'Fill this in.').max(200) });
export type SignIn = z.infer<typeof SignIn>;

/** NIST SP 800-63B: length over composition; the server also refuses the commonest passwords. */
export const NewPassword = z.string().min(12, 'Use at least 12 characters.').max(200);
export const ChangePassword = z.strictObject({ current: z.string().min(1, 'Fill this in.').max(200), next: NewPassword });
export type ChangePassword = z.infer<typeof ChangePassword>;

export const OrganisationName = Line(120);
