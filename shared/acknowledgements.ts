import * as z from 'zod';
import { Id, Instant, Language, LocalDate, PageQuery, Sha256 } from './common';

export const acknowledgementKinds = ['signed', 'could-not-sign', 'paper', 'witnessed'] as const;
export const AcknowledgementKind = z.enum(acknowledgementKinds);
/**
 * Whether the PIN that came with the record was the person's own: confirmed, and set before a witness; not-confirmed, a wrong one;
 * not-set, none was on record; unwitnessed, the right one, but nobody vouched for who had set it. Only `confirmed` proves a signature.
 */
export const pinStates = ['confirmed', 'not-confirmed', 'not-set', 'unwitnessed'] as const;
export const PinState = z.enum(pinStates);
export type PinState = z.infer<typeof PinState>;
/** Why the time on a tablet cannot be right: later than it was sent; or earlier than what it is about was published. */
export const TimeDoubt = z.enum(['after-arrival', 'before-publishing']);
export type TimeDoubt = z.infer<typeof TimeDoubt>;

export const AcknowledgementRow = z.object({
  id: Id,
  capturedAt: Instant,
  receivedAt: Instant,
  personId: Id,
  personName: z.string(),
  jobId: Id,
  jobName: z.string(),
  /** The job's own zone: times are shown in it, wherever the reader sits. */
  timeZone: z.string(),
  shiftDate: LocalDate,
  versionNumber: z.number().int(),
  language: Language,
  kind: AcknowledgementKind,
  pinState: PinState,
  /** A newer version existed when this arrived: kept as what was signed, a new signature is asked. */
  wasSuperseded: z.boolean(),
  tabletName: z.string().nullable(),
  /** Null where the tablet's time can be right. */
  timeDoubt: TimeDoubt.nullable(),
  entryIndex: z.number().int(),
});
export type AcknowledgementRow = z.infer<typeof AcknowledgementRow>;

/** Signature pad's point groups, as captured. */
export const Strokes = z
  .array(z.object({ points: z.array(z.object({ x: z.number(), y: z.number(), time: z.number(), pressure: z.number().optional() })).max(5000) }))
  .max(200);
export type Strokes = z.infer<typeof Strokes>;

export const InclusionProof = z.object({ index: z.number().int(), treeSize: z.number().int(), leafHash: Sha256, root: Sha256, hashes: z.array(Sha256) });

export const Acknowledgement = AcknowledgementRow.extend({
  textSha256: Sha256,
  versionId: Id,
  /** What the signature meant, word for word as signed. */
  sentence: z.string(),
  reason: z.string().nullable(),
  strokes: Strokes,
  /** Tablet clock minus server clock when sent, seconds. */
  clockOffsetSeconds: z.number().nullable(),
  leaf: z.string(),
  leafHash: Sha256,
  /** Null until the first checkpoint that covers the entry: the receipt is pending. */
  proof: InclusionProof.nullable(),
  checkpoint: z.object({ note: z.string(), createdAt: Instant }).nullable(),
});
export type Acknowledgement = z.infer<typeof Acknowledgement>;

export const HistoryQuery = PageQuery.extend({
  jobId: Id.optional(),
  personId: Id.optional(),
  from: LocalDate.optional(),
  to: LocalDate.optional(),
  kind: AcknowledgementKind.optional(),
});
export type HistoryQuery = z.infer<typeof HistoryQuery>;
/** `total` counts all rows of the organisation; `found` counts the filter up to 1,000 (`isFoundCapped`). */
export const HistoryPage = z.object({ items: z.array(AcknowledgementRow), next: z.string().nullable(), total: z.number().int(), found: z.number().int(), isFoundCapped: z.boolean() });
export type HistoryPage = z.infer<typeof HistoryPage>;
/** Same filters, whole result. */
export const HistoryExportQuery = HistoryQuery.omit({ after: true, limit: true });

export const RecordCheck = z.object({
  entries: z.number().int(),
  root: z.string(),
  checkpoint: z.object({ note: z.string(), size: z.number().int(), createdAt: Instant }).nullable(),
  isGood: z.boolean(),
  /** The first thing wrong, in words; null when good. */
  trouble: z.string().nullable(),
  key: z.string(),
});
export type RecordCheck = z.infer<typeof RecordCheck>;
