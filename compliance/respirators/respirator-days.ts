import { addDays, addYears, checkDoneOn, checkIsoDate, type IsoDate } from '../iso-date';
import { usFederal } from '../source';

export const MEDICAL_TRIGGER_SOURCE = usFederal('1926.1153', 'parallel-text', { paragraph: '(h)(1)(i)', note: 'OAR 437-002-1062 and WAC 296-840-145 read. Only respirators required by this standard count.' });
export const ROLLING_SOURCE = usFederal('1926.1153', 'from-memory', { paragraph: '(h)(1)(i)', note: 'Calendar or rolling year is not said: computed over any 12 months. A day counts whatever the time of use.' });
export const EXAM_SOURCE = usFederal('1926.1153', 'partly', { paragraph: '(h)(2)-(3)', note: 'Initial timing read in Oregon and Washington texts; every three years in an OSHA fact sheet.' });

export const MEDICAL_TRIGGER_DAYS = 30;
const INITIAL_EXAM_DAYS = 30;
const EXAM_YEARS = 3;

/** Why a respirator was required of an assigned person on a day. Only the first two are the silica standard's own. */
export type RespiratorBasis = 'silica-table-1' | 'silica-assessment' | 'sheet' | 'other-standard' | 'host-rule' | 'policy' | 'voluntary';
const COUNTING: readonly RespiratorBasis[] = ['silica-table-1', 'silica-assessment'];

/** One assignment with a respirator; scheduled ones lie ahead. Signing proves a briefing, not wearing: the assignment is what counts. */
export interface RespiratorDay {
  readonly on: IsoDate;
  readonly basis: RespiratorBasis;
}

export interface RespiratorDayCount {
  /** Distinct counting days in the 12 months up to and including `asOf`. */
  readonly inLast12Months: number;
  /** Most counting days in any 12 months, past and scheduled. */
  readonly inAny12Months: number;
  /** The calendar year of `asOf`, shown beside it. */
  readonly inCalendarYear: number;
  /** Days that did not count, because another rule or nobody required the respirator. */
  readonly notCounted: number;
  readonly isTriggered: boolean;
  /** The day that makes thirty in some 12 months; null when no day does. */
  readonly reachedOn: IsoDate | null;
  readonly reading: 'rolling-12-months';
}

/** Counts days per person, looked back and ahead. The trigger is "will be required", so a schedule that reaches 30 triggers before the days are worked. */
export function countRespiratorDays(days: readonly RespiratorDay[], asOf: IsoDate): RespiratorDayCount {
  checkIsoDate('asOf', asOf);
  days.forEach((day, i) => checkIsoDate(`days[${i}].on`, day.on));
  const counting = [...new Set(days.filter((day) => COUNTING.includes(day.basis)).map((day) => day.on))].sort();
  const others = new Set(days.filter((day) => !counting.includes(day.on)).map((day) => day.on));
  const windowStart = addDays(addYears(asOf, -1), 1);
  let most = 0;
  let reachedOn: IsoDate | null = null;
  counting.forEach((day, i) => {
    const end = addYears(day, 1);
    const inWindow = counting.slice(i).filter((each) => each < end);
    most = Math.max(most, inWindow.length);
    const thirtieth = inWindow[MEDICAL_TRIGGER_DAYS - 1];
    if (thirtieth !== undefined && (reachedOn === null || thirtieth < reachedOn)) reachedOn = thirtieth;
  });
  return {
    inLast12Months: counting.filter((day) => day >= windowStart && day <= asOf).length,
    inAny12Months: most,
    inCalendarYear: counting.filter((day) => day.slice(0, 4) === asOf.slice(0, 4)).length,
    notCounted: others.size,
    isTriggered: most >= MEDICAL_TRIGGER_DAYS,
    reachedOn,
    reading: 'rolling-12-months',
  };
}

export interface ExamDue {
  readonly dueOn: IsoDate;
  readonly kind: 'initial' | 'repeat';
  readonly isOverdue: boolean;
}

/**
 * When the silica exam is due for a person whose days trigger it: within 30 days of assignment unless an equivalent exam was given in the three years before,
 * then every three years or sooner when the clinician says so. Dates only, never findings.
 */
export function silicaExamDue(person: { readonly assignedOn: IsoDate; readonly lastExamOn: IsoDate | null; readonly clinicianWantsBy: IsoDate | null }, asOf: IsoDate): ExamDue {
  checkIsoDate('assignedOn', person.assignedOn);
  checkIsoDate('asOf', asOf);
  const lastExamOn = person.lastExamOn === null ? null : checkDoneOn('lastExamOn', person.lastExamOn, asOf);
  const isStillGood = lastExamOn !== null && addYears(lastExamOn, EXAM_YEARS) >= person.assignedOn;
  const regular = isStillGood ? addYears(lastExamOn, EXAM_YEARS) : addDays(person.assignedOn, INITIAL_EXAM_DAYS);
  const sooner = person.clinicianWantsBy === null ? regular : checkIsoDate('clinicianWantsBy', person.clinicianWantsBy);
  const dueOn = sooner < regular ? sooner : regular;
  return { dueOn, kind: isStillGood ? 'repeat' : 'initial', isOverdue: dueOn < asOf };
}
