/**
 * A short piece of a sheet's text around what was looked for. Plain text, never markup: each match stands between
 * U+2068 and U+2069 (first strong isolate, pop directional isolate), which also keeps a right-to-left word from turning
 * its surroundings; the page draws its marks from them.
 */
export const [markStart, markEnd] = ['\u2068', '\u2069'];

const lengthBefore = 60;
const lengthInAll = 180;
const matchesLookedAt = 200;

/** `stems` are word beginnings as the database stems them, without accents. Null when none of them stands in the text. */
export function snippetOf(text: string, stems: readonly string[]): string | null {
  const wanted = stems.filter((stem) => stem.length > 1).map(stemPattern);
  if (wanted.length === 0) return null;
  const plain = text.normalize('NFC').replace(/[\s\p{Cc}]+/gu, ' ').replace(/[\u202a-\u202e\u2066-\u2069]/gu, '');
  const pattern = new RegExp(`(?<![\\p{L}\\p{N}])(?:${wanted.map((stem) => `(${stem})`).join('|')})[\\p{L}\\p{N}]*`, 'giu');
  const matches = [...take(plain.matchAll(pattern), matchesLookedAt)].map((match) => ({ start: match.index, end: match.index + match[0].length, stem: match.slice(1).findIndex((group) => group !== undefined) }));
  if (matches.length === 0) return null;
  // The first place where the most of the words stand together.
  const together = (from: number): number => new Set(matches.filter(({ start }) => start >= from && start < from + lengthInAll - lengthBefore).map(({ stem }) => stem)).size;
  let best = matches[0] as (typeof matches)[number];
  for (const match of matches) if (together(match.start) > together(best.start)) best = match;
  const start = best.start <= lengthBefore ? 0 : nextSpace(plain, best.start - lengthBefore, best.start);
  const end = plain.length <= start + lengthInAll ? plain.length : lastSpace(plain, start + lengthInAll, best.end);
  let marked = '';
  let at = start;
  for (const match of matches.filter((each) => each.start >= start && each.end <= end)) {
    marked += `${plain.slice(at, match.start)}${markStart}${plain.slice(match.start, match.end)}${markEnd}`;
    at = match.end;
  }
  marked += plain.slice(at, end);
  return `${start > 0 ? '… ' : ''}${marked.trim()}${end < plain.length ? ' …' : ''}`;
}

/** Words cut in the middle are hard to read: the piece begins and ends at a space. */
function nextSpace(text: string, from: number, latest: number): number {
  const at = text.indexOf(' ', from);
  return at < 0 || at >= latest ? from : at + 1;
}
function lastSpace(text: string, from: number, earliest: number): number {
  const at = text.lastIndexOf(' ', from);
  return at <= earliest ? Math.max(from, earliest) : at;
}

const accented: Readonly<Record<string, string>> = { a: '[aàáâäãå]', c: '[cç]', e: '[eèéêë]', i: '[iìíîï]', n: '[nñ]', o: '[oòóôöõ]', u: '[uùúûü]', y: '[yýÿ]' };
/** English stems write y as i ("allergi"): the letter is left open. */
function stemPattern(stem: string): string {
  const open = stem.length > 3 && stem.endsWith('i') ? stem.slice(0, -1) : stem;
  return [...open].map((letter) => accented[letter] ?? letter.replace(/[^\p{L}\p{N}]/u, '.')).join('');
}

function* take<T>(all: Iterable<T>, most: number): Generator<T> {
  let taken = 0;
  for (const each of all) {
    if ((taken += 1) > most) return;
    yield each;
  }
}
