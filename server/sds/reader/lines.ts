import { type TextItem } from './pdf-text';
import { type Box } from './reading';

/** Words that stand together: a cell of a table, a label, a value, a stretch of prose. */
export interface Segment {
  page: number;
  text: string;
  box: Box;
}

/** What stands on one height of one page, from left to right. */
export interface Line {
  page: number;
  text: string;
  box: Box;
  segments: Segment[];
}

/** Gaps in em: below `joinedEm` letters of one word, below `cellEm` words of one stretch, above that another cell. */
const joinedEm = 0.16;
const cellEm = 1.05;
const narrowCellEm = 0.42;
/** Fewer words than this say nothing about even gaps. */
const leastStretched = 3;

/** Whether a row has gaps that are a cell's only where a column starts. */
export const mayTouch = (row: readonly TextItem[]): boolean =>
  isStretched(row) ||
  row.some((item, at) => {
    const before = row[at - 1];
    const gap = before ? (item.x - before.x - before.width) / item.height : 0;
    return gap > narrowCellEm && gap < cellEm;
  });

/** A line of justified text that ends in a forced break: its few words are drawn apart evenly, over more than a cell's gap. */
function isStretched(row: readonly TextItem[]): boolean {
  if (row.length < leastStretched) return false;
  const gaps = row.slice(1).map((item, at) => item.x - ((row[at]?.x ?? 0) + (row[at]?.width ?? 0)));
  const [least, most] = [Math.min(...gaps), Math.max(...gaps)];
  const em = row[0]?.height ?? 0;
  return least > cellEm * em * 0.9 && most - least < Math.max(1.2, most * 0.06) && row.every(({ text }) => /^\s*\S+\s*$/.test(text));
}

/** Fake bold draws the same words again a hair beside; text drawn twice is read once. */
export function withoutOverprints(items: TextItem[]): TextItem[] {
  const kept: TextItem[] = [];
  const byHeight = new Map<number, TextItem[]>();
  for (const item of items) {
    const slot = Math.round(item.baseline / 4);
    const isRepeat = repeats(item, byHeight.get(slot - 1)) || repeats(item, byHeight.get(slot)) || repeats(item, byHeight.get(slot + 1));
    if (isRepeat) continue;
    kept.push(item);
    const list = byHeight.get(slot);
    if (list) list.push(item);
    else byHeight.set(slot, [item]);
  }
  return kept;
}

const repeats = (item: TextItem, others: TextItem[] | undefined): boolean => others?.some((other) => overprints(item, other)) ?? false;

function overprints(item: TextItem, other: TextItem): boolean {
  const tolerance = Math.min(item.height, other.height) * 0.3;
  if (Math.abs(item.baseline - other.baseline) > tolerance) return false;
  const start = Math.max(item.x, other.x);
  const end = Math.min(item.x + item.width, other.x + other.width);
  if (end - start < item.width * 0.7) return false;
  return squeezed(other.text).includes(squeezed(item.text));
}

const squeezed = (text: string): string => text.replace(/\s+/g, '');

/** Items whose heights overlap by half share a row; small raised or lowered letters stay with their word. */
export function groupRows(items: TextItem[]): TextItem[][] {
  const sorted = [...items].sort((a, b) => a.baseline - b.baseline || a.x - b.x);
  const rows: { baseline: number; height: number; items: TextItem[] }[] = [];
  for (const item of sorted) {
    const row = rows.at(-1);
    if (row && sharedHeight(item, row) >= Math.min(item.height, row.height) * 0.45) {
      row.items.push(item);
      if (item.height > row.height) Object.assign(row, { height: item.height, baseline: item.baseline });
    } else {
      rows.push({ baseline: item.baseline, height: item.height, items: [item] });
    }
  }
  return rows.map((row) => row.items.sort((a, b) => a.x - b.x));
}

/** How far the letters of two runs overlap in height, points; letters reach four fifths of their size above the line. */
function sharedHeight(a: { baseline: number; height: number }, b: { baseline: number; height: number }): number {
  return Math.min(a.baseline, b.baseline) - Math.max(a.baseline - a.height * 0.8, b.baseline - b.height * 0.8);
}

/**
 * The cells of a row. `startsCell` tells where a column of the neighbouring rows begins: there a smaller gap parts cells
 * too, for a full cell nearly touches the next one.
 */
export function toLine(row: TextItem[], startsCell: (item: TextItem) => boolean = () => false): Line {
  const segments: Segment[] = [];
  let end = -Infinity;
  const isOne = isStretched(row) && row.slice(1).filter(startsCell).length < 2;
  for (const item of row) {
    const last = segments.at(-1);
    const gap = (item.x - end) / item.height;
    if (last && (isOne || (gap < cellEm && !(gap > narrowCellEm && startsCell(item))))) {
      const needsSpace = gap > joinedEm && !last.text.endsWith(' ') && !item.text.startsWith(' ');
      last.text += (needsSpace ? ' ' : '') + item.text;
      last.box = around(last.box, boxOf(item));
    } else {
      segments.push({ page: item.page, text: item.text, box: boxOf(item) });
    }
    end = Math.max(end, item.x + item.width);
  }
  for (const segment of segments) segment.text = tidy(segment.text);
  return lineOf(segments.filter((segment) => segment.text !== ''));
}

export function lineOf(segments: Segment[]): Line {
  const box = segments.map((segment) => segment.box).reduce(around, segments[0]?.box ?? { x: 0, y: 0, width: 0, height: 0 });
  return { page: segments[0]?.page ?? 0, text: segments.map((segment) => segment.text).join('  '), box, segments };
}

const boxOf = (item: TextItem): Box => ({ x: item.x, y: item.y, width: item.width, height: item.height });

export function around(a: Box, b: Box): Box {
  const x = Math.min(a.x, b.x);
  const y = Math.min(a.y, b.y);
  return { x, y, width: Math.max(a.x + a.width, b.x + b.width) - x, height: Math.max(a.y + a.height, b.y + b.height) - y };
}

const isTidy = /^[!-~]+(?: [!-~]+)*$/;

/** Dots that lead from a label to its value: "Trade name.......: X", "Trade name ........ X". */
const leaders = /(?<=\p{L}\)?)\s?(?:\.{2,}\s?:|(?:\. ?){5,}(?=\s?\p{L}))\s?/u;

/** Odd blanks and soft hyphens out, control characters out, ligature and width forms normalised by pdfjs already. */
function tidy(text: string): string {
  if (text.includes('..')) return spaced(text.replace(leaders, ': '));
  return isTidy.test(text) ? text : spaced(text);
}

function spaced(text: string): string {
  return text
    .replace(/[\u00a0\u2000-\u200a\u202f\u205f\u3000\t\r\n]/g, ' ')
    .replace(/[\u00ad\u200b-\u200f\u202a-\u202e\u2060\u2066-\u2069\ufeff]/g, '')
    .replace(/ {2,}/g, ' ')
    .trim();
}
