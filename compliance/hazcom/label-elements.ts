import { sourced, usFederal } from '../source';
import { pictograms, type HazardRow, type Pictogram, type SignalWord } from './ghs-hazards.data';
import { hazardRowsOf, singleCodes } from './statements';

export const PRECEDENCE_SOURCE = usFederal('1910.1200', 'read', { paragraph: 'App. C.2.1.1-C.2.1.4', note: 'Quotation of C.2.1 and of GHS 1.4.10.5.3.1.' });
export const STATEMENT_PRECEDENCE_SOURCE = sourced('29 CFR 1910.1200 App. C / Regulation (EC) 1272/2008', 'from-memory', { note: 'H318 need not stand beside H314, H400 not beside H410.' });

/** A statement with the category the sheet gives; null when the sheet gives none. */
export interface StatedHazard {
  readonly code: string;
  readonly category: string | null;
}

export interface LabelElements {
  readonly signalWord: SignalWord;
  /** Pictograms that the statements demand, after precedence. */
  readonly pictograms: readonly Pictogram[];
  /** Shown only for hazards that OSHA does not use (environment, for example): allowed, not demanded in the US. */
  readonly voluntaryPictograms: readonly Pictogram[];
  /** GHS07 was demanded and gives way; why. */
  readonly displaced: readonly { readonly code: string; readonly because: Pictogram }[];
  /** Codes whose signal word or pictogram hangs on a category that the sheet did not give: the strictest was taken. */
  readonly categoryMissing: readonly string[];
  /** Statements that need not stand beside a stronger one. */
  readonly redundant: readonly { readonly code: string; readonly beside: string }[];
}

const RANK: Readonly<Record<SignalWord, number>> = { none: 0, warning: 1, danger: 2 };
const ACUTE = /^H(302|312|332)/;
const IRRITATION = /^H(315|319|320)/;
const SKIN_SENSITIZATION = /^H317/;
const RESPIRATORY_SENSITIZATION = 'H334';

/** Whether the rows would give different label elements. */
function differ(rows: readonly HazardRow[]): boolean {
  const shown = new Set(rows.map((row) => `${row.signalWord} ${row.pictograms.join()}`));
  return shown.size > 1;
}

function strictest(rows: readonly HazardRow[]): readonly HazardRow[] {
  const top = Math.max(...rows.map((row) => RANK[row.signalWord]));
  return rows.filter((row) => RANK[row.signalWord] === top);
}

function rowsFor({ code, category }: StatedHazard): { rows: readonly HazardRow[]; isCategoryMissing: boolean } {
  const rows = hazardRowsOf(code);
  const wanted = category?.trim().toLowerCase().replace(/^category\s+/, '');
  const exact = rows.filter((row) => row.category.toLowerCase() === wanted);
  if (exact.length > 0) return { rows: differ(exact) ? strictest(exact) : exact, isCategoryMissing: differ(exact) };
  return differ(rows) ? { rows: strictest(rows), isCategoryMissing: true } : { rows, isCategoryMissing: false };
}

/** The pictogram that takes the exclamation mark's place for this hazard, if one of the label does (App. C.2.1). */
function displacer(code: string, shown: ReadonlySet<Pictogram>, hasRespiratorySensitizer: boolean): Pictogram | null {
  if (ACUTE.test(code) && shown.has('GHS06')) return 'GHS06';
  if (IRRITATION.test(code) && shown.has('GHS05')) return 'GHS05';
  if ((SKIN_SENSITIZATION.test(code) || IRRITATION.test(code)) && hasRespiratorySensitizer) return 'GHS08';
  return null;
}

/** Signal word and pictograms that a set of hazard statements demands. The exclamation mark is decided hazard by hazard, never for the whole label. */
export function labelElements(hazards: readonly StatedHazard[]): LabelElements {
  const found = hazards.map((hazard) => ({ code: hazard.code, ...rowsFor(hazard) }));
  const rows = found.flatMap((each) => each.rows);
  const osha = rows.filter((row) => row.isUsedByOsha);
  const shown = new Set(osha.flatMap((row) => row.pictograms));
  const codes = new Set(singleCodes(hazards.map((hazard) => hazard.code)));

  const displaced: { code: string; because: Pictogram }[] = [];
  let keepsExclamation = false;
  for (const row of osha.filter((each) => each.pictograms.includes('GHS07'))) {
    const because = displacer(row.code, shown, codes.has(RESPIRATORY_SENSITIZATION));
    if (because === null) keepsExclamation = true;
    else if (!displaced.some((each) => each.code === row.code)) displaced.push({ code: row.code, because });
  }
  if (!keepsExclamation) shown.delete('GHS07');

  const voluntary = new Set(rows.filter((row) => !row.isUsedByOsha).flatMap((row) => row.pictograms));
  const topRank = Math.max(0, ...osha.map((row) => RANK[row.signalWord]));
  return {
    signalWord: (['none', 'warning', 'danger'] as const)[topRank]!,
    pictograms: pictograms.filter((each) => shown.has(each)),
    voluntaryPictograms: pictograms.filter((each) => voluntary.has(each) && !shown.has(each)),
    displaced,
    categoryMissing: [...new Set(found.filter((each) => each.isCategoryMissing).map((each) => each.code))],
    redundant: redundantStatements(codes),
  };
}

function redundantStatements(codes: ReadonlySet<string>): LabelElements['redundant'] {
  return [
    { code: 'H318', beside: 'H314' },
    { code: 'H400', beside: 'H410' },
  ].filter(({ code, beside }) => codes.has(code) && codes.has(beside));
}
