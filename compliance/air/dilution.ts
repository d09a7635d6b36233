import { singleCodes } from '../hazcom/statements';
import { checkNumber } from '../input-error';
import { type Words } from '../outcome';
import { sourced, type Source } from '../source';
import { MOLAR_VOLUME_L } from './units';

/** For evaporation in pints per minute; not to be mixed with 387, which goes with pounds. The range of K is recalled. */
const CFM_CONSTANT_PINTS = 403e6;
/** For evaporation in pounds per minute: cubic feet of vapor that a pound-mole gives, times a million. */
const CFM_CONSTANT_POUNDS = 387e6;
export const DILUTION_SOURCE = sourced('Industrial ventilation manual, dilution for health', 'partly', { note: 'Formula read in a university sheet; the range of the mixing factor K (1 to 10) recalled.' });
export const DILUTION_METRIC_SOURCE = sourced('Metric form of the dilution formula at 25 °C', 'derived', { note: 'Differs from the 403 form by 1.4 %.' });
const UNSUITABLE_SOURCE = sourced('Industrial ventilation practice', 'from-memory', { note: 'Dilution is unsuitable for dust and for sensitizers such as isocyanates.' });

/** Statements of sensitizers: air is exhausted where they arise, never thinned. */
const SENSITIZER_CODES = ['H334', 'H317', 'EUH204', 'EUH208', 'EUH205'];

export type DilutionAnswer =
  | { readonly isAllowed: true; /** For perfect mixing. */ readonly idealM3PerH: number; readonly requiredM3PerH: number; readonly source: Source }
  | { readonly isAllowed: false; readonly reason: Words; readonly source: Source };

/** Q' = 403·10⁶ × SG × ER ÷ (MW × C) in cfm, ER in pints per minute; Q = K × Q'. */
export function dilutionAirflowCfm(vapor: {
  readonly specificGravity: number;
  readonly evaporationPintsPerMin: number;
  readonly molarMassGPerMol: number;
  readonly targetPpm: number;
  /** K: 1 for ideal to 10 for poor mixing. */
  readonly mixingFactor: number;
}): { readonly idealCfm: number; readonly requiredCfm: number } {
  checkNumber('specificGravity', vapor.specificGravity, { above: 0, max: 5 });
  checkNumber('evaporationPintsPerMin', vapor.evaporationPintsPerMin, { min: 0 });
  checkNumber('molarMassGPerMol', vapor.molarMassGPerMol, { above: 0 });
  checkNumber('targetPpm', vapor.targetPpm, { above: 0 });
  checkNumber('mixingFactor', vapor.mixingFactor, { min: 1, max: 10 });
  const idealCfm = (CFM_CONSTANT_PINTS * vapor.specificGravity * vapor.evaporationPintsPerMin) / (vapor.molarMassGPerMol * vapor.targetPpm);
  return { idealCfm, requiredCfm: idealCfm * vapor.mixingFactor };
}

/** Q' = 387·10⁶ × W ÷ (MW × C) in cfm, W in pounds per minute; Q = K × Q'. Pounds hold the density already: no specific gravity. */
export function dilutionAirflowCfmFromPounds(vapor: { readonly evaporationLbPerMin: number; readonly molarMassGPerMol: number; readonly targetPpm: number; readonly mixingFactor: number }): { readonly idealCfm: number; readonly requiredCfm: number } {
  checkNumber('evaporationLbPerMin', vapor.evaporationLbPerMin, { min: 0 });
  checkNumber('molarMassGPerMol', vapor.molarMassGPerMol, { above: 0 });
  checkNumber('targetPpm', vapor.targetPpm, { above: 0 });
  checkNumber('mixingFactor', vapor.mixingFactor, { min: 1, max: 10 });
  const idealCfm = (CFM_CONSTANT_POUNDS * vapor.evaporationLbPerMin) / (vapor.molarMassGPerMol * vapor.targetPpm);
  return { idealCfm, requiredCfm: idealCfm * vapor.mixingFactor };
}

/** Where dilution is no control at all: dust, mist, and anything whose statements name a sensitizer. Null where it may serve. */
export function dilutionRefusal(form: 'vapor' | 'dust' | 'mist', hazardCodes: readonly string[]): Extract<DilutionAnswer, { isAllowed: false }> | null {
  if (form !== 'vapor') {
    return { isAllowed: false, reason: { en: 'Fresh air does not control dust or mist. Capture it where it arises.', es: 'El aire fresco no controla el polvo ni la niebla. Captúrelo donde se produce.' }, source: UNSUITABLE_SOURCE };
  }
  const sensitizers = singleCodes(hazardCodes).filter((code) => SENSITIZER_CODES.includes(code));
  if (sensitizers.length === 0) return null;
  return { isAllowed: false, reason: { en: `Fresh air is not enough for a sensitizer (${sensitizers.join(', ')}). Capture it where it arises.`, es: `El aire fresco no basta para un sensibilizante (${sensitizers.join(', ')}). Captúrelo donde se produce.` }, source: UNSUITABLE_SOURCE };
}

/** Fresh air that keeps a vapor at `targetPpm`: Q = 24,450 × G × K ÷ (MW × C), m³/h, G in g/h. Refused where dilution is no control. */
export function dilutionVentilation(contaminant: {
  readonly form: 'vapor' | 'dust' | 'mist';
  readonly hazardCodes: readonly string[];
  readonly evaporationGPerH: number;
  readonly molarMassGPerMol: number;
  readonly targetPpm: number;
  readonly mixingFactor: number;
}): DilutionAnswer {
  const { form, hazardCodes, evaporationGPerH, molarMassGPerMol, targetPpm, mixingFactor } = contaminant;
  checkNumber('evaporationGPerH', evaporationGPerH, { min: 0 });
  checkNumber('molarMassGPerMol', molarMassGPerMol, { above: 0 });
  checkNumber('targetPpm', targetPpm, { above: 0 });
  checkNumber('mixingFactor', mixingFactor, { min: 1, max: 10 });
  const refusal = dilutionRefusal(form, hazardCodes);
  if (refusal !== null) return refusal;
  const idealM3PerH = (MOLAR_VOLUME_L * 1_000 * evaporationGPerH) / (molarMassGPerMol * targetPpm);
  return { isAllowed: true, idealM3PerH, requiredM3PerH: idealM3PerH * mixingFactor, source: DILUTION_METRIC_SOURCE };
}
