import { describe, expect, it } from '@jest/globals';
import { PUBLISHED_EXPOSURES } from './published-exposure.data';

describe('published exposures', () => {
  // Section 10.3 of the reference, each from its study.
  it.each([
    ['handheld-grinding-uncontrolled', 61.7, false],
    ['handheld-grinding-wet', 0.896, false],
    ['handheld-grinding-vacuum', 0.155, false],
    ['concrete-finishing', 1.16, false],
    ['drillers-and-grinders', 0.84, true],
    ['mortar-mixing', 0.11, false],
    ['shot-blasting', null, false],
    ['walk-behind-grinding', null, false],
    ['powder-mixing', null, false],
  ])('%s: %s mg/m³', (id, mgPerM3, isEightHourAverage) => {
    const row = PUBLISHED_EXPOSURES.find((each) => each.id === `exposure/${id}`)!;
    expect([row.mgPerM3, row.isEightHourAverage]).toEqual([mgPerM3, isEightHourAverage]);
    expect(PUBLISHED_EXPOSURES).toHaveLength(9);
  });
});
