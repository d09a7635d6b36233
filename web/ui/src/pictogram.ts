import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Language, type Words } from '#compliance/outcome';

/** Symbol names as in the GHS, annex 1 (English) and its Spanish edition. */
const WORDS: Readonly<Record<string, Words>> = {
  GHS01: { en: 'Exploding bomb', es: 'Bomba explotando' },
  GHS02: { en: 'Flame', es: 'Llama' },
  GHS03: { en: 'Flame over circle', es: 'Llama sobre círculo' },
  GHS04: { en: 'Gas cylinder', es: 'Bombona de gas' },
  GHS05: { en: 'Corrosion', es: 'Corrosión' },
  GHS06: { en: 'Skull and crossbones', es: 'Calavera y tibias cruzadas' },
  GHS07: { en: 'Exclamation mark', es: 'Signo de exclamación' },
  GHS08: { en: 'Health hazard', es: 'Peligro para la salud' },
  GHS09: { en: 'Environment', es: 'Medio ambiente' },
};

/**
 * A hazard pictogram: black symbol on white in a red square set on a point, drawn for this project after the GHS's
 * description of the nine symbols. Its colours stay in the dark scheme. Words as with `kb-mark`; size by `--kb-pictogram-size`.
 * A code it does not know is written out, never left away.
 */
@Component({
  selector: 'kb-pictogram',
  templateUrl: './pictogram.html',
  styleUrl: './pictogram.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Pictogram {
  /** 'GHS01' to 'GHS09'. */
  readonly code = input.required<string>();
  readonly label = input<string>();
  readonly hasWords = input(false);
  readonly language = input<Language>('en');

  protected readonly words = computed(() => this.label() ?? WORDS[this.code()]?.[this.language()] ?? this.code());
  protected readonly isNamed = computed(() => !this.hasWords() && this.words() !== '');
  protected readonly isKnown = computed(() => this.code() in WORDS);
}
