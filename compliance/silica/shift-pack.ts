import { respiratorTypes, type RespiratorType } from '../facts';
import { type LimitRow } from '../air/limits.data';
import { findPack } from '../jurisdictions/pack';
import { type JurisdictionPack } from '../jurisdictions/packs.data';
import { type Words } from '../outcome';
import { APF_COMPARISON, apfRowsOf, type FacePiece, type RespiratorDevice } from '../respirators/apf.data';
import { sourceLine, type Source } from '../source';
import { words } from '../words';

/** What the shift's rules need from the law of a place. */
export interface ShiftPack {
  readonly id: string;
  readonly version: string;
  readonly name: Words;
  readonly isComplete: boolean;
  readonly gap: Words | null;
  /** What the US federal text is here: the law, a state's likely least, or another country's. */
  readonly federalText: 'law' | 'orientation' | 'foreign';
  /** The place's own silica figure where no pack holds its law: for orientation, it decides nothing. */
  readonly orientation: { readonly words: Words; readonly source: Source } | null;
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

const UNITS: Readonly<Partial<Record<LimitRow['unit'], string>>> = { 'ug/m3': 'µg/m³', 'mg/m3': 'mg/m³' };

function orientationOf(rows: readonly LimitRow[]): ShiftPack['orientation'] {
  const row = rows.find(({ kind }) => kind === 'twa-8h');
  if (row === undefined) return null;
  const figure = `${row.value} ${UNITS[row.unit] ?? row.unit}`;
  const cited = sourceLine(row.source);
  return {
    words: words(`Its silica limit, for orientation only: ${figure} as 8-hour average (${cited}).`, `Su límite de sílice, solo como guía: ${figure} en promedio de 8 horas (${cited}).`),
    source: row.source,
  };
}

/** The pack of a place; a place without one gets a pack that decides nothing and says so. */
export function shiftPack(jurisdictionId: string): ShiftPack {
  const found = findPack(jurisdictionId);
  if (found.kind === 'no-pack') {
    const name = found.place?.name ?? words('this place', 'este lugar');
    return { id: jurisdictionId, version: 'none', name, isComplete: false, gap: found.gap, federalText: found.isUs ? 'orientation' : 'foreign', orientation: orientationOf(found.orientation), silica: null };
  }
  const { pack, isComplete, gap } = found;
  return { id: pack.id, version: pack.version, name: pack.name, isComplete, gap, federalText: pack.id.startsWith('us-') ? 'law' : 'foreign', orientation: null, silica: lawOf(pack) };
}
