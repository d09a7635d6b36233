import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { type Finding } from '#compliance/outcome';
import { State } from '#ui/state';
import { Why } from '#ui/why';
import { lineState } from './answer-rows';

/** Lines about the place, the people and the kits: what is open first, what is met behind one button. */
@Component({
  selector: 'kb-line-rows',
  imports: [State, Why],
  template: `
    <ul class="kb-rows" style="--kb-columns: 9.2rem minmax(0, 1fr) 3rem" aria-label="Place, people and kits">
      @for (row of rows(); track row.line.id) {
        <li>
          <kb-state [kind]="row.state.kind">{{ row.state.words }}</kb-state>
          <span
            >{{ row.line.text.en }} <span class="kb-quiet">{{ row.line.reason.en }}</span></span
          >
          <kb-why [class.open]="whys()[row.line.id]" [finding]="row.line" [about]="row.line.text.en" [open]="whys()[row.line.id] ?? false" (openChange)="show(row.line.id, $event)" />
        </li>
      }
    </ul>
    @if (met().length > 0) {
      <button type="button" class="kb-link more" [attr.aria-expanded]="isMetShown()" (click)="isMetShown.set(!isMetShown())">
        {{ isMetShown() ? 'Hide the lines that are met' : met().length === 1 ? '1 line is met' : met().length + ' lines are met' }}
      </button>
    }
  `,
  styles: `
    kb-why {
      text-align: right;
    }

    kb-why.open {
      grid-column: 1 / -1;
    }

    .more {
      margin-top: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LineRows {
  readonly open = input.required<readonly Finding[]>();
  readonly met = input.required<readonly Finding[]>();

  protected readonly isMetShown = signal(false);
  protected readonly whys = signal<Readonly<Record<string, boolean>>>({});
  protected readonly rows = computed(() => [...this.open(), ...(this.isMetShown() ? this.met() : [])].map((line) => ({ line, state: lineState(line) })));

  protected show(id: string, isOpen: boolean): void {
    this.whys.update((whys) => ({ ...whys, [id]: isOpen }));
  }
}
