import { type Words } from '../outcome';
import { sourced, type Source } from '../source';
import { words } from '../words';

/** A published measurement of respirable quartz at floor work: for orientation. Task concentrations are not 8-hour averages, and none of them is our objective data. */
export interface PublishedExposureRow {
  readonly id: string;
  readonly what: Words;
  /** mg/m³ of respirable quartz; null where no figure was found. */
  readonly mgPerM3: number | null;
  readonly isEightHourAverage: boolean;
  readonly source: Source;
}

const LAB = sourced('J Occup Environ Hyg 2007;4:770-779', 'read', { note: 'Enclosed laboratory, arithmetic task means.' });
const NONE = sourced('literature search', 'from-memory', { note: 'No figure found.' });

export const PUBLISHED_EXPOSURES: readonly PublishedExposureRow[] = [
  { id: 'exposure/handheld-grinding-uncontrolled', what: words('handheld grinding, no dust control', 'pulido a mano, sin control de polvo'), mgPerM3: 61.7, isEightHourAverage: false, source: LAB },
  { id: 'exposure/handheld-grinding-wet', what: words('handheld grinding, wet', 'pulido a mano, con agua'), mgPerM3: 0.896, isEightHourAverage: false, source: LAB },
  { id: 'exposure/handheld-grinding-vacuum', what: words('handheld grinding, vacuum shroud', 'pulido a mano, con campana y aspiradora'), mgPerM3: 0.155, isEightHourAverage: false, source: LAB },
  { id: 'exposure/concrete-finishing', what: words('handheld concrete finishing on sites, mean of 49 samples', 'acabado de concreto a mano en obras, media de 49 muestras'), mgPerM3: 1.16, isEightHourAverage: false, source: sourced('Ann Occup Hyg 2002 (mef043)', 'read', { note: '0.02 to 7.1; 69 % of the averages above 0.05.' }) },
  { id: 'exposure/drillers-and-grinders', what: words('drillers and grinders, full shift, mean of 14', 'perforistas y pulidores, turno completo, media de 14'), mgPerM3: 0.84, isEightHourAverage: true, source: sourced('Occup Environ Med, table', 'read', { note: '0.03 to 3.8.' }) },
  { id: 'exposure/mortar-mixing', what: words('mixing mortar, 12 to 17 minutes', 'mezclar mortero, 12 a 17 minutos'), mgPerM3: 0.11, isEightHourAverage: false, source: sourced('NIOSH survey 2017', 'partly', { note: 'A trace result, "up to": a screening figure, not objective data.' }) },
  { id: 'exposure/shot-blasting', what: words('shot blasting of floors', 'granallado de pisos'), mgPerM3: null, isEightHourAverage: false, source: NONE },
  { id: 'exposure/walk-behind-grinding', what: words('walk-behind grinding', 'pulido con máquina de empuje'), mgPerM3: null, isEightHourAverage: false, source: sourced('NIOSH surveys EPHB 368-12a, -13a, -14a (2016)', 'partly', { note: 'That they exist was read, their figures were not.' }) },
  { id: 'exposure/powder-mixing', what: words('emptying bags and mixing powder', 'vaciar sacos y mezclar polvo'), mgPerM3: null, isEightHourAverage: false, source: sourced('HSE cement page', 'read', { note: 'Named as dusty; no figure.' }) },
];
