import { addYears, checkIsoDate, type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { RETENTION_ROWS, type RecordKind, type RetentionRow } from './retention.data';

/** What is known about one record. */
export interface RecordFacts {
  readonly record: RecordKind;
  readonly jurisdictionId: string;
  readonly madeOn: IsoDate;
  /** End of the person's employment; null while it lasts or when it is not known. */
  readonly employmentEndedOn: IsoDate | null;
  /** Whether a newer record of the same kind has taken its place. */
  readonly isReplaced: boolean;
  /** For a sheet: a register of identity, where and when is kept; for work papers: results, method and summary are. */
  readonly hasSubstitute: boolean;
}

export type RetentionAnswer =
  | { readonly outcome: 'keep-until'; readonly lastDay: IsoDate; readonly mayDiscard: boolean; readonly row: RetentionRow }
  /** Kept with no end in sight: the person is still employed, or nothing has replaced it. */
  | { readonly outcome: 'keep'; readonly reason: Words; readonly row: RetentionRow }
  | { readonly outcome: 'no-period'; readonly reason: Words; readonly row: RetentionRow }
  | { readonly outcome: 'undecided'; readonly reason: Words; readonly whoDecides: Words };

/** Until when a record is kept. Nothing goes early: a kind that the place's table does not know is kept and undecided. */
export function retention(facts: RecordFacts, asOf: IsoDate): RetentionAnswer {
  checkIsoDate('madeOn', facts.madeOn);
  checkIsoDate('asOf', asOf);
  if (facts.employmentEndedOn !== null) checkIsoDate('employmentEndedOn', facts.employmentEndedOn);
  const row = RETENTION_ROWS.find((each) => each.record === facts.record && each.jurisdictionId === facts.jurisdictionId);
  if (row === undefined) {
    return { outcome: 'undecided', reason: { en: 'No period for this place is on file. Keep it.', es: 'No hay un plazo registrado para este lugar. Consérvelo.' }, whoDecides: WHO.localAuthority };
  }
  // (d)(1)(ii)(B)
  if (facts.record === 'sheet' && facts.hasSubstitute) {
    return { outcome: 'no-period', reason: { en: 'The register of use is kept for 30 years in its place.', es: 'En su lugar se guarda 30 años el registro de uso.' }, row };
  }
  // (d)(1)(ii)(A): work papers may go after a year only when their results stay; else 30 years, as any exposure record.
  if (facts.record === 'background-data' && !facts.hasSubstitute) return keepUntil(row, addYears(facts.madeOn, 30), asOf);
  return byKeeping(facts, row, asOf);
}

function keepUntil(row: RetentionRow, lastDay: IsoDate, asOf: IsoDate): RetentionAnswer {
  return { outcome: 'keep-until', lastDay, mayDiscard: asOf > lastDay, row };
}

function byKeeping(facts: RecordFacts, row: RetentionRow, asOf: IsoDate): RetentionAnswer {
  switch (row.keeping.kind) {
    case 'years':
      return keepUntil(row, addYears(facts.madeOn, row.keeping.years), asOf);
    case 'employment-plus':
      return facts.employmentEndedOn === null
        ? { outcome: 'keep', reason: { en: 'Kept while the person is employed; the years run from the last day.', es: 'Se guarda mientras la persona trabaja aquí; los años corren desde el último día.' }, row }
        : keepUntil(row, addYears(facts.employmentEndedOn, row.keeping.years), asOf);
    case 'until-replaced':
      return facts.isReplaced
        ? { outcome: 'no-period', reason: { en: 'A newer one has taken its place. Keeping the old one as evidence is good practice.', es: 'Uno más reciente lo reemplazó. Guardar el anterior como prueba es buena práctica.' }, row }
        : { outcome: 'keep', reason: { en: 'Kept until a newer one takes its place.', es: 'Se guarda hasta que otro más reciente lo reemplace.' }, row };
    case 'no-period':
      return { outcome: 'no-period', reason: { en: 'The law sets no period; your own policy does.', es: 'La ley no fija un plazo; lo fija su propia política.' }, row };
  }
}

/** What a register of use must hold before a sheet may be let go. */
export interface UseEntry {
  readonly chemicalName: string;
  readonly where: string;
  readonly usedFrom: IsoDate;
  readonly usedUntil: IsoDate | null;
}

/** Fields of a register entry that are still missing; none means the entry stands in for the sheet. */
export function missingInRegister(entry: Partial<UseEntry>): readonly (keyof UseEntry)[] {
  const required = ['chemicalName', 'where', 'usedFrom', 'usedUntil'] as const;
  return required.filter((field) => (entry[field] ?? '').trim() === '');
}
