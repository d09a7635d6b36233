import { lineOf, type Line, type Segment } from '#server/sds/reader/lines';

const letter = 5;
const lineHeight = 12;

/**
 * Pages drawn as plain text: each row is a line, two or more blanks part cells, a letter is 5 points wide. An empty row
 * leaves a gap. So a layout can be shown in a test as it looks.
 */
export function pagesFrom(...pages: readonly string[]): Line[][] {
  return pages.map((text, index) =>
    text
      .replace(/^\n/, '')
      .split('\n')
      .map((row, at) => lineOf(cells(row, index + 1, 30 + at * lineHeight)))
      .filter((line) => line.segments.length > 0),
  );
}

function cells(row: string, page: number, y: number): Segment[] {
  return [...row.matchAll(/\S+(?: \S+)*/g)].map((match) => ({ page, text: match[0], box: { x: 30 + match.index * letter, y, width: match[0].length * letter, height: 9 } }));
}
