import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { generalIndustryActionLevelDba, isImpulseExceeded, nioshDosePercent, nioshTwaDba, noiseDosePercent, noiseShift, printedReferenceHours, referenceHours, tableD2Fraction, tableD2Hours, twaDbaFromDose } from './dose';
import { PUBLISHED_LEVELS, TABLE_D2, TABLE_G16A } from './noise-tables.data';

const at = (...pairs: [levelDba: number, hours: number][]) => pairs.map(([levelDba, hours]) => ({ levelDba, minutes: hours * 60 }));

describe('[NOI-01] construction, 29 CFR 1926.52 Table D-2', () => {
  // Cornell LII copy and Michigan parallel rule, verified.
  it('holds the nine steps', () => {
    expect(TABLE_D2.map((row) => [row.levelDba, row.hours])).toEqual([[90, 8], [92, 6], [95, 4], [97, 3], [100, 2], [102, 1.5], [105, 1], [110, 0.5], [115, 0.25]]);
  });

  it('gives 0.9375 for A4, 1926.52(d)(2)(iii), partly verified', () => {
    const result = tableD2Fraction(at([110, 0.25], [100, 0.5], [90, 1.5]));
    expect(result.fraction).toBeCloseTo(0.938, 3);
    expect(result.fraction).toBe(0.9375);
    expect(result.isExceeded).toBe(false);
  });

  it('gives 1.58 for B4, derived: 85 dBA is below the table', () => {
    const result = tableD2Fraction(at([97, 4], [90, 2], [85, 2]));
    expect(result.fraction).toBeCloseTo(4 / 3 + 2 / 8, 12);
    expect(result.isExceeded).toBe(true);
  });

  it.each(TABLE_D2.map((row) => [row.levelDba, row.hours]))('%d dBA: exceeded just after %d h, not at it', (level, hours) => {
    expect(tableD2Fraction(at([level!, hours!])).isExceeded).toBe(false);
    expect(tableD2Fraction([{ levelDba: level!, minutes: hours! * 60 + 1 }]).isExceeded).toBe(true);
  });

  it('takes the next louder step between two, and counts nothing under 90 dBA (trap 20)', () => {
    expect(tableD2Hours(90.1)).toBe(6);
    expect(tableD2Hours(98)).toBe(2);
    expect(tableD2Hours(89.9)).toBe(Number.POSITIVE_INFINITY);
    expect(tableD2Fraction(at([89, 8])).fraction).toBe(0);
  });

  it('permits no time above 115 dBA, whatever general industry’s durations say (section 14)', () => {
    expect(tableD2Hours(115.1)).toBeNull();
    const shift = noiseShift(at([120, 0.1]));
    expect(shift.construction).toMatchObject({ isExceeded: true, minutesAboveTable: 6 });
    expect(shift.generalIndustryDosePercent).toBeLessThan(100);
    expect(shift.isAboveTable).toBe(true);
  });

  it('caps impulses at 140 dB peak, (e): read in 41 CFR 50-204.10 and 1910.95', () => {
    expect([isImpulseExceeded(140), isImpulseExceeded(140.1)]).toEqual([false, true]);
  });

  it('refuses impossible values by name', () => {
    expect(() => tableD2Fraction([{ levelDba: 95, minutes: -5 }])).toThrow(InputError);
    expect(() => tableD2Fraction([{ levelDba: Number.NaN, minutes: 5 }])).toThrow(/^periods\[0\]\.levelDba/);
    expect(() => tableD2Fraction(at([90, 13], [90, 12]))).toThrow(/^periods/);
  });

  it('never falls with more minutes or a higher level, and changes with no permutation', () => {
    const anyPeriods = fc.array(fc.record({ levelDba: fc.integer({ min: 70, max: 125 }), minutes: fc.integer({ min: 0, max: 120 }) }), { minLength: 1, maxLength: 6 });
    fc.assert(
      fc.property(anyPeriods, fc.integer({ min: 0, max: 20 }), fc.integer({ min: 0, max: 60 }), (periods, louder, longer) => {
        const before = tableD2Fraction(periods);
        const [first, ...rest] = periods;
        const after = tableD2Fraction([{ levelDba: first!.levelDba + louder, minutes: first!.minutes + longer }, ...rest]);
        expect(after.fraction).toBeGreaterThanOrEqual(before.fraction - 1e-12);
        expect(after.isExceeded || !before.isExceeded).toBe(true);
        expect(tableD2Fraction([...periods].reverse()).fraction).toBeCloseTo(before.fraction, 12);
      }),
    );
  });
});

describe('[NOI-02] general industry, 29 CFR 1910.95 App. A, shown beside', () => {
  // A5: Table G-16a, OSHA page, verified; the formula gives every printed value at the precision printed.
  it.each(TABLE_G16A.map((row) => [row.levelDba, row.hours]))('%d dBA: printed %d h', (level, hours) => {
    const decimals = hours! < 0.1 || String(hours).includes('.125') ? 3 : hours! < 1 ? 2 : 1;
    expect(Number(referenceHours(level!).toFixed(decimals))).toBe(hours);
  });
  it('A5: the durations picked out there', () => {
    const picked: [number, number][] = [[80, 32], [85, 16], [90, 8], [92, 6.1], [95, 4], [97, 3], [100, 2], [102, 1.5], [105, 1], [110, 0.5], [115, 0.25], [120, 0.125], [130, 0.031]];
    for (const [level, hours] of picked) expect(printedReferenceHours(level)).toBe(hours);
    expect(TABLE_G16A).toHaveLength(43);
  });

  it('A6: a constant level for eight hours is its own average; 92 dBA gives 131.95 %, 131 % with the rounded 6.1', () => {
    for (const level of [80, 85, 90, 92, 97, 105, 115]) expect(twaDbaFromDose(noiseDosePercent(at([level, 8]), 80))).toBeCloseTo(level, 1);
    expect(noiseDosePercent(at([92, 8]), 90)).toBeCloseTo(131.95, 2);
    expect(Math.floor(noiseDosePercent(at([92, 8]), 90, printedReferenceHours))).toBe(131);
  });

  // A17, training site, verified for sums; summed from the printed table.
  it.each([
    ['limit dose', at([100, 1], [90, 4], [85, 3]), 90, 100],
    ['hearing conservation dose', at([85, 5], [87, 2], [80, 0.5]), 80, 49.34],
    ['hearing conservation dose above', at([100, 1], [90, 4], [85, 3]), 80, 118.75],
  ] as const)('A17: %s', (_name, periods, threshold, expected) => {
    expect(noiseDosePercent(periods, threshold, printedReferenceHours)).toBeCloseTo(expected, 2);
  });

  it('B4, derived: 169.5 % and 93.8 dBA; NIOSH 904.4 % and 94.6 dBA', () => {
    const shift = noiseShift(at([97, 4], [90, 2], [85, 2]));
    expect(shift.hearingConservationDosePercent).toBeCloseTo(169.5, 1);
    expect(shift.generalIndustryTwaDba).toBeCloseTo(93.8, 1);
    expect(shift.nioshDosePercent).toBeCloseTo(904.4, 1);
    expect(shift.nioshTwaDba).toBeCloseTo(94.6, 1);
  });

  // Section 6.2: dose to average, derived from the formula; agrees with Table A-1 as recalled.
  it.each([
    [10, 73.4], [25, 80.0], [50, 85.0], [75, 87.9], [80, 88.4], [90, 89.2], [100, 90.0], [110, 90.7], [125, 91.6], [150, 92.9],
    [175, 94.0], [200, 95.0], [300, 97.9], [400, 100.0], [500, 101.6], [700, 104.0], [999, 106.6],
  ])('dose %d % is %d dBA', (dose, twa) => {
    expect(twaDbaFromDose(dose)).toBeCloseTo(twa, 1);
  });

  it('A18: lowers the general-industry action level for long shifts, 83.4 at 10 h and 82.1 at 12 h', () => {
    expect(generalIndustryActionLevelDba(10)).toBeCloseTo(83.4, 1);
    expect(generalIndustryActionLevelDba(12)).toBeCloseTo(82.1, 1);
    expect(Math.round(generalIndustryActionLevelDba(10))).toBe(83);
    expect(Math.round(generalIndustryActionLevelDba(12))).toBe(82);
    expect(generalIndustryActionLevelDba(8)).toBeCloseTo(85, 1);
    expect(generalIndustryActionLevelDba(4)).toBe(generalIndustryActionLevelDba(8));
  });

  it('NIOSH doubles the dose every 3 dB: 85 dBA for 8 h and 88 for 4 h are 100 % (training slide, verified)', () => {
    expect(nioshDosePercent(at([85, 8]))).toBeCloseTo(100, 9);
    expect(nioshDosePercent(at([88, 4]))).toBeCloseTo(100, 9);
    expect(nioshTwaDba(100)).toBe(85);
  });

  it('has no average for silence and refuses a level that is not printed', () => {
    expect(twaDbaFromDose(0)).toBeNull();
    expect(nioshTwaDba(0)).toBeNull();
    expect(() => noiseDosePercent(at([92.5, 1]), 80, printedReferenceHours)).toThrow(InputError);
  });
});

describe('[NOI-01] published levels', () => {
  it('are those of the study, and say where there is none', () => {
    // J Occup Environ Hyg 2013;10(9):478-486, verified.
    expect(PUBLISHED_LEVELS.map((row) => row.dba)).toEqual([97.0, 98.9, 98.5, 96.2, null]);
  });
});
