import { addDays, checkIsoDate, isWeekend, type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { usFederal, type Source } from '../source';

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

/** The day `count` working days after `from`; the first one counted is the day after. */
export function addWorkingDays(from: IsoDate, count: number, isHoliday: (day: IsoDate) => boolean): IsoDate {
  let day = checkIsoDate('from', from);
  for (let left = count; left > 0; ) {
    day = addDays(day, 1);
    if (!isWeekend(day) && !isHoliday(day)) left -= 1;
  }
  return day;
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
