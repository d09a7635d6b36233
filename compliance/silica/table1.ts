import { type Setting } from '../facts';
import { checkNumber } from '../input-error';
import { TABLE_1, type Table1Apf, type Table1Method, type Table1Option, type Table1Respirator, type Table1Tool } from './table1.data';

/** Sum of all Table 1 work of one person in the shift up to which the "4 hours or less" column holds; exactly four hours is still inside. */
export const FOUR_HOURS_MINUTES = 240;

export type Table1Place = 'outdoors' | 'indoors';

/** Table 1 has one column for indoors and enclosed areas together. */
export function table1Place(setting: Setting): Table1Place {
  return setting === 'outdoors' ? 'outdoors' : 'indoors';
}

export interface Table1Choice {
  readonly tool: Table1Tool;
  readonly method: Table1Method;
  readonly place: Table1Place;
}

export type Table1Selection =
  | { readonly isCovered: true; readonly options: readonly Table1Option[]; readonly respirator: Table1Respirator }
  /** `row` is the row that would hold elsewhere; null when no row has this tool with this method. */
  | { readonly isCovered: false; readonly because: 'method' | 'place'; readonly row: string | null };

/** The row for a tool, a way of dust control and a place; a row that lacks the place or the method leaves the task outside Table 1. */
export function selectTable1({ tool, method, place }: Table1Choice): Table1Selection {
  const options = TABLE_1.filter((option) => option.tool === tool && option.method === method);
  const first = options[0];
  if (first === undefined) return { isCovered: false, because: 'method', row: null };
  const respirator = first[place];
  if (respirator === null) return { isCovered: false, because: 'place', row: first.row };
  return { isCovered: true, options, respirator };
}

/**
 * Respirator of a row for a person whose Table 1 work of the shift, over all jobs, sums to `table1Minutes` ((c)(3)).
 * More than four hours puts every one of the person's Table 1 tasks in the second column.
 */
export function table1Apf(respirator: Table1Respirator, table1Minutes: number): Table1Apf {
  checkNumber('table1Minutes', table1Minutes, { min: 0 });
  return table1Minutes > FOUR_HOURS_MINUTES ? respirator.over4Hours : respirator.upTo4Hours;
}
