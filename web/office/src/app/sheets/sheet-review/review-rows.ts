import { type SheetSuggestions } from '#shared/corrections';
import { neededToConfirm, type Place, type SheetFields, type SheetEdit } from '#shared/sheets';
import type * as z from 'zod';
import { splitCodes, type SheetForm } from './sheet-form';

export type ReviewKey = keyof SheetEdit | 'sections';

/** One line of the review: what was read, where, and whether a person must look. */
export interface ReviewRow {
  readonly key: ReviewKey;
  readonly label: string;
  readonly words: string;
  readonly place: z.infer<typeof Place> | null;
  /** Read with doubt, or not found though every sheet says it. */
  readonly wantsLook: boolean;
  readonly because: string;
  /** What an earlier correction says instead; null where none does, or where it was taken over. */
  readonly suggestion: Suggestion | null;
}
export type Suggestion = SheetSuggestions['items'][number];

/** Below this the reader itself is unsure (the same figure counts "to look at" on the server). */
const lookBelow = 0.8;

const labels: Readonly<Record<ReviewKey, string>> = {
  productName: 'Product',
  supplier: 'Supplier',
  language: 'Language',
  revisedOn: 'Revised',
  signalWord: 'Signal word',
  hazardCodes: 'Hazards',
  precautionaryCodes: 'Precautions',
  ingredients: 'Ingredients',
  limits: 'Limits',
  protectionWords: 'Protection',
  sections: 'Sections',
};
export const languageNames: Readonly<Record<NonNullable<SheetEdit['language']>, string>> = { en: 'English', es: 'Español', fr: 'Français', de: 'Deutsch' };
export const signalWordNames: Readonly<Record<NonNullable<SheetEdit['signalWord']>, string>> = { danger: 'Danger', warning: 'Warning', none: 'none' };
const wanted: ReadonlySet<ReviewKey> = new Set<ReviewKey>(neededToConfirm);

type ReadField = { readonly place: z.infer<typeof Place> | null; readonly confidence: number; readonly because: string | null };

function readOf(fields: SheetFields, key: ReviewKey): readonly ReadField[] {
  if (key === 'sections') return [];
  const field = fields[key];
  return field === null ? [] : Array.isArray(field) ? field : [field as ReadField];
}

const orNone = (text: string): string => text || 'none found';

function wordsOf(value: ReturnType<SheetForm['getRawValue']>, fields: SheetFields, key: ReviewKey): string {
  switch (key) {
    case 'productName':
    case 'supplier':
      return value[key] ?? 'not found';
    case 'language':
      return value.language === null ? 'not found' : languageNames[value.language];
    case 'revisedOn':
      return value.revisedOn ?? 'not found';
    case 'signalWord':
      return value.signalWord === null ? 'not found' : signalWordNames[value.signalWord];
    case 'hazardCodes':
    case 'precautionaryCodes':
      return orNone(splitCodes(value[key]).join(', '));
    case 'ingredients': {
      const withCas = value.ingredients.filter(({ cas }) => cas).length;
      return value.ingredients.length === 0 ? 'none found' : `${withCas} of ${value.ingredients.length} with CAS: ${value.ingredients.map(({ name }) => name).join(', ')}`;
    }
    case 'limits':
      return orNone(value.limits.map((limit) => [limit.substance, limit.value, limit.unit, limit.kind].filter(Boolean).join(' ')).join('; '));
    case 'protectionWords':
      return orNone(value.protectionWords.map(({ topic, text }) => `${topic}: ${text}`).join('; '));
    case 'sections':
      return `${fields.sections.length} of 16`;
  }
}

/** Every line of the review in the order of the sheet. */
export function reviewRows(fields: SheetFields, value: ReturnType<SheetForm['getRawValue']>, suggestions: readonly Suggestion[] = []): readonly ReviewRow[] {
  return (Object.keys(labels) as ReviewKey[]).map((key) => {
    const read = readOf(fields, key);
    const doubtful = read.filter(({ confidence }) => confidence < lookBelow);
    const isMissing = wanted.has(key) && (key === 'sections' ? false : value[key as keyof typeof value] === null);
    const first = doubtful[0] ?? read[0];
    const suggestion = suggestions.find((each) => each.field === key && each.value !== value[each.field]) ?? null;
    return {
      key,
      label: labels[key],
      words: wordsOf(value, fields, key),
      place: first?.place ?? null,
      wantsLook: doubtful.length > 0 || isMissing || suggestion !== null,
      because: isMissing ? 'Every sheet says this, but it was not found. Read it on the page and fill it in.' : (doubtful[0]?.because ?? (doubtful.length > 0 ? 'The reader is not sure of this one.' : '')),
      suggestion,
    };
  });
}
