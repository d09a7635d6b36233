import { type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { LIMIT_ROWS, type LimitKind, type LimitRow, type LimitUnit } from './limits.data';
import { ppbToPpm, ppmToMgPerM3 } from './units';

export type LimitAnswer =
  | { readonly isDecided: true; readonly row: LimitRow }
  | { readonly isDecided: false; readonly reason: Words; readonly whoDecides: Words };

/**
 * The construction limit of a substance in a place on a day. Another place's figure is never used in its stead:
 * a place without a row, or whose row says that none is set, is undecided.
 */
export function findLimit(substanceId: string, jurisdictionId: string, kind: LimitKind, asOf: IsoDate): LimitAnswer {
  const row = LIMIT_ROWS.find(
    (each) =>
      each.substanceId === substanceId &&
      each.jurisdictionId === jurisdictionId &&
      each.kind === kind &&
      (each.scope === 'construction' || each.scope === 'any-work') &&
      (each.source.inForceFrom === undefined || each.source.inForceFrom <= asOf),
  );
  if (row === undefined) {
    return { isDecided: false, reason: { en: 'No limit for this place is on file.', es: 'No hay un límite registrado para este lugar.' }, whoDecides: WHO.localAuthority };
  }
  if (row.value === null) {
    return { isDecided: false, reason: { en: 'The law here sets no limit for this substance.', es: 'La ley de aquí no fija un límite para esta sustancia.' }, whoDecides: WHO.hygienist };
  }
  return { isDecided: true, row };
}

/** Every figure known for a substance, law and advice, each with its source. */
export function limitsOf(substanceId: string): readonly LimitRow[] {
  return LIMIT_ROWS.filter((each) => each.substanceId === substanceId);
}

/** The value in mg/m³; null where the unit counts particles or the molar mass is not known. */
export function inMgPerM3(value: number, unit: LimitUnit, molarMassGPerMol: number | null): number | null {
  if (unit === 'mg/m3') return value;
  if (unit === 'ug/m3') return value / 1_000;
  if (unit === 'mppcf' || molarMassGPerMol === null) return null;
  return ppmToMgPerM3(unit === 'ppb' ? ppbToPpm(value) : value, molarMassGPerMol);
}
