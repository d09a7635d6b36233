import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Top of a page: where we are (kicker), what it is (one h1), and its actions as content. */
@Component({
  selector: 'kb-page-header',
  template: `
    <div class="words">
      @if (kicker()) {
        <p class="kb-small kb-quiet">{{ kicker() }}</p>
      }
      <h1>{{ heading() }}</h1>
    </div>
    <div class="kb-actions kb-no-print"><ng-content /></div>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 0.75rem 1.5rem;
      align-items: flex-start;
    }

    .words {
      flex: 1 1 18rem;
      min-width: 0;
    }

  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PageHeader {
  readonly heading = input.required<string>();
  readonly kicker = input('');
}
