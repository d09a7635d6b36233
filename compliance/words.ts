import { type Language, type Words } from './outcome';

/** One sentence in both crew languages. */
export const words = (en: string, es: string): Words => ({ en, es });

/** Both languages made from one template. */
export function eachLanguage(make: (language: Language) => string): Words {
  return { en: make('en'), es: make('es') };
}

/** Sentences one after the other, in each language. */
export function sentences(...parts: readonly (Words | null)[]): Words {
  const present = parts.filter((part) => part !== null);
  return eachLanguage((language) => present.map((part) => part[language]).join(' '));
}

/** "a, b and c" / "a, b y c". */
export function listed(names: readonly string[]): Words {
  return eachLanguage((language) => {
    const last = names[names.length - 1];
    if (last === undefined) return '';
    if (names.length === 1) return last;
    return `${names.slice(0, -1).join(', ')} ${language === 'en' ? 'and' : conjunction(last)} ${last}`;
  });
}

/** Spanish "y" becomes "e" before the sound i: "Marisol e Inés". */
function conjunction(next: string): string {
  return /^h?i(?![aeiouáéíóú])/i.test(next) ? 'e' : 'y';
}

/** First letter small, for use inside a sentence. */
export function inside(text: Words): Words {
  return eachLanguage((language) => text[language].charAt(0).toLowerCase() + text[language].slice(1));
}

/** "2 h 10 min", "45 min", "4 h". */
export function duration(minutes: number): string {
  const whole = Math.round(minutes);
  const hours = Math.floor(whole / 60);
  const rest = whole % 60;
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`;
}

/** Clock time of a minute from local midnight: 780 → "13:00"; past midnight the clock starts again. */
export function clock(minute: number): string {
  const ofDay = ((Math.round(minute) % 1440) + 1440) % 1440;
  return `${String(Math.floor(ofDay / 60)).padStart(2, '0')}:${String(ofDay % 60).padStart(2, '0')}`;
}
