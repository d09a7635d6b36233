import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Mark as MarkName } from '#compliance/answer';
import { type Language, type Words } from '#compliance/outcome';

const WORDS: Readonly<Record<MarkName, Words>> = {
  eyes: { en: 'Eye protection', es: 'Protección para los ojos' },
  face: { en: 'Face shield', es: 'Careta' },
  ears: { en: 'Hearing protection', es: 'Protección para los oídos' },
  hands: { en: 'Gloves', es: 'Guantes' },
  clothing: { en: 'Protective clothing', es: 'Ropa de protección' },
  boots: { en: 'Safety boots', es: 'Botas de seguridad' },
  respirator: { en: 'Respirator', es: 'Respirador' },
};

/**
 * A mark of what to wear: white figure on a filled circle, as mandatory-action signs are (ISO 7010), drawn for this project.
 * Never without words: `hasWords` sets them beside it; else they are its name for screen readers.
 * Where the page itself says them next to the mark, pass `label=""`. Size by `--kb-mark-size`.
 */
@Component({
  selector: 'kb-mark',
  templateUrl: './mark.html',
  styleUrl: './mark.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Mark {
  readonly mark = input.required<MarkName>();
  /** Words in place of the usual ones, for example "Half mask, P100". */
  readonly label = input<string>();
  readonly hasWords = input(false);
  readonly language = input<Language>('en');

  protected readonly words = computed(() => this.label() ?? WORDS[this.mark()][this.language()]);
  protected readonly isNamed = computed(() => !this.hasWords() && this.words() !== '');
}
