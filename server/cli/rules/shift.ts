import * as z from 'zod';
import { answerShift, generateChecklist, type ShiftFacts } from '#compliance';
import { consumableBases, consumableKinds, consumableUnits, dustMethods, fitTestKinds, respiratorTypes, settings, taskKinds } from '#compliance/facts';
import { calculation, day, jurisdictionId, unsaid, type Calculation } from './calculation';
import { equipment } from './floor';

const known = unsaid(z.boolean());
const text = z.string();
const clock = z.number().int().min(0).max(2880).describe('minute from local midnight of the date, 0 to 2880');
const survey = z.enum(['absent', 'present', 'unknown', 'not-needed']).default('unknown');
const nobody = { firstAiderName: null, hasEyewash: null, emergencyNumber: null, address: null };

const sheet = z.strictObject({
  revisionId: text.default('sheet'),
  revisedOn: unsaid(day),
  signalWord: unsaid(z.enum(['danger', 'warning', 'none'])),
  hazardCodes: z.array(text).default([]),
  precautionaryCodes: z.array(text).default([]),
  casNumbers: z.array(text).default([]),
  protectionWords: z.array(z.strictObject({ topic: z.enum(['eyes', 'hands', 'skin', 'respiratory', 'hearing']), text })).default([]),
});
const kit = z.strictObject({
  id: text,
  name: text,
  volumeL: z.number().positive().describe('mixed volume of one kit, liters'),
  mixMinutesPerKit: z.number().min(0).describe('minutes'),
  bucketMinutes: unsaid(z.number().min(0).describe('minutes')),
  count: unsaid(z.number().int().min(0)),
  surfaceException: unsaid(z.strictObject({ writtenBy: text, reference: text, text })).describe('the supplier’s written exception for surface preparation'),
  cartridgeSchedule: unsaid(z.strictObject({ change: text, basedOn: text })).describe('when vapor cartridges are changed, and on what data'),
  parts: z.array(z.strictObject({ productId: text, productName: text, part: text, form: z.enum(['liquid', 'powder', 'paste']), sheet: unsaid(sheet) })),
});
const person = z.strictObject({
  id: text,
  name: text,
  language: z.enum(['en', 'es']).default('en'),
  isLead: z.boolean().default(false),
  employer: unsaid(text),
  isAdultConfirmed: z.boolean().default(false),
  isKeptFromIsocyanates: z.boolean().default(false),
  silicaTrainedOn: unsaid(day),
  silicaTrainedBy: unsaid(text),
  hazcomTrainedOn: unsaid(day),
  hazcomTrainedBy: unsaid(text),
  respirators: z.array(z.strictObject({ type: z.enum(respiratorTypes), label: text, clearedOn: unsaid(day), fitTestedOn: unsaid(day), fitTestKind: unsaid(z.enum(fitTestKinds)) })).default([]),
  elsewhere: z.array(z.strictObject({ jobName: text, kind: z.enum(taskKinds), startMinute: clock, endMinute: clock })).default([]),
});
const span = z.strictObject({ personId: text, startMinute: clock, endMinute: clock });
const task = z.strictObject({
  id: text,
  kind: z.enum(taskKinds),
  assignments: z.array(span),
  logged: z.array(span).default([]).describe('time worked so far; counts beside the plan'),
  equipmentId: unsaid(text),
  collectorId: unsaid(text),
  dustMethod: unsaid(z.enum(dustMethods)),
  kitId: unsaid(text),
  failedControl: unsaid(text),
});
const basis = z.strictObject({
  id: text,
  taskKind: z.enum(taskKinds),
  kind: z.enum(['objective-data', 'air-samples', 'sampling-day', 'below-action-level']),
  exposureMicrogramsPerM3: unsaid(z.number().min(0).describe('µg/m³ as 8-hour average, without respirator')),
  conditions: text,
  signedBy: text,
  signedOn: day,
  endsOn: day,
  interimApf: unsaid(z.number().positive()),
});

/** The facts of one shift; whatever is left out counts as "nobody has said". */
export const shiftFactsSchema = z.strictObject({
  jurisdictionId,
  date: day,
  jobName: text,
  siteName: text,
  setting: z.enum(settings),
  roomVolumeM3: unsaid(z.number().positive().describe('m³')),
  areaM2: unsaid(z.number().positive().describe('m²')),
  thicknessMm: unsaid(z.number().positive().describe('mm')),
  targetProfile: unsaid(z.number().int().min(1).max(10).describe('CSP 1 to 10')),
  floor: z
    .strictObject({ covering: z.enum(['bare-concrete', 'tile', 'black-mastic', 'old-coating', 'unknown']).default('unknown'), builtYear: unsaid(z.number().int()), asbestos: survey, lead: survey, surveyReference: unsaid(text) })
    .default({ covering: 'unknown', builtYear: null, asbestos: 'unknown', lead: 'unknown', surveyReference: null }),
  engines: z.strictObject({ areUsedInside: known, isExhaustLedOutside: known, hasCarbonMonoxideAlarm: known }).default({ areUsedInside: null, isExhaustLedOutside: null, hasCarbonMonoxideAlarm: null }),
  firstAid: z.strictObject({ firstAiderName: unsaid(text), hasEyewash: known, emergencyNumber: unsaid(text), address: unsaid(text) }).default(nobody),
  hostHazards: unsaid(text),
  siteMaskRule: unsaid(text).describe('mask that the site or its owner asks beside the law'),
  competentPersonId: unsaid(text),
  inspectionCoverId: unsaid(text).describe('who inspects while the competent person runs a machine'),
  people: z.array(person).default([]),
  tasks: z.array(task).default([]),
  kits: z.array(kit).default([]),
  equipment: z.array(equipment).default([]),
  bases: z.array(basis).default([]),
  consumableRates: z.array(z.strictObject({ item: z.enum(consumableKinds), amount: z.number().positive(), unit: z.enum(consumableUnits), per: z.enum(consumableBases), statedBy: text })).default([]).describe('rates that somebody stated'),
});

const example: z.input<typeof shiftFactsSchema> = {
  jurisdictionId: 'us-federal',
  date: '2026-12-03',
  jobName: 'Hall 2',
  siteName: 'Lakehead Cold Storage, Superior',
  setting: 'indoors',
  areaM2: 232.26,
  thicknessMm: 6.35,
  floor: { covering: 'bare-concrete', builtYear: 2004, asbestos: 'not-needed', lead: 'not-needed', surveyReference: 'Ines Halloran, 1 Dec 2026' },
  engines: { areUsedInside: false },
  firstAid: { firstAiderName: 'Ines Halloran', hasEyewash: true, emergencyNumber: '911', address: '12 Dock Road, Superior' },
  hostHazards: 'Ammonia plant next door; alarm is a long horn.',
  competentPersonId: 'ines',
  people: [
    { id: 'ines', name: 'Ines Halloran', isLead: true, employer: 'Marrow & Slate Floors', isAdultConfirmed: true, silicaTrainedOn: '2026-02-10', hazcomTrainedOn: '2026-02-10' },
    { id: 'dov', name: 'Dov Lindqvist', language: 'es', employer: 'Marrow & Slate Floors', isAdultConfirmed: true, silicaTrainedOn: '2026-02-10', hazcomTrainedOn: '2026-02-10', respirators: [{ type: 'half-mask', label: 'Harrow H6 half mask, M', clearedOn: '2026-03-01', fitTestedOn: '2026-03-02' }] },
  ],
  tasks: [{ id: 'edges', kind: 'edge-grinding', assignments: [{ personId: 'dov', startMinute: 420, endMinute: 675 }], equipmentId: 'edger', collectorId: 'collector', dustMethod: 'vacuum' }],
  equipment: [
    { id: 'edger', name: 'Edge grinder 5 in', kind: 'edge-grinder', wheelDiameterMm: 127, hasShroud: true, hasManualOnFile: true },
    { id: 'collector', name: 'Collector', kind: 'collector', filterEfficiencyPercent: 99.9, hasFilterCleaning: true, hasManualOnFile: true, airflow: { airflowM3PerH: 220, instrument: 'vane anemometer', place: 'at the shroud', filterState: 'clean', takenBy: 'Ines Halloran', takenOn: '2026-12-03' } },
  ],
};

const ppe = calculation({
  name: 'ppe',
  summary: 'protection of each task of a shift from its hazards, tools and setting, with reasons; controls stand before it',
  schema: shiftFactsSchema,
  example,
  run: (facts) => {
    const answer = answerShift(facts satisfies ShiftFacts, facts.date);
    return { pack: answer.pack, tasks: answer.tasks.map(({ taskId, name, state, findings, respirator, protection }) => ({ taskId, name, state, controls: findings.filter(({ topic }) => topic === 'control'), respirator, protection })) };
  },
});

const checklist = calculation({
  name: 'checklist',
  summary: 'the day’s checklist in both languages: morning lines, live lines, each person’s own lines',
  schema: shiftFactsSchema,
  example,
  run: (facts) => generateChecklist(facts, answerShift(facts, facts.date)),
});

const consumables = calculation({
  name: 'consumables',
  summary: 'what a shift uses up, by rates that somebody stated; without a rate "not known" and who can say',
  schema: shiftFactsSchema,
  example: { ...example, consumableRates: [{ item: 'diamonds', amount: 0.5, unit: 'pieces', per: 'hour', statedBy: 'Ines Halloran, counted on the last job' }] },
  run: (facts) => answerShift(facts, facts.date).consumables.map(({ id, outcome, text: said, reason, whoDecides, inputs }) => ({ item: id.slice(id.indexOf('/') + 1), outcome, text: said, reason, whoDecides, inputs })),
});

export const SHIFT_CALCULATIONS: readonly Calculation[] = [ppe, checklist, consumables];
