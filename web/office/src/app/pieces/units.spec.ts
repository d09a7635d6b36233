import { beforeEach, describe, expect, it } from '@jest/globals';
import { inUnit, numberFrom, preferredUnit, preferUnit, quantities, useUnits, withUnit } from './units';

const unitOf = (quantity: keyof typeof quantities, id: string) => {
  const found = quantities[quantity].find((unit) => unit.id === id);
  if (!found) throw new Error(id);
  return found;
};

describe('figures as people type them', () => {
  it.each([
    ['38,000', 38_000],
    ['1/4', 0.25],
    ['1 3/8', 1.375],
    ['0.5', 0.5],
    ['.5', 0.5],
  ])('%s is %s', (text, value) => {
    expect(numberFrom(text)).toBe(value);
  });

  it.each(['', 'about 4', '1/0', '-3', '1e5', '12,34'])('%p is no number', (text) => {
    expect(numberFrom(text)).toBeNaN();
  });
});

describe('units', () => {
  beforeEach(() => useUnits({}));

  // Source: NIST SP 811, appendix B.8: 1 ft² = 0.09290304 m² (exact), 1 in = 25.4 mm (exact), 1 gal (US) = 3.785412 L.
  it.each([
    ['area', 'ft2', 600, 55.741824],
    ['thickness', 'in', 0.25, 6.35],
    ['mix', 'gal', 1, 3.785412],
    ['room', 'ft3', 38_000, 1076.04],
  ] as const)('%s: %s, %s is %s in SI and comes back as typed', (quantity, id, typed, si) => {
    const unit = unitOf(quantity, id);
    expect(typed * unit.perUnit).toBeCloseTo(si, 2);
    expect(numberFrom(inUnit(typed * unit.perUnit, unit))).toBeCloseTo(typed, 6);
  });

  it('are the ones this person typed last, as the session brought them; one that is not known is the trade’s own', () => {
    expect(withUnit('thickness', 6.35)).toBe('1/4 in');
    useUnits({ thickness: 'mm', area: 'acre' });
    expect(withUnit('thickness', 6.35)).toBe('6.35 mm');
    expect(preferredUnit('area').id).toBe('ft2');
    expect(preferUnit('thickness', unitOf('thickness', 'mm'))).toBe(false);
    expect(preferUnit('thickness', unitOf('thickness', 'in'))).toBe(true);
    expect(withUnit('thickness', 6.35)).toBe('1/4 in');
  });

  it('says inches in eighths where they are eighths', () => {
    expect(withUnit('thickness', 6.35)).toBe('1/4 in');
    expect(withUnit('thickness', 9.525)).toBe('3/8 in');
    expect(withUnit('thickness', 38.1)).toBe('1 1/2 in');
    expect(withUnit('thickness', 7)).toBe('0.2756 in');
  });
});
