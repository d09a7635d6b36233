import * as z from 'zod';
import { Id, Instant, Line, LocalDate, PageQuery, SearchText, Sha256, Version } from './common';

/** Where a value was read: page from 1, box in PDF points from the page's top left corner. */
export const Place = z.object({
  page: z.number().int().min(1),
  box: z.object({ x: z.number(), y: z.number(), width: z.number(), height: z.number() }).nullable(),
  quote: z.string(),
});
export const fieldOrigins = ['read', 'entered'] as const;
const field = <T extends z.ZodType>(value: T) =>
  z.object({ value, place: Place.nullable(), confidence: z.number().min(0).max(1), because: z.string().nullable(), origin: z.enum(fieldOrigins) });
export interface SheetField<T> {
  value: T;
  place: z.infer<typeof Place> | null;
  confidence: number;
  because: string | null;
  origin: (typeof fieldOrigins)[number];
}

export const signalWords = ['danger', 'warning', 'none'] as const;
export const Ingredient = z.object({ name: z.string(), cas: z.string().nullable(), concentration: z.string().nullable() });
export const ExposureLimit = z.object({ substance: z.string(), kind: z.string(), value: z.string(), unit: z.string() });
export const protectionTopics = ['eyes', 'hands', 'skin', 'respiratory', 'hearing'] as const;
export const ProtectionWords = z.object({ topic: z.enum(protectionTopics), text: z.string() });

/** What a person must know about the whole file; only the first sheet of several is read. */
export const noticeKinds = ['several-sheets', 'language-not-read', 'date-without-day'] as const;
export const SheetNotice = z.object({ kind: z.enum(noticeKinds), page: z.number().int().min(1), quote: z.string() });
export type SheetNotice = z.infer<typeof SheetNotice>;

/** What a revision says, each value with where it was read and how sure the reader is. */
export const SheetFields = z.object({
  productName: field(z.string()).nullable(),
  supplier: field(z.string()).nullable(),
  language: field(z.string()).nullable(),
  revisedOn: field(LocalDate).nullable(),
  signalWord: field(z.enum(signalWords)).nullable(),
  hazardCodes: z.array(field(z.string())),
  precautionaryCodes: z.array(field(z.string())),
  ingredients: z.array(field(Ingredient)),
  limits: z.array(field(ExposureLimit)),
  protectionWords: z.array(field(ProtectionWords)),
  sections: z.array(z.object({ number: z.number().int().min(1).max(16), heading: z.string(), page: z.number().int() })),
  /** Absent on sheets read before there were any. */
  notices: z.array(SheetNotice).optional(),
});
export type SheetFields = z.infer<typeof SheetFields>;

/**
 * waiting: queued or being read; read: a person must check it; needs-entry: the reader could not (readerState says why), fill in by hand;
 * confirmed: checked by a named person; set-aside: not used (kept).
 */
export const revisionStates = ['waiting', 'read', 'needs-entry', 'confirmed', 'set-aside'] as const;
export const readerStates = ['read', 'read-by-ocr', 'no-text-layer', 'encrypted', 'damaged', 'not-a-pdf', 'too-large', 'too-slow', 'too-much-memory', 'unavailable'] as const;
export type ReaderState = (typeof readerStates)[number];

export const RevisionSummary = z.object({
  id: Id,
  fileName: z.string(),
  sha256: Sha256,
  byteLength: z.number().int(),
  pages: z.number().int().nullable(),
  /** While a sheet is read from pictures of its pages: the page under way, 0 before the first; otherwise null. */
  pagesRead: z.number().int().nullable(),
  state: z.enum(revisionStates),
  readerState: z.enum(readerStates).nullable(),
  productId: Id.nullable(),
  productName: z.string().nullable(),
  supplier: z.string().nullable(),
  revisedOn: LocalDate.nullable(),
  /** BCP 47; null while nobody knows. */
  language: z.string().nullable(),
  /** Fields under the confidence that asks a person to look. */
  toLookAt: z.number().int(),
  isCurrent: z.boolean(),
  uploadedAt: Instant,
  uploadedBy: z.string(),
  confirmedAt: Instant.nullable(),
  confirmedBy: z.string().nullable(),
  version: Version,
});
export type RevisionSummary = z.infer<typeof RevisionSummary>;

/** One thing the audit of a sheet found, in plain words with its source. */
export const SheetRemark = z.object({ outcome: z.enum(['met', 'unmet', 'undecided', 'not-applicable']), text: z.string(), source: z.string() });

export const Revision = RevisionSummary.extend({ fields: SheetFields, remarks: z.array(SheetRemark) });
export type Revision = z.infer<typeof Revision>;

/** Answer to an upload: `isKnown` when the same bytes are already in this organisation. */
export const UploadedSheet = z.object({ revision: RevisionSummary, isKnown: z.boolean() });
export type UploadedSheet = z.infer<typeof UploadedSheet>;

export const SheetsQuery = PageQuery.extend({ state: z.enum(revisionStates).optional(), q: SearchText.optional(), productId: Id.optional() });

/** Values as a person confirms or enters them; places of untouched values are kept by the server. */
export const SheetEdit = z.strictObject({
  productName: Line(200).nullable(),
  supplier: Line(200).nullable(),
  language: z.enum(['en', 'es', 'fr', 'de']).nullable(),
  revisedOn: LocalDate.nullable(),
  signalWord: z.enum(signalWords).nullable(),
  hazardCodes: z.array(z.string().regex(/^(?:EU)?H\d{3}[A-Za-z]{0,2}(?:\+H\d{3}[A-Za-z]{0,2})*$/, 'Write codes such as H317 or H302+H332.')).max(60),
  precautionaryCodes: z.array(z.string().regex(/^P\d{3}(?:\+P\d{3})*$/, 'Write codes such as P280.')).max(120),
  ingredients: z.array(z.strictObject({ name: Line(300), cas: Line(20).nullable(), concentration: Line(60).nullable() })).max(200),
  limits: z.array(z.strictObject({ substance: Line(300), kind: Line(60), value: Line(60), unit: Line(30) })).max(200),
  protectionWords: z.array(z.strictObject({ topic: z.enum(protectionTopics), text: Line(1000) })).max(40),
});
export type SheetEdit = z.infer<typeof SheetEdit>;
/** What a sheet cannot be confirmed without. */
export const neededToConfirm = ['productName', 'supplier', 'language', 'revisedOn', 'signalWord'] as const satisfies readonly (keyof SheetEdit)[];
export const neededMessage = 'Read this from the sheet and fill it in.';

/** Confirming names the product this sheet belongs to, or makes it. */
export const ConfirmSheet = z.strictObject({
  fields: SheetEdit,
  product: z.union([z.strictObject({ id: Id }), z.strictObject({ name: Line(200), supplier: Line(200) })]),
});
export type ConfirmSheet = z.infer<typeof ConfirmSheet>;
