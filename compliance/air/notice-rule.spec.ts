import { describe, expect, it } from '@jest/globals';
import Holidays from 'date-holidays';
import fc from 'fast-check';
import { InputError } from '../input-error';
import { addDays, addWorkingDays, daysBetween, isWeekend } from '../iso-date';
import { noticeDate } from './notice-rule';

const us = new Holidays('US');
/** Days, not instants: the calendar keeps the country's own zone. */
const holidays = new Set([2025, 2026, 2027, 2028, 2029, 2030].flatMap((year) => us.getHolidays(year).filter((each) => each.type === 'public').map((each) => each.date.slice(0, 10))));
const isHoliday = (day: string) => holidays.has(day);
const due = (completedOn: string, scope: 'construction' | 'general-industry' = 'construction') => {
  const { dueOn, earlierDueOn } = noticeDate(completedOn, scope, isHoliday);
  return [dueOn, earlierDueOn];
};

describe('[SIL-11] notice of an assessment, 29 CFR 1926.1153(d)(2)(vi)', () => {
  it.each([
    ['B5, derived: Friday 4 December 2026, no holiday between', '2026-12-04', '2026-12-11', '2026-12-11'],
    ['over Christmas 2026 (a Friday) the reading matters', '2026-12-18', '2026-12-28', '2026-12-25'],
    ['over Thanksgiving, Thursday 26 November 2026', '2026-11-20', '2026-11-30', '2026-11-27'],
    ['completed on a Saturday', '2026-12-05', '2026-12-11', '2026-12-11'],
  ])('%s', (_name, completedOn, dueOn, earlierDueOn) => {
    expect(due(completedOn)).toEqual([dueOn, earlierDueOn]);
  });

  it('gives 5 working days in construction and 15 in general industry (trap 12)', () => {
    // 1910.1053(d)(6): 15 working days, verified. From Tuesday 1 September 2026, Labor Day on the 7th.
    expect(due('2026-09-01')).toEqual(['2026-09-09', '2026-09-08']);
    expect(due('2026-09-01', 'general-industry')).toEqual(['2026-09-23', '2026-09-22']);
  });

  it('refuses a day that does not exist by name', () => {
    expect(() => noticeDate('2026-02-30', 'construction', () => false)).toThrow(InputError);
    expect(() => noticeDate('2026-02-30', 'construction', () => false)).toThrow(/^assessmentCompletedOn/);
  });

  it('never falls on a weekend or holiday, nor before the earlier reading', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1500 }), fc.integer({ min: 1, max: 20 }), (offset, count) => {
        const from = addDays('2026-01-01', offset);
        const day = addWorkingDays(from, count, isHoliday);
        expect(isWeekend(day) || isHoliday(day)).toBe(false);
        expect(daysBetween(addWorkingDays(from, count, () => false), day)).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 50 },
    );
  });
});
