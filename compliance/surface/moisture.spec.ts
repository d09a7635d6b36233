import { describe, expect, it } from '@jest/globals';
import { InputError } from '../input-error';
import { humidityProbeDepthMm, humidityTestHoles, moistureVaporEmission } from './moisture';

describe('floor moisture', () => {
  it('B6, derived: 10 g on 0.5 ft² in 72 h is 14.7 lb per 1,000 ft² and day', () => {
    const reading = moistureVaporEmission(10, 0.5, 72);
    expect(reading.mverLb).toBeCloseTo(14.7, 1);
    expect(reading.isValid).toBe(true);
  });

  // ASTM F1869: 60 to 72 hours, verified.
  it.each([
    [59.9, false],
    [60, true],
    [72, true],
    [72.1, false],
  ])('a dish of %d h is valid: %s', (hours, isValid) => {
    expect(moistureVaporEmission(5, 0.5, hours).isValid).toBe(isValid);
  });

  // ASTM F2170: three holes for the first 1,000 ft² and one more per further 1,000; 40 % or 20 % of the slab, verified.
  it.each([
    [500, 3],
    [1000, 3],
    [1001, 4],
    [2000, 4],
    [3200, 6],
  ])('%d ft² needs %d humidity holes', (area, holes) => {
    expect(humidityTestHoles(area)).toBe(holes);
  });
  it('puts the probe at 40 % of the slab, or 20 % where both sides dry', () => {
    expect(humidityProbeDepthMm(150, 'one-side')).toBe(60);
    expect(humidityProbeDepthMm(150, 'both-sides')).toBe(30);
  });

  it('refuses impossible values by name', () => {
    expect(() => moistureVaporEmission(-1, 0.5, 72)).toThrow(InputError);
    expect(() => moistureVaporEmission(1, 0, 72)).toThrow(/^dishAreaFt2/);
    expect(() => humidityTestHoles(0)).toThrow(/^areaFt2/);
  });
});
