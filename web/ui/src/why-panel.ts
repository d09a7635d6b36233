import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Finding, type Language, type Outcome, type Words } from '#compliance/outcome';
import { VERIFIED_WORDS } from '#compliance/source';
import { State, type StateKind } from './state';

const KIND: Readonly<Record<Outcome, StateKind>> = { met: 'done', unmet: 'stop', 'not-applicable': 'plain', undecided: 'caution' };

const OUTCOME: Readonly<Record<Outcome, Words>> = {
  met: { en: 'Met', es: 'Se cumple' },
  unmet: { en: 'Not met', es: 'No se cumple' },
  'not-applicable': { en: 'Does not apply', es: 'No aplica' },
  undecided: { en: 'Not decided', es: 'Sin decidir' },
};

const LABEL = {
  decides: { en: 'Who decides', es: 'Quién decide' },
  facts: { en: 'Facts used', es: 'Datos usados' },
  change: { en: 'What would change it', es: 'Qué lo cambiaría' },
  source: { en: 'Source', es: 'Fuente' },
  rule: { en: 'Rule', es: 'Regla' },
  unknown: { en: 'not known', es: 'no se sabe' },
  yes: { en: 'yes', es: 'sí' },
  no: { en: 'no', es: 'no' },
} as const satisfies Record<string, Words>;

/** How each finding came about. `aria` is left to the page: give it the id that the "why" button controls. */
@Component({
  selector: 'kb-why-panel',
  imports: [State],
  templateUrl: './why-panel.html',
  styleUrl: './why-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WhyPanel {
  readonly findings = input.required<readonly Finding[]>();
  readonly language = input<Language>('en');

  protected readonly label = computed(() => {
    const language = this.language();
    return {
      decides: LABEL.decides[language],
      facts: LABEL.facts[language],
      change: LABEL.change[language],
      source: LABEL.source[language],
      rule: LABEL.rule[language],
    };
  });

  protected readonly lines = computed(() =>
    this.findings().map((finding) => ({
      finding,
      kind: KIND[finding.outcome],
      outcome: this.word(OUTCOME[finding.outcome]),
      text: this.word(finding.text),
      reason: this.word(finding.reason),
      whoDecides: finding.whoDecides && this.word(finding.whoDecides),
      whatWouldChange: finding.whatWouldChange && this.word(finding.whatWouldChange),
      facts: Object.entries(finding.inputs).map(([name, value]) => ({ name, value: this.factWords(value) })),
      verified: VERIFIED_WORDS[finding.source.verified],
    })),
  );

  private word(words: Words): string {
    return words[this.language()];
  }

  private factWords(value: string | number | boolean | null): string {
    if (value === null) return this.word(LABEL.unknown);
    if (typeof value === 'boolean') return this.word(value ? LABEL.yes : LABEL.no);
    return typeof value === 'number' ? value.toLocaleString('en-US') : value;
  }
}
