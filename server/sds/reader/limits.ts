import { casNumbersIn } from './cas';
import { type Line, type Segment } from './lines';
import { type ExposureLimit, type Field } from './reading';
import { type SheetParts } from './sheet-parts';
import { fold, hasLetters } from './words';

const amount = /(?<![\d.,])(\d{1,5}(?:[.,]\d{1,4})?|[.,]\d{1,4})\s?(ppm|ppb|mg\/m\s?[3³]|mg\/cu\.? ?m|[µμu]g\/m\s?[3³]|mppcf|f(?:ibers?)?\/(?:cc|cm\s?[3³]|ml)|mg\s?m-3)/gi;
const kinds: readonly (readonly [string, RegExp])[] = [
  ['OSHA PEL', /\bosha\b|\bpel\b/],
  ['ACGIH TLV', /\bacgih\b|\btlv\b/],
  ['NIOSH REL', /\bniosh\b|\brel\b/],
  ['Cal/OSHA PEL', /cal\/?osha|california pel/],
  ['WEL', /\bwel\b|eh40/],
  ['MAK', /\bmak\b/],
  ['AGW', /\bagw\b|trgs 900/],
  ['VLA', /\bvla(-e[dc])?\b/],
  ['VLEP', /\bvlep\b|\bvme\b|\bvle\b/],
  ['LMPE', /\blmpe\b|nom-010/],
  ['IDLH', /\bidlh\b/],
  ['DNEL', /\bdnel\b/],
];
const terms: readonly (readonly [string, RegExp])[] = [
  ['ceiling', /\bceiling\b|\(c\)|\bc:|\btecho\b|\bpico\b/],
  ['STEL', /\bstel\b|short[- ]term|15 ?min|\bct\b|kurzzeit|court terme|corta duracion/],
  ['TWA', /\btwa\b|8 ?-?h(r|our)?s?\b|time[- ]weighted|\bppt\b|langzeit/],
];
/** Quick looks before the slow ones. */
const anyKind = /osha|pel|acgih|tlv|niosh|rel|wel|eh40|mak|agw|trgs|vl[ae]|vme|lmpe|nom-|idlh|dnel/i;
const anyTerm = /ceil|\(c\)|c:|techo|pico|stel|term|min|ct|kurz|dura|twa|h|ppt|weig|lang/i;
const endOfLimits = /^(\d[\d.]*\s+)?(appropriate engineering|engineering (controls|measures)|exposure controls|personal protect|individual protection|respiratory protection|eye(\/face)? protection|hand protection|skin protection|ventilation|controles? tecnicos|controles? de ingenieria|proteccion|controles de la exposicion|mesures d'ordre technique|protection|technische|begrenzung|persönliche|augenschutz|atemschutz|handschutz)/;

/** Limits of section 8: each figure with a unit of air, its kind, and the substance of its row or of the row above. */
export function exposureLimits(parts: SheetParts, ingredientNames: readonly string[]): Field<ExposureLimit>[] {
  const lines = parts.sections.bodies.get('exposure') ?? [];
  const found: Field<ExposureLimit>[] = [];
  let substance: string | null = null;
  let headings: Segment[] = [];
  let rowKind: string | null = null;
  for (const line of lines) {
    if (endOfLimits.test(fold(line.text)) && amountsIn(line).length === 0) {
      if (found.length > 0) break;
      continue;
    }
    const values = amountsIn(line);
    if (values.length === 0) {
      if (line.segments.some(({ text }) => kindOf(text) !== null || termOf(text) !== null)) {
        headings = line.segments.filter(({ text }) => kindOf(text) !== null || termOf(text) !== null);
        rowKind = line.segments.length === 1 ? kindOf(line.text) : null;
      }
      substance = substanceIn(line) ?? substance;
      continue;
    }
    substance = substanceIn(line) ?? substance;
    for (const { segment, match } of values) {
      const above = headings.find((heading) => heading.box.x < segment.box.x + segment.box.width && heading.box.x + heading.box.width > segment.box.x);
      const before = segment.text.slice(0, match.index);
      const rowBefore = line.text.slice(0, Math.max(0, line.text.indexOf(segment.text)) + match.index);
      const lineKind = kindOf(rowBefore);
      const kind = [lineKind ?? (above ? kindOf(above.text) : null) ?? rowKind, termOf(before.slice(-30)) ?? termOf(segment.text.slice(match.index + match[0].length, match.index + match[0].length + 24)) ?? (above ? termOf(above.text) : null) ?? termOf(sinceLastAmount(rowBefore))].filter((part) => part !== null).join(' ');
      const value = Number((match[1] ?? '').replace(',', '.'));
      const known = substance ? ingredientOf(substance, ingredientNames) : null;
      const limit: ExposureLimit = { substance: known ?? substance, kind: kind || null, value: Number.isFinite(value) ? value : null, unit: unitOf(match[2] ?? ''), text: line.text };
      found.push({ value: limit, page: line.page, box: segment.box, quote: line.text, confidence: known && kind ? 0.85 : 0.5 });
    }
  }
  return found;
}

/** A name wrapped in a narrow cell is only part of the ingredient's name; it counts when it is part of one only. */
function ingredientOf(substance: string, names: readonly string[]): string | null {
  const words = fold(substance);
  const exact = names.find((name) => fold(name) === words);
  const around = words.length < 5 ? [] : names.filter((name) => fold(name).includes(words) || words.includes(fold(name)));
  return exact ?? (around.length === 1 ? (around[0] ?? null) : null);
}

const amountsIn = (line: Line): { segment: Segment; match: RegExpExecArray }[] => line.segments.flatMap((segment) => (/\d/.test(segment.text) ? [...segment.text.matchAll(amount)] : []).map((match) => ({ segment, match })));

/** What stands between the figure before and this one: that figure's words are its own. */
const sinceLastAmount = (rowBefore: string): string => rowBefore.slice(Math.max(0, ...[...rowBefore.matchAll(amount)].map((match) => match.index + match[0].length)));

const kindOf = (text: string): string | null => (anyKind.test(text) ? kindIn(text) : null);
const kindIn = (text: string): string | null => kinds.find(([, words]) => words.test(fold(text)))?.[0] ?? null;
const termOf = (text: string): string | null => (anyTerm.test(text) ? termIn(text) : null);
const termIn = (text: string): string | null => terms.find(([, words]) => words.test(fold(text)))?.[0] ?? null;

const unitOf = (printed: string): string => printed.toLowerCase().replace(/\s/g, '').replace(/m3|m³/, 'm³').replace(/^[µμu]g/, 'µg');

/** The first cell, when it is words and not a kind of limit, a heading or a sentence. */
function substanceIn(line: Line): string | null {
  const first = line.segments[0];
  if (!first) return null;
  const text = first.text.replace(amount, ' ').replace(/^[:\s]+/, '').trim();
  const folded = fold(text);
  const isWords = hasLetters(text) && text.length < 70 && !/[.!?:]$/.test(text) && kindOf(text) === null && termOf(text) === null;
  const isHeading = /^(component|ingredient|chemical|substance|exposure|occupational|control parameter|limit|not |no |none|type|value|form|country|basis|source|\d+(\.\d+)*\s|components|nombre|ingrediente|parametros|valores|inhaltsstoff|see |date|reference|remark|note|total|respirable|inhalable|precautions|recommended|inhaltsstoffe?|ceil|as |united|uk|us)\b/.test(folded);
  if (casNumbersIn(line.text).length > 0 && isWords) return text.replace(/\(?\d{2,7}-\d{2}-\d\)?/, '').replace(/\(?\s*CAS[^)]*\)?\s*$/i, '').trim() || null;
  return isWords && !isHeading ? text.replace(/\s*\(\s*CAS\b[^)]*$/i, '') || null : null;
}
