import { CFM_PER_INCH_OF_WHEEL } from '../air/airflow';
import { type AirflowReading, type EquipmentFacts } from '../facts';
import { inchesFromMm, m3PerHFromCfm } from '../quantities/units';
import { type Table1Demand, type Table1Option } from './table1.data';
import { type Table1Place } from './table1';

/** Rows with a collector: filter efficiency at least. Source: the rows. */
export const FILTER_EFFICIENCY_PERCENT = 99;
/** HEPA: 29 CFR 1926.1153(b). */
export const HEPA_EFFICIENCY_PERCENT = 99.97;
/** Conversions cost digits: a reading that meets the figure to one part in a million meets it. */
const CONVERSION_NOISE = 1e-6;

export interface ControlFacts {
  readonly option: Table1Option;
  readonly place: Table1Place;
  readonly tool: EquipmentFacts;
  readonly collector: EquipmentFacts | null;
  readonly equipment: readonly EquipmentFacts[];
}

/** `by-eye`: seen on the floor, not on file; it becomes a live line of the checklist. */
export type ControlState = 'met' | 'unmet' | 'unknown' | 'by-eye' | 'not-here';

export interface ControlCheck {
  readonly demand: Table1Demand;
  readonly state: ControlState;
}

/** Airflow that the collector must move for this tool, m³/h; null when the figure it hangs on is not on file. */
export function requiredAirflow(option: Table1Option, tool: EquipmentFacts): number | null {
  if (option.demands.includes('airflow-25-cfm-per-inch')) {
    return tool.wheelDiameterMm === null || !(tool.wheelDiameterMm > 0) ? null : m3PerHFromCfm(CFM_PER_INCH_OF_WHEEL * inchesFromMm(tool.wheelDiameterMm));
  }
  if (option.demands.includes('airflow-makers-figure')) return tool.requiredAirflowM3PerH !== null && tool.requiredAirflowM3PerH > 0 ? tool.requiredAirflowM3PerH : null;
  return null;
}

/** A bare number is not a reading: it needs its instrument, place, filter state, who and when. */
export function isWholeReading(reading: AirflowReading): boolean {
  const words = [reading.instrument, reading.place, reading.filterState, reading.takenBy, reading.takenOn];
  return Number.isFinite(reading.airflowM3PerH) && reading.airflowM3PerH >= 0 && words.every((word) => word.trim() !== '');
}

function fromBoolean(value: boolean | null | undefined): ControlState {
  return value === true ? 'met' : value === false ? 'unmet' : 'unknown';
}

function airflowState({ option, tool, collector }: ControlFacts): ControlState {
  if (collector === null) return 'unmet';
  const required = requiredAirflow(option, tool);
  const reading = collector.airflow;
  if (required === null || reading === null || !isWholeReading(reading)) return 'unknown';
  return reading.airflowM3PerH >= required * (1 - CONVERSION_NOISE) ? 'met' : 'unmet';
}

function filterState(collector: EquipmentFacts | null): ControlState {
  if (collector === null) return 'unmet';
  if (collector.filterEfficiencyPercent !== null) return collector.filterEfficiencyPercent >= FILTER_EFFICIENCY_PERCENT ? 'met' : 'unmet';
  return collector.isHepa === true ? 'met' : 'unknown';
}

function cycloneOrCleaning(collector: EquipmentFacts | null): ControlState {
  if (collector === null) return 'unmet';
  if (collector.hasCyclone === true || collector.hasFilterCleaning === true) return 'met';
  return collector.hasCyclone === false && collector.hasFilterCleaning === false ? 'unmet' : 'unknown';
}

function hepaVacuum(equipment: readonly EquipmentFacts[]): ControlState {
  const vacuums = equipment.filter(({ kind }) => kind === 'vacuum' || kind === 'collector');
  if (vacuums.some(({ isHepa }) => isHepa === true)) return 'met';
  return vacuums.some(({ isHepa }) => isHepa === null) ? 'unknown' : 'unmet';
}

function stateOf(demand: Table1Demand, facts: ControlFacts): ControlState {
  const { collector, tool } = facts;
  switch (demand) {
    case 'built-in-water-feed':
      return fromBoolean(tool.hasWaterFeed);
    case 'shroud':
      return fromBoolean(tool.hasShroud);
    case 'dust-collection-commercial':
      return collector === null ? 'unmet' : 'met';
    case 'dust-collection-makers-system':
      // Which collector the maker recommends stands in the manual: without manual and figure, any collector would pass.
      return collector === null ? 'unmet' : tool.hasManualOnFile && tool.requiredAirflowM3PerH !== null ? 'met' : 'unknown';
    case 'airflow-makers-figure':
    case 'airflow-25-cfm-per-inch':
      return airflowState(facts);
    case 'filter-99-percent':
      return filterState(collector);
    case 'filter-cleaning':
      return collector === null ? 'unmet' : fromBoolean(collector.hasFilterCleaning);
    case 'cyclone-or-filter-cleaning':
      return cycloneOrCleaning(collector);
    case 'hepa-vacuum-for-holes':
      return hepaVacuum(facts.equipment);
    case 'hepa-vacuum-between-passes-indoors':
      return facts.place === 'indoors' ? hepaVacuum(facts.equipment) : 'not-here';
    default:
      return 'by-eye';
  }
}

/** Each demand of the row against what is on file. Table 1 is all or nothing: one `unmet` loses it, one `unknown` leaves it open. */
export function checkControls(facts: ControlFacts): readonly ControlCheck[] {
  return facts.option.demands.map((demand) => ({ demand, state: stateOf(demand, facts) }));
}
