import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { numberFrom } from '../units';
import { Field } from './field';

/** A plain figure; nothing written is null, something that is no number is NaN, which every schema refuses. */
@Component({
  selector: 'kb-number-field',
  template: `
    <label [for]="id">{{ label() }}</label>
    <div class="pair">
      <input class="kb-field" style="border-inline-end: var(--kb-edge)" inputmode="decimal" autocomplete="off" [id]="id" [value]="text()" [disabled]="isDisabled()" [attr.aria-invalid]="error() ? true : null" [attr.aria-describedby]="error() || hint() ? id + '-note' : null" (input)="type($any($event.target).value)" (blur)="touch()" />
      @if (unit()) {
        <span class="unit kb-quiet">{{ unit() }}</span>
      }
    </div>
    @if (error() || hint()) {
      <p class="note" [class.wrong]="error()" [id]="id + '-note'">{{ error() || hint() }}</p>
    }
  `,
  styleUrl: './field.scss',
  styles: `
    .unit {
      align-self: center;
      padding-inline-start: 8px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NumberField extends Field<number | null> {
  readonly unit = input('');

  protected readonly text = signal('');
  protected readonly error = computed(() => (Number.isNaN(valueOf(this.text())) ? 'Write a number.' : this.message()));

  override writeValue(value: number | null): void {
    this.text.set(value === null || Number.isNaN(value) ? '' : String(value));
  }

  protected type(text: string): void {
    this.text.set(text);
    this.tell(valueOf(text));
  }
}

function valueOf(text: string): number | null {
  return text.trim() === '' ? null : numberFrom(text);
}
