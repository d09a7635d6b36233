import { checkNumber } from '../input-error';
import { type Words } from '../outcome';
import { sourced, type Source } from '../source';

export const MVER_SOURCE: Source = sourced('ASTM F1869', 'partly', { note: 'Scope text of F1869-11 and a vendor page for conditions and time; the factor 52.91 = 24 × 1,000 ÷ 453.59 derived.' });
export const RH_SOURCE: Source = sourced('ASTM F2170', 'partly', { note: 'Instrument manual quoting the 2009 edition; 24 hours since the 2018 revision in a meter maker’s article.' });

const GRAMS_PER_LB = 453.59237;
/** The dish must stand on bare concrete this long. */
export const MVER_HOURS = { min: 60, max: 72 } as const;

export interface MoistureReading {
  /** lb per 1,000 ft² per 24 h. */
  readonly mverLb: number;
  readonly isValid: boolean;
  readonly reason: Words;
  readonly source: Source;
}

/** Moisture vapor emission rate from the weight a calcium chloride dish gained; valid only for 60 to 72 hours. */
export function moistureVaporEmission(weightGainG: number, dishAreaFt2: number, hours: number): MoistureReading {
  checkNumber('weightGainG', weightGainG, { min: 0 });
  checkNumber('dishAreaFt2', dishAreaFt2, { above: 0 });
  checkNumber('hours', hours, { above: 0 });
  const mverLb = ((24 * 1_000) / GRAMS_PER_LB) * (weightGainG / (dishAreaFt2 * hours));
  const isValid = hours >= MVER_HOURS.min && hours <= MVER_HOURS.max;
  return {
    mverLb,
    isValid,
    reason: isValid
      ? { en: 'The dish stood 60 to 72 hours.', es: 'El plato estuvo de 60 a 72 horas.' }
      : { en: `The dish stood ${hours} hours; the test wants 60 to 72.`, es: `El plato estuvo ${hours} horas; la prueba pide de 60 a 72.` },
    source: MVER_SOURCE,
  };
}

/** Holes for the in-slab humidity test: three for the first 1,000 ft², one more for each further 1,000 ft² begun. */
export function humidityTestHoles(areaFt2: number): number {
  checkNumber('areaFt2', areaFt2, { above: 0 });
  return 3 + Math.max(0, Math.ceil((areaFt2 - 1_000) / 1_000));
}

/** Depth of the humidity probe: 40 % of the slab drying from one side, 20 % from both. */
export function humidityProbeDepthMm(slabThicknessMm: number, driesFrom: 'one-side' | 'both-sides'): number {
  return checkNumber('slabThicknessMm', slabThicknessMm, { above: 0 }) * (driesFrom === 'one-side' ? 0.4 : 0.2);
}
