import { checkMinutes, checkNumber, InputError, MINUTES_PER_DAY } from '../input-error';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { sourced, usFederal } from '../source';
import { withoutNoise } from './units';

export const TWA_SOURCE = usFederal('1910.1000', 'read', { paragraph: '(d)(1)(i)', note: 'Formula, definitions and example. The divisor is 8 hours whatever the length of the shift.' });
export const LONG_SHIFT_SOURCE = sourced('OSHA memorandum, 10 Nov 1999, extended work shifts', 'partly', { note: 'As summarized: field practice takes the worst 8 hours; the limit itself is not lowered except for lead.' });

const TWA_MINUTES = 480;

/** Air at one concentration for some minutes of one person's shift; the concentration in any one unit. */
export interface ExposurePeriod {
  readonly concentration: number;
  readonly minutes: number;
}

function checkPeriods(periods: readonly ExposurePeriod[]): void {
  periods.forEach((period, i) => {
    checkMinutes(`periods[${i}].minutes`, period.minutes);
    checkNumber(`periods[${i}].concentration`, period.concentration, { min: 0 });
  });
  checkShiftMinutes(periods);
}

function checkShiftMinutes(periods: readonly { readonly minutes: number }[]): number {
  const minutes = periods.reduce((sum, period) => sum + period.minutes, 0);
  if (minutes > MINUTES_PER_DAY) throw new InputError('periods', `add up to ${minutes} minutes, more than a day has`);
  return minutes;
}

/** Whole shift ÷ 8: Σ concentration × hours ÷ 8, in the unit of the concentrations. The stricter reading for shifts over 8 hours. */
export function twaEightHours(periods: readonly ExposurePeriod[]): number {
  checkPeriods(periods);
  return withoutNoise(periods.reduce((sum, { concentration, minutes }) => sum + concentration * minutes, 0) / TWA_MINUTES);
}

/** The most exposed 480 minutes of the shift ÷ 8, in the unit of the concentrations; the same as `twaEightHours` up to 8 hours. */
export function twaWorstEightHours(periods: readonly ExposurePeriod[]): number {
  checkPeriods(periods);
  let left = TWA_MINUTES;
  let sum = 0;
  for (const { concentration, minutes } of [...periods].sort((a, b) => b.concentration - a.concentration)) {
    const taken = Math.min(minutes, left);
    sum += concentration * taken;
    left -= taken;
  }
  return withoutNoise(sum / TWA_MINUTES);
}

export type ShiftTwa =
  | {
      readonly isDecided: true;
      readonly minutes: number;
      /** Used for decisions: whole shift ÷ 8. */
      readonly wholeShift: number;
      /** Shown beside it where the shift is longer than 8 hours. */
      readonly worstEightHours: number;
      readonly isLongShift: boolean;
      readonly reading: Words;
    }
  | { readonly isDecided: false; readonly unstatedMinutes: number; readonly reason: Words; readonly whoDecides: Words };

/**
 * The 8-hour average of a whole shift. Minutes without a stated concentration leave it undecided: they are never counted as zero.
 * @param shiftMinutes the shift's length; minutes beyond the periods' sum are unstated.
 */
export function shiftTwa(shiftMinutes: number, periods: readonly { readonly concentration: number | null; readonly minutes: number }[]): ShiftTwa {
  checkMinutes('shiftMinutes', shiftMinutes);
  periods.forEach((period, i) => checkMinutes(`periods[${i}].minutes`, period.minutes));
  const stated = periods.filter((period): period is ExposurePeriod => period.concentration !== null);
  const minutes = checkShiftMinutes(periods);
  if (minutes > shiftMinutes) throw new InputError('periods', `add up to ${minutes} minutes, more than the shift's ${shiftMinutes}`);
  const unstatedMinutes = shiftMinutes - checkShiftMinutes(stated);
  if (unstatedMinutes > 0) {
    return {
      isDecided: false,
      unstatedMinutes,
      reason: {
        en: `${unstatedMinutes} minutes of the shift have no stated concentration. They cannot count as zero.`,
        es: `${unstatedMinutes} minutos del turno no tienen una concentración indicada. No pueden contar como cero.`,
      },
      whoDecides: WHO.hygienist,
    };
  }
  const isLongShift = shiftMinutes > TWA_MINUTES;
  return {
    isDecided: true,
    minutes: shiftMinutes,
    wholeShift: twaEightHours(stated),
    worstEightHours: twaWorstEightHours(stated),
    isLongShift,
    reading: isLongShift
      ? { en: 'Whole shift divided by 8 hours (the stricter reading); the worst 8 hours stand beside it.', es: 'Turno completo dividido entre 8 horas (la lectura más estricta); al lado, las peores 8 horas.' }
      : { en: 'As 8-hour average.', es: 'Como promedio de 8 horas.' },
  };
}

/** The concentration that, breathed for `minutes` and nothing else, just gives `level` as 8-hour average; in the unit of `level`. */
export function concentrationThatGives(level: number, minutes: number): number {
  checkNumber('level', level, { min: 0 });
  checkNumber('minutes', minutes, { above: 0, max: MINUTES_PER_DAY });
  return (level * TWA_MINUTES) / minutes;
}
