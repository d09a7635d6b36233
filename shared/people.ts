import * as z from 'zod';
import { fitTestKinds, respiratorTypes } from '#compliance/facts';
import { Id, Instant, Language, Line, LocalDate, PageQuery, Role, SearchText, Version } from './common';
import { NewPassword } from './session';

/** lead: a lead or officer with an own PIN; office: a start PIN from the office; none: nobody vouched for who set it. */
export const PinProof = z.enum(['lead', 'office', 'none']);
export type PinProof = z.infer<typeof PinProof>;

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
  /** Who vouched for the person when the PIN was set; null without a PIN. */
  pinProof: PinProof.nullable(),
  /** A start PIN that waits to be used. */
  startPin: z.object({ givenBy: z.string(), givenAt: Instant, expiresAt: Instant }).nullable(),
  login: z.object({ email: z.string(), role: Role }).nullable(),
});
export type Person = z.infer<typeof Person>;

export const PeopleQuery = PageQuery.extend({ q: SearchText.optional() });

/** Owner only: gives, changes or (null) takes away a sign-in. A password is set only when given. */
export const SetLogin = z.strictObject({
  login: z.strictObject({ email: z.email('Write an e-mail address.').max(200), role: Role, password: NewPassword.optional() }).nullable(),
});
export type SetLogin = z.infer<typeof SetLogin>;

/** Shown once, said or handed to the person; good for one PIN, until `expiresAt`. */
export const StartPin = z.object({ pin: z.string(), expiresAt: Instant, person: Person });
export type StartPin = z.infer<typeof StartPin>;

/** What happened to PINs, never a PIN: an entry of the record log each. */
export const PinEvent = z.object({
  id: Id,
  event: z.enum(['set', 'reset', 'start-pin-given']),
  personId: Id,
  personName: z.string(),
  /** Where one was set. */
  proof: PinProof.nullable(),
  /** The witness; or who in the office reset it or gave the start PIN. */
  byName: z.string().nullable(),
  tabletName: z.string().nullable(),
  /** The tablet's time, where it was set on one. */
  capturedAt: Instant.nullable(),
  at: Instant,
  entryIndex: z.number().int(),
});
export type PinEvent = z.infer<typeof PinEvent>;
export const PinEventsQuery = PageQuery.extend({ personId: Id.optional() });
