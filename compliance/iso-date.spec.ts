import { describe, expect, it } from '@jest/globals';
import * as dateFns from 'date-fns';
import fc from 'fast-check';
import { InputError } from './input-error';
import { addDays, addMonths, addYears, checkIsoDate, daysBetween, isIsoDate, isWeekend, weekday, wholeYearsBetween } from './iso-date';

const anyDay = fc.date({ min: new Date('1970-01-01T00:00:00Z'), max: new Date('2120-12-31T00:00:00Z'), noInvalidDate: true }).map((date) => date.toISOString().slice(0, 10));
/** date-fns works in local time: noon keeps the day in every zone. */
const local = (day: string) => dateFns.parse(`${day} 12:00`, 'yyyy-MM-dd HH:mm', new Date(0));
const format = (date: Date) => dateFns.format(date, 'yyyy-MM-dd');

describe('isIsoDate', () => {
  it.each([
    ['2028-02-29', true],
    ['2026-02-29', false],
    ['2026-13-01', false],
    ['2026-1-1', false],
    ['2026-01-01T00:00', false],
    ['', false],
  ])('%s → %s', (text, expected) => {
    expect(isIsoDate(text)).toBe(expected);
  });

  it('names the field of a day that does not exist', () => {
    expect(() => checkIsoDate('sampledOn', '2026-02-30')).toThrow(InputError);
    expect(() => checkIsoDate('sampledOn', '2026-02-30')).toThrow(/^sampledOn: /);
  });
});

describe('day arithmetic', () => {
  // Convention of the reference, section 14: months clamp at the end of the month.
  it.each([
    ['2026-11-30', 3, '2027-02-28'],
    ['2027-11-30', 3, '2028-02-29'],
    ['2026-08-31', 6, '2027-02-28'],
    ['2026-12-04', 6, '2027-06-04'],
    ['2026-01-15', -1, '2025-12-15'],
  ])('%s and %d months → %s', (day, months, expected) => {
    expect(addMonths(day, months)).toBe(expected);
  });

  it('counts years to the anniversary, with 29 February falling on the 28th', () => {
    expect(addYears('2028-02-29', 30)).toBe('2058-02-28');
    expect(wholeYearsBetween('2020-06-01', '2023-05-31')).toBe(2);
    expect(wholeYearsBetween('2020-06-01', '2023-06-01')).toBe(3);
  });

  it('knows Friday 4 December 2026 (calendar)', () => {
    expect(weekday('2026-12-04')).toBe(5);
    expect(isWeekend('2026-12-04')).toBe(false);
    expect(isWeekend('2026-12-05')).toBe(true);
    expect(isWeekend('2026-12-06')).toBe(true);
  });

  it('agrees with date-fns on days, months and differences', () => {
    fc.assert(
      fc.property(anyDay, fc.integer({ min: -800, max: 800 }), (day, count) => {
        expect(addDays(day, count)).toBe(format(dateFns.addDays(local(day), count)));
        expect(addMonths(day, count)).toBe(format(dateFns.addMonths(local(day), count)));
        expect(daysBetween(day, addDays(day, count))).toBe(count);
        expect(weekday(day)).toBe(dateFns.getDay(local(day)));
      }),
    );
  });
});
