import * as z from 'zod';
import { airflowDemand, meetsAirflow } from '#compliance/air/airflow';
import { DILUTION_SOURCE, dilutionAirflowCfm, dilutionRefusal, dilutionVentilation } from '#compliance/air/dilution';
import { limitsOf } from '#compliance/air/limits';
import { additiveMixture, MIXTURE_SOURCE } from '#compliance/air/mixture';
import { monitoringSchedule } from '#compliance/air/monitoring';
import { noticeDate } from '#compliance/air/notice-rule';
import { findSubstance, SUBSTANCES } from '#compliance/air/substances.data';
import { LONG_SHIFT_SOURCE, shiftTwa, TWA_SOURCE } from '#compliance/air/twa';
import { findPack } from '#compliance/jurisdictions/pack';
import { cfmFromM3PerH, m3PerHFromCfm } from '#compliance/quantities/units';
import { publicHolidays } from '../../platform/holidays';
import { calculation, day, jurisdictionId, minutes, RefusedInput, unsaid, type Calculation } from './calculation';

const twa = calculation({
  name: 'twa',
  summary: '8-hour average of one substance over one person’s shift, both readings for long shifts',
  schema: z.strictObject({
    unit: z.string().describe('unit of every concentration, for example "ug/m3"; passed through'),
    shiftMinutes: minutes.describe('length of the whole shift, minutes'),
    periods: z.array(z.strictObject({ concentration: z.number().min(0).nullable().describe('in `unit`; null where nobody has stated it'), minutes })),
  }),
  example: { unit: 'ppm', shiftMinutes: 480, periods: [{ concentration: 150, minutes: 120 }, { concentration: 75, minutes: 120 }, { concentration: 50, minutes: 240 }] },
  run: ({ unit, shiftMinutes, periods }) => ({ unit, ...shiftTwa(shiftMinutes, periods), sources: [TWA_SOURCE, LONG_SHIFT_SOURCE] }),
});

const mixture = calculation({
  name: 'mixture',
  summary: 'additive mixture: the sum of each contaminant’s share of its limit; above 1 exceeds',
  schema: z.strictObject({ members: z.array(z.strictObject({ name: z.string().min(1), concentration: z.number().min(0).describe('8-hour average, in the unit of its limit'), limit: z.number().positive().nullable().describe('null where none is known') })).min(1) }),
  example: { members: [{ name: 'B', concentration: 500, limit: 1000 }, { name: 'C', concentration: 45, limit: 200 }, { name: 'D', concentration: 40, limit: 200 }] },
  run: ({ members }) => ({ ...additiveMixture(members), source: MIXTURE_SOURCE }),
});

const monitoring = calculation({
  name: 'monitoring',
  summary: 'scheduled air monitoring for silica: when the next sample is due',
  schema: z.strictObject({
    jurisdictionId,
    asOf: day,
    results: z.array(z.strictObject({ sampledOn: day, twaMicrogramsPerM3: z.number().min(0).describe('µg/m³ as 8-hour average, without respirator') })),
  }),
  example: { jurisdictionId: 'us-federal', asOf: '2026-12-01', results: [{ sampledOn: '2026-11-30', twaMicrogramsPerM3: 50.1 }] },
  run: ({ jurisdictionId: place, asOf, results }) => {
    const found = findPack(place);
    const silica = found.kind === 'pack' ? found.pack.silica : null;
    if (silica === null || silica.actionLevelMicrogramsPerM3 === null) return { outcome: 'undecided', reason: found.gap ?? { en: 'This law knows no action level: its own monitoring rule decides.', es: 'Esta ley no tiene nivel de acción: decide su propia norma de mediciones.' } };
    return monitoringSchedule(results, { actionLevelMicrogramsPerM3: silica.actionLevelMicrogramsPerM3, limitMicrogramsPerM3: silica.limitMicrogramsPerM3 }, asOf);
  },
});

const notice = calculation({
  name: 'notice-date',
  summary: 'by when employees must be told of an exposure assessment',
  schema: z.strictObject({
    assessmentCompletedOn: day,
    scope: z.enum(['construction', 'general-industry']),
    country: z.string().length(2).describe('country of the holiday calendar, ISO 3166'),
    state: z.string().optional().describe('state of the holiday calendar; leave out for federal holidays only'),
  }),
  example: { assessmentCompletedOn: '2026-12-04', scope: 'construction', country: 'US' },
  run: ({ assessmentCompletedOn, scope, country, state }) => {
    const isHoliday = publicHolidays(country, state);
    if (isHoliday === null) throw new RefusedInput([{ field: state === undefined ? 'country' : 'state', message: 'has no holiday calendar' }]);
    // The five and fifteen working days are US text: no other country's date is made of them.
    if (country.toUpperCase() !== 'US') return { outcome: 'undecided', reason: { en: 'The days for the notice are US text. Check the local law.', es: 'El plazo del aviso es texto de EE. UU. Consulte la ley local.' } };
    return noticeDate(assessmentCompletedOn, scope, isHoliday);
  },
});

const airflow = calculation({
  name: 'airflow',
  summary: 'airflow that a dust collector must move at the tool',
  schema: z.strictObject({
    isHandheldGrinder: z.boolean(),
    wheelDiameterMm: unsaid(z.number().positive().max(1000).describe('wheel diameter, mm (1 in = 25.4 mm)')),
    makerAirflowM3PerH: unsaid(z.number().positive().describe('maker’s figure, m³/h (1 cfm = 1.699 m³/h)')),
    measuredM3PerH: unsaid(z.number().min(0).describe('measured at the shroud in use, m³/h')),
  }),
  example: { isHandheldGrinder: true, wheelDiameterMm: 127, measuredM3PerH: 220 },
  run: ({ measuredM3PerH, ...tool }) => {
    const demand = airflowDemand(tool);
    if (!demand.isDecided) return demand;
    return { ...demand, requiredCfm: cfmFromM3PerH(demand.requiredM3PerH), isMet: measuredM3PerH === null ? null : meetsAirflow(measuredM3PerH, demand.requiredM3PerH) };
  },
});

const dilution = calculation({
  name: 'dilution',
  summary: 'fresh air that keeps a vapor at a target; refused for dust, mist and sensitizers',
  schema: z.strictObject({
    form: z.enum(['vapor', 'dust', 'mist']),
    hazardCodes: z.array(z.string()).describe('statements of its sheet, for example ["H336"]'),
    evaporationGPerH: unsaid(z.number().min(0).describe('g/h, for the metric form; or the next two')),
    evaporationPintsPerMin: unsaid(z.number().min(0).describe('US pints per minute, for the form with 403·10⁶')),
    specificGravity: unsaid(z.number().positive().max(5).describe('of the liquid, goes with pints')),
    molarMassGPerMol: z.number().positive().describe('g/mol'),
    targetPpm: z.number().positive().describe('ppm'),
    mixingFactor: z.number().min(1).max(10).describe('K: 1 ideal to 10 poor mixing'),
  }),
  example: { form: 'vapor', hazardCodes: ['H336'], evaporationGPerH: 936.9, molarMassGPerMol: 133.4, targetPpm: 350, mixingFactor: 5 },
  run: ({ evaporationGPerH, evaporationPintsPerMin, specificGravity, ...vapor }) => {
    if ((evaporationGPerH === null) === (evaporationPintsPerMin === null)) throw new RefusedInput([{ field: 'evaporationGPerH', message: 'say the evaporation once: in g/h, or in pints per minute with the specific gravity' }]);
    if (evaporationGPerH !== null) {
      const answer = dilutionVentilation({ ...vapor, evaporationGPerH });
      return answer.isAllowed ? { ...answer, requiredCfm: cfmFromM3PerH(answer.requiredM3PerH) } : answer;
    }
    if (specificGravity === null || evaporationPintsPerMin === null) throw new RefusedInput([{ field: 'specificGravity', message: 'is needed where the evaporation is in pints' }]);
    const refusal = dilutionRefusal(vapor.form, vapor.hazardCodes);
    if (refusal !== null) return refusal;
    const { idealCfm, requiredCfm } = dilutionAirflowCfm({ ...vapor, specificGravity, evaporationPintsPerMin });
    return { isAllowed: true, idealM3PerH: m3PerHFromCfm(idealCfm), requiredM3PerH: m3PerHFromCfm(requiredCfm), source: DILUTION_SOURCE, requiredCfm };
  },
});

const limits = calculation({
  name: 'limits',
  summary: 'every limit on file for a substance, law and advice, each with its source',
  schema: z.strictObject({ substance: z.string().describe(`id or CAS number: ${SUBSTANCES.map(({ id }) => id).join(', ')}`) }),
  example: { substance: '101-68-8' },
  run: ({ substance }) => {
    const found = SUBSTANCES.find(({ id }) => id === substance) ?? findSubstance(substance);
    if (found === null) throw new RefusedInput([{ field: 'substance', message: 'is not in the table of substances' }]);
    return { substance: found, limits: limitsOf(found.id) };
  },
});

export const AIR_CALCULATIONS: readonly Calculation[] = [twa, mixture, monitoring, notice, airflow, dilution, limits];
