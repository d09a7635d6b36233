import { computed, effect, Injectable, signal } from '@angular/core';
import { type Language } from '#compliance/outcome';
import { en, type Messages } from './en';
import { es } from './es';

export const tabletLanguages: readonly Language[] = ['en', 'es'];
const tables: Readonly<Record<Language, Messages>> = { en, es };
const storedAs = 'kneeboard-language';

/** The tablet's own words in one language. */
export function messagesIn(language: Language): Messages {
  return tables[language];
}

/** The language the tablet itself speaks; who signs reads in their own, whatever this is. */
@Injectable({ providedIn: 'root' })
export class Words {
  private readonly chosen = signal<Language>(stored());
  readonly language = this.chosen.asReadonly();
  readonly say = computed(() => messagesIn(this.chosen()));

  constructor() {
    effect(() => (document.documentElement.lang = this.chosen()));
  }

  use(language: Language): void {
    this.chosen.set(language);
    try {
      localStorage.setItem(storedAs, language);
    } catch {
      // A browser without storage still speaks; it asks again next time.
    }
  }
}

function stored(): Language {
  try {
    const chosen = localStorage.getItem(storedAs);
    if (chosen === 'en' || chosen === 'es') return chosen;
  } catch {
    // Without storage the browser's own language decides.
  }
  return navigator.language.startsWith('es') ? 'es' : 'en';
}
