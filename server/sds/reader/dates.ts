import { fold } from './words';

/** A date as written. `alternatives` holds the ISO readings when day and month could change places. */
export interface WrittenDate {
  start: number;
  end: number;
  text: string;
  iso: string;
  /** Set when the figures allow the other order as well. */
  other: string | null;
  isDayFirst: boolean;
}

export interface DateOrder {
  isDayFirst: boolean;
  /** How sure the order is, 0 to 1. */
  confidence: number;
  because: string;
}

const monthNames: readonly (readonly string[])[] = [
  ['january', 'jan', 'enero', 'ene', 'janvier', 'janv', 'januar', 'janner', 'gennaio', 'janeiro', 'januari'],
  ['february', 'feb', 'febr', 'febrero', 'fevrier', 'fevr', 'februar', 'febbraio', 'fevereiro', 'februari'],
  ['march', 'mar', 'marzo', 'mars', 'marz', 'maerz', 'mrz', 'marco', 'maart'],
  ['april', 'apr', 'abril', 'abr', 'avril', 'avr', 'aprile'],
  ['may', 'mayo', 'mai', 'maggio', 'maio', 'mei'],
  ['june', 'jun', 'junio', 'juin', 'juni', 'giugno', 'junho'],
  ['july', 'jul', 'julio', 'juillet', 'juil', 'juli', 'luglio', 'julho'],
  ['august', 'aug', 'agosto', 'ago', 'aout', 'augustus'],
  ['september', 'sep', 'sept', 'septiembre', 'set', 'septembre', 'settembre', 'setembro'],
  ['october', 'oct', 'octubre', 'octobre', 'oktober', 'okt', 'ottobre', 'outubro'],
  ['november', 'nov', 'noviembre', 'novembre', 'novembro'],
  ['december', 'dec', 'diciembre', 'dic', 'decembre', 'dezember', 'dez', 'dicembre', 'dezembro'],
];
const monthOf = new Map(monthNames.flatMap((names, index) => names.map((name): [string, number] => [name, index + 1])));
const monthWord = [...monthOf.keys()].sort((a, b) => b.length - a.length).join('|');

const yearFirst = /(?<![\d.])((?:19|20)\d{2})[-/.](\d{1,2})[-/.](\d{1,2})(?!\d)/g;
const figures = /(?<![\d.,/-])(\d{1,2})\s?([-/.])\s?(\d{1,2})\s?\2\s?((?:19|20)\d{2}|\d{2})(?![\d]|[-/]\d)/g;
const yearMonth = new RegExp(`(?<![\\d.])((?:19|20)\\d{2})[-/. ](${monthWord})[-/. ](\\d{1,2})(?!\\d)`, 'g');
const dayMonth = new RegExp(`(?<![\\d])(\\d{1,2})(?:st|nd|rd|th|er|o|\\.)?[\\s./-]*(?:of |de |del )?(${monthWord})\\.?[\\s,./-]*(?:de |del |of )?((?:19|20)\\d{2}|\\d{2})(?!\\d)`, 'g');
const monthDay = new RegExp(`(?<![a-z])(${monthWord})\\.?[\\s/-]*(\\d{1,2})(?:st|nd|rd|th)?[\\s,/-]+((?:19|20)\\d{2})(?!\\d)`, 'g');

const mayHoldDate = /\d.{0,14}\d\d/;

/** Every full date in a line, in order. Figures that could be read both ways are read as `order` says. */
export function datesIn(text: string, order: Pick<DateOrder, 'isDayFirst'>): WrittenDate[] {
  if (!mayHoldDate.test(text)) return [];
  const folded = foldKeepingLength(text);
  const found: WrittenDate[] = [];
  const add = (match: RegExpExecArray, year: number, month: number, day: number, other: string | null, isDayFirst: boolean): void => {
    const iso = isoDate(year, month, day);
    const end = match.index + match[0].length;
    if (iso && !found.some((date) => match.index < date.end && end > date.start)) found.push({ start: match.index, end, text: text.slice(match.index, end), iso, other, isDayFirst });
  };
  for (const match of folded.matchAll(yearFirst)) add(match, Number(match[1]), Number(match[2]), Number(match[3]), null, false);
  for (const match of folded.matchAll(yearMonth)) add(match, Number(match[1]), monthOf.get(match[2] ?? '') ?? 0, Number(match[3]), null, false);
  for (const match of folded.matchAll(dayMonth)) add(match, fullYear(match[3]), monthOf.get(match[2] ?? '') ?? 0, Number(match[1]), null, true);
  for (const match of folded.matchAll(monthDay)) add(match, fullYear(match[3]), monthOf.get(match[1] ?? '') ?? 0, Number(match[2]), null, false);
  for (const match of folded.matchAll(figures)) {
    const [a, b, year] = [Number(match[1]), Number(match[3]), fullYear(match[4])];
    const asDayFirst = isoDate(year, b, a);
    const asMonthFirst = isoDate(year, a, b);
    const isDayFirst = asDayFirst !== null && (asMonthFirst === null || order.isDayFirst || match[2] === '.');
    const other = asDayFirst && asMonthFirst && asDayFirst !== asMonthFirst && match[2] !== '.' ? (isDayFirst ? asMonthFirst : asDayFirst) : null;
    if (isDayFirst) add(match, year, b, a, other, true);
    else add(match, year, a, b, other, false);
  }
  return found.sort((a, b) => a.start - b.start);
}

const monthYear = new RegExp(`(?<![a-z\\d])(?:(${monthWord})\\.?[\\s,/-]{1,3}(?:de |of )?|(\\d{1,2})[/.-])((?:19|20)\\d{2})(?![\\d/.-]*\\d)`, 'g');

export interface WrittenMonth {
  start: number;
  end: number;
  text: string;
}

/** Every month and year without a day ("March 2024", "03/2024"), outside the full dates of the line. */
export function monthsIn(text: string, order: Pick<DateOrder, 'isDayFirst'>): WrittenMonth[] {
  const folded = foldKeepingLength(text);
  const days = datesIn(text, order);
  return [...folded.matchAll(monthYear)]
    .map((match) => ({ start: match.index, end: match.index + match[0].length, text: text.slice(match.index, match.index + match[0].length), month: match[2] ? Number(match[2]) : 1 }))
    .filter(({ start, end, month }) => month >= 1 && month <= 12 && !/\d[\s./-]*$/.test(text.slice(0, start)) && !days.some((date) => start < date.end && end > date.start))
    .map(({ start, end, text: printed }) => ({ start, end, text: printed }));
}

/** One letter for one letter, so that places in the folded text are places in the printed one. */
const foldKeepingLength = (text: string): string => text.replace(/[^ -~]/g, (letter) => fold(letter).charAt(0) || ' ').toLowerCase();

const fullYear = (figure: string | undefined): number => {
  const year = Number(figure);
  return (figure ?? '').length === 4 ? year : year < 70 ? 2000 + year : 1900 + year;
};

function isoDate(year: number, month: number, day: number): string | null {
  if (year < 1980 || year > 2099 || month < 1 || month > 12 || day < 1) return null;
  const daysInMonth = new Date(Date.UTC(year, month, 0)).getUTCDate();
  return day > daysInMonth ? null : `${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
}

/** Whether this sheet writes the day or the month first, from its own dates, its language and the law it cites. */
export function dateOrder(text: string, language: string): DateOrder {
  const counts = { dayFirst: 0, monthFirst: 0 };
  for (const match of text.matchAll(figures)) {
    const [a, b] = [Number(match[1]), Number(match[3])];
    if (match[2] === '.' || (a > 12 && b <= 12)) counts.dayFirst++;
    else if (b > 12 && a <= 12) counts.monthFirst++;
  }
  if (counts.dayFirst > 0 && counts.monthFirst === 0) return { isDayFirst: true, confidence: 0.92, because: 'Other dates on this sheet write the day first.' };
  if (counts.monthFirst > 0 && counts.dayFirst === 0) return { isDayFirst: false, confidence: 0.92, because: 'Other dates on this sheet write the month first.' };
  if (language !== 'en') return { isDayFirst: true, confidence: 0.85, because: 'Sheets in this language write the day first.' };
  for (const length of [frontLetters, enoughLetters]) {
    const law = lawOf(text.slice(0, length));
    if (law > 0) return { isDayFirst: false, confidence: 0.8, because: 'The sheet cites American rules, so the month is read first.' };
    if (law < 0) return { isDayFirst: true, confidence: 0.8, because: 'The sheet cites European rules, so the day is read first.' };
  }
  return { isDayFirst: false, confidence: 0.5, because: 'Nothing on the sheet says whether day or month comes first.' };
}

/** Above zero for American law and addresses, below it for those of countries that write the day first. */
function lawOf(first: string): number {
  const american = count(first, /\b(29 ?c\.?f\.?r|osha|hcs|usa|u\.s\.a?|chemtrec|infotrac|tsca|sara 31\d|proposition 65|prop 65|\d{5}-\d{4}|united states)\b/gi);
  const european = count(first, /\b(1907\/2006|1272\/2008|reach annex|2015\/830|2020\/878|453\/2010|united kingdom|uk reach|great britain|ireland|\+44|\+353|\+61|\+64|coshh|eh40|australia|new zealand)\b/gi);
  return american - european;
}

/** The title and section 1 say whom a sheet is for; the first pages name the law it obeys. */
const frontLetters = 2_500;
const enoughLetters = 20_000;

const count = (text: string, words: RegExp): number => text.match(words)?.length ?? 0;
