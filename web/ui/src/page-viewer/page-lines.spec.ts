import { describe, expect, it } from '@jest/globals';
import { linesOf } from './page-lines';

const run = (text: string, x: number, y: number, height = 10) => ({ text, x, y, height });

describe('the text of a page', () => {
  it('reads from top to bottom and left to right, whatever was drawn first', () => {
    expect(linesOf([run('Part C, powder', 120, 700), run('2. Hazards', 40, 600), run('Product', 40, 700), run('1. Identification', 40, 740, 14)])).toEqual(['1. Identification', 'Product Part C, powder', '2. Hazards']);
  });

  it('keeps large and small type of one line together, and close lines apart', () => {
    expect(linesOf([run('DANGER', 40, 500, 18), run('causes burns', 140, 504, 9), run('next line', 40, 488, 9)])).toEqual(['DANGER causes burns', 'next line']);
  });

  it('has no lines for blanks', () => {
    expect(linesOf([run(' ', 40, 500), run('', 60, 500)])).toEqual([]);
  });
});
