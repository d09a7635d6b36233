import { type Language } from '#compliance/outcome';

const locales: Readonly<Record<Language, string>> = { en: 'en-US', es: 'es-US' };

/** "Thursday, December 3", of a local date. */
export const dayIn = (language: Language, isoDate: string): string => new Intl.DateTimeFormat(locales[language], { timeZone: 'UTC', weekday: 'long', month: 'long', day: 'numeric' }).format(new Date(`${isoDate}T00:00:00Z`));

/** "Dec 3, 2026", of a local date. */
export const dateIn = (language: Language, isoDate: string): string => new Intl.DateTimeFormat(locales[language], { timeZone: 'UTC', year: 'numeric', month: 'short', day: 'numeric' }).format(new Date(`${isoDate}T00:00:00Z`));

/** "Dec 3, 06:52", on this phone's clock. */
export const momentIn = (language: Language, instant: string): string => new Intl.DateTimeFormat(locales[language], { month: 'short', day: 'numeric', hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(new Date(instant));
