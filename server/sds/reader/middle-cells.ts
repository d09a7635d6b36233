import { around, lineOf, type Line, type Segment } from './lines';

/** Longest label and longest cell that are looked at, lines. */
const mostLabelLines = 4;
const mostCellLines = 14;
/** Letters of a label; more are a text of their own. */
const mostLabelLetters = 120;

interface Placed {
  segment: Segment;
  line: Line;
}

/**
 * In tables whose cells are set to the middle, a label stands beside the middle of its text, not beside its first line.
 * Such labels are moved up to the first line of their cell (a label of several lines becomes one), so that reading from
 * the top meets the label before its text. Tables set to the top are left as they are.
 */
export function withLabelsOnTop(lines: Line[]): Line[] {
  let current = lines;
  for (const x of valueColumns(lines)) current = raised(current, x);
  return current;
}

/** Where cells start that stand beside another at least once, and three times in all. */
function valueColumns(lines: Line[]): number[] {
  const counts = new Map<number, number>();
  for (const line of lines) {
    for (const { box } of line.segments) counts.set(Math.round(box.x), (counts.get(Math.round(box.x)) ?? 0) + 1);
  }
  const beside = new Set(lines.flatMap((line) => line.segments.slice(1).map(({ box }) => Math.round(box.x))));
  return [...beside].filter((x) => (counts.get(x) ?? 0) >= 3);
}

function raised(lines: Line[], x: number): Line[] {
  const values = lines.flatMap((line) => line.segments.filter((segment) => Math.abs(segment.box.x - x) < 1.5).slice(0, 1).map((segment): Placed => ({ segment, line })));
  const labels = lines.flatMap((line) => {
    const [segment] = line.segments;
    return segment && segment.box.x + segment.box.width < x - 2 ? [{ segment, line }] : [];
  });
  if (values.length < 2 || labels.length === 0) return lines;
  const moved = new Map<Segment, Segment>();
  const gone = new Set<Segment>();
  const groups = cellsOf(labels);
  for (const cell of cellsOf(values)) {
    const beside = groups.filter((group) => group.some((label) => isBeside(label, cell)));
    const label = beside.length === 1 && beside[0] && isLabelAtMiddle(beside[0], cell, values) ? beside[0] : undefined;
    const [first] = cell;
    if (!label || !first) continue;
    for (const { segment } of label) gone.add(segment);
    const box = label.map(({ segment }) => segment.box).reduce(around);
    moved.set(first.segment, { page: first.segment.page, text: label.map(({ segment }) => segment.text).join(' '), box: { ...box, y: first.segment.box.y, height: first.segment.box.height } });
  }
  if (moved.size === 0) return lines;
  return lines.flatMap((line) => {
    if (!line.segments.some((segment) => gone.has(segment) || moved.has(segment))) return [line];
    const segments = line.segments.filter((segment) => !gone.has(segment)).flatMap((segment) => [...(moved.has(segment) ? [moved.get(segment) as Segment] : []), segment]);
    return segments.length > 0 ? [lineOf(segments)] : [];
  });
}

/** Runs of lines of one column at even spacing; the wider gap between two rows of a table parts them. */
function cellsOf(values: readonly Placed[]): Placed[][] {
  const cells: Placed[][] = [];
  const gaps = values.map(({ segment }, at) => segment.box.y - (values[at - 1]?.segment.box.y ?? -Infinity));
  values.forEach((value, at) => {
    const gap = gaps[at] ?? Infinity;
    const beside = Math.min(at > 1 ? (gaps[at - 1] ?? Infinity) : Infinity, gaps[at + 1] ?? Infinity);
    const cell = cells.at(-1);
    if (cell && gap < value.segment.box.height * 1.5 && gap <= beside * 1.12) cell.push(value);
    else cells.push([value]);
  });
  return cells;
}

function isBeside({ segment }: Placed, cell: readonly Placed[]): boolean {
  const [top = 0, bottom = 0] = [cell[0]?.segment.box.y, cell.at(-1)?.segment.box.y];
  return segment.box.y > top - segment.box.height * 0.9 && segment.box.y < bottom + segment.box.height * 0.9;
}

/** Whether lines that stand together are the label beside the middle of a cell, and not one at its top. */
function isLabelAtMiddle(label: readonly Placed[], cell: readonly Placed[], values: readonly Placed[]): boolean {
  const [first, last, upper, lower] = [cell[0], cell.at(-1), label[0], label.at(-1)];
  if (!first || !last || !upper || !lower) return false;
  if (cell.length > mostCellLines || label.length > mostLabelLines || label.length === cell.length) return false;
  const height = first.segment.box.height;
  const top = first.segment.box.y;
  const isCentered = Math.abs((upper.segment.box.y + lower.segment.box.y) / 2 - (top + last.segment.box.y) / 2) < height * 0.35;
  if (!isCentered || Math.abs(upper.segment.box.y - top) < height * 0.35) return false;
  const isOneLabel = label.every(({ segment }, at) => {
    const before = label[at - 1]?.segment;
    return !before || (Math.abs(segment.box.x - before.box.x) < 2 && !before.text.endsWith(':'));
  });
  // A row with a value of its own, outside of this cell, is another entry.
  const others = new Set(values.filter((value) => !cell.includes(value)).map(({ line }) => line));
  // What stands higher or lower than the cell stands alone on its row; a row of several cells is an entry too.
  const own = new Set(cell.map(({ line }) => line));
  if (label.some(({ line }) => !own.has(line) && line.segments.length > 1)) return false;
  const letters = label.reduce((sum, { segment }) => sum + segment.text.length, 0);
  return isOneLabel && letters <= mostLabelLetters && !label.some(({ line }) => others.has(line));
}
