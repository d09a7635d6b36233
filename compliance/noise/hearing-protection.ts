import { checkNumber } from '../input-error';
import { sourced, usFederal, type Source } from '../source';

export const NRR_SOURCE: Source = usFederal('1910.95', 'partly', { paragraph: 'App. B', note: 'Appendix summaries and California Appendix E.' });
export const DUAL_SOURCE: Source = sourced('WAC 296-307-63215', 'read', { note: 'Only the higher rating counts, and 5 dB more.' });
export const DERATING_SOURCE: Source = sourced('OSHA Technical Manual, noise', 'partly', { note: 'Third-party quotation; judges the priority of engineering controls, is not Appendix B.' });

/** Spread between C- and A-weighted sound that Appendix B takes off the rating. */
const A_WEIGHTING_DB = 7;
const DUAL_BONUS_DB = 5;
const FIELD_SHARE = 0.5;

export type Weighting = 'A' | 'C';

export interface ProtectedLevel {
  readonly levelDba: number;
  readonly method: 'app-b' | 'app-b-dual' | 'field-derated' | 'field-derated-dual';
  readonly source: Source;
}

function rating(field: string, nrrDb: number): number {
  return checkNumber(field, nrrDb, { min: 0, max: 40 });
}

function attenuation(nrrDb: number, weighting: Weighting): number {
  return Math.max(0, weighting === 'A' ? nrrDb - A_WEIGHTING_DB : nrrDb);
}

/** Level under one protector: TWA(A) − (NRR − 7), or TWA(C) − NRR. NRR only: a European SNR is another scale. */
export function protectedLevel(twaDb: number, weighting: Weighting, nrrDb: number): ProtectedLevel {
  checkNumber('twaDb', twaDb, { min: 0, max: 160 });
  return { levelDba: twaDb - attenuation(rating('nrrDb', nrrDb), weighting), method: 'app-b', source: NRR_SOURCE };
}

/** Level under plug and muff together: the higher rating, and 5 dB. */
export function protectedLevelDual(twaDb: number, weighting: Weighting, plugNrrDb: number, muffNrrDb: number): ProtectedLevel {
  checkNumber('twaDb', twaDb, { min: 0, max: 160 });
  const higher = Math.max(rating('plugNrrDb', plugNrrDb), rating('muffNrrDb', muffNrrDb));
  // The five decibels come after the seven are off: a weak pair of 5 gives 3 by A-weighted sound, not 5.
  const pair = Math.max(0, (weighting === 'A' ? higher - A_WEIGHTING_DB : higher) + DUAL_BONUS_DB);
  return { levelDba: twaDb - pair, method: 'app-b-dual', source: DUAL_SOURCE };
}

/** Half of the attenuation, as OSHA's field practice counts it: TWA − (NRR − 7) × 0.5. */
export function deratedLevel(twaDba: number, nrrDb: number): ProtectedLevel {
  checkNumber('twaDba', twaDba, { min: 0, max: 160 });
  return { levelDba: twaDba - attenuation(rating('nrrDb', nrrDb), 'A') * FIELD_SHARE, method: 'field-derated', source: DERATING_SOURCE };
}

/** Half of the higher attenuation, and 5 dB. */
export function deratedLevelDual(twaDba: number, plugNrrDb: number, muffNrrDb: number): ProtectedLevel {
  const higher = Math.max(rating('plugNrrDb', plugNrrDb), rating('muffNrrDb', muffNrrDb));
  return { levelDba: deratedLevel(twaDba, higher).levelDba - DUAL_BONUS_DB, method: 'field-derated-dual', source: { ...DERATING_SOURCE, verified: 'from-memory' } };
}
