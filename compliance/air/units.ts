import { checkNumber } from '../input-error';
import { sourced } from '../source';

/** Litres of one mole of gas at 25 °C and 1 atm. */
export const MOLAR_VOLUME_L = 24.45;
export const MOLAR_VOLUME_SOURCE = sourced('ppm to mg/m³ at 25 °C and 1 atm', 'derived', { note: 'Molar volume of an ideal gas, 24.47 L by its law; the printed 24.45 is recalled and agrees to a thousandth, and with the paired MDI limits 0.02 ppm and 0.2 mg/m³.' });

const MICROGRAMS_PER_MG = 1_000;

/** mg/m³ = ppm × molar mass ÷ 24.45. */
export function ppmToMgPerM3(ppm: number, molarMassGPerMol: number): number {
  checkNumber('ppm', ppm, { min: 0 });
  return (ppm * checkNumber('molarMassGPerMol', molarMassGPerMol, { above: 0 })) / MOLAR_VOLUME_L;
}

export function mgPerM3ToPpm(mgPerM3: number, molarMassGPerMol: number): number {
  checkNumber('mgPerM3', mgPerM3, { min: 0 });
  return (mgPerM3 * MOLAR_VOLUME_L) / checkNumber('molarMassGPerMol', molarMassGPerMol, { above: 0 });
}

export const ppbToPpm = (ppb: number): number => checkNumber('ppb', ppb, { min: 0 }) / 1_000;
export const mgToMicrogramsPerM3 = (mgPerM3: number): number => checkNumber('mgPerM3', mgPerM3, { min: 0 }) * MICROGRAMS_PER_MG;
export const microgramsToMgPerM3 = (microgramsPerM3: number): number => checkNumber('microgramsPerM3', microgramsPerM3, { min: 0 }) / MICROGRAMS_PER_MG;

/** Takes off the noise of binary fractions, so that an average of exactly the limit is not "above" it. */
export function withoutNoise(value: number): number {
  return Number(value.toPrecision(12));
}
