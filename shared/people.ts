import * as z from 'zod';
import { fitTestKinds, respiratorTypes } from '#compliance/facts';
import { Id, Language, Line, LocalDate, PageQuery, Role, SearchText, Version } from './common';
import { NewPassword } from './session';

export const PersonRespirator = z.strictObject({
  type: z.enum(respiratorTypes),
  label: Line(120),
  clearedOn: LocalDate.nullable(),
  fitTestedOn: LocalDate.nullable(),
  /** Absent on people kept before it was asked. */
  fitTestKind: z.enum(fitTestKinds).nullable().optional(),
});

const personFields = {
  name: Line(120),
  language: Language,
  employer: Line(120).nullable(),
  isAdultConfirmed: z.boolean(),
  /** The limit a clinician wrote, never the finding. */
  isKeptFromIsocyanates: z.boolean(),
  silicaTrainedOn: LocalDate.nullable(),
  /** Who certifies the training: trainer or employer. Absent on requests made before it was asked. */
  silicaTrainedBy: Line(120).nullable().optional(),
  hazcomTrainedOn: LocalDate.nullable(),
  hazcomTrainedBy: Line(120).nullable().optional(),
  respirators: z.array(PersonRespirator).max(10),
  isActive: z.boolean(),
};
export const PersonEdit = z.strictObject(personFields);
export type PersonEdit = z.infer<typeof PersonEdit>;

export const Person = z.object({
  id: Id,
  ...personFields,
  version: Version,
  hasPin: z.boolean(),
  login: z.object({ email: z.string(), role: Role }).nullable(),
});
export type Person = z.infer<typeof Person>;

export const PeopleQuery = PageQuery.extend({ q: SearchText.optional() });

/** Owner only: gives, changes or (null) takes away a sign-in. A password is set only when given. */
export const SetLogin = z.strictObject({
  login: z.strictObject({ email: z.email('Write an e-mail address.').max(200), role: Role, password: NewPassword.optional() }).nullable(),
});
export type SetLogin = z.infer<typeof SetLogin>;
