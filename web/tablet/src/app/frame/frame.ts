import { afterNextRender, ChangeDetectionStrategy, Component, effect, type ElementRef, inject, input, viewChild } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { RouterLink } from '@angular/router';
import { ConnectionNote } from '../connection/connection-note';

/** Whether a page was shown before: the first one does not take the focus away from the top of the document. */
let isLaterPage = false;

/**
 * One page of the tablet: where we are, what it is, whether there is signal; the page between two brass strips; a foot.
 * `back` and `backLabel` give the way out; a page without them has none (while somebody signs).
 * Content with the attribute kbFoot goes below the lower strip.
 */
@Component({
  selector: 'kb-frame',
  imports: [RouterLink, ConnectionNote],
  template: `
    <header>
      <div class="words">
        <p class="kicker kb-quiet">
          @if (back()) {
            <a class="back" [routerLink]="back()">{{ backLabel() }}</a>
          }
          {{ kicker() }}
        </p>
        <h1 #heading tabindex="-1">{{ title() }}</h1>
      </div>
      <kb-connection-note />
    </header>
    <main><ng-content /></main>
    <footer class="kb-quiet"><ng-content select="[kbFoot]" /></footer>
  `,
  styleUrl: './frame.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Frame {
  readonly title = input.required<string>();
  readonly kicker = input('');
  readonly back = input<string | readonly string[] | null>(null);
  readonly backLabel = input('');

  private readonly heading = viewChild.required<ElementRef<HTMLElement>>('heading');

  constructor() {
    const documentTitle = inject(Title);
    effect(() => documentTitle.setTitle(`${this.title()}, Kneeboard`));
    afterNextRender(() => {
      if (isLaterPage) this.heading().nativeElement.focus();
      isLaterPage = true;
    });
  }
}
