import * as z from 'zod';
import { Id, Instant, Language, Sha256 } from './common';
import { PinState, Strokes } from './acknowledgements';

/**
 * What a tablet writes to its outbox and sends. Schemas tolerate unknown fields (an older or newer app may have written them);
 * an envelope that is not understood is stored all the same, kept aside and shown to the safety officer.
 */
const envelope = {
  format: z.literal('kneeboard-envelope/1'),
  /** UUIDv7 made by the tablet: the same envelope sent twice has the same id. */
  id: Id,
  capturedAt: Instant,
  /** Counts up on this tablet; order is kept by it. */
  sequence: z.number().int().min(0),
};
/** A PIN sealed to the server's key together with what it stands for (shared/pin-sealing.ts). */
const sealedPin = { sealedPin: z.string().max(2000), nonce: z.string().min(16).max(64) };
/** The same beside answers, sealed over `answersText`; an older app sends none, and its answers are kept as not proven. */
const answererPin = { sealedPin: sealedPin.sealedPin.optional(), nonce: sealedPin.nonce.optional() };

export const SignedEnvelope = z.looseObject({
  ...envelope,
  kind: z.literal('signed'),
  versionId: Id,
  language: Language,
  textSha256: Sha256,
  personId: Id,
  strokes: Strokes.min(1),
  ...sealedPin,
});
export const couldNotSignReasons = ['do-not-understand', 'missing-gear', 'no-fit-test', 'feels-unsafe', 'other'] as const;
export const CouldNotSignEnvelope = z.looseObject({
  ...envelope,
  kind: z.literal('could-not-sign'),
  versionId: Id,
  language: Language,
  textSha256: Sha256,
  personId: Id,
  reason: z.enum(couldNotSignReasons),
  note: z.string().max(2000).nullable(),
});
const answers = z.array(z.object({ lineId: z.string().max(300), answer: z.enum(['yes', 'no']), note: z.string().max(1000).nullable() })).min(1).max(300);
/** The lead's answers to the morning lines. */
export const BriefingEnvelope = z.looseObject({ ...envelope, kind: z.literal('briefing'), versionId: Id, personId: Id, answers, ...answererPin });
/** The live lines that unlock a task, answered at its start. */
export const StartCheckEnvelope = z.looseObject({ ...envelope, kind: z.literal('start-check'), versionId: Id, personId: Id, taskId: Id, answers, ...answererPin });
/**
 * A PIN chosen by the person on the tablet; the witness seals their own, or the person seals the start PIN from the office.
 * All seal over the owner (pinSetText in pin-sealing.ts). With neither the PIN is set and marked: nobody vouched for who set it.
 */
export const PinSetEnvelope = z.looseObject({
  ...envelope,
  kind: z.literal('pin-set'),
  personId: Id,
  ...sealedPin,
  witnessPersonId: Id.nullable(),
  /** The witness's own PIN, sealed the same way; absent without a witness. */
  witnessSealedPin: z.string().max(2000).optional(),
  witnessNonce: z.string().min(16).max(64).optional(),
  /** The start PIN, where there is no witness. */
  startSealedPin: z.string().max(2000).optional(),
  startNonce: z.string().min(16).max(64).optional(),
});
export const Envelope = z.discriminatedUnion('kind', [SignedEnvelope, CouldNotSignEnvelope, BriefingEnvelope, StartCheckEnvelope, PinSetEnvelope]);
export type Envelope = z.infer<typeof Envelope>;

/** `bytes` is the envelope's JSON text exactly as written to the outbox: it is what gets stored. */
export const Deliveries = z.strictObject({ sentAt: Instant, envelopes: z.array(z.strictObject({ id: Id, bytes: z.string().min(2).max(400_000) })).min(1).max(50) });
export type Deliveries = z.infer<typeof Deliveries>;

/**
 * recorded: understood and on record; kept-aside: stored, a person will look; duplicate: this very envelope was stored before;
 * second: the person already has a signature on that version, this delivery is kept and linked to it.
 */
export const Receipt = z.object({
  id: Id,
  outcome: z.enum(['recorded', 'kept-aside', 'duplicate', 'second']),
  acknowledgementId: Id.nullable(),
  entryIndex: z.number().int().nullable(),
  /** `unwitnessed` is told as not-confirmed with `isUnwitnessed`: an older app knows only these three, and must not choke on its receipt. */
  pinState: z.enum(['confirmed', 'not-confirmed', 'not-set']).nullable(),
  isUnwitnessed: z.boolean().default(false),
  /** Whether a newer version must be signed as well. */
  isSuperseded: z.boolean(),
  note: z.string().nullable(),
});
export type Receipt = z.infer<typeof Receipt>;
export const Receipts = z.object({ receivedAt: Instant, receipts: z.array(Receipt) });
export type Receipts = z.infer<typeof Receipts>;

/** Asked online before signing, so that a wrong PIN is said at once. */
export const CheckPin = z.strictObject({ kind: z.enum(['pin', 'start-pin']).default('pin'), personId: Id, textSha256: Sha256, sealedPin: z.string().max(2000), nonce: z.string().min(16).max(64) });
export type CheckPin = z.input<typeof CheckPin>;

/** Everything a tablet needs for the day, kept on it for when there is no signal. */
export const TabletDay = z.object({
  tablet: z.object({ id: Id, name: z.string() }),
  organisationName: z.string(),
  serverTime: Instant,
  /** P-256 public key, SPKI, base64. */
  sealingKey: z.string(),
  officerName: z.string().nullable(),
  officerPhone: z.string().nullable(),
  /** Who may witness a new PIN and has an own proven one: leads, officers, owners, competent persons. */
  witnesses: z.array(z.object({ id: Id, name: z.string() })).default([]),
  jobs: z.array(
    z.object({
      shiftId: Id,
      jobId: Id,
      jobName: z.string(),
      siteName: z.string(),
      date: z.string(),
      version: z.object({
        id: Id,
        number: z.number().int(),
        publishedAt: Instant,
        /** The stored bytes as UTF-8 text, per language; hash them before showing (compliance/checklists/text reads them). */
        texts: z.array(z.object({ language: Language, sha256: Sha256, text: z.string() })),
      }),
      people: z.array(
        z.object({
          id: Id,
          name: z.string(),
          language: Language,
          isLead: z.boolean(),
          hasPin: z.boolean(),
          /** False where nobody vouched for who set it: such a PIN proves nothing until it is set again before a witness. */
          isPinProven: z.boolean().default(true),
          state: z.enum(['not-yet', 'signed', 'could-not-sign', 'not-confirmed']),
          at: Instant.nullable(),
          /** What the PIN of the last answer proved; null where nothing was answered. */
          pinState: PinState.nullable().default(null),
        }),
      ),
      briefing: z.object({ at: Instant, noLineIds: z.array(z.string()), by: z.string().default(''), isProven: z.boolean().default(true) }).nullable(),
      /** Tasks stopped by a "No", until the action is resolved; a "No" to a line about the whole job stops each of its tasks. `lineId` finds the line in the crew's language. */
      stopped: z.array(
        z.object({ taskId: Id, lineId: z.string().nullable().default(null), text: z.string(), actionId: Id, openedAt: Instant.nullable().default(null), openedBy: z.string().default(''), ownerName: z.string().nullable().default(null) }),
      ),
      /** Stops of this shift that the office or a lead closed, newest last: what was done, by whom, when. The live lines are asked again after it. */
      reopened: z.array(z.object({ taskId: Id, lineId: z.string().nullable(), text: z.string(), actionId: Id, resolvedAt: Instant, resolvedBy: z.string(), evidence: z.string() })).default([]),
      /** Tasks whose live lines were answered "Yes" by somebody with a proven PIN, after the last stop. */
      startedTaskIds: z.array(Id),
      /** Tasks whose live lines were answered by somebody whose PIN proved nothing: to be asked again. */
      unprovenTaskIds: z.array(Id).default([]),
      sheets: z.array(z.object({ revisionId: Id, productName: z.string() })),
    }),
  ),
});
export type TabletDay = z.infer<typeof TabletDay>;
