import { type Language } from '#compliance/outcome';

const locale: Readonly<Record<Language, string>> = { en: 'en-US', es: 'es-US' };

/** "06:24" on the tablet's clock. */
export function clockTime(instant: string, language: Language): string {
  return new Intl.DateTimeFormat(locale[language], { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(new Date(instant));
}

/** "06:24" today, "Dec 2, 06:24" on another day. */
export function whenTime(instant: string, language: Language, now = new Date()): string {
  const at = new Date(instant);
  if (at.toDateString() === now.toDateString()) return clockTime(instant, language);
  const day = new Intl.DateTimeFormat(locale[language], { month: 'short', day: 'numeric' }).format(at);
  return `${day}, ${clockTime(instant, language)}`;
}

/** A local calendar date (ISO) as "Thursday, December 3". */
export function dayName(date: string, language: Language): string {
  return new Intl.DateTimeFormat(locale[language], { weekday: 'long', month: 'long', day: 'numeric', timeZone: 'UTC' }).format(new Date(`${date}T12:00:00Z`));
}

/** "Marisol, Tomasz and Abe". */
export function nameList(names: readonly string[], language: Language): string {
  return new Intl.ListFormat(locale[language], { type: 'conjunction' }).format(names);
}
