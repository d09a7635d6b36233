import { type IsoDate } from '../iso-date';
import { met, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';
import { monitoringSchedule, MONITORING_SOURCES, reassessment, type MonitoringLimits, type MonitoringResult, type WorkChange } from './monitoring';

export interface MonitoringFacts {
  readonly results: readonly MonitoringResult[];
  readonly limits: MonitoringLimits;
}

/**
 * (d)(2)(iii), the scheduled option. (A): a first sample of each shift, job and area. Then, by the most recent day:
 * (B) a first result below the action level ends it; (C) at or above it, not above the limit: again within six months; (D) above the limit: within three;
 * (E) below it after a higher one: within six months, until two in a row, seven or more days apart, are below.
 * The months and days stand in `monitoring.ts` (`REPEAT_MONTHS`, `monitoringSchedule`); the limits come with the facts, from the place's pack.
 */
export const monitoringDue: Rule<MonitoringFacts> = {
  id: 'silica-monitoring-due',
  title: words('Next air sample', 'Próxima muestra de aire'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(d)(2)(iii)', note: 'Read in OAR 437-002-1056(3).' }),
  duties: ['SIL-08'],
  evaluate({ results, limits }, asOf) {
    const schedule = monitoringSchedule(results, limits, asOf);
    // The most recent day decides, not the highest result ever ((d)(2)(iii)(C)-(E)).
    const lastDay = results.map((each) => each.sampledOn).sort().at(-1) ?? null;
    const latest = lastDay === null ? null : Math.max(...results.filter((each) => each.sampledOn === lastDay).map((each) => each.twaMicrogramsPerM3));
    const extra = { inputs: { 'results on file': results.length, 'most recent sample on': lastDay, 'most recent, µg/m³ as 8-hour average': latest }, dueOn: schedule.dueOn };
    // (A)
    if (schedule.step === 'sample-first') return undecided(schedule.reason, WHO.hygienist, { ...extra, whatWouldChange: words('A first sample of each shift, job and area.', 'Una primera muestra por turno, puesto y zona.') });
    // (C), (D), (E): the day to sample again is past.
    if (schedule.isOverdue) return unmet(schedule.reason, { ...extra, whatWouldChange: words('Sample again.', 'Muestree de nuevo.') });
    // (B), (E): may stop; or the next day is still to come.
    return met(schedule.reason, extra);
  },
};

export interface ChangeFacts {
  readonly lastAssessedOn: IsoDate;
  readonly changes: readonly WorkChange[];
}

/** (d)(2)(iv): assess again when a change of production, process, controls, people or work practices may bring exposure at or above the action level, or there is reason to think it did. */
export const reassessOnChange: Rule<ChangeFacts> = {
  id: 'silica-reassess-on-change',
  title: words('Assess again after a change', 'Evaluar de nuevo tras un cambio'),
  source: MONITORING_SOURCES.reassess,
  duties: ['SIL-09'],
  evaluate({ lastAssessedOn, changes }) {
    const answer = reassessment(lastAssessedOn, changes);
    const inputs = { 'last assessed': lastAssessedOn, changes: answer.changes.length };
    if (answer.outcome === 'not-needed') return met(words('No change since that can raise exposure.', 'Ningún cambio desde entonces puede subir la exposición.'), { inputs });
    if (answer.outcome === 'needed') return unmet(words('A change can raise the exposure: assess again.', 'Un cambio puede subir la exposición: evalúe de nuevo.'), { inputs, whatWouldChange: words('A new assessment.', 'Una nueva evaluación.') });
    return undecided(words('A change was made, and nobody has said whether it can raise the exposure.', 'Hubo un cambio y nadie ha dicho si puede subir la exposición.'), answer.whoDecides, { inputs, whatWouldChange: words('Say for each change whether it can.', 'Diga de cada cambio si puede.') });
  },
};
