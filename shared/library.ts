import * as z from 'zod';
import { type DayPlan } from '#compliance/plans/day-plan';
import { Id, Instant, Line, LocalDate, PageQuery, Paragraph, SearchText, Sha256 } from './common';
import { RevisionSummary, revisionStates } from './sheets';

/** One field that differs between the current revision and a newer one, in words. */
export const FieldChange = z.object({
  field: z.enum(['productName', 'supplier', 'signalWord', 'hazardCodes', 'precautionaryCodes', 'ingredients', 'limits', 'protectionWords']),
  added: z.array(z.string()),
  removed: z.array(z.string()),
  /** Whether it brings a hazard class nobody on these jobs was briefed on (29 CFR 1910.1200(h)(1)). */
  isNewHazard: z.boolean(),
});
export type FieldChange = z.infer<typeof FieldChange>;

/** What a revision reaches: before it is confirmed as if it were, afterwards as it stands. */
export const Reach = z.object({
  previous: z.object({ revisionId: Id, revisedOn: LocalDate.nullable(), confirmedAt: Instant.nullable() }).nullable(),
  changes: z.array(FieldChange),
  kits: z.array(z.object({ id: Id, name: z.string() })),
  /** Shifts of open jobs from today on whose kits hold the product. */
  shifts: z.array(
    z.object({
      shiftId: Id,
      jobId: Id,
      jobName: z.string(),
      date: LocalDate,
      publishedVersion: z.number().int().nullable(),
      /** Whether what people sign would change. */
      changesChecklist: z.boolean(),
      signed: z.number().int(),
      asked: z.number().int(),
    }),
  ),
});
export type Reach = z.infer<typeof Reach>;

/** Publishes a new version of every published checklist the revision changes; those crews are asked again. */
export const AppliedRevision = z.object({ published: z.array(z.object({ shiftId: Id, jobName: z.string(), date: LocalDate, number: z.number().int(), asked: z.number().int() })), failed: z.array(z.object({ shiftId: Id, jobName: z.string(), because: z.string() })) });
export type AppliedRevision = z.infer<typeof AppliedRevision>;

/** Where and when a product was used: kept 30 years (29 CFR 1910.1020(d)(1)(ii)(B)). */
export const ProductUse = z.object({ id: Id, productName: z.string(), revisionId: Id, revisedOn: LocalDate.nullable(), jobId: Id, jobName: z.string(), siteName: z.string(), usedOn: LocalDate });
export type ProductUse = z.infer<typeof ProductUse>;
export const ProductUsesQuery = PageQuery.extend({ productId: Id.optional(), jobId: Id.optional() });

/** What to do next in the library, worst first. */
export const LibraryTask = z.object({
  id: z.string(),
  kind: z.enum(['no-sheet', 'to-check', 'review-overdue', 'old-format', 'no-spanish', 'request-open']),
  level: z.enum(['stop', 'caution', 'plain']),
  productId: Id.nullable(),
  revisionId: Id.nullable(),
  text: z.string(),
  detail: z.string(),
  isInUse: z.boolean(),
});
export type LibraryTask = z.infer<typeof LibraryTask>;

/** The organisation's own limit of age; policy, not law. */
export const LibraryPolicy = z.strictObject({ reviewAfterYears: z.number().int().min(1).max(10).nullable() });
export type LibraryPolicy = z.infer<typeof LibraryPolicy>;

export const requestStates = ['open', 'answered', 'withdrawn', 'expired'] as const;
export const SheetRequest = z.object({
  id: Id,
  /** Null while the sheet that was sent back belongs to no product yet. */
  productId: Id.nullable(),
  productName: z.string(),
  supplier: z.string(),
  /** The sheet that was sent back with the findings of its audit; null where one was merely asked for. */
  aboutRevisionId: Id.nullable(),
  email: z.string(),
  message: z.string(),
  language: z.enum(['en', 'es']),
  state: z.enum(requestStates),
  askedAt: Instant,
  askedBy: z.string(),
  mailedAt: Instant.nullable(),
  expiresAt: Instant,
  answeredAt: Instant.nullable(),
  /** The sheet that came as the answer; the same as `aboutRevisionId` when the supplier sent the very same file again. */
  revisionId: Id.nullable(),
});
export type SheetRequest = z.infer<typeof SheetRequest>;
export const AskSupplier = z.strictObject({ productId: Id, email: z.email('Write an e-mail address.').max(200), message: Paragraph(4000), language: z.enum(['en', 'es']) });
export type AskSupplier = z.infer<typeof AskSupplier>;
/** What sending a sheet back would say: from its values and the findings of its audit, to be changed before it goes. */
export const SheetReturnDraft = z.object({ productName: z.string(), supplier: z.string(), /** Where this supplier was last asked. */ email: z.string(), messages: z.object({ en: z.string(), es: z.string() }) });
export type SheetReturnDraft = z.infer<typeof SheetReturnDraft>;
export const ReturnSheet = z.strictObject({
  productName: Line(200),
  supplier: Line(200),
  email: z.email('Write an e-mail address.').max(200),
  message: Paragraph(4000),
  language: z.enum(['en', 'es']),
  /** Sets the sheet aside until the answer is there; not for a confirmed one. */
  isSetAside: z.boolean(),
});
export type ReturnSheet = z.infer<typeof ReturnSheet>;
export const RequestsQuery = PageQuery.extend({ state: z.enum(requestStates).optional(), productId: Id.optional(), /** Sent back, or come as the answer. */ revisionId: Id.optional() });
/** All that a link shows: who asks for which product. Nothing else of the organisation. */
export const OpenRequest = z.object({ organisationName: z.string(), productName: z.string(), supplier: z.string(), message: z.string(), expiresAt: Instant });
export type OpenRequest = z.infer<typeof OpenRequest>;
/** A secret from a link: 43 characters of base64url, sent in the body or a header, never in a path that gets logged. */
export const LinkToken = z.string().regex(/^[\w-]{43}$/, 'This link is not complete.');
export const UseLink = z.strictObject({ token: LinkToken });

/** A zip of sheets: one row per file inside, with what became of it. */
export const ZipOutcome = z.object({ files: z.array(z.object({ fileName: z.string(), outcome: z.enum(['added', 'known', 'refused']), because: z.string().nullable(), revision: RevisionSummary.nullable() })) });
export type ZipOutcome = z.infer<typeof ZipOutcome>;

/** Products from a CSV file: looked at first, row by row, then added. */
export const ImportRow = z.object({ row: z.number().int(), name: z.string(), supplier: z.string(), outcome: z.enum(['new', 'known', 'wrong']), because: z.string().nullable() });
export const ImportPreview = z.object({ sha256: Sha256, columns: z.array(z.string()), rows: z.array(ImportRow), newCount: z.number().int(), knownCount: z.number().int(), wrongCount: z.number().int() });
export type ImportPreview = z.infer<typeof ImportPreview>;
export const ImportProducts = z.strictObject({ products: z.array(z.strictObject({ name: Line(200), supplier: Line(200) })).min(1, 'Nothing to add.').max(5000) });
export const ImportedProducts = z.object({ added: z.number().int(), known: z.number().int() });

export const SearchQuery = z.strictObject({
  q: SearchText.trim().min(1, 'Type what you look for.'),
  state: z.enum(revisionStates).optional(),
  language: z.enum(['en', 'es', 'fr', 'de']).optional(),
  signalWord: z.enum(['danger', 'warning', 'none']).optional(),
  isInUse: z.enum(['true', 'false']).optional(),
  limit: z.coerce.number().int().min(1).max(50).default(20),
});
export const SearchHit = z.object({ revision: RevisionSummary, /** What matched, in words: name, supplier, CAS number, code, text. */ matched: z.string(), snippet: z.string().nullable() });
export const SearchAnswer = z.object({ items: z.array(SearchHit), /** True when more than the shown ones match. */ hasMore: z.boolean() });
export type SearchAnswer = z.infer<typeof SearchAnswer>;

/** The printed code of a job: opens its sheets and plan without an account. */
export const SiteCode = z.object({ jobId: Id, isOn: z.boolean(), madeAt: Instant.nullable(), madeBy: z.string().nullable(), /** Shown once when made: the address behind the code. */ address: z.string().nullable() });
export type SiteCode = z.infer<typeof SiteCode>;
/** Nobody's name: whoever holds the paper reads this page. */
export const SitePage = z.object({
  organisationName: z.string(),
  jobName: z.string(),
  siteName: z.string(),
  emergencyNumber: z.string().nullable(),
  address: z.string().nullable(),
  hasFirstAider: z.boolean(),
  hostHazards: z.string().nullable(),
  /** The server's clock when it answered. */
  asOf: Instant,
  /** Of the newest published checklist of today, else of the next day that has one, else of the last; made and stored when that was published. */
  plan: z.object({ date: LocalDate, isToday: z.boolean(), number: z.number().int(), publishedAt: Instant, /** Null in what was published before plans were made. */ day: z.custom<DayPlan>().nullable() }).nullable(),
  sheets: z.array(z.object({ revisionId: Id, productName: z.string(), supplier: z.string(), language: z.string(), revisedOn: LocalDate.nullable(), signalWord: z.string().nullable(), hazardCodes: z.array(z.string()), pictograms: z.array(z.string()) })),
  /** Kit parts that have no confirmed sheet: named, with whom to ask. */
  productsWithoutSheet: z.array(z.string()),
});
export type SitePage = z.infer<typeof SitePage>;

/** A label for a mixed or decanted container (29 CFR 1910.1200(f)(6)). */
export const LabelQuery = z.strictObject({ state: z.enum(['dry', 'mixing', 'wet', 'cured-being-ground']).optional() });
const words = z.object({ en: z.string(), es: z.string() });
export const ContainerLabel = z.object({
  identifier: z.string(),
  state: words,
  signalWord: z.enum(['danger', 'warning', 'none']),
  statements: z.array(words.extend({ code: z.string() })),
  pictograms: z.array(z.string()),
  /** What mixing adds, in plain words. */
  effects: z.array(words),
  /** Products whose sheet is missing: the label must not be printed before it is there. */
  partsWithoutSheet: z.array(z.string()),
  notice: words,
});
export type ContainerLabel = z.infer<typeof ContainerLabel>;
