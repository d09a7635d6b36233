import { dateOrder, datesIn } from '../sds/reader/dates';
import { hasLetters, lettersOf } from '../sds/reader/words';

/** What is remembered: names and dates are written the same way on all sheets of a layout; hazards are not, so they never are. */
export const rememberedFields = ['productName', 'supplier', 'revisedOn'] as const;
export type RememberedField = (typeof rememberedFields)[number];

/**
 * label: the value stands after these words, in the same line or alone in the next one; spelling: what the reader takes for the
 * value is written so. Both are shown word for word to whoever is offered them.
 */
export type Rule =
  | { readonly kind: 'label'; readonly label: string; readonly where: 'same-line' | 'next-line'; /** For dates: whether the day is written first. */ readonly isDayFirst: boolean | null }
  | { readonly kind: 'spelling'; readonly readValue: string; readonly value: string };

export interface Correction {
  readonly field: RememberedField;
  /** What the reader found; null when it found nothing. */
  readonly readValue: string | null;
  readonly value: string;
  /** The sheet's text, line by line, as the reader took it. */
  readonly text: string;
  /** BCP 47; null while nobody knows. */
  readonly language: string | null;
}

const longestLabel = 60;
/** Names stand at the beginning of a sheet; a later place is a mention of them. */
const linesWithNames = 150;

const linesOf = (text: string): readonly string[] => text.split('\n').map((line) => line.replace(/\s+/g, ' ').trim()).filter(Boolean);
const withoutColon = (text: string): string => text.replace(/[\s:.–-]+$/, '').trim();
const isLabel = (text: string): boolean => text.length > 0 && text.length <= longestLabel && hasLetters(text);
export const isSame = (a: string, b: string): boolean => lettersOf(a) === lettersOf(b);

/** The rule that would have given the right value; null when none explains it. A supplier is above all a spelling, a date never one. */
export function learnRule(correction: Correction): Rule | null {
  const { field, readValue, value } = correction;
  const spelling: Rule | null = readValue === null || field === 'revisedOn' || isSame(readValue, value) ? null : { kind: 'spelling', readValue, value };
  const label = field === 'revisedOn' ? labelOfDate(correction) : labelOfName(correction);
  const learned = field === 'supplier' ? (spelling ?? label) : (label ?? spelling);
  // A rule that does not lead back to what was entered explains nothing.
  return learned?.kind === 'label' && applyRule(learned, correction) !== value ? (field === 'revisedOn' ? null : spelling) : learned;
}

function labelOfName({ value, text }: Correction): Rule | null {
  const lines = linesOf(text).slice(0, linesWithNames);
  const wanted = value.replace(/\s+/g, ' ').trim().toLowerCase();
  for (const [at, line] of lines.entries()) {
    if (!line.toLowerCase().endsWith(wanted)) continue;
    const before = withoutColon(line.slice(0, line.length - wanted.length));
    if (isLabel(before)) return { kind: 'label', label: before, where: 'same-line', isDayFirst: null };
    const above = withoutColon(lines[at - 1] ?? '');
    if (before === '' && isLabel(above)) return { kind: 'label', label: above, where: 'next-line', isDayFirst: null };
  }
  return null;
}

function labelOfDate({ value, text, language }: Correction): Rule | null {
  const lines = linesOf(text);
  const order = dateOrder(text, language ?? 'en');
  for (const [at, line] of lines.entries()) {
    for (const date of datesIn(line, order)) {
      if (date.iso !== value && date.other !== value) continue;
      const isDayFirst = date.iso === value ? date.isDayFirst : !date.isDayFirst;
      const before = withoutColon(line.slice(0, date.start));
      if (isLabel(before)) return { kind: 'label', label: before, where: 'same-line', isDayFirst };
      const above = withoutColon(lines[at - 1] ?? '');
      if (before === '' && isLabel(above)) return { kind: 'label', label: above, where: 'next-line', isDayFirst };
    }
  }
  return null;
}

/** What a rule gives on another sheet; null when it gives nothing, or more than one thing. */
export function applyRule(rule: Rule, { field, readValue, text, language }: Pick<Correction, 'field' | 'readValue' | 'text' | 'language'>): string | null {
  if (rule.kind === 'spelling') return readValue !== null && isSame(rule.readValue, readValue) ? rule.value : null;
  const lines = linesOf(text);
  const order = { ...dateOrder(text, language ?? 'en'), ...(rule.isDayFirst === null ? {} : { isDayFirst: rule.isDayFirst }) };
  const values = lines.slice(0, field === 'revisedOn' ? lines.length : linesWithNames).flatMap((line, at) => {
    const said = rule.where === 'same-line' ? restAfter(line, rule.label) : withoutColon(line).toLowerCase() === rule.label.toLowerCase() ? (lines[at + 1] ?? '') : '';
    if (said === '') return [];
    if (field !== 'revisedOn') return said.length <= 200 ? [said] : [];
    return datesIn(said, order).slice(0, 1).map(({ iso }) => iso);
  });
  const different = new Set(values);
  return different.size === 1 ? (values[0] ?? null) : null;
}

/** What follows a label in its line; nothing when the line begins otherwise, or the label goes on as a longer word. */
function restAfter(line: string, label: string): string {
  if (line.slice(0, label.length).toLowerCase() !== label.toLowerCase()) return '';
  const rest = line.slice(label.length);
  return /^[\p{L}\p{N}]/u.test(rest) ? '' : rest.replace(/^[\s:.–-]+/, '').trim();
}

export interface Layout {
  /** As read or confirmed; null when nobody found one. */
  readonly supplier: string | null;
  readonly language: string | null;
  /** The first heading as it is printed. */
  readonly heading: string;
}
/** Whether a sheet looks like those a rule was learned on: same language, same first heading, and the supplier is named. */
export function isSameLayout(rule: { readonly supplier: string; readonly readSupplier: string | null; readonly language: string | null; readonly heading: string }, sheet: Layout, text: string): boolean {
  if (rule.language !== sheet.language || lettersOf(rule.heading) !== lettersOf(sheet.heading)) return false;
  if (sheet.supplier !== null && [rule.supplier, rule.readSupplier].some((name) => name !== null && isSame(name, sheet.supplier ?? ''))) return true;
  return sheet.supplier === null && lettersOf(text.slice(0, 6000)).includes(lettersOf(rule.supplier));
}
