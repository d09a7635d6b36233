import { type Words } from '../outcome';
import { sourced, type Source } from '../source';

/** A substance met in floor kits, floors or engines. */
export interface SubstanceRow {
  readonly id: string;
  readonly name: Words;
  readonly casNumbers: readonly string[];
  readonly molarMassGPerMol: number | null;
  /** Statements its sheets usually carry: to ask about a sheet that lacks them, never to fill them in. */
  readonly usualCodes: readonly string[];
  readonly source: Source;
}

const recalled = (note?: string): Source => sourced('supplier sheets, usual health statements', 'from-memory', note === undefined ? {} : { note });

export const SUBSTANCES: readonly SubstanceRow[] = [
  { id: 'rcs', name: { en: 'respirable crystalline silica', es: 'sílice cristalina respirable' }, casNumbers: ['14808-60-7', '14464-46-1'], molarMassGPerMol: null, usualCodes: ['H350', 'H372'], source: recalled() },
  { id: 'portland-cement', name: { en: 'Portland cement', es: 'cemento Portland' }, casNumbers: ['65997-15-1'], molarMassGPerMol: null, usualCodes: ['H315', 'H318', 'H317', 'H335'], source: recalled('With 0.1 % quartz or more also H350 and H372; some sheets H314.') },
  { id: 'calcium-hydroxide', name: { en: 'calcium hydroxide', es: 'hidróxido de calcio' }, casNumbers: ['1305-62-0'], molarMassGPerMol: 74.09, usualCodes: ['H315', 'H318', 'H335'], source: recalled() },
  { id: 'mdi', name: { en: "4,4'-MDI", es: "4,4'-MDI" }, casNumbers: ['101-68-8'], molarMassGPerMol: 250.26, usualCodes: ['H332', 'H315', 'H319', 'H334', 'H317', 'H351', 'H335', 'H373'], source: sourced('Canadian assessment of MDI', 'partly', { note: 'Shows skull, exclamation mark and health hazard; the codes recalled.' }) },
  { id: 'polymeric-mdi', name: { en: 'polymeric MDI', es: 'MDI polimérico' }, casNumbers: ['9016-87-9'], molarMassGPerMol: null, usualCodes: ['H332', 'H315', 'H319', 'H334', 'H317', 'H351', 'H335', 'H373'], source: recalled('As MDI.') },
  { id: 'badge', name: { en: 'bisphenol A epoxy resin', es: 'resina epoxi de bisfenol A' }, casNumbers: ['25068-38-6', '1675-54-3', '25085-99-8'], molarMassGPerMol: null, usualCodes: ['H315', 'H319', 'H317', 'H411'], source: sourced('two supplier sheets', 'read', { note: 'Irritation from 5 %.' }) },
  { id: 'bisphenol-f-resin', name: { en: 'bisphenol F epoxy resin', es: 'resina epoxi de bisfenol F' }, casNumbers: ['9003-36-5'], molarMassGPerMol: null, usualCodes: ['H315', 'H317', 'H411'], source: recalled() },
  { id: 'benzyl-alcohol', name: { en: 'benzyl alcohol', es: 'alcohol bencílico' }, casNumbers: ['100-51-6'], molarMassGPerMol: 108.14, usualCodes: ['H302', 'H317', 'H319'], source: sourced('EU harmonized classification, RAC-58', 'read', { inForceFrom: '2025-09-01', note: 'Before that H302, H332.' }) },
  { id: 'ipda', name: { en: 'isophorone diamine', es: 'isoforondiamina' }, casNumbers: ['2855-13-2'], molarMassGPerMol: 170.3, usualCodes: ['H314', 'H317', 'H302', 'H312'], source: recalled() },
  { id: 'mda', name: { en: "4,4'-methylenedianiline", es: "4,4'-metilendianilina" }, casNumbers: ['101-77-9'], molarMassGPerMol: 198.26, usualCodes: ['H350', 'H317', 'H370'], source: recalled() },
  { id: 'carbon-monoxide', name: { en: 'carbon monoxide', es: 'monóxido de carbono' }, casNumbers: ['630-08-0'], molarMassGPerMol: 28.01, usualCodes: ['H331', 'H360', 'H372'], source: recalled() },
];

/** The substance of a CAS number; null when it is not in the table. */
export function findSubstance(casNumber: string): SubstanceRow | null {
  return SUBSTANCES.find((each) => each.casNumbers.includes(casNumber)) ?? null;
}
