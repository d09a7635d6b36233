import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { inUnit, numberFrom, preferredUnit, quantities, type Quantity, type Unit } from '../units';
import { SessionApi } from '../../session/session-api';
import { Field } from './field';

/**
 * A figure with its unit. The control's value is SI (or null; NaN for what is no number, which every schema refuses);
 * the person types and sees the unit they chose, which is remembered for them on every machine. Fractions are allowed: thickness is said as "1/4".
 */
@Component({
  selector: 'kb-quantity-field',
  template: `
    <label [for]="id">{{ label() }}</label>
    <div class="pair">
      <input class="kb-field" inputmode="decimal" autocomplete="off" [id]="id" [value]="text()" [disabled]="isDisabled()" [attr.aria-invalid]="error() ? true : null" [attr.aria-describedby]="error() || hint() ? id + '-note' : null" (input)="type($any($event.target).value)" (blur)="touch()" />
      <select class="kb-field" [attr.aria-label]="label() + ', unit'" [disabled]="isDisabled()" (change)="choose($any($event.target).value)">
        @for (choice of choices(); track choice.id) {
          <option [value]="choice.id" [selected]="choice.id === unit().id">{{ choice.label }}</option>
        }
      </select>
    </div>
    @if (error() || hint()) {
      <p class="note" [class.wrong]="error()" [id]="id + '-note'">{{ error() || hint() }}</p>
    }
  `,
  styleUrl: './field.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QuantityField extends Field<number | null> {
  private readonly session = inject(SessionApi);
  readonly quantity = input.required<Quantity>();

  protected readonly choices = computed<readonly Unit[]>(() => quantities[this.quantity()]);
  protected readonly unit = linkedSignal<Unit>(() => preferredUnit(this.quantity()));
  /** What stands in the box: a person's own digits, or the stored figure in the chosen unit. */
  protected readonly text = computed<string>(() => {
    const typed = this.typed();
    if (typed !== null) return typed;
    const value = this.stored();
    return value === null || Number.isNaN(value) ? '' : inUnit(value, this.unit());
  });
  protected readonly error = computed(() => (Number.isNaN(this.value()) ? 'Write a number, or a fraction such as 1/4.' : this.message()));

  private readonly stored = signal<number | null>(null);
  private readonly typed = signal<string | null>(null);
  private readonly value = computed(() => {
    const typed = this.typed();
    if (typed === null) return this.stored();
    return typed.trim() === '' ? null : numberFrom(typed) * this.unit().perUnit;
  });

  override writeValue(value: number | null): void {
    this.stored.set(value);
    this.typed.set(null);
  }

  protected type(text: string): void {
    this.typed.set(text);
    void this.session.keepUnit(this.quantity(), this.unit());
    this.tell(this.value());
  }

  /** Digits just typed keep standing and mean the new unit; a stored figure is converted. */
  protected choose(id: string): void {
    const unit = this.choices().find((choice) => choice.id === id);
    if (!unit) return;
    this.unit.set(unit);
    void this.session.keepUnit(this.quantity(), unit);
    if (this.typed() !== null) this.tell(this.value());
  }
}
