import { checkNumber } from '../input-error';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { isFederal, sourced, usFederal, type Source } from '../source';
import { APF_COMPARISON, apfOf, apfRowsOf, type ApfRow } from './apf.data';

export const MUC_SOURCE = usFederal('1910.134', 'read', { paragraph: '(b), (d)(3)(i)(B)' });
export const UNKNOWN_EXPOSURE_SOURCE = usFederal('1910.134', 'read', { paragraph: '(d)(1)(iii)', note: 'Quoted word for word in a public list of safety codes; WAC 296-842-13005.' });
export const GAS_SOURCE = usFederal('1910.134', 'read', { paragraph: '(d)(3)(iii)' });
const IDLH_SOURCE = usFederal('1910.134', 'read', { paragraph: '(d)(3)(i)(B)(2)-(3)' });

/** Exposure ÷ limit, both in the same unit; rounded at the ninth place so that 0.3 ÷ 0.03 is 10. */
export function hazardRatio(exposure: number, limit: number): number {
  checkNumber('exposure', exposure, { min: 0 });
  checkNumber('limit', limit, { above: 0 });
  return Math.round((exposure / limit) * 1e9) / 1e9;
}

/** Factor × limit, capped at the concentration immediately dangerous to life or health where one is known; in the unit of the limit. */
export function maximumUseConcentration(apf: number, limit: number, idlh: number | null): number {
  checkNumber('apf', apf, { min: 1 });
  checkNumber('limit', limit, { above: 0 });
  if (idlh !== null) checkNumber('idlh', idlh, { above: 0 });
  return idlh === null ? apf * limit : Math.min(apf * limit, idlh);
}

export interface RespiratorOption {
  readonly row: ApfRow;
  readonly apf: number;
  readonly maximumUseConcentrationMgPerM3: number;
  readonly needsFitTest: boolean;
  /** A cartridge against gas or vapor needs a written change schedule. */
  readonly needsChangeSchedule: boolean;
}

export interface RespiratorNeed {
  readonly jurisdictionId: string;
  /** 8-hour average without respirator; null where nobody can estimate it. */
  readonly exposureMgPerM3: number | null;
  readonly limitMgPerM3: number | null;
  readonly idlhMgPerM3: number | null;
  readonly form: 'particles' | 'gas-or-vapor';
  /** The maker's test evidence for the higher factor of a hood is on file. */
  readonly hasHoodEvidence: boolean;
}

export type RespiratorChoice =
  | { readonly outcome: 'none-required'; readonly ratio: number; readonly reason: Words; readonly source: Source }
  | { readonly outcome: 'required'; readonly ratio: number; /** Lowest factor on file that is enough. */ readonly leastApf: number; readonly options: readonly RespiratorOption[]; readonly reason: Words; readonly source: Source }
  | { readonly outcome: 'immediately-dangerous'; readonly reason: Words; readonly whoDecides: Words; readonly source: Source }
  | { readonly outcome: 'undecided'; readonly reason: Words; readonly whoDecides: Words; readonly source: Source };

/** Chooses by hazard ratio from the factors of the place. Controls come first: this answers only what is left after them. */
export function selectRespirator(need: RespiratorNeed): RespiratorChoice {
  const choice = choose(need);
  // In another country the US paragraph is not the rule, whatever the arithmetic says.
  return need.jurisdictionId.startsWith('us-') || !isFederal(choice.source) ? choice : { ...choice, source: NOT_ON_FILE };
}

const NOT_ON_FILE = sourced('No text on file for this place', 'not-on-file', { note: 'Check the local law.' });

function choose(need: RespiratorNeed): RespiratorChoice {
  const { exposureMgPerM3: exposure, limitMgPerM3: limit, idlhMgPerM3: idlh } = need;
  if (exposure === null) {
    return {
      outcome: 'immediately-dangerous',
      reason: { en: 'Nobody can say how high the exposure is. The law treats that as immediately dangerous to life: the task is held.', es: 'Nadie puede decir cuánta exposición hay. La ley lo trata como peligro inmediato para la vida: la tarea queda detenida.' },
      whoDecides: WHO.hygienist,
      source: UNKNOWN_EXPOSURE_SOURCE,
    };
  }
  checkNumber('exposureMgPerM3', exposure, { min: 0 });
  if (limit === null) {
    return { outcome: 'undecided', reason: { en: 'No limit is on file for this substance here: the employer must set the highest use concentration.', es: 'Aquí no hay un límite para esta sustancia: el empleador debe fijar la concentración máxima de uso.' }, whoDecides: WHO.hygienist, source: MUC_SOURCE };
  }
  const ratio = hazardRatio(exposure, limit);
  if (idlh !== null && exposure > checkNumber('idlhMgPerM3', idlh, { above: 0 })) {
    return { outcome: 'immediately-dangerous', reason: { en: 'The exposure is above the level immediately dangerous to life or health.', es: 'La exposición supera el nivel de peligro inmediato para la vida o la salud.' }, whoDecides: WHO.hygienist, source: IDLH_SOURCE };
  }
  if (ratio <= 1) {
    return { outcome: 'none-required', ratio, reason: { en: 'The exposure is not above the limit.', es: 'La exposición no supera el límite.' }, source: MUC_SOURCE };
  }
  return fromRatio(need, limit, ratio);
}

const RANK: Readonly<Record<RespiratorChoice['outcome'], number>> = { 'none-required': 0, required: 1, undecided: 2, 'immediately-dangerous': 3 };

function isStricter(a: RespiratorChoice, b: RespiratorChoice): boolean {
  if (a.outcome === 'required' && b.outcome === 'required') return a.leastApf > b.leastApf || (a.leastApf === b.leastApf && a.ratio > b.ratio);
  return RANK[a.outcome] > RANK[b.outcome];
}

/** Several contaminants at once: the strictest answer holds; one that nobody can decide holds all. Additive effects are for the mixture, beside this. */
export function selectForAll(needs: readonly [RespiratorNeed, ...RespiratorNeed[]]): RespiratorChoice {
  return needs.map(selectRespirator).reduce((top, next) => (isStricter(next, top) ? next : top));
}

function fromRatio(need: RespiratorNeed, limit: number, ratio: number): RespiratorChoice {
  const comparison = APF_COMPARISON[need.jurisdictionId];
  const rows = apfRowsOf(need.jurisdictionId);
  if (comparison === undefined || rows.length === 0) {
    return { outcome: 'undecided', reason: { en: 'No protection factors for this place are on file.', es: 'No hay factores de protección registrados para este lugar.' }, whoDecides: WHO.localAuthority, source: MUC_SOURCE };
  }
  const options = rows
    .filter((row) => fitsForm(row, need.form))
    .map((row): RespiratorOption => {
      const apf = apfOf(row, need.hasHoodEvidence);
      return {
        row,
        apf,
        maximumUseConcentrationMgPerM3: maximumUseConcentration(apf, limit, need.idlhMgPerM3),
        needsFitTest: row.isTightFitting,
        needsChangeSchedule: need.form === 'gas-or-vapor' && (row.device === 'air-purifying' || row.device === 'powered-air-purifying'),
      };
    })
    .filter(({ apf }) => (comparison.mustExceedRatio ? apf > ratio : apf >= ratio))
    .sort((a, b) => a.apf - b.apf);
  const least = options[0];
  if (least === undefined) {
    return { outcome: 'undecided', reason: { en: 'No respirator on file has a high enough factor: bring the exposure down.', es: 'Ningún respirador registrado tiene un factor suficiente: baje la exposición.' }, whoDecides: WHO.hygienist, source: comparison.source };
  }
  const shown = Math.round(ratio * 100) / 100;
  return {
    outcome: 'required',
    ratio,
    leastApf: least.apf,
    options,
    reason: { en: `The exposure is ${shown} times the limit: a factor of ${least.apf} or more.`, es: `La exposición es ${shown} veces el límite: un factor de ${least.apf} o más.` },
    source: comparison.source,
  };
}

/** Paper and particle filters stop no vapor; gas classes stop no dust. Quarter masks are in the table, but the trade does not use them. */
function fitsForm(row: ApfRow, form: RespiratorNeed['form']): boolean {
  if (row.facePiece === 'quarter-mask') return false;
  if (form === 'particles') return row.filterClass !== 'gas';
  if (row.facePiece === 'filtering-facepiece') return false;
  return row.filterClass === null || row.filterClass === 'gas';
}
