import { auditSds, type AuditLine } from '#compliance/hazcom/sds-audit';
import { type SheetEdit, type SheetField, type SheetFields } from '#shared/sheets';
import type * as z from 'zod';
import { type SheetNotice, type SheetRemark } from '#shared/sheets';
import { type Field, type NoticeKind, type SheetReading } from './reader/reading';

/** Below this a person is asked to look. */
export const lookBelow = 0.8;

export const noFields = (): SheetFields => ({ productName: null, supplier: null, language: null, revisedOn: null, signalWord: null, hazardCodes: [], precautionaryCodes: [], ingredients: [], limits: [], protectionWords: [], sections: [] });

const fromReader = <T, U = T>({ value, page, box, quote, confidence, because }: Field<T>, change: (value: T) => U): SheetField<U> => ({ value: change(value), place: { page, box, quote }, confidence, because: because ?? null, origin: 'read' });
const one = <T>(field: Field<T> | null): SheetField<T> | null => field && fromReader(field, (value) => value);
const many = <T, U = T>(fields: readonly Field<T>[], change: (value: T) => U): SheetField<U>[] => fields.map((field) => fromReader(field, change));

const notText = /(?![\n\r\t\f])[\p{Cc}\p{Cs}\u202a-\u202e\u2066-\u2069]/gu;
/** Without what a PDF may hold and the database refuses, or a page would be fooled by: controls, halves of a character pair, overrides of the text's direction. */
export const asPlainText = <T>(value: T): T => JSON.parse(JSON.stringify(value), (_, each: unknown) => (typeof each === 'string' ? each.replace(notText, ' ') : each)) as T;

/** What the reader answered, in the contract's form. Text from a PDF is cut to lengths a form can carry. */
export function fieldsFromReading(reading: SheetReading): SheetFields {
  return {
    productName: one(reading.productName),
    supplier: one(reading.supplier),
    language: one(reading.language),
    revisedOn: one(reading.revisionDate),
    signalWord: one(reading.signalWord),
    hazardCodes: many(reading.hazardCodes, (code) => code),
    precautionaryCodes: many(reading.precautionaryCodes, (code) => code),
    ingredients: many(reading.ingredients, ({ name, cas, concentration }) => ({ name: (name ?? '').slice(0, 300), cas, concentration })).slice(0, 200),
    limits: many(reading.limits, ({ substance, kind, value, unit, text }) => ({ substance: (substance ?? '').slice(0, 300), kind: kind ?? '', value: value === null ? text.slice(0, 60) : String(value), unit: unit ?? '' })).slice(0, 200),
    protectionWords: many(reading.ppeWords, ({ topic, text }) => ({ topic, text: text.slice(0, 1000) })).slice(0, 40),
    sections: reading.sections,
    notices: reading.notices.map(({ quote, ...notice }) => ({ ...notice, quote: quote.slice(0, 200) })),
  };
}

/** How many values want a person's look: unsure ones, and single values that were not found. */
export function countToLookAt(fields: SheetFields): number {
  const singles = [fields.productName, fields.supplier, fields.revisedOn, fields.signalWord];
  const all = [...singles, ...fields.hazardCodes, ...fields.ingredients];
  return all.filter((field) => field === null || field.confidence < lookBelow).length + (fields.notices ?? []).length;
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);
/** A value a person left as read keeps its place; a changed one is marked as entered. */
const keep = <T>(value: T, before: readonly (SheetField<T> | null)[]): SheetField<T> => before.find((field) => field !== null && same(field.value, value)) ?? { value, place: null, confidence: 1, because: null, origin: 'entered' };

export function applyEdit(before: SheetFields, edit: SheetEdit): SheetFields {
  const single = <T>(value: T | null, field: SheetField<T> | null): SheetField<T> | null => (value === null ? null : keep(value, [field]));
  return {
    productName: single(edit.productName, before.productName),
    supplier: single(edit.supplier, before.supplier),
    language: single<string>(edit.language, before.language),
    revisedOn: single(edit.revisedOn, before.revisedOn),
    signalWord: single(edit.signalWord, before.signalWord),
    hazardCodes: edit.hazardCodes.map((code) => keep(code, before.hazardCodes)),
    precautionaryCodes: edit.precautionaryCodes.map((code) => keep(code, before.precautionaryCodes)),
    ingredients: edit.ingredients.map((each) => keep(each, before.ingredients)),
    limits: edit.limits.map((each) => keep(each, before.limits)),
    protectionWords: edit.protectionWords.map((each) => keep(each, before.protectionWords)),
    sections: before.sections,
    ...(before.notices ? { notices: before.notices } : {}),
  };
}

type Remark = z.infer<typeof SheetRemark>;

/** What the reader noticed about the whole file, then what the audit of form, statements and CAS digits has to say, worst first; lines that are met are left out. */
export const remarksOn = (fields: SheetFields, today: string): Remark[] => [...(fields.notices ?? []).map(remarkOnNotice), ...auditRemarks(fields, today)];

const noticeTexts: Readonly<Record<NoticeKind, (page: number, quote: string) => Omit<Remark, 'source'>>> = {
  'several-sheets': (page) => ({ outcome: 'unmet', text: `This file holds more than one safety data sheet: the next begins on page ${page}. Only the first one was read. Add the others as files of their own.` }),
  'language-not-read': (page, quote) => ({ outcome: 'undecided', text: `The reader does not know the language of this sheet (${quote}): it took codes, numbers and dates only. Compare every value with the page.` }),
  'date-without-day': (page, quote) => ({ outcome: 'undecided', text: `The sheet names the month of its revision, but no day (“${quote}”, page ${page}). No day was made up: ask the supplier for it.` }),
};
const remarkOnNotice = ({ kind, page, quote }: SheetNotice): Remark => ({ ...noticeTexts[kind](page, quote), source: 'Noticed while reading the file' });

const auditRemarks = (fields: SheetFields, today: string): Remark[] =>
  findingsOn(fields, today).map(({ outcome, text, source }) => ({ outcome, text: text.en, source: [source.citation, source.paragraph].filter(Boolean).join(' ') }));

export function findingsOn(fields: SheetFields, today: string): AuditLine[] {
  const codes = fields.hazardCodes.map((field) => ({ code: field.value, category: null }));
  const lines = auditSds(
    {
      kind: 'mixture',
      language: fields.language?.value ?? 'en',
      sections: fields.sections.map(({ number, heading }) => ({ number, heading, text: heading })),
      signalWords: fields.signalWord && [fields.signalWord.value],
      hazards: codes,
      pictograms: null,
      casNumbers: fields.ingredients.flatMap(({ value }) => (value.cas ? [value.cas] : [])),
      revisedOn: fields.revisedOn?.value ?? null,
      maxAgeYears: null,
    },
    today,
  );
  // The text of each section is not kept, so its content is not judged here; pictograms are not read, so nothing is asked of them.
  const shown = (line: AuditLine) => line.outcome !== 'met' && line.outcome !== 'not-applicable' && !line.id.startsWith('content-') && !/pictogram/.test(line.id);
  return lines.filter(shown);
}
