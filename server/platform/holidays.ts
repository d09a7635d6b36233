import Holidays from 'date-holidays';

/**
 * Whether a local day (ISO) is a public holiday of a country, or of its state. Compares calendar days, not instants:
 * the calendar keeps the country's own zone, which the machine need not share. Null where there is no such calendar.
 */
export function publicHolidays(country: string, state?: string): ((day: string) => boolean) | null {
  const calendar = state === undefined ? new Holidays(country) : new Holidays(country, state);
  if (calendar.getRules().length === 0) return null;
  const byYear = new Map<number, ReadonlySet<string>>();
  const daysOf = (year: number): ReadonlySet<string> => {
    const known = byYear.get(year);
    if (known !== undefined) return known;
    const days = new Set(calendar.getHolidays(year).filter(({ type }) => type === 'public').map(({ date }) => date.slice(0, 10)));
    byYear.set(year, days);
    return days;
  };
  return (day) => daysOf(Number(day.slice(0, 4))).has(day);
}
