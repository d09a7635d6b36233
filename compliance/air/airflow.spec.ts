import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { airflowDemand, handheldAirflowCfm, meetsAirflow } from './airflow';
import { MM_PER_INCH, m3PerHFromCfm } from '../quantities/units';

const handheld = { isHandheldGrinder: true, wheelDiameterMm: null, makerAirflowM3PerH: null };
const walkBehind = { ...handheld, isHandheldGrinder: false };

describe('[AIR-03] collector airflow', () => {
  // A14: 29 CFR 1926.1153 Table 1 (xi), (xii): 100 cfm in OSHA's video, 125 cfm in a trade article, verified; 7 in by the same rule.
  it.each([
    [4, 100],
    [5, 125],
    [7, 175],
  ])('%d-inch wheel needs %d cfm', (inches, cfm) => {
    expect(handheldAirflowCfm(inches)).toBe(cfm);
    const demand = airflowDemand({ ...handheld, wheelDiameterMm: inches * MM_PER_INCH });
    expect(demand.isDecided && demand.requiredM3PerH).toBeCloseTo(m3PerHFromCfm(cfm), 9);
  });

  it('takes the maker’s figure for a walk-behind machine, and asks where there is none', () => {
    expect(airflowDemand({ ...walkBehind, makerAirflowM3PerH: 400 })).toMatchObject({ isDecided: true, requiredM3PerH: 400 });
    // No numeric cfm in row (xiii): a wheel size changes nothing.
    expect(airflowDemand({ ...walkBehind, wheelDiameterMm: 500 })).toMatchObject({ isDecided: false, whoDecides: { en: 'the maker of the machine' } });
  });

  it('asks for the wheel size of a handheld grinder, and follows the maker where that is more', () => {
    expect(airflowDemand(handheld)).toMatchObject({ isDecided: false });
    expect(airflowDemand({ ...handheld, wheelDiameterMm: 127, makerAirflowM3PerH: 300 })).toMatchObject({ requiredM3PerH: 300 });
  });

  it('passes on the figure and fails just under it', () => {
    const required = m3PerHFromCfm(100);
    expect(meetsAirflow(169.9, required)).toBe(true);
    expect(meetsAirflow(m3PerHFromCfm(99.9), required)).toBe(false);
  });

  it('refuses a wheel of nothing by name', () => {
    expect(() => airflowDemand({ ...handheld, wheelDiameterMm: 0 })).toThrow(InputError);
    expect(() => handheldAirflowCfm(-4)).toThrow(/^wheelDiameterIn/);
  });

  it('asks for more air the larger the wheel', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 500, noNaN: true }), fc.double({ min: 0, max: 400, noNaN: true }), (mm, more) => {
        const of = (wheelDiameterMm: number) => {
          const demand = airflowDemand({ ...handheld, wheelDiameterMm });
          return demand.isDecided ? demand.requiredM3PerH : Number.NaN;
        };
        expect(of(mm + more)).toBeGreaterThanOrEqual(of(mm));
      }),
    );
  });
});
