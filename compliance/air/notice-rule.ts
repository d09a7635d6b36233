import { addWorkingDays, checkDoneOn, checkIsoDate, type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { met, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal, type Source } from '../source';
import { words } from '../words';

export type NoticeScope = 'construction' | 'general-industry';

/** Working days within which employees must be told of an exposure assessment. */
export const NOTICE_WORKING_DAYS: Readonly<Record<NoticeScope, { readonly days: number; readonly source: Source }>> = {
  construction: { days: 5, source: usFederal('1926.1153', 'partly', { paragraph: '(d)(2)(vi)(A)', note: 'A trade article and a training text that restate it.' }) },
  'general-industry': { days: 15, source: usFederal('1910.1053', 'partly', { paragraph: '(d)(6)', note: 'A trade article.' }) },
};
export const WORKING_DAY_SOURCE = usFederal('1903.22', 'from-memory', { paragraph: '(c)', note: 'The silica rule does not define working days; by analogy federal holidays are left out.' });

export interface NoticeDate {
  /** Weekends and holidays left out. */
  readonly dueOn: IsoDate;
  /** Weekends only left out: the date that is safe under either reading. */
  readonly earlierDueOn: IsoDate;
  readonly convention: Words;
  readonly source: Source;
  readonly conventionSource: Source;
}

/** By when affected employees must be told, each in writing or by a posting all can see. `isHoliday` comes from the caller's calendar. */
export function noticeDate(assessmentCompletedOn: IsoDate, scope: NoticeScope, isHoliday: (day: IsoDate) => boolean): NoticeDate {
  checkIsoDate('assessmentCompletedOn', assessmentCompletedOn);
  const { days, source } = NOTICE_WORKING_DAYS[scope];
  return {
    dueOn: addWorkingDays(assessmentCompletedOn, days, isHoliday),
    earlierDueOn: addWorkingDays(assessmentCompletedOn, days, () => false),
    convention: {
      en: `${days} working days, Monday to Friday, federal holidays left out. The rule does not say so itself: the earlier date counts holidays too.`,
      es: `${days} días hábiles, de lunes a viernes, sin los feriados federales. La norma no lo dice: la fecha más temprana cuenta también los feriados.`,
    },
    source,
    conventionSource: WORKING_DAY_SOURCE,
  };
}

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

/**
 * (d)(2)(vi)(A): within five working days after an assessment is completed, each affected employee is told the result in writing, or it is posted where all can see it;
 * (B): where it is above the limit, the notice says what is done to bring the exposure down to it.
 */
export const noticeOfAssessment: Rule<NoticeFacts> = {
  id: 'silica-notice-of-assessment',
  title: words('Employees told of the result', 'Se informó el resultado a los empleados'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(d)(2)(vi)(A), (B)', note: 'A trade article and a training text that restate (A); (B) recalled.' }),
  duties: ['SIL-11'],
  evaluate({ assessmentCompletedOn, scope, holidays, toldOn, isAboveLimit, namesCorrectiveAction }, asOf) {
    if (toldOn !== null) checkDoneOn('toldOn', toldOn, asOf);
    const { dueOn, earlierDueOn } = noticeDate(assessmentCompletedOn, scope, (day) => holidays.includes(day));
    const extra = { inputs: { 'assessment completed': assessmentCompletedOn, 'told on': toldOn, 'above the limit': isAboveLimit }, dueOn, results: { 'earlier reading': earlierDueOn } };
    // (A) Told late, or not told and the last day is past; the last day itself is still in time.
    if ((toldOn ?? asOf) > dueOn) return unmet(words(`Was due by ${dueOn}.`, `Debía informarse a más tardar el ${dueOn}.`), { ...extra, whatWouldChange: words('Post it now, and keep the date.', 'Publíquelo ya y guarde la fecha.') });
    // (A) Not told, and there is still time.
    if (toldOn === null) return undecided(words(`Not told yet: by ${earlierDueOn} at the safest.`, `Aún sin informar: lo más seguro, a más tardar el ${earlierDueOn}.`), WHO.safetyOfficer, { ...extra, whatWouldChange: words('Post it, or hand it to each person.', 'Publíquelo o entréguelo a cada persona.') });
    // (B) Told in time, above the limit: the corrective action.
    if (isAboveLimit && namesCorrectiveAction === null) return undecided(words('Does the notice say what is done to bring the exposure down?', '¿Dice el aviso qué se hace para bajar la exposición?'), WHO.safetyOfficer, { ...extra, whatWouldChange: words('Read the notice.', 'Lea el aviso.') });
    if (isAboveLimit && namesCorrectiveAction === false) return unmet(words('Above the limit, the notice must say what is done about it.', 'Sobre el límite, el aviso debe decir qué se hace al respecto.'), { ...extra, whatWouldChange: words('Add the corrective action.', 'Añada la medida correctiva.') });
    return met(words(`Told on ${toldOn}.`, `Informado el ${toldOn}.`), extra);
  },
};
