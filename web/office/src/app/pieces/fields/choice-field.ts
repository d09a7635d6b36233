import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { Field } from './field';

export interface Choice<T> {
  readonly value: T;
  readonly label: string;
}

/** Yes, no, or nobody has said: `null` never means "no". */
export const knownChoices: readonly Choice<boolean | null>[] = [
  { value: null, label: 'not known yet' },
  { value: true, label: 'yes' },
  { value: false, label: 'no' },
];

/** One of a few, by the browser's own select: it works with every keyboard, reader and phone. */
@Component({
  selector: 'kb-choice-field',
  template: `
    <label [for]="id">{{ label() }}</label>
    <select class="kb-field" [id]="id" [disabled]="isDisabled()" [attr.aria-invalid]="message() ? true : null" [attr.aria-describedby]="message() || hint() ? id + '-note' : null" (change)="choose($any($event.target).selectedIndex)" (blur)="touch()">
      @for (choice of choices(); track $index) {
        <option [selected]="$index === at()">{{ choice.label }}</option>
      }
    </select>
    @if (message() || hint()) {
      <p class="note" [class.wrong]="message()" [id]="id + '-note'">{{ message() || hint() }}</p>
    }
  `,
  styleUrl: './field.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChoiceField<T> extends Field<T> {
  readonly choices = input.required<readonly Choice<T>[]>();

  protected readonly value = signal<T | undefined>(undefined);
  protected readonly at = computed(() => this.choices().findIndex((choice) => choice.value === this.value()));

  override writeValue(value: T): void {
    this.value.set(value);
  }

  protected choose(index: number): void {
    const choice = this.choices()[index];
    if (!choice) return;
    this.value.set(choice.value);
    this.tell(choice.value);
  }
}
