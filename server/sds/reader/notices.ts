import { type Field, type Notice } from './reading';
import { undatedRevision } from './revision-date';
import { type SheetParts } from './sheet-parts';

/** Languages whose labels and statements the reader knows; of others it takes figures and codes only. */
const knownLanguages: ReadonlySet<string> = new Set(['en', 'es', 'fr', 'de']);

/** What a person must know about the whole file before trusting the values. */
export function notices(parts: SheetParts, language: Field<string> | null, revised: Field<string> | null): Notice[] {
  const { nextSheet } = parts.sections;
  const undated = revised ? null : undatedRevision(parts);
  return [
    ...(nextSheet ? [{ kind: 'several-sheets' as const, page: nextSheet.page, quote: nextSheet.text }] : []),
    ...(language && !knownLanguages.has(language.value) ? [{ kind: 'language-not-read' as const, page: language.page, quote: language.value }] : []),
    ...(undated ? [{ kind: 'date-without-day' as const, page: undated.page, quote: undated.text }] : []),
  ];
}
