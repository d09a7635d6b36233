import { numberWords, sectionRoles, sectionWords, titleStarts, type SectionRole } from './headings.data';
import { lineOf, type Line, type Segment } from './lines';
import { type SectionHeading } from './reading';
import { fold, joinSpacedLetters, lettersOf } from './words';

interface Candidate {
  index: number;
  number: number;
  role: SectionRole;
  line: Line;
  heading: string;
  /** Title known for its section, as opposed to a number with a free title. */
  isSure: boolean;
  /** How many cells of the row are the heading; the others stand in a column beside it and are text of the section. */
  cells?: number;
}

export interface Sections {
  headings: SectionHeading[];
  /** Lines of each section without its headings; what stands before the first heading is the preamble. */
  preamble: Line[];
  bodies: Map<SectionRole, Line[]>;
  headingLines: Map<SectionRole, Line>;
  /** The first heading of a second sheet in the same file; its text is not dealt out. */
  nextSheet: Line | null;
}

/** Finds the numbered sections of a sheet in lines in reading order and deals the lines out to them. */
export function findSections(all: Line[]): Sections {
  const { lines, chosen, nextSheet } = chooseHeadings(all);
  const sections: Sections = { headings: [], preamble: [], bodies: new Map(), headingLines: new Map(), nextSheet };
  const byIndex = new Map(chosen.map((candidate) => [candidate.index, candidate]));
  let body = sections.preamble;
  let lastHeading: Line | null = null;
  lines.forEach((line, index) => {
    const candidate = byIndex.get(index);
    if (candidate) {
      body = sections.bodies.get(candidate.role) ?? [];
      sections.bodies.set(candidate.role, body);
      if (!sections.headingLines.has(candidate.role)) sections.headingLines.set(candidate.role, line);
      lastHeading = line;
      const beside = candidate.cells === undefined ? [] : line.segments.slice(candidate.cells);
      if (beside.length > 0) body.push(lineOf(beside));
      return;
    }
    // The second line of a long heading is no part of the section's text.
    if (lastHeading && isWrappedHeading(lastHeading, line)) return;
    lastHeading = null;
    body.push(line);
  });
  const seen = new Set<number>();
  for (const { number, heading, line } of [...chosen].sort((a, b) => a.number - b.number || a.index - b.index)) {
    if (seen.has(number)) continue;
    seen.add(number);
    sections.headings.push({ number, heading, page: line.page });
  }
  return sections;
}

/** Whether a line is the heading of a section with a title that is known for it. */
export const isSectionHeading = (line: Line): boolean => headingIn(line, 0)?.isSure === true;

function isWrappedHeading(heading: Line, line: Line): boolean {
  const gap = line.box.y - heading.box.y;
  return (
    line.page === heading.page &&
    gap > 0 &&
    gap < heading.box.height * 2.2 &&
    Math.abs(line.box.height - heading.box.height) < 0.6 &&
    line.segments.length === 1 &&
    ((/^\p{Ll}/u.test(line.text) && /(\/|,|\b(and|of|the|o|y|e|u|de|del|la|el|et|des|du|und|der|des|zu|von|sur))$/i.test(heading.text)) || /^company\s*\/|(^|[/ ])undertaking\b/i.test(line.text)) &&
    !line.text.includes(':')
  );
}

function chooseHeadings(all: Line[]): { lines: Line[]; chosen: Candidate[]; nextSheet: Line | null } {
  const found = all.map((line, index) => headingIn(line, index, all[index + 1])).filter((candidate) => candidate !== null);
  const { candidates, end } = firstSheet(found, all);
  const lines = all.slice(0, end);
  let chosen = inOrder(candidates);
  if (new Set(chosen.map(({ number }) => number)).size < 8) {
    const titled = lines.map((line, index) => titleAlone(line, index)).filter((candidate) => candidate !== null);
    chosen = inOrder([...candidates, ...titled.filter((title) => !candidates.some((other) => other.index === title.index))].sort((a, b) => a.index - b.index));
  }
  return { lines, chosen: fillGaps(lines, chosen), nextSheet: all[end] ?? null };
}

/**
 * A file may hold two sheets (the parts of a kit) or begin with a table of contents: section 1 comes again after most
 * of the others. Contents are headings on neighbouring lines; they are passed over. A second sheet is left unread.
 */
function firstSheet(found: Candidate[], all: Line[]): { candidates: Candidate[]; end: number } {
  let candidates = found;
  for (let round = 0; round < 3; round++) {
    const restart = candidates.findIndex((candidate, at) => candidate.number === 1 && candidate.isSure && new Set(candidates.slice(0, at).filter(({ isSure }) => isSure).map(({ number }) => number)).size >= 10);
    const before = candidates.slice(0, Math.max(0, restart));
    const [first] = before;
    const last = before.at(-1);
    const second = candidates[restart];
    if (restart < 0 || !first || !last || !second) break;
    const isContents = last.index - first.index < before.length * 3;
    if (!isContents) return { candidates: before, end: startOfSheet(all, last.index, second.index) };
    candidates = candidates.slice(restart);
  }
  return { candidates, end: all.length };
}

/** A sheet begins with its page, where title, name and dates stand above its first heading. */
function startOfSheet(all: Line[], after: number, heading: number): number {
  const page = all[heading]?.page;
  const top = all.findIndex((line) => line.page === page);
  return top > after ? top : heading;
}

/** A quick look before the slow one: a figure, a Roman number, a word for "section", or letters set apart. */
const mayBeHeading = /^\P{L}{0,6}(\d|[ivx]{1,4}[\s.:)]|sec|sek|rub|abs|sez|se[cç]|apa|kap|part|punkt|\p{L} \p{L} )|ansi section/iu;

/** Reads "Section 3. Composition", "3 Composition", "SECTION THREE", "III.", "H A Z A R D S (ANSI Section 3)". */
function headingIn(line: Line, index: number, next?: Line): Candidate | null {
  if (!mayBeHeading.test(line.text)) return null;
  const [first, second] = line.segments;
  if (!first) return null;
  // The first cell alone before the whole row: what stands beside a heading in a column is text of its section.
  const texts: [text: string, cells: number][] = second ? [[first.text, 1], [`${first.text} ${wrappedBelow(first, next)}`, 1], [`${first.text} ${second.text}`, 2], [line.text, line.segments.length]] : [[line.text, 1]];
  for (const [text, cells] of texts) {
    if (text.length > 170) continue;
    const joined = joinSpacedLetters(text).trim();
    const found = numbered(fold(joined), joined, cells === line.segments.length ? next : undefined);
    if (found) return { ...found, index, line, heading: joined, cells };
  }
  return null;
}

/** The next line of a heading set in a column of its own, beside the text. */
function wrappedBelow(first: Segment, next?: Line): string {
  const below = next?.segments[0];
  const isNear = below && next.page === first.page && Math.abs(below.box.x - first.box.x) < 3 && below.box.y - first.box.y < first.box.height * 1.8;
  return isNear && !/^\d/.test(below.text) ? below.text : '';
}

const numberForm = /^(?:no\.? ?|nr\.? ?|n° ?|# ?)?(\d{1,2}|[ivx]{1,4}|[a-z]{2,12})(?![a-z0-9])\s*([:.)\]|/-]*)\s*(.*)$/;

function numbered(whole: string, printed: string, next?: Line): Pick<Candidate, 'number' | 'role' | 'isSure'> | null {
  // "§ 3.", "• 3.", "3.0 COMPOSITION", "Section 3 of 16".
  const folded = whole.replace(/^[^a-z0-9#]+/, '').replace(/^(\d{1,2})\.0(?=\s+[a-z])/, '$1.').replace(/^([a-z]* ?\d{1,2}) ?(?:of|\/|de|sur|von) ?16\b/, '$1');
  const ansi = /^(.*?)\s*\(?ansi section (\d{1,2})\)?$/.exec(folded);
  if (ansi?.[1]) {
    const role = roleOfTitle(ansi[1], Number(ansi[2]));
    return role ? { number: Number(ansi[2]), role, isSure: true } : null;
  }
  const word = sectionWords.exec(folded);
  const form = numberForm.exec(word ? folded.slice(word[0].length).trimStart() : folded);
  if (!form) return null;
  const [, figure = '', mark = '', title = ''] = form;
  const number = /^\d+$/.test(figure) ? Number(figure) : (numberWords.get(figure) ?? 0);
  if (number < 1 || number > 16) return null;
  // "9.1 Information on …" is a subsection, "3.5 mg" a figure.
  if (mark.startsWith('.') && /^\d/.test(title) && !word) return null;
  if (/^\d/.test(title) && mark === '') return null;
  const isSpelled = !/^\d+$/.test(figure);
  const own = sectionRoles[number - 1];
  // "IV   FIRE-FIGHTING MEASURES": a Roman number without a mark, before the title that belongs to it.
  if (!word && isSpelled && mark === '' && !(/^[ivx]+$/.test(figure) && own && roleOfTitle(title, number) === own)) return null;
  const ownTitle = title === '' && word && next ? fold(joinSpacedLetters(next.text)) : title;
  const role = roleOfTitle(ownTitle, number);
  if (role && !isSentence(title)) return { number, role, isSure: true };
  const isFreeTitle = word && mark !== '' && title !== '' && lettersOf(title).length <= 60 && !isSentence(title) && startsLikeTitle(printed);
  return isFreeTitle && own ? { number, role: own, isSure: false } : null;
}

const startsLikeTitle = (printed: string): boolean => /^\S+\s*[\p{L}\d#.]*\s*[:.)\]|/\u2010-\u2015-]+\s*\p{Lu}/u.test(printed);

/** Ends like a sentence or runs on after one: a reference to a section, not its heading. */
const isSentence = (title: string): boolean => /[a-z]{3}[.;,]$|[a-z]{3}\. [a-z]/.test(title) || lettersOf(title).length > 110;

function roleOfTitle(title: string, number: number): SectionRole | null {
  const letters = lettersOf(title);
  if (letters.length < 4) return null;
  const own = sectionRoles[number - 1];
  if (own && titleStarts[own].some((start) => start.test(letters))) return own;
  return sectionRoles.find((role) => titleStarts[role].some((start) => start.test(letters))) ?? null;
}

/** A title without a number, on a line of its own. */
function titleAlone(line: Line, index: number): Candidate | null {
  if (line.segments.length !== 1 || line.text.length > 70 || /[.;,]$/.test(line.text)) return null;
  const heading = joinSpacedLetters(line.text);
  const title = fold(heading).replace(/:$/, '');
  if (lettersOf(title).length > 48 || /[:.]/.test(title) || !/^\p{Lu}/u.test(heading)) return null;
  const role = roleOfTitle(title, 0);
  return role ? { index, number: sectionRoles.indexOf(role) + 1, role, line, heading, isSure: false } : null;
}

/** The longest run of headings whose numbers never fall; a number that stands only elsewhere is kept as well. */
function inOrder(candidates: Candidate[]): Candidate[] {
  const best: { weight: number; before: number }[] = [];
  candidates.forEach((candidate, at) => {
    const own = { weight: 0, before: -1 };
    for (let earlier = 0; earlier < at; earlier++) {
      const other = candidates[earlier];
      const score = best[earlier];
      if (other && score && other.number <= candidate.number && score.weight > own.weight) Object.assign(own, { weight: score.weight, before: earlier });
    }
    own.weight += candidate.isSure ? 1 : 0.4;
    best.push(own);
  });
  let at = best.reduce((top, score, index) => (score.weight >= (best[top]?.weight ?? 0) ? index : top), 0);
  const chain = new Set<Candidate>();
  while (at >= 0 && candidates[at]) {
    chain.add(candidates[at] as Candidate);
    at = best[at]?.before ?? -1;
  }
  const numbers = new Set([...chain].map(({ number }) => number));
  return candidates.filter((candidate) => chain.has(candidate) || (candidate.isSure && !numbers.has(candidate.number)));
}

/** A number missing between two neighbours: a line there that begins with it, or its title alone, will do. */
function fillGaps(lines: Line[], chosen: Candidate[]): Candidate[] {
  const filled = [...chosen];
  const numbers = new Set(chosen.map(({ number }) => number));
  if (numbers.size < 6) return chosen;
  for (let number = 1; number <= 16; number++) {
    if (numbers.has(number)) continue;
    const from = Math.max(-1, ...chosen.filter((other) => other.number < number).map(({ index }) => index));
    const to = Math.min(lines.length, ...chosen.filter((other) => other.number > number).map(({ index }) => index));
    const role = sectionRoles[number - 1];
    if (from >= to || !role || filled.some((other) => other.role === role)) continue;
    const between = lines.slice(from + 1, to).map((line, offset) => ({ line, index: from + 1 + offset }));
    const start = new RegExp(`^(\\p{L}{3,10} )?${number}\\s?[.:)|–—-]?\\s{0,3}\\p{Lu}`, 'u');
    const numberedLine = between.find(({ line }) => line.text.length < 70 && start.test(line.text) && !isSentence(fold(line.text)) && /\p{L}{4}/u.test(line.text) && !/\d/.test(line.text.slice(4)));
    const titled = between.map(({ line, index }) => titleAlone(line, index)).find((candidate) => candidate?.number === number);
    if (titled) filled.push(titled);
    else if (numberedLine) filled.push({ ...numberedLine, number, role, heading: numberedLine.line.text, isSure: false });
  }
  return filled.sort((a, b) => a.index - b.index);
}
