import { type RespiratorType } from '../facts';
import { type Words } from '../outcome';
import { usFederal, type Source } from '../source';
import { words } from '../words';

/** What the shift's rules need from the law of a place. */
export interface ShiftPack {
  readonly id: string;
  readonly version: string;
  readonly name: Words;
  readonly isComplete: boolean;
  readonly gap: Words | null;
  /** Null where no pack holds this place's silica law: silica work there is undecided, never judged by another country's figures. */
  readonly silica: SilicaLaw | null;
}

export interface SilicaLaw {
  /** Respirable crystalline silica, µg/m³, 8-hour average; null where the law knows no action level. */
  readonly actionLevel: number | null;
  readonly limit: number;
  readonly limitSource: Source;
  readonly hasTable1: boolean;
  /** Assigned protection factor of each type under this law. */
  readonly apf: Readonly<Record<RespiratorType, number>>;
}

const US_APF: SilicaLaw['apf'] = {
  'filtering-facepiece': 10, 'half-mask': 10, 'full-facepiece': 50, 'papr-loose': 25, 'papr-hood': 25, 'papr-half-mask': 50, 'papr-full-facepiece': 1000, 'supplied-air-hood': 25,
};

const US_FEDERAL: ShiftPack = {
  id: 'us-federal',
  version: '2026.12',
  name: words('US federal rules', 'Reglas federales de EE. UU.'),
  isComplete: true,
  gap: null,
  silica: { actionLevel: 25, limit: 50, limitSource: usFederal('1926.1153', 'read', { paragraph: '(b), (d)(1)' }), hasTable1: true, apf: US_APF },
};

/** The pack of a place; a place without one gets a pack that decides nothing and says so. */
export function shiftPack(jurisdictionId: string): ShiftPack {
  if (jurisdictionId === US_FEDERAL.id) return US_FEDERAL;
  return {
    id: jurisdictionId,
    version: 'none',
    name: words('No pack for this place', 'Sin reglas para este lugar'),
    isComplete: false,
    gap: words('No pack: federal text shown for orientation, check the state\'s.', 'Sin reglas propias: el texto federal es solo de guía; consulte las del estado.'),
    silica: null,
  };
}
