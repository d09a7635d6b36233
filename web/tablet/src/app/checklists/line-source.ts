import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { Words } from '../words/words';

/** "Why" in plain words with the citation behind "Source". */
@Component({
  selector: 'kb-line-source',
  template: `
    <p><b>{{ words.say().answer.why }}</b> {{ why() }}</p>
    <details>
      <summary>{{ words.say().answer.source }}</summary>
      <p class="kb-small">{{ source() }}</p>
    </details>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 0 0.75rem;
      align-items: baseline;
    }

    summary {
      color: var(--kb-pigment);
      text-decoration: underline;
      text-underline-offset: 3px;
      cursor: pointer;
      display: inline-flex;
      align-items: center;
      min-height: var(--kb-target);
      padding-inline: 0.5rem;
      list-style: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LineSource {
  readonly why = input.required<string>();
  readonly source = input.required<string>();
  protected readonly words = inject(Words);
}
