import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { coverageM2, kitsFor, mixingOf, statedCoverageFt2 } from './kits';
import { ft2FromM2, litersFromFt3, m2FromFt2, MM_PER_INCH } from './units';

// common practice, no source: 25 ft² at 1/4 in and "about 16" at 3/8 in are one volume, 25 × 0.25/12 = 0.5208 ft³.
const VOLUME_L = litersFromFt3((25 * 0.25) / 12);
const QUARTER = 0.25 * MM_PER_INCH;
const THREE_EIGHTHS = 0.375 * MM_PER_INCH;

describe('kits from area and thickness', () => {
  it('covers 25 ft² at 1/4 in and 16.67, stated as 16, at 3/8 in (common practice, no source)', () => {
    expect(statedCoverageFt2(VOLUME_L, QUARTER)).toBe(25);
    expect(ft2FromM2(coverageM2(VOLUME_L, THREE_EIGHTHS))).toBeCloseTo(16.667, 3);
    expect(statedCoverageFt2(VOLUME_L, THREE_EIGHTHS)).toBe(16);
  });

  it('turns 600 ft² at 1/4 in into 24 kits, 48 minutes of mixing and 24 dumps (common practice, no source)', () => {
    const kits = kitsFor(m2FromFt2(600), QUARTER, VOLUME_L);
    expect(kits).toBe(24);
    expect(mixingOf({ kits, mixMinutesPerKit: 2, powderParts: 1 })).toEqual({ mixingMinutes: 48, powderDumps: 24 });
  });

  it.each([
    [25, QUARTER, 1],
    [26, QUARTER, 2],
    [601, QUARTER, 25],
    [0, QUARTER, 0],
    // derived: 600 ft² × 3/8 in = 18.75 ft³; ÷ 0.5208 = 36 by volume (the stated 16 ft² would give 38)
    [600, THREE_EIGHTHS, 36],
  ])('%d ft² at %f mm needs %d kits, rounded up (derived)', (ft2, mm, kits) => {
    expect(kitsFor(m2FromFt2(ft2), mm, VOLUME_L)).toBe(kits);
  });

  it('does not count a kit more for a volume written with fewer digits', () => {
    expect(kitsFor(m2FromFt2(600), QUARTER, 14.748)).toBe(24);
    expect(statedCoverageFt2(14.748, QUARTER)).toBe(25);
  });

  it('never leaves more than a hundredth of a kit of floor uncovered, and never brings a kit too many', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 5000, noNaN: true }), fc.double({ min: 1, max: 30, noNaN: true }), fc.double({ min: 5, max: 60, noNaN: true }), (area, mm, volume) => {
        const kits = kitsFor(area, mm, volume);
        const exact = (area * mm) / volume;
        expect(kits).toBeGreaterThanOrEqual(exact - 0.0101);
        expect(kits).toBeLessThan(exact + 1);
      }),
    );
  });

  it.each([
    ['areaM2', () => kitsFor(-1, QUARTER, VOLUME_L)],
    ['areaM2', () => kitsFor(Number.NaN, QUARTER, VOLUME_L)],
    ['thicknessMm', () => kitsFor(1, 0, VOLUME_L)],
    ['volumeL', () => kitsFor(1, QUARTER, 0)],
    ['powderParts', () => mixingOf({ kits: 1, mixMinutesPerKit: 2, powderParts: -1 })],
  ])('refuses an impossible %s by name', (field, run) => {
    expect(run).toThrow(InputError);
    expect(run).toThrow(field);
  });
});
