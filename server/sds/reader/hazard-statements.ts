import { hazardParts, type PartText } from './hazard-block';
import { type Line, type Segment } from './lines';
import { type Box, type Field } from './reading';
import { closedBody, type SheetParts } from './sheet-parts';
import { globalWords, signalWord } from './signal-word';
import { matchStatements } from './statement-matcher';
import { fold } from './words';

/** H-codes with the suffixes that change their meaning (GHS Annex 3: H350i, H360F, H360FD, H361d …). */
const hCode = /(?<![A-Za-z0-9])(EUH\s?\d{3}[A-Z]?|H\s?[2-4]\d{2})(i\b|FD|Fd|Df|fd|F\b|D\b|f\b|d\b)?/g;
const pCode = /(?<![A-Za-z0-9])P\s?[1-5]\d{2}/g;
const cas = /\b\d{2,7}-\d{2}-\d\b/;
/** "H301+H311", "H301 + 311". */
const joinedCodes = /^\s*\+\s*(?:H|P)?\s?(\d{3})(?!\d)/;

export interface HazardReading {
  hazardCodes: Field<string>[];
  precautionaryCodes: Field<string>[];
}

/** The product's own statements: section 2 only, by their printed codes or, where none is printed, by their words. */
export function hazardStatements(parts: SheetParts): HazardReading {
  const lines = closedBody(parts, 'hazards');
  const cells = hazardParts(withoutIngredientRows(lines));
  const printed = codesIn(cells, hCode, isOwnHazard);
  const hazardCodes = printed.length > 0 ? printed : isGlobalSystem(parts, lines) ? mapped(cells, parts.language, 'H') : [];
  const printedPrecautions = codesIn(cells, pCode, () => true);
  const precautionaryCodes = printedPrecautions.length > 0 ? printedPrecautions : mapped(cells, parts.language, 'P');
  return { hazardCodes: withoutPartsOfCombinations(hazardCodes), precautionaryCodes };
}

/** Rows with a CAS number list what an ingredient does, not the product. */
const withoutIngredientRows = (lines: Line[]): Line[] => lines.filter((line) => !cas.test(line.text));

const isOwnHazard = ({ part, segment }: PartText): boolean => part !== 'precaution' || /^\W*H\s?\d{3}/.test(segment.text);

function codesIn(cells: PartText[], pattern: RegExp, isWanted: (cell: PartText) => boolean): Field<string>[] {
  const found = new Map<string, Field<string>>();
  cells.forEach((cell, index) => {
    if (!isWanted(cell)) return;
    const { text, tail } = withWrappedCode(cell.segment, cells.slice(index + 1, index + 5));
    let end = 0;
    for (const match of text.matchAll(pattern)) {
      if (match.index < end) continue;
      const codes = [clean(match[1] ?? match[0], match[2])];
      end = match.index + match[0].length;
      for (let next = joinedCodes.exec(text.slice(end)); next; next = joinedCodes.exec(text.slice(end))) {
        codes.push(`${codes[0]?.[0] ?? ''}${next[1]}`);
        end += next[0].length;
      }
      if (end > text.length - tail && codes.length === 1 && match.index >= text.length - tail) continue;
      const code = codes.join('+');
      if (!found.has(code)) found.set(code, { value: code, page: cell.segment.page, box: placeOf(cell.segment, match.index, end), quote: cell.segment.text.slice(match.index, match.index + 160) || match[0], confidence: 0.97 });
    }
  });
  return [...found.values()].sort((a, b) => a.value.localeCompare(b.value));
}

/** A combination broken over two lines of a narrow cell: "P305+P351+P3" / "38". */
function withWrappedCode(segment: Segment, following: PartText[]): { text: string; tail: number } {
  const isOpen = /[HP]\s?\d{3}\s*\+\s*(?:[HP]?\d{0,2})$/.test(segment.text);
  const next = isOpen ? following.find((other) => Math.abs(other.segment.box.x - segment.box.x) < 4)?.segment : undefined;
  return next && /^[HP]?\d{1,3}\b/.test(next.text) ? { text: segment.text + next.text, tail: next.text.length } : { text: segment.text, tail: 0 };
}

function clean(code: string, suffix = ''): string {
  const base = code.replace(/\s/g, '');
  return /^H3(50|60|61)$/.test(base) ? base + suffix : base;
}

/** "H301+H311" says what "H301" and "H311" would say again. */
function withoutPartsOfCombinations(codes: Field<string>[]): Field<string>[] {
  const combined = new Set(codes.filter(({ value }) => value.includes('+')).flatMap(({ value }) => value.split('+')));
  return codes.filter(({ value }) => value.includes('+') || !combined.has(value));
}

/** Whether the sheet speaks the global system's language, so that its sentences are statements and not free prose. */
function isGlobalSystem(parts: SheetParts, lines: Line[]): boolean {
  if (isOfNewForm(parts, lines)) return true;
  const own = fold(lines.map((line) => line.text).join('\n'));
  return globalWords.test(own) || /signal ?word|palabra de advertencia|indicacion(es)? de peligro|consejos? de prudencia|mentions? (de danger|d'avertissement)|conseils? de prudence|gefahrenhinweis|signalwort|sicherheitshinweis|1272\/2008/.test(own);
}

/** A sheet after the global system that labels nothing in section 2: its law is cited, its title is new, and a signal word stands there. */
function isOfNewForm(parts: SheetParts, lines: Line[]): boolean {
  const front = fold([...parts.sections.preamble, ...parts.running, ...(parts.sections.bodies.get('identification') ?? []), ...lines].map((line) => line.text).join('\n'));
  return /1910\.1200|\bghs\b|1272\/2008|hcs ?2012|hazcom|whmis 2015/.test(front) && !/material safety data/.test(front) && ['danger', 'warning'].includes(signalWord(parts)?.value ?? '');
}

/** Sentences of the labelled statement block; without such a label, whole sentences anywhere but among precautions. */
function mapped(cells: PartText[], language: string, kind: 'H' | 'P'): Field<string>[] {
  const wanted = kind === 'H' ? 'hazard' : 'precaution';
  const labelled = cells.filter(({ part }) => part === wanted);
  const chosen = labelled.length > 0 ? labelled : kind === 'P' ? [] : cells.filter(({ part }) => part !== 'precaution' && part !== 'other');
  const { text, places } = flow(chosen.map(({ segment }) => segment));
  const found = new Map<string, Field<string>>();
  for (const match of matchStatements(text, language, kind, labelled.length > 0)) {
    const segment = places.findLast((place) => place.start <= match.start)?.segment;
    if (!segment || found.has(match.code)) continue;
    found.set(match.code, {
      value: match.code,
      page: segment.page,
      box: segment.box,
      quote: text.slice(match.start, match.end),
      confidence: labelled.length > 0 ? 0.9 : 0.7,
      because: 'The sheet prints the statement without its code.',
    });
  }
  return [...found.values()].sort((a, b) => a.value.localeCompare(b.value));
}

function flow(segments: Segment[]): { text: string; places: { start: number; segment: Segment }[] } {
  const places: { start: number; segment: Segment }[] = [];
  let text = '';
  for (const segment of segments) {
    places.push({ start: text.length, segment });
    // A line that begins a new sentence is parted from one that did not end with a stop.
    text += segment.text + '\n';
  }
  return { text, places };
}

function placeOf(segment: Segment, start: number, end: number): Box {
  const letter = segment.box.width / Math.max(1, segment.text.length);
  return { ...segment.box, x: segment.box.x + letter * start, width: Math.max(letter, letter * (Math.min(end, segment.text.length) - start)) };
}
