import { type Line } from './lines';
import { fold } from './words';

export interface RunningSplit {
  /** The lines of each page without what repeats at its top and foot. */
  pages: Line[][];
  /** What repeats at the top or foot of the pages, each wording once: dates, names and addresses stand here too. */
  running: Line[];
}

/** How many lines from the top and from the foot of a page may belong to its running header or footer. */
const edgeLines = 7;

/**
 * Parts running headers and footers from the text. A line runs when the same words, figures aside, stand near the
 * same height on at least half of the pages (and two). Section headings that are repeated on each page are kept.
 */
export function splitRunningLines(pages: Line[][], isHeading: (line: Line) => boolean): RunningSplit {
  const counts = new Map<string, number>();
  const fillers = fillerWords(pages);
  const edges = pages.map(edgesOf);
  for (const edge of edges) {
    for (const key of new Set(edge.values())) counts.set(key, (counts.get(key) ?? 0) + 1);
  }
  const least = Math.max(2, Math.ceil(pages.length * 0.5));
  const running = new Map<string, Line>();
  const kept = pages.map((lines, index) =>
    lines.filter((line) => {
      if (fillers.has(line.text)) return false;
      const key = edges[index]?.get(line);
      if (key === undefined || (counts.get(key) ?? 0) < least || isHeading(line)) return true;
      const wording = fold(line.text);
      if (!running.has(wording)) running.set(wording, line);
      return false;
    }),
  );
  return { pages: kept, running: [...running.values()] };
}

/** A small word that stands alone on line after line ("space") is a template's unseen filler. */
function fillerWords(pages: Line[][]): Set<string> {
  const counts = new Map<string, number>();
  for (const { text } of pages.flat()) if (/^\p{Ll}{3,12}$/u.test(text)) counts.set(text, (counts.get(text) ?? 0) + 1);
  return new Set([...counts].filter(([, count]) => count >= 12).map(([text]) => text));
}

/** The lines at the top and foot of a page with what they are compared by. */
function edgesOf(lines: Line[]): Map<Line, string> {
  const byHeight = [...lines].sort((a, b) => a.box.y - b.box.y);
  return new Map([...byHeight.slice(0, edgeLines), ...byHeight.slice(-edgeLines)].map((line) => [line, keyOf(line)]));
}

/** Figures are page numbers as a rule; heights are compared to six points. */
const keyOf = (line: Line): string => `${Math.round(line.box.y / 6)} ${fold(line.text).replace(/\d+/g, '#')}`;
