import { describe, expect, it } from '@jest/globals';
import { InputError } from '../input-error';
import { additiveMixture } from './mixture';

const of = (...pairs: [concentration: number, limit: number | null][]) => pairs.map(([concentration, limit], i) => ({ name: 'BCD'[i]!, concentration, limit }));

describe('[AIR-01] additive mixture', () => {
  it('gives 0.925 for A2, 29 CFR 1910.1000(d)(2)(ii), verified', () => {
    const result = additiveMixture(of([500, 1000], [45, 200], [40, 200]));
    expect(result).toMatchObject({ isDecided: true, isExceeded: false });
    if (result.isDecided) {
      expect(result.index).toBeCloseTo(0.925, 12);
      expect(result.shares.map(({ share }) => share)).toEqual([0.5, 0.225, 0.2]);
    }
  });

  it('exceeds only above 1 (derived)', () => {
    expect(additiveMixture(of([50, 100], [50, 100]))).toMatchObject({ isExceeded: false });
    expect(additiveMixture(of([50, 100], [51, 100]))).toMatchObject({ isExceeded: true });
  });

  it('is undecided where a member has no limit, and names it', () => {
    expect(additiveMixture(of([50, 100], [5, null]))).toMatchObject({ isDecided: false, withoutLimit: ['C'] });
  });

  it('refuses a limit of zero by name', () => {
    expect(() => additiveMixture(of([1, 0]))).toThrow(InputError);
    expect(() => additiveMixture(of([1, 0]))).toThrow(/^members\[0\]\.limit/);
  });
});
