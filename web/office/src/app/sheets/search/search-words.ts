import { type SearchAnswer } from '#shared/library';
import { revisionStates } from '#shared/sheets';
import { type SheetSearch } from './search-api';

const similar = /^Similar to what you typed: (.+)$/;

/** What was looked for instead, when nothing is called what was typed. */
export function closestWords({ items }: SearchAnswer): string | null {
  return similar.exec(items[0]?.matched ?? '')?.[1] ?? null;
}

/** A snippet's pieces; the server sets matches between U+2068 and U+2069. */
export function snippetPieces(snippet: string): readonly { readonly text: string; readonly isMatch: boolean }[] {
  return snippet.split(/(\u2068[^\u2069]*\u2069)/u).flatMap((piece) => (piece === '' ? [] : [{ text: piece.replace(/[\u2068\u2069]/gu, ''), isMatch: piece.startsWith('\u2068') }]));
}

/** How many were found, as it is read out. */
export function countSaid({ items, hasMore }: SearchAnswer): string {
  if (items.length === 0) return 'No sheet matches.';
  if (hasMore) return `More than ${items.length} match. The best are shown.`;
  return items.length === 1 ? '1 sheet matches.' : `${items.length} sheets match.`;
}

export type FilterName = Exclude<keyof SheetSearch, 'q'>;
/** Values and their words, as a page's selects show them; the first of each is "no filter". */
export const filterChoices: Readonly<Record<FilterName, { readonly label: string; readonly choices: readonly (readonly [string, string])[] }>> = {
  state: { label: 'State', choices: [['', 'any'], ...revisionStates.map((state) => [state, { waiting: 'being read', read: 'to check', 'needs-entry': 'to enter by hand', confirmed: 'confirmed', 'set-aside': 'set aside' }[state]] as const)] },
  language: { label: 'Language', choices: [['', 'any'], ['en', 'English'], ['es', 'Spanish'], ['fr', 'French'], ['de', 'German']] },
  signalWord: { label: 'Signal word', choices: [['', 'any'], ['danger', 'Danger'], ['warning', 'Warning'], ['none', 'none']] },
  isInUse: { label: 'On an open job', choices: [['', 'any'], ['true', 'yes'], ['false', 'no']] },
};
export const filterNames = Object.keys(filterChoices) as FilterName[];

/** A value from the address, when the filter knows it. */
export const knownChoice = (name: FilterName, value: string | undefined): string => (value && filterChoices[name].choices.some(([known]) => known === value) ? value : '');
