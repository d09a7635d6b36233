import { STATEMENT_TEXTS } from '#compliance/hazcom/ghs-statements.data';
import { precautionRows, statementRows } from './statements.data';
import { fold } from './words';

export interface StatementMatch {
  code: string;
  /** Places in the text that was given. */
  start: number;
  end: number;
}

interface Compiled {
  code: string;
  pattern: RegExp;
  length: number;
}

const columns: Readonly<Record<string, number>> = { en: 1, es: 2, fr: 3, de: 4 };
const compiled = new Map<string, readonly Compiled[]>();

/**
 * Finds statements by their words, the longest first, so that "May be harmful if swallowed" is not also "Harmful if
 * swallowed". A statement begins a sentence or a line: "dust may be harmful if inhaled" is prose, unless the text is a
 * labelled list (`isList`), where one statement may follow another without a stop.
 */
export function matchStatements(text: string, language: string, kind: 'H' | 'P', isList: boolean): StatementMatch[] {
  const { level, origin } = levelled(text);
  const taken: { start: number; end: number }[] = [];
  const found: StatementMatch[] = [];
  for (const { code, pattern } of statementsOf(language, kind)) {
    for (const match of level.matchAll(pattern)) {
      const [start, end] = [match.index, match.index + match[0].length];
      if (taken.some((other) => start < other.end && end > other.start) || !beginsSentence(level, start, isList, text.charAt(origin[start] ?? 0))) continue;
      taken.push({ start, end });
      for (const single of withRepetition(code, level.slice(end, end + 90)).split(',')) found.push({ code: single, start: origin[start] ?? 0, end: (origin[end - 1] ?? 0) + 1 });
    }
  }
  return found.sort((a, b) => a.start - b.start);
}

/** Damage to organs "through prolonged or repeated inhalation" is that of repeated exposure, however the rest is put. */
function withRepetition(code: string, after: string): string {
  const isRepeated = /^[^.;]*\b(prolong\w*|repeated|repetid\w*|repete\w*|langerer|wiederholter)\b/.test(after);
  return isRepeated && code === 'H370' ? 'H372' : isRepeated && code === 'H371' ? 'H373' : code;
}

function statementsOf(language: string, kind: 'H' | 'P'): readonly Compiled[] {
  const key = `${language in columns ? language : 'en'}${kind}`;
  const ready = compiled.get(key);
  if (ready) return ready;
  const column = columns[language] ?? 1;
  const rows = kind === 'H' ? statementRows : precautionRows;
  const wordings = rows.flatMap((row) => (row[column] ?? '').split('|').map((wording) => ({ code: row[0], wording })));
  const official = kind === 'H' && column <= 2 ? STATEMENT_TEXTS.map(({ code, text }) => ({ code, wording: column === 2 ? text.es : text.en })) : [];
  const known = new Set(wordings.map(({ code }) => code));
  const list = [...wordings, ...official.filter(({ code, wording }) => !known.has(code) && wording.length > 12)]
    .map(({ code, wording }) => ({ code, wording: levelled(wording).level.trim() }))
    .filter(({ wording }) => wording !== '')
    .map(({ code, wording }) => ({
      code,
      length: wording.length,
      pattern: patternOf(wording),
    }))
    .sort((a, b) => b.length - a.length);
  compiled.set(key, list);
  return list;
}

/** Wording with free blanks and stops; `~` inside it takes what the supplier names, at its end one word. */
function patternOf(wording: string): RegExp {
  const pieces = wording.split('~').map((piece) =>
    piece
      .trim()
      .replace(/\s*;\s*/g, '[;.]? ')
      .replace(/\.(?!\?)(?!\])/g, '\\.?')
      .replace(/ /g, '\\s+'),
  );
  const middle = pieces.filter((piece) => piece !== '').join('\\s+[^.;]{3,110}?\\s+');
  return new RegExp(`(?<![a-z0-9])${middle}${pieces.at(-1) === '' ? '\\s+(?:the\\s+)?[a-z]{3,}' : ''}(?![a-z0-9])`, 'g');
}

/**
 * Levels spelling: accents, case, British and American forms, commas, hyphens and what stands in brackets go; stops,
 * semicolons and line ends stay. `origin` leads each letter back to its place in the text.
 */
function levelled(text: string): { level: string; origin: number[] } {
  const level: string[] = [];
  const origin: number[] = [];
  let depth = 0;
  for (let at = 0; at < text.length; at++) {
    const printed = text.charAt(at);
    // A word parted at the end of its line: "ex-" / "posure".
    if (printed === '-' && /^-\n\p{Ll}/u.test(text.slice(at, at + 3)) && /\p{Ll}/u.test(text.charAt(at - 1))) {
      at++;
      continue;
    }
    if (printed === '(' || printed === '[' || printed === '<') depth++;
    if (depth > 0) {
      if (printed === ')' || printed === ']' || printed === '>') depth--;
      // A bracket that never closes must not swallow the rest.
      if (printed === '.' || printed === '\n') depth = printed === '\n' && /^[^\n]{0,80}[)\]>]/.test(text.slice(at + 1)) ? depth : 0;
      continue;
    }
    const letters = printed === '\n' ? '\n' : printed === ' ' || printed === ',' || printed === '/' || printed === '-' || printed === ':' ? ' ' : fold(printed);
    for (const letter of letters) {
      const last = level.at(-1);
      if (letter === ' ' && (last === ' ' || last === '\n')) continue;
      if (letter === "'" || letter === '"' || letter === '*') continue;
      level.push(letter);
      origin.push(at);
    }
  }
  return spelled(level.join(''), origin);
}

/** British to American, letter by letter so that places stay right. */
function spelled(level: string, origin: number[]): { level: string; origin: number[] } {
  let text = level;
  let places = origin;
  for (const match of [...text.matchAll(/vapour|oxidis|pressuris|foetus/g)].reverse()) {
    const replacement = { vapour: 'vapor', oxidis: 'oxidiz', pressuris: 'pressuriz', foetus: 'fetus' }[match[0]] ?? match[0];
    text = text.slice(0, match.index) + replacement + text.slice(match.index + match[0].length);
    places = [...places.slice(0, match.index + replacement.length), ...places.slice(match.index + match[0].length)];
  }
  return { level: text, origin: places };
}

/** `letter` is the statement's first letter as printed. */
function beginsSentence(level: string, start: number, isList: boolean, letter: string): boolean {
  const before = level.slice(0, start).trimEnd();
  if (before === '' || /[.;!•·|]$|(^|\n|[.;] )(danger|warning|peligro|atencion|gefahr|achtung|attention)$/.test(before)) return true;
  // "Suspected that it" / "may damage fertility": a sentence that is not over goes on with a small letter.
  const isSmall = /\p{Ll}/u.test(letter);
  if (isSmall && /\b(may|can|not|that|if|is|are|of|and|or|with|by|to|in|the|its?|which|que|puede|se|de|del|la|el|o|y|e|con|si|qui|peut|est|ou|et|du|des|le|dass|kann|und|oder|mit|der|die|das|bei)$/.test(before)) return false;
  // The text before ends a line: then this is the first word of the next one.
  if (/\n\s*$/.test(level.slice(0, start))) return true;
  return isList && !isSmall && !/\b(may|can|not|dust|dusts|vapors?|product|material|contact|and|or|very|que|puede|peut|kann|muy|tres|sehr)$/.test(before);
}
