import { afterRenderEffect, ChangeDetectionStrategy, Component, computed, type ElementRef, input, output, viewChild } from '@angular/core';
import { type ContainerLabel } from '#shared/library';
import { Pictogram } from '#ui/pictogram';
import { fittingPt, layoutOf, marginMm, type LabelSize, type Paper } from './label-layout';

const signalWords = { danger: 'DANGER / PELIGRO', warning: 'WARNING / ATENCIÓN', none: '' } as const;

/** One sheet of paper with labels, drawn in true size: what is seen is what is printed. */
@Component({
  selector: 'kb-label-sheet',
  imports: [Pictogram],
  template: `
    <div class="sheet" [class.bw]="!isColor()" [class.a4]="paper().id === 'a4'" [style.width.mm]="paper().widthMm - 2 * margin" [style.grid-template-columns]="columns()" role="region" tabindex="0" aria-label="Labels as printed">
      @for (place of places(); track place) {
        <article #label [style.width.mm]="size().widthMm" [style.height.mm]="size().heightMm" [attr.aria-hidden]="$first ? null : 'true'">
          <div class="words">
            <p class="name">{{ content().identifier }}</p>
            @if (stateWords(); as state) {
              <p class="state">{{ state.en }} / <span lang="es">{{ state.es }}</span></p>
            }
            <div class="signs">
              @for (code of content().pictograms; track code) {
                <kb-pictogram [code]="code" />
              }
              <b class="signal">{{ signalWord() }}</b>
            </div>
            <p>{{ english() }}</p>
            <p lang="es">{{ spanish() }}</p>
            <p class="notice">{{ content().notice.en }} <span lang="es">{{ content().notice.es }}</span></p>
          </div>
        </article>
      }
    </div>
  `,
  styleUrl: './label-sheet.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LabelSheet {
  private readonly labels = viewChild<ElementRef<HTMLElement>>('label');

  readonly content = input.required<ContainerLabel>();
  readonly size = input.required<LabelSize>();
  readonly paper = input.required<Paper>();
  readonly isColor = input(true);
  /** What is in the container; null for a product that is only decanted. */
  readonly stateWords = input<ContainerLabel['state'] | null>(null);
  /** Whether all words fit at a size somebody can read. */
  readonly fitted = output<boolean>();

  protected readonly margin = marginMm;
  private readonly layout = computed(() => layoutOf(this.paper(), this.size()));
  protected readonly columns = computed(() => `repeat(${this.layout().columns}, ${this.size().widthMm}mm)`);
  protected readonly places = computed(() => Array.from({ length: this.layout().columns * this.layout().rows }, (_, at) => at));
  protected readonly signalWord = computed(() => signalWords[this.content().signalWord]);
  protected readonly english = computed(() => sentences(this.content(), 'en'));
  protected readonly spanish = computed(() => sentences(this.content(), 'es'));

  constructor() {
    afterRenderEffect(() => {
      const first = this.labels()?.nativeElement;
      const { largestPt } = this.size();
      this.content();
      this.stateWords();
      this.paper();
      const sheet = first?.parentElement;
      const words = first?.firstElementChild;
      if (!first || !sheet || !words) return;
      const pt = fittingPt(largestPt, (size) => {
        sheet.style.setProperty('--label-pt', `${size}pt`);
        return words.scrollHeight <= first.clientHeight && words.scrollWidth <= first.clientWidth;
      });
      this.fitted.emit(pt !== null);
    });
  }
}

function sentences({ statements, effects }: ContainerLabel, language: 'en' | 'es'): string {
  return [...statements, ...effects].map((words) => words[language].replace(/[^.!?]$/, '$&.')).join(' ');
}
