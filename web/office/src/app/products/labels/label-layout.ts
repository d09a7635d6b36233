/** A label as it is cut or peeled off, millimetres. */
export interface LabelSize {
  readonly id: string;
  readonly name: string;
  readonly widthMm: number;
  readonly heightMm: number;
  /** Type at its largest, points. */
  readonly largestPt: number;
}
export interface Paper {
  readonly id: 'letter' | 'a4';
  readonly name: string;
  readonly widthMm: number;
  readonly heightMm: number;
}

const inch = 25.4;
export const labelSizes: readonly LabelSize[] = [
  { id: '4x3in', name: '4 × 3 in', widthMm: 4 * inch, heightMm: 3 * inch, largestPt: 11 },
  { id: '4x2in', name: '4 × 2 in', widthMm: 4 * inch, heightMm: 2 * inch, largestPt: 10 },
  { id: '2x2in', name: '2 × 2 in', widthMm: 2 * inch, heightMm: 2 * inch, largestPt: 8 },
  { id: 'a6', name: 'A6, 148 × 105 mm', widthMm: 148, heightMm: 105, largestPt: 14 },
  { id: 'a7', name: 'A7, 105 × 74 mm', widthMm: 105, heightMm: 74, largestPt: 11 },
];
/** ISO 216 and the North American letter size. */
export const papers: readonly Paper[] = [
  { id: 'letter', name: 'Letter', widthMm: 8.5 * inch, heightMm: 11 * inch },
  { id: 'a4', name: 'A4', widthMm: 210, heightMm: 297 },
];
/** Edge that office printers leave white; common practice, no source. */
export const marginMm = 6;
/** Below this nobody reads a label at arm's length; common practice, no source. */
export const smallestPt = 5;

/** How many labels stand beside and above each other on one sheet of paper. */
export function layoutOf(paper: Paper, size: LabelSize): { readonly columns: number; readonly rows: number } {
  const fit = (room: number, side: number) => Math.floor((room - 2 * marginMm) / side + 1e-9);
  return { columns: fit(paper.widthMm, size.widthMm), rows: fit(paper.heightMm, size.heightMm) };
}

/** The largest type at which the text fits, in quarter points; null when it does not fit even at the smallest. */
export function fittingPt(largest: number, fits: (pt: number) => boolean): number | null {
  for (let pt = largest; pt >= smallestPt; pt -= 0.25) if (fits(pt)) return pt;
  return null;
}
