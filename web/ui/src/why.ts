import { ChangeDetectionStrategy, Component, computed, input, model } from '@angular/core';
import { type Finding, type Language } from '#compliance/outcome';
import { WhyPanel } from './why-panel';

let lastId = 0;

/**
 * The word "why" that opens how a line came about: reason, facts, rule, source, what would change it.
 * In a narrow table cell set `hasPanel` to false, bind `open`, and place `<kb-why-panel>` in a row of its own
 * with the id of `panelId`.
 */
@Component({
  selector: 'kb-why',
  imports: [WhyPanel],
  template: `
    <button
      type="button"
      class="kb-link kb-no-print"
      [attr.aria-expanded]="open()"
      [attr.aria-controls]="open() ? panelId() : null"
      [attr.aria-label]="about() ? label() + ': ' + about() : null"
      (click)="open.set(!open())"
    >
      {{ label() }}
    </button>
    @if (open() && hasPanel()) {
      <kb-why-panel [id]="panelId()" [findings]="list()" [language]="language()" />
    }
  `,
  styles: `
    kb-why-panel {
      margin-top: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Why {
  readonly finding = input.required<Finding | readonly Finding[]>();
  readonly language = input<Language>('en');
  /** What the line is about, for those who hear only "why": "Shot blasting". */
  readonly about = input('');
  readonly hasPanel = input(true);
  readonly panelId = input(`kb-why-${(lastId += 1)}`);
  readonly open = model(false);

  protected readonly label = computed(() => (this.language() === 'es' ? 'por qué' : 'why'));
  protected readonly list = computed<readonly Finding[]>(() => {
    const finding = this.finding();
    return isList(finding) ? finding : [finding];
  });
}

function isList(finding: Finding | readonly Finding[]): finding is readonly Finding[] {
  return Array.isArray(finding);
}
