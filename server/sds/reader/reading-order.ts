import { groupRows, lineOf, mayTouch, toLine, withoutOverprints, type Line, type Segment } from './lines';
import { withLabelsOnTop } from './middle-cells';
import { type TextItem, type TextPage } from './pdf-text';
import { isSectionHeading } from './sections';

/**
 * The lines of a page in the order a person reads them. Rows are read across, as tables and label-value lists want;
 * only where a band of the page is set in two columns of running prose is the left column read before the right.
 */
export function readingLines(page: TextPage): Line[] {
  return withLabelsOnTop(inOrder(page));
}

function inOrder(page: TextPage): Line[] {
  const items = withoutOverprints(page.items);
  const lines = linesOf(items);
  const gutter = proseGutter(lines, page.width) ?? headingGutter(lines, page.width);
  if (gutter === null) return lines;
  return bandsAcross(lines, gutter).flatMap((band) => {
    if (!isProse(band, gutter) && !hasHeadings(band, gutter)) return band;
    const top = Math.min(...band.map((line) => line.box.y));
    const bottom = Math.max(...band.map((line) => line.box.y + line.box.height));
    const inBand = items.filter((item) => item.y >= top - 0.1 && item.y + item.height <= bottom + 0.1);
    return [...linesOf(inBand.filter((item) => item.x < gutter)), ...linesOf(inBand.filter((item) => item.x >= gutter))];
  });
}

function linesOf(items: TextItem[]): Line[] {
  const rows = groupRows(items);
  const coarse = rows.map((row) => toLine(row));
  return rows.map((row, at) => (mayTouch(row) ? toLine(row, columnStarts(coarse, at)) : (coarse[at] as Line))).filter((line) => line.segments.length > 0 && !isRule(line));
}

/** How many rows up and down may name the columns of a row, and how far off a cell may start, points. */
const neighbours = 20;
const columnTolerance = 0.8;

/** Whether a cell of a neighbouring row that is not its first starts where this piece does. */
function columnStarts(rows: readonly Line[], at: number): (item: TextItem) => boolean {
  let starts: number[] | null = null;
  return (item) => {
    starts ??= rows.slice(Math.max(0, at - neighbours), at + neighbours + 1).flatMap(({ segments }, index) => (index + Math.max(0, at - neighbours) === at ? [] : segments.slice(1).map(({ box }) => box.x)));
    return starts.some((start) => Math.abs(start - item.x) < columnTolerance);
  };
}

/** Rows of underscores, dots or dashes drawn as rules. */
const isRule = (line: Line): boolean => /^[\s._\-–—=*•|]*$/.test(line.text);

const leastProseRows = 8;
/** Points; narrower columns are cells. */
const leastColumn = 150;

/** Where the white strip between two columns of prose stands, if the page has one near its middle. */
function proseGutter(lines: Line[], width: number): number | null {
  if (!mayHoldColumns(lines, width)) return null;
  const starts = new Map<number, number>();
  for (const line of lines) {
    for (const segment of line.segments) {
      if (segment.box.x > width * 0.35 && segment.box.x < width * 0.65) {
        const start = Math.round(segment.box.x / 2);
        starts.set(start, (starts.get(start) ?? 0) + 1);
      }
    }
  }
  const candidates = [...starts].filter(([, count]) => count >= leastProseRows / 2).map(([start]) => start * 2 - 3);
  candidates.sort((a, b) => a - b);
  return candidates.find((gutter) => bandsAcross(lines, gutter).some((band) => isProse(band, gutter))) ?? null;
}

/** Where a second column starts whose section headings stand beside text of another section. */
function headingGutter(lines: Line[], width: number): number | null {
  const starts = lines.flatMap((line) => line.segments.filter((segment) => segment.box.x > width * 0.35 && segment.box.x < width * 0.65 && isHeading(segment)).map(({ box }) => box.x));
  const candidates = [...new Set(starts.map((start) => Math.round(start) - 3))].sort((a, b) => a - b);
  return candidates.find((gutter) => bandsAcross(lines, gutter).some((band) => hasHeadings(band, gutter))) ?? null;
}

const isHeading = (segment: Segment): boolean => isSectionHeading(lineOf([segment]));

/** Whether both sides of a band hold headings, and at least two begin the right column: a heading is never a cell. */
function hasHeadings(band: Line[], gutter: number): boolean {
  if (band.length < leastProseRows) return false;
  const segments = band.flatMap((line) => line.segments);
  const right = segments.filter((segment) => Math.abs(segment.box.x - gutter - 3) < 2 && isHeading(segment));
  return right.length >= 2 && segments.some((segment) => segment.box.x < gutter && isHeading(segment));
}

/** A cheap look first: both halves of the page hold some long pieces. Most pages do not. */
function mayHoldColumns(lines: Line[], width: number): boolean {
  let left = 0;
  let right = 0;
  for (const line of lines) {
    for (const { box } of line.segments) {
      if (box.width < leastColumn * 0.75 || box.width > width * 0.6) continue;
      if (box.x > width * 0.35) right++;
      else if (box.x + box.width < width * 0.65) left++;
    }
  }
  return left >= 4 && right >= 4 && left + right >= leastProseRows * 1.5;
}

/** Runs of lines that keep clear of the gutter, each followed by the line that crosses it. */
function bandsAcross(lines: Line[], gutter: number): Line[][] {
  const bands: Line[][] = [];
  let isOpen = false;
  for (const line of lines) {
    const crosses = line.segments.some((segment) => segment.box.x < gutter - 1 && segment.box.x + segment.box.width > gutter + 1);
    const band = bands.at(-1);
    if (!crosses && isOpen && band) band.push(line);
    else bands.push([line]);
    isOpen = !crosses;
  }
  return bands;
}

/** Whether most pieces on both sides fill their column, as sentences do and table cells do not. */
function isProse(band: Line[], gutter: number): boolean {
  const segments = band.flatMap((line) => line.segments);
  const left = segments.filter((segment) => segment.box.x < gutter);
  const right = segments.filter((segment) => segment.box.x >= gutter);
  // Labels and their values stand side by side, however full the values are.
  if (left.filter(({ text }) => /[:?]$/.test(text)).length > left.length * 0.3) return false;
  // One full column of prose is enough when the other, perhaps at its end, has some full lines too.
  return Math.max(fullness(left), fullness(right)) >= 0.5 && Math.min(fullness(left), fullness(right)) >= 0.3;
}

/** The share of pieces that run from edge to edge of their column; 0 for a column too narrow or too short to tell. */
function fullness(segments: Segment[]): number {
  if (segments.length < leastProseRows) return 0;
  const start = Math.min(...segments.map((segment) => segment.box.x));
  const end = Math.max(...segments.map((segment) => segment.box.x + segment.box.width));
  const full = segments.filter((segment) => segment.box.x + segment.box.width - start > (end - start) * 0.75 && segment.box.x - start < (end - start) * 0.25);
  return end - start > leastColumn && full.length >= 4 ? full.length / segments.length : 0;
}
