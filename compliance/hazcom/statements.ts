import { type Words } from '../outcome';
import { HAZARD_ROWS, type HazardRow } from './ghs-hazards.data';
import { STATEMENT_TEXTS } from './ghs-statements.data';
import { SUPPLEMENTARY_STATEMENTS } from './supplementary-statements.data';

const TEXT_BY_CODE: ReadonlyMap<string, Words> = new Map([
  ...STATEMENT_TEXTS.map(({ code, text }) => [code, text] as const),
  ...SUPPLEMENTARY_STATEMENTS.map(({ code, text }) => [code, text] as const),
]);
const ROWS_BY_CODE: ReadonlyMap<string, readonly HazardRow[]> = groupRows();

function groupRows(): Map<string, HazardRow[]> {
  const groups = new Map<string, HazardRow[]>();
  for (const row of HAZARD_ROWS) groups.set(row.code, [...(groups.get(row.code) ?? []), row]);
  return groups;
}

/** A statement code as read from a sheet. Unknown ones carry the question to ask; nothing is dropped. */
export type ReadCode =
  | { readonly isKnown: true; readonly code: string; /** The single codes inside, for 'H302+H332' two. */ readonly parts: readonly string[] }
  | { readonly isKnown: false; readonly text: string; readonly question: Words };

// H or EUH, three digits, up to two suffix letters.
const SINGLE = /(EUH|H)\s?(\d{3})([A-Za-z]{0,2})(?![A-Za-z0-9])/gi;
const COMBINED = /^\s*(?:EUH|H)\s?\d{3}[A-Za-z]{0,2}(?:\s*\+\s*(?:EUH|H)\s?\d{3}[A-Za-z]{0,2})*\s*$/i;

/** The English and Spanish text of a known code; null for an unknown one. */
export function statementText(code: string): Words | null {
  return TEXT_BY_CODE.get(code) ?? null;
}

/** The classes and categories behind a code; empty for supplementary and unknown codes. */
export function hazardRowsOf(code: string): readonly HazardRow[] {
  return ROWS_BY_CODE.get(code) ?? [];
}

/** Suffix letters carry meaning (Fd is not FD), so the letters' own case is kept unless only one spelling exists. */
function normalise(prefix: string, digits: string, suffix: string): string | null {
  const code = `${prefix.toUpperCase()}${digits}${suffix}`;
  if (TEXT_BY_CODE.has(code)) return code;
  const sameLetters = [...TEXT_BY_CODE.keys()].filter((known) => known.toLowerCase() === code.toLowerCase());
  return sameLetters.length === 1 ? sameLetters[0]! : null;
}

function ask(text: string): ReadCode {
  const shown = text.trim();
  return {
    isKnown: false,
    text: shown,
    question: {
      en: `The code "${shown}" is not a known hazard statement. Look at the sheet: which code is printed?`,
      es: `El código «${shown}» no es una indicación de peligro conocida. Mire la hoja: ¿qué código está impreso?`,
    },
  };
}

/** Reads one entry: 'H350i', 'h 302 + h332', 'EUH066'. A combination that is no official one is kept as its parts. */
export function readHazardCode(text: string): readonly ReadCode[] {
  if (!COMBINED.test(text)) return [ask(text)];
  const singles = [...text.matchAll(SINGLE)].map(([, prefix, digits, suffix]) => normalise(prefix!, digits!, suffix!));
  const parts = singles.filter((code) => code !== null);
  // The known part of a doubtful entry protects people while the question is open.
  if (parts.length < singles.length) return [ask(text), ...parts.map(known)];
  const combined = [...parts].sort().join('+');
  if (parts.length > 1 && TEXT_BY_CODE.has(combined)) return [known(combined)];
  return parts.map(known);
}

function known(code: string): ReadCode {
  return { isKnown: true, code, parts: code.split('+') };
}

/** Reads many entries; known codes once each in the order found, unknown ones kept apart to be asked. */
export function readHazardCodes(texts: readonly string[]): { readonly codes: readonly string[]; readonly unknown: readonly Extract<ReadCode, { isKnown: false }>[] } {
  const codes: string[] = [];
  const unknown: Extract<ReadCode, { isKnown: false }>[] = [];
  for (const read of texts.flatMap((text) => readHazardCode(text))) {
    if (!read.isKnown) unknown.push(read);
    else if (!codes.includes(read.code)) codes.push(read.code);
  }
  return { codes, unknown };
}

/** Finds every code in running text, for example section 2 of a sheet: a code followed by other words is found too. */
export function findHazardCodes(text: string): ReturnType<typeof readHazardCodes> {
  const entries = text.match(/\b(?:EUH|H)\s?\d{3}(?!\d)(?:[A-Za-z]{1,2}\b)?(?:\s*\+\s*(?:EUH|H)\s?\d{3}(?!\d)(?:[A-Za-z]{1,2}\b)?)*/g) ?? [];
  return readHazardCodes(entries);
}

/** All single codes, combinations taken apart: what protection is chosen from. */
export function singleCodes(codes: readonly string[]): readonly string[] {
  return [...new Set(codes.flatMap((code) => code.split('+')))];
}
