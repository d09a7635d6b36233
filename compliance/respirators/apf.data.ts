import { sourced, usFederal, type Source } from '../source';

export type RespiratorDevice =
  | 'air-purifying'
  | 'powered-air-purifying'
  | 'supplied-air-demand'
  | 'supplied-air-continuous-flow'
  | 'supplied-air-pressure-demand'
  | 'scba-demand'
  | 'scba-pressure-demand';
export type FacePiece = 'quarter-mask' | 'filtering-facepiece' | 'half-mask' | 'full-facepiece' | 'hood' | 'loose-fitting';

/** One assigned protection factor. Factors of one place never serve another. */
export interface ApfRow {
  readonly id: string;
  readonly jurisdictionId: string;
  readonly device: RespiratorDevice;
  readonly facePiece: FacePiece;
  /** European filter or performance class; null in the US. */
  readonly filterClass: string | null;
  readonly apf: number;
  /** With the maker's test evidence on file; null where evidence changes nothing. */
  readonly apfWithMakerEvidence: number | null;
  readonly isTightFitting: boolean;
  readonly source: Source;
}

const US_TABLE = usFederal('1910.134', 'read', { paragraph: '(d)(3)(i)(A) Table 1', note: 'Whole table and notes 1 to 5 read in a reproduction; applies to construction through 1926.103.' });
const isTight = (facePiece: FacePiece): boolean => facePiece !== 'hood' && facePiece !== 'loose-fitting';

const us = (device: RespiratorDevice, facePiece: FacePiece, apf: number, apfWithMakerEvidence: number | null = null): ApfRow => ({
  id: `apf/us-federal/${device}/${facePiece}`,
  jurisdictionId: 'us-federal',
  device,
  facePiece,
  filterClass: null,
  apf,
  apfWithMakerEvidence,
  isTightFitting: isTight(facePiece),
  source: US_TABLE,
});

const GB_FILTERING = sourced('HSG53 class factors', 'partly', { note: 'University page and catalogue.' });
const GB_MASK = sourced('HSG53 class factors', 'partly', { note: 'Supplier table by EN standard; half masks in a second table.' });
const GB_RECALLED = sourced('HSG53 class factors', 'from-memory');
const gb = (device: RespiratorDevice, facePiece: FacePiece, filterClass: string | null, apf: number, source: Source): ApfRow => ({
  id: `apf/great-britain/${device}/${facePiece}${filterClass === null ? '' : `/${filterClass}`}`,
  jurisdictionId: 'great-britain',
  device,
  facePiece,
  filterClass,
  apf,
  apfWithMakerEvidence: null,
  isTightFitting: isTight(facePiece),
  source,
});

export const APF_ROWS: readonly ApfRow[] = [
  us('air-purifying', 'quarter-mask', 5),
  us('air-purifying', 'filtering-facepiece', 10),
  us('air-purifying', 'half-mask', 10),
  us('air-purifying', 'full-facepiece', 50),
  us('powered-air-purifying', 'half-mask', 50),
  us('powered-air-purifying', 'full-facepiece', 1000),
  us('powered-air-purifying', 'hood', 25, 1000),
  us('powered-air-purifying', 'loose-fitting', 25),
  us('supplied-air-demand', 'half-mask', 10),
  us('supplied-air-demand', 'full-facepiece', 50),
  us('supplied-air-continuous-flow', 'half-mask', 50),
  us('supplied-air-continuous-flow', 'full-facepiece', 1000),
  us('supplied-air-continuous-flow', 'hood', 25, 1000),
  us('supplied-air-continuous-flow', 'loose-fitting', 25),
  us('supplied-air-pressure-demand', 'half-mask', 50),
  us('supplied-air-pressure-demand', 'full-facepiece', 1000),
  us('scba-demand', 'half-mask', 10),
  us('scba-demand', 'full-facepiece', 50),
  us('scba-demand', 'hood', 50),
  us('scba-pressure-demand', 'full-facepiece', 10000),
  us('scba-pressure-demand', 'hood', 10000),

  gb('air-purifying', 'filtering-facepiece', 'FFP1', 4, GB_FILTERING),
  gb('air-purifying', 'filtering-facepiece', 'FFP2', 10, GB_FILTERING),
  gb('air-purifying', 'filtering-facepiece', 'FFP3', 20, GB_FILTERING),
  gb('air-purifying', 'half-mask', 'P1', 4, GB_MASK),
  gb('air-purifying', 'half-mask', 'P2', 10, GB_MASK),
  gb('air-purifying', 'half-mask', 'P3', 20, GB_MASK),
  gb('air-purifying', 'half-mask', 'gas', 10, GB_MASK),
  gb('air-purifying', 'full-facepiece', 'P2', 10, GB_MASK),
  gb('air-purifying', 'full-facepiece', 'P3', 40, GB_MASK),
  gb('air-purifying', 'full-facepiece', 'gas', 20, GB_MASK),
  gb('powered-air-purifying', 'hood', 'TH1', 10, GB_MASK),
  gb('powered-air-purifying', 'hood', 'TH2', 20, GB_MASK),
  gb('powered-air-purifying', 'hood', 'TH3', 40, GB_MASK),
  gb('powered-air-purifying', 'full-facepiece', 'TM1', 10, GB_RECALLED),
  gb('powered-air-purifying', 'full-facepiece', 'TM2', 20, GB_RECALLED),
  gb('powered-air-purifying', 'full-facepiece', 'TM3', 40, GB_RECALLED),
  gb('supplied-air-continuous-flow', 'hood', null, 40, GB_RECALLED),
  gb('scba-pressure-demand', 'full-facepiece', null, 2000, GB_RECALLED),
];

/** How a place compares factor and hazard ratio: at least as high (US, from the maximum use concentration) or above it (Great Britain). */
export const APF_COMPARISON: Readonly<Record<string, { readonly mustExceedRatio: boolean; readonly source: Source }>> = {
  'us-federal': { mustExceedRatio: false, source: usFederal('1910.134', 'read', { paragraph: '(b), (d)(3)(i)(B)', note: 'Exposure must be at or below factor × limit.' }) },
  'great-britain': { mustExceedRatio: true, source: sourced('HSE selection method', 'partly', { note: 'Supplier guidance: the factor is to be above the ratio.' }) },
};

/** Factors of a place; empty where it has none on file. */
export function apfRowsOf(jurisdictionId: string): readonly ApfRow[] {
  return APF_ROWS.filter((row) => row.jurisdictionId === jurisdictionId);
}

/** The factor that counts: a hood's higher one only with the maker's test evidence on file. */
export function apfOf(row: ApfRow, hasMakerEvidence: boolean): number {
  return hasMakerEvidence && row.apfWithMakerEvidence !== null ? row.apfWithMakerEvidence : row.apf;
}
