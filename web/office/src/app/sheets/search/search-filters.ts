import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { type SheetSearch } from './search-api';
import { filterChoices, filterNames, type FilterName } from './search-words';

/** State, language, signal word, on an open job. Emits what changed; `null` takes a filter away. */
@Component({
  selector: 'kb-search-filters',
  template: `
    @for (name of names; track name) {
      <div>
        <label [for]="'sheet-' + name">{{ filters[name].label }}</label>
        <select class="kb-field" [id]="'sheet-' + name" (change)="choose(name, $any($event.target).value)">
          @for (choice of filters[name].choices; track choice[0]) {
            <option [value]="choice[0]" [selected]="choice[0] === (search()[name] ?? '')">{{ choice[1] }}</option>
          }
        </select>
      </div>
    }
    @if (isFiltered()) {
      <button type="button" class="kb-link" (click)="changed.emit(none)">Without filters</button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem 1rem;
      align-items: end;
    }

    label {
      display: block;
      font-size: var(--kb-small);
      color: var(--kb-ink-2);
      margin-bottom: 3px;
    }

    .kb-link {
      min-height: var(--kb-target);
    }

    @media (max-width: 700px) {
      :host {
        display: grid;
        grid-template-columns: repeat(2, minmax(0, 1fr));
      }

      .kb-field {
        width: 100%;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SearchFilters {
  readonly search = input.required<SheetSearch>();
  readonly changed = output<Partial<Record<FilterName, string | null>>>();

  protected readonly names = filterNames;
  protected readonly filters = filterChoices;
  protected readonly none = { state: null, language: null, signalWord: null, isInUse: null };
  protected readonly isFiltered = computed(() => filterNames.some((name) => Boolean(this.search()[name])));

  protected choose(name: FilterName, value: string): void {
    this.changed.emit({ [name]: value || null });
  }
}
