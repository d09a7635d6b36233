import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatAutocomplete, MatAutocompleteTrigger, MatOption, type MatAutocompleteSelectedEvent } from '@angular/material/autocomplete';
import { catchError, debounceTime, of, Subject, switchMap } from 'rxjs';
import { type Product } from '#shared/products';
import { ProductsApi } from '../products-api';

let lastId = 0;

/** Finds a product by its first letters and hands it over. */
@Component({
  selector: 'kb-product-search',
  imports: [MatAutocomplete, MatAutocompleteTrigger, MatOption],
  template: `
    <label [for]="id">{{ label() }}</label>
    <input #box class="kb-field" [id]="id" autocomplete="off" [matAutocomplete]="list" (focus)="typed.next(box.value)" (input)="typed.next(box.value)" />
    <mat-autocomplete #list="matAutocomplete" [displayWith]="nothing" [autoActiveFirstOption]="true" (optionSelected)="choose($event, box)">
      @for (product of found(); track product.id) {
        <mat-option [value]="product">{{ product.name }}, {{ product.supplier }}{{ product.sheet ? '' : ' (no confirmed sheet)' }}</mat-option>
      } @empty {
        @if (hasLooked()) {
          <mat-option disabled>No product matches. Confirm its sheet first, or add it under Products.</mat-option>
        }
      }
    </mat-autocomplete>
  `,
  styles: `
    label {
      display: block;
      font-size: var(--kb-small);
      color: var(--kb-ink-2);
      margin-bottom: 3px;
    }

    input {
      width: 100%;
      max-width: 28rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProductSearch {
  private readonly api = inject(ProductsApi);

  readonly label = input.required<string>();
  readonly chosen = output<Product>();

  protected readonly id = `kb-product-search-${(lastId += 1)}`;
  protected readonly typed = new Subject<string>();
  protected readonly found = signal<readonly Product[]>([]);
  protected readonly hasLooked = signal(false);
  protected readonly nothing = () => '';

  constructor() {
    this.typed
      .pipe(
        debounceTime(200),
        switchMap((q) => this.api.find(q.trim()).pipe(catchError(() => of({ items: [], next: null })))),
        takeUntilDestroyed(),
      )
      .subscribe(({ items }) => {
        this.found.set(items);
        this.hasLooked.set(true);
      });
  }

  protected choose(event: MatAutocompleteSelectedEvent, box: HTMLInputElement): void {
    this.chosen.emit(event.option.value as Product);
    box.value = '';
  }
}
