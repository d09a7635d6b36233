import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { mgPerM3ToPpm, mgToMicrogramsPerM3, microgramsToMgPerM3, ppbToPpm, ppmToMgPerM3 } from './units';

const MDI_G_PER_MOL = 250.26;

describe('[AIR-01] units', () => {
  // A16: NIOSH IDLH documentation pairs 0.02 ppm with 0.2 mg/m³ and 0.005 ppm with 0.05 mg/m³ (0.051 in the TLV), verified; tolerance 5 %.
  it.each([
    [0.02, 0.2, 0.2047],
    [0.005, 0.051, 0.0512],
  ])('%d ppm of MDI is %d mg/m³', (ppm, printed, computed) => {
    const mgPerM3 = ppmToMgPerM3(ppm, MDI_G_PER_MOL);
    expect(mgPerM3).toBeCloseTo(computed, 4);
    expect(Math.abs(mgPerM3 / printed - 1)).toBeLessThan(0.05);
  });

  it('converts by definition: 50 µg = 0.05 mg, 10 ppb = 0.01 ppm', () => {
    expect(microgramsToMgPerM3(50)).toBe(0.05);
    expect(mgToMicrogramsPerM3(0.05)).toBe(50);
    expect(ppbToPpm(10)).toBe(0.01);
  });

  it('comes back where it started', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1e6, noNaN: true }), fc.double({ min: 1, max: 1000, noNaN: true }), (value, molarMass) => {
        expect(mgPerM3ToPpm(ppmToMgPerM3(value, molarMass), molarMass)).toBeCloseTo(value, 6);
      }),
    );
  });

  it('refuses a molar mass of zero by name', () => {
    expect(() => ppmToMgPerM3(1, 0)).toThrow(InputError);
    expect(() => mgPerM3ToPpm(1, 0)).toThrow(/^molarMassGPerMol/);
  });
});
