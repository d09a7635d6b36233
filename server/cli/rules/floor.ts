import * as z from 'zod';
import { type EquipmentFacts, equipmentKinds, settings } from '#compliance/facts';
import { coverageM2, KIT_COVERAGE_SOURCE, KIT_MIXING_SOURCE, kitsFor, mixingOf } from '#compliance/quantities/kits';
import { shiftPack } from '#compliance/silica/shift-pack';
import { selectTable1, table1Apf, table1Place } from '#compliance/silica/table1';
import { checkControls } from '#compliance/silica/table1-controls';
import { table1Tools, type Table1Method, type Table1Option, type Table1Tool } from '#compliance/silica/table1.data';
import { moistureVaporEmission } from '#compliance/surface/moisture';
import { methodsFor, profileAnswer } from '#compliance/surface/profile';
import { METHOD_RANGES } from '#compliance/surface/profiles.data';
import { calculation, day, jurisdictionId, minutes, unsaid, type Calculation } from './calculation';

const tool = z.enum(table1Tools);
const method = z.enum(['water', 'vacuum', 'cab', 'water-and-vacuum']);
const setting = z.enum(settings);

/** Rows of a place's Table 1 for a tool, a method and a setting; null with the reason where the task stands outside. */
function rowsOf(place: string, choice: { tool: Table1Tool; method: Table1Method; setting: (typeof settings)[number] }) {
  const law = shiftPack(place).silica;
  if (law === null || law.table1Rows.length === 0) return { options: null, reason: 'this place has no Table 1 on file' };
  const selection = selectTable1({ tool: choice.tool, method: choice.method, place: table1Place(choice.setting) });
  if (!selection.isCovered) return { options: null, reason: selection.because === 'method' ? 'no row has this tool with this method' : `row ${selection.row} does not hold for this setting` };
  const compared = selection.options.filter((option) => law.table1Rows === 'all' || law.table1Rows.includes(option.row));
  if (compared.length === 0) return { options: null, reason: 'the row was not compared with this place’s text' };
  return { options: compared, respirator: selection.respirator };
}

const table1 = calculation({
  name: 'table1',
  summary: 'silica Table 1 for one person’s shift: rows, demands and respirator of each task, summed over all of them',
  schema: z.strictObject({
    jurisdictionId,
    tasks: z.array(z.strictObject({ tool, method, setting, minutes })).min(1),
    minutesElsewhere: minutes.default(0).describe('Table 1 minutes of the same person on other jobs of the shift'),
  }),
  example: {
    jurisdictionId: 'us-federal',
    tasks: [
      { tool: 'walk-behind-grinder-or-mill', method: 'vacuum', setting: 'indoors', minutes: 180 },
      { tool: 'handheld-grinder', method: 'vacuum', setting: 'indoors', minutes: 90 },
    ],
  },
  run: ({ jurisdictionId: place, tasks, minutesElsewhere }) => {
    const chosen = tasks.map((task) => ({ task, rows: rowsOf(place, task) }));
    const table1Minutes = chosen.reduce((sum, { task, rows }) => sum + (rows.options === null ? 0 : task.minutes), minutesElsewhere);
    return {
      table1Minutes,
      tasks: chosen.map(({ task, rows }) =>
        rows.options === null
          ? { ...task, isCovered: false, outcome: 'undecided', reason: `Not Table 1: ${rows.reason}. Assess the exposure; hold the task until someone qualified signs.` }
          : { ...task, isCovered: true, respiratorApf: table1Apf(rows.respirator, table1Minutes), rows: rows.options.map(rowOut) },
      ),
    };
  },
});

const rowOut = ({ id, row, heading, demands, source }: Table1Option) => ({ id, row, heading, demands, source });

const known = unsaid(z.boolean());
const equipment = z.strictObject({
  id: z.string().default('equipment'),
  name: z.string().default(''),
  kind: z.enum(equipmentKinds),
  isRideOn: z.boolean().default(false),
  wheelDiameterMm: unsaid(z.number().positive().describe('mm')),
  requiredAirflowM3PerH: unsaid(z.number().positive().describe('maker’s figure, m³/h')),
  airflow: unsaid(z.strictObject({ airflowM3PerH: z.number().min(0).describe('m³/h'), instrument: z.string(), place: z.string(), filterState: z.string(), takenBy: z.string(), takenOn: day })),
  filterEfficiencyPercent: unsaid(z.number().min(0).max(100).describe('percent')),
  hasFilterCleaning: known,
  hasCyclone: known,
  hasShroud: known,
  hasWaterFeed: known,
  isHepa: known,
  hasManualOnFile: z.boolean().default(false),
});

const controls = calculation({
  name: 'controls',
  summary: 'each control of the Table 1 row against what is on file; one unmet loses Table 1, one unknown leaves it open',
  schema: z.strictObject({ jurisdictionId, tool, method, setting, machine: equipment, collector: unsaid(equipment), others: z.array(equipment).default([]).describe('vacuums and collectors on the site') }),
  example: {
    jurisdictionId: 'us-federal',
    tool: 'handheld-grinder',
    method: 'vacuum',
    setting: 'indoors',
    machine: { kind: 'edge-grinder', wheelDiameterMm: 127, hasShroud: true, hasManualOnFile: true },
    collector: { kind: 'collector', filterEfficiencyPercent: 99.9, hasFilterCleaning: true, airflow: { airflowM3PerH: 220, instrument: 'vane anemometer', place: 'at the shroud', filterState: 'clean', takenBy: 'Ines Halloran', takenOn: '2026-12-01' } },
  },
  run: ({ jurisdictionId: place, tool: name, method: way, setting: where, machine, collector, others }) => {
    const rows = rowsOf(place, { tool: name, method: way, setting: where });
    if (rows.options === null) return { isCovered: false, outcome: 'undecided', reason: rows.reason };
    const all: readonly EquipmentFacts[] = [machine, ...(collector === null ? [] : [collector]), ...others];
    return {
      isCovered: true,
      rows: rows.options.map((option) => {
        const checks = checkControls({ option, place: table1Place(where), tool: machine, collector, equipment: all });
        const states = checks.map(({ state }) => state);
        return { row: option.row, outcome: states.includes('unmet') ? 'unmet' : states.includes('unknown') ? 'undecided' : 'met', checks, source: option.source };
      }),
    };
  },
});

const kits = calculation({
  name: 'kits',
  summary: 'kits for a floor, minutes at the mixer and powder dumps',
  schema: z.strictObject({
    areaM2: z.number().min(0).describe('m² (1 ft² = 0.0929 m²)'),
    thicknessMm: z.number().positive().describe('mm (1/4 in = 6.35 mm)'),
    volumeL: z.number().positive().describe('mixed volume of one kit, liters'),
    mixMinutesPerKit: z.number().min(0).describe('minutes'),
    powderParts: z.number().int().min(0).describe('powder parts in one kit'),
  }),
  example: { areaM2: 232.26, thicknessMm: 6.35, volumeL: 14.75, mixMinutesPerKit: 2, powderParts: 1 },
  run: ({ areaM2, thicknessMm, volumeL, mixMinutesPerKit, powderParts }) => {
    const count = kitsFor(areaM2, thicknessMm, volumeL);
    return { kits: count, coverageM2: coverageM2(volumeL, thicknessMm), ...mixingOf({ kits: count, mixMinutesPerKit, powderParts }), sources: [KIT_COVERAGE_SOURCE, KIT_MIXING_SOURCE] };
  },
});

const surfaceMethod = z.enum(METHOD_RANGES.map((row) => row.method) as [string, ...string[]]) as unknown as z.ZodType<(typeof METHOD_RANGES)[number]['method']>;
const profile = calculation({
  name: 'profile',
  summary: 'whether the planned preparation can leave the floor profile (CSP), and what can',
  schema: z.strictObject({
    targetProfile: z.number().int().min(1).max(10).nullable().describe('CSP 1 to 10'),
    methods: z.array(surfaceMethod).describe('in the order in which they are done'),
    exception: unsaid(z.strictObject({ writtenBy: z.string(), reference: z.string(), text: z.string() })).describe('the supplier’s written exception'),
  }),
  example: { targetProfile: 5, methods: ['grinding'] },
  run: ({ targetProfile, methods, exception }) => ({ ...profileAnswer(targetProfile, methods, exception), methods: targetProfile === null ? [] : methodsFor(targetProfile) }),
});

const moisture = calculation({
  name: 'moisture',
  summary: 'moisture vapor emission from a calcium chloride dish',
  schema: z.strictObject({ weightGainG: z.number().min(0).describe('g'), dishAreaFt2: z.number().positive().describe('ft²'), hours: z.number().positive().describe('h') }),
  example: { weightGainG: 10, dishAreaFt2: 0.5, hours: 72 },
  run: ({ weightGainG, dishAreaFt2, hours }) => moistureVaporEmission(weightGainG, dishAreaFt2, hours),
});

export const FLOOR_CALCULATIONS: readonly Calculation[] = [table1, controls, kits, profile, moisture];
export { equipment };
