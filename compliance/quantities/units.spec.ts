import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { all, create, type Unit } from 'mathjs';
import { dilutionAirflowCfm, dilutionAirflowCfmFromPounds } from '../air/dilution';
import { twaEightHours } from '../air/twa';
import { MOLAR_VOLUME_L, mgPerM3ToPpm, ppmToMgPerM3 } from '../air/units';
import { moistureVaporEmission } from '../surface/moisture';
import { cfmFromM3PerH, ft2FromM2, ft3FromL, inchesFromMm, L_PER_FT3, litersFromFt3, m2FromFt2, M2_PER_FT2, M3_PER_H_PER_CFM, m3PerHFromCfm, MM_PER_INCH } from './units';

/** A reference of other makers: mathjs 15 knows its units by their definitions (international foot and pound, US liquid pint). */
const math = create(all ?? {}, {});
const convert = (value: number, from: string, to: string): number => math.unit(value, from).toNumber(to);
const close = (ours: number, reference: number): void => expect(Math.abs(ours - reference)).toBeLessThanOrEqual(Math.abs(reference) * 1e-12 + 1e-12);

describe('unit conversions against a reference library (mathjs)', () => {
  it.each([
    ['inch', MM_PER_INCH, convert(1, 'inch', 'mm')],
    ['ft²', M2_PER_FT2, convert(1, 'ft^2', 'm^2')],
    ['ft³', L_PER_FT3, convert(1, 'ft^3', 'l')],
    ['cfm', M3_PER_H_PER_CFM, convert(1, 'ft^3 / minute', 'm^3 / hour')],
  ])('one %s', (_name, ours, reference) => close(ours, reference));

  it.each<[string, (value: number) => number, string, string]>([
    ['mm → in', inchesFromMm, 'mm', 'inch'],
    ['m³/h → cfm', cfmFromM3PerH, 'm^3 / hour', 'ft^3 / minute'],
    ['cfm → m³/h', m3PerHFromCfm, 'ft^3 / minute', 'm^3 / hour'],
    ['m² → ft²', ft2FromM2, 'm^2', 'ft^2'],
    ['ft² → m²', m2FromFt2, 'ft^2', 'm^2'],
    ['L → ft³', ft3FromL, 'l', 'ft^3'],
    ['ft³ → L', litersFromFt3, 'ft^3', 'l'],
  ])('%s, any amount', (_name, ours, from, to) => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1e6, noNaN: true }), (value) => close(ours(value), convert(value, from, to))));
  });

  it('ppm and mg/m³: the molar volume is that of an ideal gas at 25 °C and 1 atm, to a thousandth', () => {
    const molarLiters = (math.divide(math.multiply(math.unit('8.314462618 J / (mol K)'), math.unit(298.15, 'K')), math.unit(1, 'atm')) as Unit).toNumber('l / mol');
    expect(Math.abs(MOLAR_VOLUME_L / molarLiters - 1)).toBeLessThan(1e-3);
    fc.assert(fc.property(fc.double({ min: 0, max: 1e4, noNaN: true }), fc.double({ min: 2, max: 500, noNaN: true }), (ppm, molarMass) => close(mgPerM3ToPpm(ppmToMgPerM3(ppm, molarMass), molarMass), ppm)));
  });

  it('the vapor constants: 387 ft³ a pound-mole is an ideal gas at 70 °F, 403 the same by pints of water (trap 21)', () => {
    const poundMole = math.divide(math.multiply(math.unit('8.314462618 J / (mol K)'), math.unit(convert(70, 'degF', 'K'), 'K'), math.unit(453.59237, 'mol')), math.unit(1, 'atm')) as Unit;
    const unitVapor = { molarMassGPerMol: 1, targetPpm: 1e6, mixingFactor: 1 };
    expect(Math.abs(dilutionAirflowCfmFromPounds({ ...unitVapor, evaporationLbPerMin: 1 }).idealCfm / poundMole.toNumber('ft^3') - 1)).toBeLessThan(1e-3);
    // A US pint of water at 25 °C, 0.99705 g/mL.
    const pounds = (convert(1, 'pint', 'ml') * 0.99705) / convert(1, 'lb', 'g');
    expect(Math.abs(dilutionAirflowCfm({ ...unitVapor, specificGravity: 1, evaporationPintsPerMin: 1 }).idealCfm / (poundMole.toNumber('ft^3') * pounds) - 1)).toBeLessThan(5e-3);
  });

  it('the moisture rate: grams a square foot and hour are pounds a thousand square feet and day', () => {
    const { mverLb } = moistureVaporEmission(10, 0.5, 72);
    close(mverLb, convert(10 / (0.5 * 72), 'g / (ft^2 hour)', 'lb / (ft^2 day)') * 1000);
  });
});

describe('[AIR-01] the 8-hour average against a reference library (mathjs): the mean of its 480 minutes', () => {
  it('is the mean of what was breathed each minute, nothing in the minutes without exposure', () => {
    const anyPeriods = fc.array(fc.record({ concentration: fc.double({ min: 0, max: 1000, noNaN: true }), minutes: fc.integer({ min: 0, max: 80 }) }), { maxLength: 6 });
    fc.assert(
      fc.property(anyPeriods, (periods) => {
        const series = periods.flatMap(({ concentration, minutes }) => Array<number>(minutes).fill(concentration));
        const day = [...series, ...Array<number>(480 - series.length).fill(0)];
        expect(Math.abs(twaEightHours(periods) - Number(math.mean(day)))).toBeLessThan(1e-9);
      }),
    );
  });
});
