import { respiratorTypes, type RespiratorType } from '../facts';
import { apfRowsOf, type FacePiece, type RespiratorDevice } from '../respirators/apf.data';
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

const KINDS: Readonly<Record<RespiratorType, readonly [RespiratorDevice, FacePiece]>> = {
  'filtering-facepiece': ['air-purifying', 'filtering-facepiece'],
  'half-mask': ['air-purifying', 'half-mask'],
  'full-facepiece': ['air-purifying', 'full-facepiece'],
  'papr-loose': ['powered-air-purifying', 'loose-fitting'],
  'papr-hood': ['powered-air-purifying', 'hood'],
  'papr-half-mask': ['powered-air-purifying', 'half-mask'],
  'papr-full-facepiece': ['powered-air-purifying', 'full-facepiece'],
  'supplied-air-hood': ['supplied-air-continuous-flow', 'hood'],
};

/** A type's factor under a law; 0 where the table has none, or one for each filter class, which the facts do not tell apart. A hood counts without the maker's evidence. */
function apfUnder(jurisdictionId: string, type: RespiratorType): number {
  const [device, facePiece] = KINDS[type];
  const rows = apfRowsOf(jurisdictionId).filter((row) => row.device === device && row.facePiece === facePiece);
  return rows.length === 1 ? rows[0]!.apf : 0;
}

function apfTable(jurisdictionId: string): SilicaLaw['apf'] {
  return Object.fromEntries(respiratorTypes.map((type) => [type, apfUnder(jurisdictionId, type)])) as Record<RespiratorType, number>;
}

const US_FEDERAL: ShiftPack = {
  id: 'us-federal',
  version: '2026.12',
  name: words('US federal rules', 'Reglas federales de EE. UU.'),
  isComplete: true,
  gap: null,
  silica: { actionLevel: 25, limit: 50, limitSource: usFederal('1926.1153', 'read', { paragraph: '(b), (d)(1)' }), hasTable1: true, apf: apfTable('us-federal') },
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
