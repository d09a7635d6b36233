import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The board a finisher kneels on, strapped with brass. Decorative: the name stands beside it. */
@Component({
  selector: 'kb-brand-mark',
  template: `
    <svg viewBox="0 0 32 32" aria-hidden="true" focusable="false">
      <path d="M3 21.5 24 12l5 3.5L8 26z" fill="var(--kb-pigment)" />
      <path d="M9 16.8 14.5 23M19 12.6l4.5 5.6" stroke="var(--kb-brass-line)" stroke-width="2.2" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      width: 1.875rem;
      height: 1.875rem;
    }

    svg {
      width: 100%;
      height: 100%;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BrandMark {}
