import { type IsoDate } from '../iso-date';
import { usFederal, type Source } from '../source';

export type HazcomText = '2012' | '2024';
export type ProductKind = 'substance' | 'mixture';
export type HazcomParty = 'manufacturer' | 'employer';

/** From `on2024Only` the 2024 text alone counts; before it the 2012 text, the 2024 text, or both. */
export interface PhaseInRow {
  readonly id: string;
  readonly party: HazcomParty;
  readonly kind: ProductKind;
  readonly originally: IsoDate;
  readonly on2024Only: IsoDate;
  readonly source: Source;
}

const source = (paragraph: string): Source =>
  usFederal('1910.1200', 'read', { paragraph, inForceFrom: '2026-01-15', note: '89 FR 44144 (20 May 2024), dates moved four months by 91 FR 1695 (15 Jan 2026); several notices of the latter read.' });

export const PHASE_IN_ROWS: readonly PhaseInRow[] = [
  { id: 'phase-in/manufacturer/substance', party: 'manufacturer', kind: 'substance', originally: '2026-01-19', on2024Only: '2026-05-19', source: source('(j)(2)(i)') },
  { id: 'phase-in/employer/substance', party: 'employer', kind: 'substance', originally: '2026-07-20', on2024Only: '2026-11-20', source: source('(j)(2)(ii)') },
  { id: 'phase-in/manufacturer/mixture', party: 'manufacturer', kind: 'mixture', originally: '2027-07-19', on2024Only: '2027-11-19', source: source('(j)(3)(i)') },
  { id: 'phase-in/employer/mixture', party: 'employer', kind: 'mixture', originally: '2028-01-19', on2024Only: '2028-05-19', source: source('(j)(3)(ii)') },
];

/** Which editions of the rule a sheet (manufacturer) or a program (employer) may follow on a day, and the row that says so. */
export function acceptedTexts(party: HazcomParty, kind: ProductKind, asOf: IsoDate): { readonly texts: readonly HazcomText[]; readonly row: PhaseInRow } {
  const row = PHASE_IN_ROWS.find((each) => each.party === party && each.kind === kind)!;
  return { texts: asOf < row.on2024Only ? ['2012', '2024'] : ['2024'], row };
}
