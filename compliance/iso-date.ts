import { InputError } from './input-error';

/** A calendar day, 'YYYY-MM-DD', with no zone: the site's own local day. */
export type IsoDate = string;

const MS_PER_DAY = 86_400_000;
const FORM = /^(\d{4})-(\d{2})-(\d{2})$/;

/** Whether the text is a day that exists: '2026-02-29' does not. */
export function isIsoDate(text: string): boolean {
  const match = FORM.exec(text);
  if (match === null) return false;
  const date = new Date(0);
  date.setUTCFullYear(Number(match[1]), Number(match[2]) - 1, Number(match[3]));
  return date.toISOString().slice(0, 10) === text;
}

/** Returns the day when it exists; throws an InputError naming `field` otherwise. */
export function checkIsoDate(field: string, text: string): IsoDate {
  if (typeof text !== 'string' || !isIsoDate(text)) throw new InputError(field, 'must be a date that exists, written YYYY-MM-DD');
  return text;
}

/** Returns the day on which something was done; throws an InputError naming `field` when it lies after `asOf`: a plan is not a deed. */
export function checkDoneOn(field: string, text: string, asOf: IsoDate): IsoDate {
  if (checkIsoDate(field, text) > checkIsoDate('asOf', asOf)) throw new InputError(field, `is later than ${asOf}`);
  return text;
}

function toDate(day: IsoDate, field = 'date'): Date {
  return new Date(`${checkIsoDate(field, day)}T00:00:00Z`);
}

function toIso(date: Date): IsoDate {
  return date.toISOString().slice(0, 10);
}

export function addDays(day: IsoDate, days: number): IsoDate {
  return toIso(new Date(toDate(day).getTime() + days * MS_PER_DAY));
}

/** The same day of the month `months` later; the end of a shorter month where that day does not exist (30 Nov + 3 = 28 or 29 Feb). */
export function addMonths(day: IsoDate, months: number): IsoDate {
  const date = toDate(day);
  const dayOfMonth = date.getUTCDate();
  date.setUTCDate(1);
  date.setUTCMonth(date.getUTCMonth() + months);
  const lastDay = new Date(Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + 1, 0)).getUTCDate();
  date.setUTCDate(Math.min(dayOfMonth, lastDay));
  return toIso(date);
}

export function addYears(day: IsoDate, years: number): IsoDate {
  return addMonths(day, years * 12);
}

/** Days from `from` to `to`; negative when `to` is earlier. */
export function daysBetween(from: IsoDate, to: IsoDate): number {
  return Math.round((toDate(to).getTime() - toDate(from).getTime()) / MS_PER_DAY);
}

/** 0 Sunday to 6 Saturday. */
export function weekday(day: IsoDate): number {
  return toDate(day).getUTCDay();
}

/** Whether the day is a Saturday or Sunday. */
export function isWeekend(day: IsoDate): boolean {
  const number = weekday(day);
  return number === 0 || number === 6;
}

/** Years from one day to another, counted in whole anniversaries reached. */
export function wholeYearsBetween(from: IsoDate, to: IsoDate): number {
  let years = Number(to.slice(0, 4)) - Number(from.slice(0, 4));
  if (addYears(from, years) > checkIsoDate('to', to)) years -= 1;
  return years;
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
