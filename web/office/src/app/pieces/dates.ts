/** Dates and times as the office writes them: "Thursday 3 December", "3 Dec", "06:52". */
const days = ['Sunday', 'Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday'] as const;
const months = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'] as const;

interface DayParts {
  readonly year: number;
  readonly month: string;
  readonly dayOfMonth: number;
  readonly weekday: string;
}

/** A local date has no zone: it is read as UTC, so that no browser shifts it by a day. */
function partsOf(isoDate: string): DayParts {
  const date = new Date(`${isoDate}T00:00:00Z`);
  return { year: date.getUTCFullYear(), month: months[date.getUTCMonth()] ?? '', dayOfMonth: date.getUTCDate(), weekday: days[date.getUTCDay()] ?? '' };
}

/** "Thursday 3 December" */
export function dayName(isoDate: string): string {
  const { weekday, dayOfMonth, month } = partsOf(isoDate);
  return `${weekday} ${dayOfMonth} ${month}`;
}

/** "Thu 3 Dec" */
export function dayShort(isoDate: string): string {
  const { weekday, dayOfMonth, month } = partsOf(isoDate);
  return `${weekday.slice(0, 3)} ${dayOfMonth} ${month.slice(0, 3)}`;
}

/** "3 Dec 2026" */
export function dayOf(isoDate: string): string {
  const { year, dayOfMonth, month } = partsOf(isoDate);
  return `${dayOfMonth} ${month.slice(0, 3)} ${year}`;
}

/** Local calendar date of an instant, ISO; in the browser's zone or a named one. */
export function localDateOf(instant: string | Date, timeZone?: string): string {
  const parts = new Intl.DateTimeFormat('en-CA', { timeZone, year: 'numeric', month: '2-digit', day: '2-digit' }).formatToParts(new Date(instant));
  const part = (type: string) => parts.find((p) => p.type === type)?.value ?? '';
  return `${part('year')}-${part('month')}-${part('day')}`;
}

/** "06:52", with seconds "06:52:05"; in the browser's zone or a named one. */
export function timeOf(instant: string | Date, { seconds = false, timeZone }: { seconds?: boolean; timeZone?: string | undefined } = {}): string {
  return new Intl.DateTimeFormat('en-GB', { timeZone, hour: '2-digit', minute: '2-digit', ...(seconds ? { second: '2-digit' as const } : {}), hourCycle: 'h23' }).format(new Date(instant));
}

/** "3 Dec 06:26" */
export function momentShort(instant: string, timeZone?: string): string {
  const { dayOfMonth, month } = partsOf(localDateOf(instant, timeZone));
  return `${dayOfMonth} ${month.slice(0, 3)} ${timeOf(instant, { timeZone })}`;
}

/** "3 Dec 2026, 06:26:41" */
export function momentFull(instant: string, timeZone?: string): string {
  return `${dayOf(localDateOf(instant, timeZone))}, ${timeOf(instant, { seconds: true, timeZone })}`;
}

/** "06:52" today, "Wed 17:20" within a week, "3 Dec 2026" before that. */
export function heardAt(instant: string, now: Date): string {
  const day = localDateOf(instant);
  if (day === localDateOf(now)) return timeOf(instant);
  const isThisWeek = now.getTime() - new Date(instant).getTime() < 6 * 24 * 3600 * 1000;
  return isThisWeek ? `${partsOf(day).weekday.slice(0, 3)} ${timeOf(instant)}` : dayOf(day);
}

/** The local date a number of days after (or before) another. */
export function daysAfter(isoDate: string, count: number): string {
  const date = new Date(`${isoDate}T00:00:00Z`);
  date.setUTCDate(date.getUTCDate() + count);
  return date.toISOString().slice(0, 10);
}
