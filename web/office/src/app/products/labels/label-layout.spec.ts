import { describe, expect, it } from '@jest/globals';
import { fittingPt, labelSizes, layoutOf, papers } from './label-layout';

const size = (id: string) => labelSizes.find((one) => one.id === id) ?? labelSizes[0]!;
const paper = (id: string) => papers.find((one) => one.id === id) ?? papers[0]!;

describe('labels on a sheet of paper', () => {
  // Counted by hand from the sizes: letter is 215.9 × 279.4 mm, A4 210 × 297 mm, 6 mm of edge all round.
  it.each([
    ['letter', '4x3in', 2, 3],
    ['letter', '4x2in', 2, 5],
    ['letter', '2x2in', 4, 5],
    ['letter', 'a6', 1, 2],
    ['letter', 'a7', 1, 3],
    ['a4', '4x3in', 1, 3],
    ['a4', '2x2in', 3, 5],
    ['a4', 'a6', 1, 2],
    ['a4', 'a7', 1, 3],
  ])('%s takes %s: %i beside, %i above each other', (paperId, sizeId, columns, rows) => expect(layoutOf(paper(paperId), size(sizeId))).toEqual({ columns, rows }));

  it('never goes over the edge of the paper', () => {
    for (const one of papers)
      for (const label of labelSizes) {
        const { columns, rows } = layoutOf(one, label);
        expect(columns * label.widthMm).toBeLessThanOrEqual(one.widthMm);
        expect(rows * label.heightMm).toBeLessThanOrEqual(one.heightMm);
        expect(columns * rows).toBeGreaterThan(0);
      }
  });

  it('takes the largest type that fits, and says when none does', () => {
    expect(fittingPt(11, (pt) => pt <= 8.3)).toBe(8.25);
    expect(fittingPt(11, () => true)).toBe(11);
    expect(fittingPt(11, (pt) => pt < 5)).toBeNull();
  });
});
