import { effect, Injectable, signal } from '@angular/core';
import { type Language } from '#compliance/outcome';

const keptUnder = 'kneeboard-reader-language';

/** What was chosen on this phone before; null where nothing was, or the browser keeps nothing. */
function keptChoice(): Language | null {
  try {
    const kept = localStorage.getItem(keptUnder);
    return kept === 'en' || kept === 'es' ? kept : null;
  } catch {
    return null;
  }
}

/** The language of the pages that open from a link: the reader's own, until they choose the other; a choice outlives the page. */
@Injectable({ providedIn: 'root' })
export class ReaderLanguage {
  private readonly chosen = signal<Language>(keptChoice() ?? (navigator.language.toLowerCase().startsWith('es') ? 'es' : 'en'));
  readonly language = this.chosen.asReadonly();

  constructor() {
    effect(() => (document.documentElement.lang = this.chosen()));
  }

  use(language: Language): void {
    this.chosen.set(language);
    try {
      localStorage.setItem(keptUnder, language);
    } catch {
      // A private window keeps nothing: the choice then holds for this page.
    }
  }
}
