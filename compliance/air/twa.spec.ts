import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { concentrationThatGives, shiftTwa, twaEightHours, twaWorstEightHours } from './twa';

const hours = (...pairs: [hours: number, concentration: number][]) => pairs.map(([h, concentration]) => ({ minutes: h * 60, concentration }));

describe('[AIR-01] 8-hour average', () => {
  it.each([
    ['A1, 29 CFR 1910.1000(d)(1)(ii), verified: ppm', hours([2, 150], [2, 75], [4, 50]), 81.25],
    ['B3, derived: µg/m³ of silica', hours([2, 180], [4, 40], [2, 10]), 67.5],
    ['B3, derived: 10 h at 45, divided by 8, not by hours worked (trap 22)', hours([10, 45]), 56.25],
    ['A3, OSHA construction silica FAQ, verified: 15 min at 800 µg/m³', hours([0.25, 800]), 25],
    ['no work', [], 0],
  ])('%s', (_name, periods, expected) => {
    expect(twaEightHours(periods)).toBe(expected);
  });

  it('names both readings of a long shift and uses the whole shift', () => {
    // B3, derived: whole shift 56.25, worst eight hours 45.
    expect(shiftTwa(600, hours([10, 45]))).toMatchObject({ isDecided: true, wholeShift: 56.25, worstEightHours: 45, isLongShift: true });
    expect(twaWorstEightHours(hours([4, 10], [6, 100]))).toBe((6 * 100 + 2 * 10) / 8);
    expect(shiftTwa(480, hours([8, 45]))).toMatchObject({ wholeShift: 45, worstEightHours: 45, isLongShift: false });
  });

  it('finds the short-task concentration of A3: 800 µg/m³ for 15 minutes gives the action level', () => {
    expect(concentrationThatGives(25, 15)).toBe(800);
  });

  it('is undecided while minutes have no stated concentration', () => {
    expect(shiftTwa(480, [{ minutes: 120, concentration: 180 }, { minutes: 60, concentration: null }])).toMatchObject({ isDecided: false, unstatedMinutes: 360 });
    expect(shiftTwa(120, [{ minutes: 120, concentration: 0 }])).toMatchObject({ isDecided: true, wholeShift: 0 });
  });

  it.each([
    ['minutes below zero', [{ minutes: -1, concentration: 1 }], /^periods\[0\]\.minutes/],
    ['no number', [{ minutes: 10, concentration: Number.NaN }], /^periods\[0\]\.concentration/],
    ['a concentration below zero', [{ minutes: 10, concentration: -1 }], /^periods\[0\]\.concentration/],
    ['more than a day', hours([13, 1], [12, 1]), /^periods/],
  ])('refuses %s by name', (_name, periods, message) => {
    expect(() => twaEightHours(periods)).toThrow(InputError);
    expect(() => twaEightHours(periods)).toThrow(message);
  });

  it('refuses periods longer than the shift', () => {
    expect(() => shiftTwa(60, hours([2, 1]))).toThrow(/^periods/);
  });

  const anyPeriods = fc.array(fc.record({ concentration: fc.double({ min: 0, max: 1000, noNaN: true }), minutes: fc.integer({ min: 0, max: 230 }) }), { maxLength: 6 });
  it('changes with no permutation, and never falls when work is added or the air gets worse', () => {
    fc.assert(
      fc.property(anyPeriods, fc.record({ concentration: fc.double({ min: 0, max: 1000, noNaN: true }), minutes: fc.integer({ min: 0, max: 60 }) }), (periods, more) => {
        const before = twaEightHours(periods);
        expect(twaEightHours([...periods].reverse())).toBeCloseTo(before, 9);
        expect(twaEightHours([...periods, more])).toBeGreaterThanOrEqual(before);
        expect(twaEightHours(periods.map((each) => ({ ...each, concentration: each.concentration + 1 })))).toBeGreaterThanOrEqual(before);
        expect(twaWorstEightHours(periods)).toBeLessThanOrEqual(before + 1e-9);
      }),
    );
  });
});
