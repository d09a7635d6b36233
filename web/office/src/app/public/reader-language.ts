import { effect, Injectable, signal } from '@angular/core';
import { type Language } from '#compliance/outcome';

/** The language of the pages that open from a link: the reader's own, until they choose the other. */
@Injectable({ providedIn: 'root' })
export class ReaderLanguage {
  private readonly chosen = signal<Language>(navigator.language.toLowerCase().startsWith('es') ? 'es' : 'en');
  readonly language = this.chosen.asReadonly();

  constructor() {
    effect(() => (document.documentElement.lang = this.chosen()));
  }

  use(language: Language): void {
    this.chosen.set(language);
  }
}
