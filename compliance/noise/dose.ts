import { checkMinutes, checkNumber, InputError, MINUTES_PER_DAY } from '../input-error';
import { usFederal, sourced } from '../source';
import { IMPULSE_LIMIT_DB_PEAK, TABLE_D2, TABLE_G16A, type DurationRow } from './noise-tables.data';

export const DOSE_SOURCE = usFederal('1910.95', 'read', { paragraph: 'App. A', note: 'General industry; in construction Table D-2 is the law.' });
export const NIOSH_SOURCE = sourced('NIOSH recommended exposure limit for noise', 'read', { note: 'Advice: 85 dBA, 8 hours, 3 dB exchange.' });
export const LONG_SHIFT_NOISE_SOURCE = sourced('OSHA policy on extended shifts, noise', 'read', { note: 'General industry: the action level falls, the 90 dBA limit does not.' });

/** Sound at one A-weighted level for some minutes of one person's shift. */
export interface NoisePeriod {
  readonly levelDba: number;
  readonly minutes: number;
}

const FIRST_LEVEL_DBA = TABLE_D2[0]!.levelDba;
const LAST_LEVEL_DBA = TABLE_D2.at(-1)!.levelDba;

function checkPeriods(periods: readonly NoisePeriod[]): void {
  periods.forEach((period, i) => {
    checkNumber(`periods[${i}].levelDba`, period.levelDba, { min: 0, max: 160 });
    checkMinutes(`periods[${i}].minutes`, period.minutes);
  });
  const minutes = periods.reduce((sum, period) => sum + period.minutes, 0);
  if (minutes > MINUTES_PER_DAY) throw new InputError('periods', `add up to ${minutes} minutes, more than a day has`);
}

/** Hours that Table D-2 permits; a level between two steps takes the hours of the next louder one. Infinity below the table, null above it. */
export function tableD2Hours(levelDba: number): number | null {
  if (levelDba < FIRST_LEVEL_DBA) return Number.POSITIVE_INFINITY;
  return TABLE_D2.find((row) => row.levelDba >= levelDba)?.hours ?? null;
}

export interface TableD2Result {
  /** Fe = Σ T/L. */
  readonly fraction: number;
  /** Fe above 1, or any time above the table. */
  readonly isExceeded: boolean;
  /** Minutes above 115 dBA, for which the table gives no time. */
  readonly minutesAboveTable: number;
}

/** Construction, 1926.52(d)(2)(ii): the mixed-level fraction of one person's whole shift. Levels under 90 dBA are not in the table and count nothing. */
export function tableD2Fraction(periods: readonly NoisePeriod[]): TableD2Result {
  checkPeriods(periods);
  let fraction = 0;
  let minutesAboveTable = 0;
  for (const { levelDba, minutes } of periods) {
    const hours = tableD2Hours(levelDba);
    if (hours === null) minutesAboveTable += minutes;
    // Even above the table the time is counted, at the last step, so that more noise never looks like less.
    fraction += minutes / 60 / (hours ?? TABLE_D2.at(-1)!.hours);
  }
  return { fraction, isExceeded: fraction > 1 + 1e-9 || minutesAboveTable > 0, minutesAboveTable };
}

/** Whether an impulse is above 140 dB peak, 1926.52(e). */
export function isImpulseExceeded(peakDb: number): boolean {
  return checkNumber('peakDb', peakDb, { min: 0, max: 200 }) > IMPULSE_LIMIT_DB_PEAK;
}

/** T = 8 / 2^((L − 90)/5), hours. */
export function referenceHours(levelDba: number): number {
  return 8 / 2 ** ((checkNumber('levelDba', levelDba) - 90) / 5);
}

/** The printed, rounded duration of Table G-16a; null for a level that is not printed. */
export function printedReferenceHours(levelDba: number): number | null {
  return TABLE_G16A.find((row: DurationRow) => row.levelDba === levelDba)?.hours ?? null;
}

/** The two doses of 1910.95: from 80 dBA for hearing conservation, from 90 dBA for the limit. */
export type DoseThreshold = 80 | 90;

/** Noise dose in percent, general industry. `hoursAt` defaults to the formula; pass `printedReferenceHours` for sums made from the printed table. */
export function noiseDosePercent(periods: readonly NoisePeriod[], thresholdDba: DoseThreshold, hoursAt: (levelDba: number) => number | null = referenceHours): number {
  checkPeriods(periods);
  return periods
    .filter((period) => period.levelDba >= thresholdDba)
    .reduce((sum, { levelDba, minutes }) => {
      const hours = hoursAt(levelDba);
      if (hours === null) throw new InputError('levelDba', `${levelDba} dBA is not printed in the table`);
      return sum + (100 * minutes) / 60 / hours;
    }, 0);
}

/** 16.61 × log10(D/100) + 90 dBA; null for a dose of zero. */
export function twaDbaFromDose(dosePercent: number): number | null {
  checkNumber('dosePercent', dosePercent, { min: 0 });
  return dosePercent === 0 ? null : 16.61 * Math.log10(dosePercent / 100) + 90;
}

/** NIOSH dose in percent (85 dBA, 3 dB exchange): advice, shown beside the law. */
export function nioshDosePercent(periods: readonly NoisePeriod[]): number {
  checkPeriods(periods);
  return periods.filter((period) => period.levelDba >= 80).reduce((sum, { levelDba, minutes }) => sum + (100 * minutes) / 60 / (8 / 2 ** ((levelDba - 85) / 3)), 0);
}

/** 10 × log10(D/100) + 85 dBA; null for a dose of zero. */
export function nioshTwaDba(dosePercent: number): number | null {
  checkNumber('dosePercent', dosePercent, { min: 0 });
  return dosePercent === 0 ? null : 10 * Math.log10(dosePercent / 100) + 85;
}

/** General-industry action level for a shift over 8 hours: 90 + 16.61 × log10(50 ÷ (12.5 × h)). Federal construction has no action level. */
export function generalIndustryActionLevelDba(shiftHours: number): number {
  checkNumber('shiftHours', shiftHours, { above: 0, max: 24 });
  return 90 + 16.61 * Math.log10(50 / (12.5 * Math.max(shiftHours, 8)));
}

/** Everything about one person's shift at once, each figure by whose rule it is. */
export interface NoiseShift {
  readonly construction: TableD2Result;
  readonly generalIndustryDosePercent: number;
  readonly hearingConservationDosePercent: number;
  /** From the hearing conservation dose. */
  readonly generalIndustryTwaDba: number | null;
  readonly nioshDosePercent: number;
  readonly nioshTwaDba: number | null;
  /** True where a level passes Table D-2's last step: general-industry durations must not pass a construction shift. */
  readonly isAboveTable: boolean;
}

export function noiseShift(periods: readonly NoisePeriod[]): NoiseShift {
  const construction = tableD2Fraction(periods);
  const hearing = noiseDosePercent(periods, 80);
  const niosh = nioshDosePercent(periods);
  return {
    construction,
    generalIndustryDosePercent: noiseDosePercent(periods, 90),
    hearingConservationDosePercent: hearing,
    generalIndustryTwaDba: twaDbaFromDose(hearing),
    nioshDosePercent: niosh,
    nioshTwaDba: nioshTwaDba(niosh),
    isAboveTable: periods.some((period) => period.levelDba > LAST_LEVEL_DBA && period.minutes > 0),
  };
}
