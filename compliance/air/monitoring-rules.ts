import { checkDoneOn, type IsoDate } from '../iso-date';
import { met, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';
import { monitoringSchedule, MONITORING_SOURCES, reassessment, type MonitoringLimits, type MonitoringResult, type WorkChange } from './monitoring';
import { NOTICE_WORKING_DAYS, noticeDate, type NoticeScope } from './notice-date';

export interface MonitoringFacts {
  readonly results: readonly MonitoringResult[];
  readonly limits: MonitoringLimits;
}

/** The scheduled option: the next sample is not overdue. */
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
    if (schedule.step === 'sample-first') return undecided(schedule.reason, WHO.hygienist, { ...extra, whatWouldChange: words('A first sample of each shift, job and area.', 'Una primera muestra por turno, puesto y zona.') });
    if (schedule.isOverdue) return unmet(schedule.reason, { ...extra, whatWouldChange: words('Sample again.', 'Muestree de nuevo.') });
    return met(schedule.reason, extra);
  },
};

export interface ChangeFacts {
  readonly lastAssessedOn: IsoDate;
  readonly changes: readonly WorkChange[];
}

/** A change of process, control, product, people or practice raises the question of a new assessment. */
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

export interface NoticeFacts {
  readonly assessmentCompletedOn: IsoDate;
  readonly scope: NoticeScope;
  /** Public holidays of the place from the assessment on. */
  readonly holidays: readonly IsoDate[];
  /** When everyone affected had been told, in writing or by posting; null while not. */
  readonly toldOn: IsoDate | null;
  readonly isAboveLimit: boolean;
  /** The notice says what is done to bring the exposure down; null where nobody looked. */
  readonly namesCorrectiveAction: boolean | null;
}

export const noticeOfAssessment: Rule<NoticeFacts> = {
  id: 'silica-notice-of-assessment',
  title: words('Employees told of the result', 'Se informó el resultado a los empleados'),
  source: NOTICE_WORKING_DAYS.construction.source,
  duties: ['SIL-11'],
  evaluate({ assessmentCompletedOn, scope, holidays, toldOn, isAboveLimit, namesCorrectiveAction }, asOf) {
    if (toldOn !== null) checkDoneOn('toldOn', toldOn, asOf);
    const { dueOn, earlierDueOn } = noticeDate(assessmentCompletedOn, scope, (day) => holidays.includes(day));
    const extra = { inputs: { 'assessment completed': assessmentCompletedOn, 'told on': toldOn, 'above the limit': isAboveLimit }, dueOn, results: { 'earlier reading': earlierDueOn } };
    if ((toldOn ?? asOf) > dueOn) return unmet(words(`Was due by ${dueOn}.`, `Debía informarse a más tardar el ${dueOn}.`), { ...extra, whatWouldChange: words('Post it now, and keep the date.', 'Publíquelo ya y guarde la fecha.') });
    if (toldOn === null) return undecided(words(`Not told yet: by ${earlierDueOn} at the safest.`, `Aún sin informar: lo más seguro, a más tardar el ${earlierDueOn}.`), WHO.safetyOfficer, { ...extra, whatWouldChange: words('Post it, or hand it to each person.', 'Publíquelo o entréguelo a cada persona.') });
    if (isAboveLimit && namesCorrectiveAction === null) return undecided(words('Does the notice say what is done to bring the exposure down?', '¿Dice el aviso qué se hace para bajar la exposición?'), WHO.safetyOfficer, { ...extra, whatWouldChange: words('Read the notice.', 'Lea el aviso.') });
    if (isAboveLimit && namesCorrectiveAction === false) return unmet(words('Above the limit, the notice must say what is done about it.', 'Sobre el límite, el aviso debe decir qué se hace al respecto.'), { ...extra, whatWouldChange: words('Add the corrective action.', 'Añada la medida correctiva.') });
    return met(words(`Told on ${toldOn}.`, `Informado el ${toldOn}.`), extra);
  },
};
