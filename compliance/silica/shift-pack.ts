import { respiratorTypes, type RespiratorType } from '../facts';
import { findPack } from '../jurisdictions/pack';
import { type JurisdictionPack } from '../jurisdictions/packs.data';
import { type Words } from '../outcome';
import { APF_COMPARISON, apfRowsOf, type FacePiece, type RespiratorDevice } from '../respirators/apf.data';
import { type Source } from '../source';
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
  /** Rows of Table 1 compared with this place's text; none where its law has no such table. */
  readonly table1Rows: 'all' | readonly string[];
  readonly factors: RespiratorFactors | null;
}

/** Assigned protection factors of one law; they never serve another. */
export interface RespiratorFactors {
  readonly isUs: boolean;
  /** Factors that some respirator offers, lowest first. */
  readonly classes: readonly number[];
  /** Whether the factor must be above the ratio of exposure to limit, not just reach it. */
  readonly mustExceedRatio: boolean;
  /** Null where the type alone does not tell: the law rates it by a filter class that the facts do not hold. */
  readonly apf: Readonly<Record<RespiratorType, number | null>>;
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

/** A hood counts without the maker's evidence, which the facts do not hold. */
function factorsOf(jurisdictionId: string | null): RespiratorFactors | null {
  const comparison = jurisdictionId === null ? undefined : APF_COMPARISON[jurisdictionId];
  if (jurisdictionId === null || comparison === undefined) return null;
  const rows = apfRowsOf(jurisdictionId).filter(({ facePiece }) => facePiece !== 'quarter-mask');
  const apfOf = (type: RespiratorType): number | null => {
    const [device, facePiece] = KINDS[type];
    const own = rows.filter((row) => row.device === device && row.facePiece === facePiece);
    return own.length === 1 ? own[0]!.apf : null;
  };
  return {
    isUs: jurisdictionId.startsWith('us-'),
    classes: [...new Set(rows.map(({ apf }) => apf))].sort((a, b) => a - b),
    mustExceedRatio: comparison.mustExceedRatio,
    apf: Object.fromEntries(respiratorTypes.map((type) => [type, apfOf(type)])) as Record<RespiratorType, number | null>,
  };
}

function lawOf({ silica, apfJurisdictionId }: JurisdictionPack): SilicaLaw {
  return { actionLevel: silica.actionLevelMicrogramsPerM3, limit: silica.limitMicrogramsPerM3, limitSource: silica.limitSource, table1Rows: silica.table1Rows, factors: factorsOf(apfJurisdictionId) };
}

/** The pack of a place; a place without one gets a pack that decides nothing and says so. */
export function shiftPack(jurisdictionId: string): ShiftPack {
  const found = findPack(jurisdictionId);
  if (found.kind === 'no-pack') {
    return { id: jurisdictionId, version: 'none', name: found.place?.name ?? words('No pack for this place', 'Sin reglas para este lugar'), isComplete: false, gap: found.gap, silica: null };
  }
  const { pack, isComplete, gap } = found;
  return { id: pack.id, version: pack.version, name: pack.name, isComplete, gap, silica: lawOf(pack) };
}
