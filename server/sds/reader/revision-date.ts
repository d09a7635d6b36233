import { type DateOrder, dateOrder, datesIn, monthsIn, type WrittenDate } from './dates';
import { around, type Line, type Segment } from './lines';
import { type Box, type Field } from './reading';
import { type SheetParts } from './sheet-parts';
import { fold } from './words';

export type DateRole = 'revision' | 'issue' | 'print' | 'supersedes' | 'other';

/** Words that say what a date is, the ones that decide against a revision first; folded. */
const roleWords: readonly (readonly [DateRole, RegExp])[] = [
  ['supersedes', /super[sc]ed|replace[sd]|previous|prior (version|revision|date)|anterior|sustituye|reemplaza|remplace|annule|ersetzt|vorherige|letzte ausgabe|last issue|first (issue|compil|version|edition)|primera (emision|edicion)|premiere (edition|emission)|erstausgabe|original (issue|date)|sostituisce|vervangt/],
  ['other', /expir|valid (until|to|thru)|effective until|vencim|caduc|gultig bis|next review|review due|proxima|download|transport|shipment|\bregulation|directive|\bcfr\b|\brule\b|hazard communication|standard|reglament|verordnung|amend(ed|ing) by|\bon or (after|before)\b/],
  ['print', /print|impres|imprim|druck|stampa|afdruk/],
  ['revision', /revis|\brev\b|rev\.|overhaul|updat|actualiz|mise a jour|misa a jour|ueberarbeit|uberarbeit|bearbeitet|bearbeitungsdatum|version (date|vom|du|from)|date of (the )?version|fecha de version|aggiorna|herzien|last (changed?|modified|review)|date reviewed|\breviewed\b|geandert|stand:|\bstand\b/],
  ['issue', /issue|issuing|issuance|prepar|emision|emitid|elabora|edicion|emission|edition|etabli|redaction|ausgabe|erstell|ausstell|creation|creacion|created|published|publica|\beffective|completed|compiled|approved|date written|\bemissione|datum vom/],
  ['issue', /\b(date|fecha|datum|data|dated)\s*[:.]?\s*$/],
];

/** A date after more letters than this stands in a sentence, which no heading cell above explains. */
const longestCellWords = 40;

interface Dated {
  date: WrittenDate;
  role: DateRole;
  line: Line;
  box: Box;
  /** The label before it, as printed. */
  label: string;
  /** Whether only the bare word "date" stands before it. */
  isBare: boolean;
}

/** The date of this revision, told apart from print, issue, superseded and cited dates. */
export function revisionDate(parts: SheetParts): Field<string> | null {
  const all = [...parts.running, ...parts.lines];
  const order = dateOrder(all.map((line) => line.text).join('\n'), parts.language);
  const dated = lookedAt(parts).flatMap(({ lines, index }) => datesOfLine(lines, index, order));
  const revisions = dated.filter(({ role }) => role === 'revision');
  const issues = dated.filter(({ role }) => role === 'issue');
  // "Revised March 2024" beside an older full date: the day is not on the sheet, and the older date is not the revision's.
  if (revisions.length === 0 && undatedRevision(parts)?.role === 'revision') return null;
  const choice = revisions.length > 0 ? revisions : issues;
  const latest = choice.reduce<Dated | null>((best, next) => (best === null || next.date.iso > best.date.iso ? next : best), null);
  if (!latest) return null;
  const distinct = new Set(choice.map(({ date }) => date.iso));
  const reasons: string[] = [];
  let confidence = revisions.length > 0 ? 0.95 : latest.isBare ? 0.6 : 0.75;
  if (revisions.length === 0) reasons.push('The sheet names no revision date; this is its date of issue.');
  if (distinct.size > 1) {
    confidence -= 0.2;
    reasons.push('Several dates carry the same role; this is the latest.');
  } else if (revisions.length > 0 && dated.some(({ date }) => date.iso !== latest.date.iso)) {
    reasons.push(`Several dates stand on the sheet. This one follows "${latest.label}".`);
  }
  if (latest.date.other) {
    const resolved = resolvedBy(latest.date, dated) ?? order;
    confidence = Math.min(confidence, resolved.confidence);
    reasons.push(resolved.because);
  }
  const value = latest.date.iso;
  const field: Field<string> = { value, page: latest.line.page, box: latest.box, quote: latest.date.text, confidence };
  return reasons.length > 0 ? { ...field, because: reasons.join(' ') } : field;
}

/** The month of this revision, else of its issue, where the sheet names no day for it. */
export function undatedRevision(parts: SheetParts): { role: 'revision' | 'issue'; page: number; text: string } | null {
  const order = { isDayFirst: true };
  let issue: ReturnType<typeof undatedRevision> = null;
  for (const { lines, index } of lookedAt(parts)) {
    const line = lines[index];
    if (!line || !mayHoldYear.test(line.text)) continue;
    let before = '';
    for (const segment of line.segments) {
      for (const month of monthsIn(segment.text, order)) {
        const own = segment.text.slice(0, month.start);
        const role = notBare(roleOf(own)) ?? roleOf(`${before} ${own}`) ?? (own.trim() === '' ? roleOfColumn(lines, index, segment) : null);
        const found = { page: line.page, text: segment.text.slice(0, month.end).slice(-60) };
        if (role?.role === 'revision') return { role: 'revision', ...found };
        if (role?.role === 'issue' && !role.isBare) issue ??= { role: 'issue', ...found };
      }
      before += ` ${segment.text}`;
    }
  }
  return issue;
}

const mayHoldYear = /(?:19|20)\d\d/;

/** Another date of the sheet, written without doubt, that agrees with one reading of this one. */
function resolvedBy(date: WrittenDate, all: Dated[]): Pick<DateOrder, 'confidence' | 'because'> | null {
  const clear = all.filter((other) => other.date.other === null).map((other) => other.date.iso);
  return clear.includes(date.iso) ? { confidence: 0.93, because: 'The same date stands written out elsewhere on the sheet.' } : null;
}

/** Dates of a sheet stand before section 1, in section 1, in the running lines and in section 16 or on the last page. */
function lookedAt(parts: SheetParts): { lines: Line[]; index: number }[] {
  const { sections, running, lines } = parts;
  const wanted = new Set<Line>([...sections.preamble, ...(sections.bodies.get('identification') ?? []), ...(sections.bodies.get('other') ?? []), ...lines.slice(0, 12), ...lines.slice(-12)]);
  const inText = lines.map((line, index) => ({ line, lines, index })).filter(({ line }) => wanted.has(line) || /revis|revid|uberarbeit|überarbeit/i.test(line.text));
  return [...running.map((_, index) => ({ lines: running, index })), ...inText];
}

function datesOfLine(lines: Line[], index: number, order: DateOrder): Dated[] {
  const line = lines[index];
  if (!line) return [];
  const found: Dated[] = [];
  let before = '';
  line.segments.forEach((segment, at) => {
    const dates = datesIn(segment.text, order);
    let from = 0;
    for (const date of dates) {
      const own = segment.text.slice(from, date.start);
      const label = `${before} ${own}`;
      // What stands right before the date counts before what stands farther off, and both before what follows it.
      const role = notBare(roleOf(own)) ?? roleOf(label) ?? roleAfter(segment.text.slice(date.end)) ?? (own.trim().length > longestCellWords ? null : roleOfColumn(lines, index, segment)) ?? roleOfAbove(lines, index, segment);
      if (role) found.push({ date, ...role, line, box: boxOf(segment, date), label: lastLabel(role.words) });
      from = date.end;
      before = '';
    }
    if (dates.length === 0) before += ` ${segment.text}${wrapped(lines, index, at)}`;
    else before = segment.text.slice(from);
  });
  return found;
}

const notBare = (role: ReturnType<typeof roleOf>): ReturnType<typeof roleOf> => (role?.isBare ? null : role);

/** "19 May 2022 (date of revision)". */
const roleAfter = (text: string): ReturnType<typeof roleOf> => roleOf(/^\s*\(([^()\d]{3,40})\)/.exec(text)?.[1] ?? '');

const lastLabel = (words: string): string => words.replace(/[\s:.-]+$/, '').split(/:\s|\s{2,}/).at(-1)?.trim().slice(-40) ?? '';

function roleOf(label: string): { role: DateRole; isBare: boolean; words: string } | null {
  const near = fold(label).slice(-70);
  // "Supersedes date: - Revision date:": the last label counts, if it says anything.
  const last = near.replace(/[\s:.-]+$/, '').split(/:\s/).at(-1) ?? near;
  for (const text of new Set([near.endsWith(':') || last !== near ? `${last}:` : near, near])) {
    for (const [at, [role, words]] of roleWords.entries()) {
      if (words.test(text)) return { role, isBare: at === roleWords.length - 1, words: label };
    }
  }
  return null;
}

/** The rest of a label broken over two lines of its column; a line below with a value of its own is another label. */
function wrapped(lines: Line[], index: number, at: number): string {
  const segment = lines[index]?.segments[at];
  const value = lines[index]?.segments[at + 1];
  const next = lines[index + 1]?.segments ?? [];
  if (value && next.some((other) => Math.abs(other.box.x - value.box.x) < 20)) return '';
  const below = next.find((other) => segment && Math.abs(other.box.x - segment.box.x) < 3);
  if (!segment || !below || below.page !== segment.page || below.box.y - segment.box.y > segment.box.height * 1.9 || /\d{2}|:/.test(below.text)) return '';
  return ` ${below.text}`;
}

/** A heading cell above the date, as in a row of small boxes. */
function roleOfColumn(lines: Line[], index: number, segment: Segment): { role: DateRole; isBare: boolean; words: string } | null {
  for (let up = index - 1; up >= Math.max(0, index - 3); up--) {
    const line = lines[up];
    if (!line || line.page !== segment.page || segment.box.y - line.box.y > segment.box.height * 4.2) return null;
    const above = line.segments.find((other) => other.box.x < segment.box.x + segment.box.width && other.box.x + other.box.width > segment.box.x);
    if (!above) continue;
    const role = roleOf(above.text);
    if (role) return role;
  }
  return null;
}

/** A label on the line above that ends with a colon. */
function roleOfAbove(lines: Line[], index: number, segment: Segment): { role: DateRole; isBare: boolean; words: string } | null {
  const above = lines[index - 1];
  return above && above.page === segment.page && above.text.endsWith(':') ? roleOf(above.text) : null;
}

function boxOf(segment: Segment, date: WrittenDate): Box {
  const letter = segment.box.width / Math.max(1, segment.text.length);
  return around({ ...segment.box, x: segment.box.x + letter * date.start, width: 0 }, { ...segment.box, x: segment.box.x + letter * date.end, width: 0 });
}
