import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { Field } from './field';

/** One line, several lines, a date, a time, an e-mail address or a password. With `isNullable`, nothing written is null. */
@Component({
  selector: 'kb-text-field',
  template: `
    <label [for]="id">{{ label() }}</label>
    @if (lines() > 1) {
      <textarea class="kb-field" [id]="id" [rows]="lines()" [value]="text()" [disabled]="isDisabled()" [attr.aria-invalid]="message() ? true : null" [attr.aria-describedby]="noteId()" (input)="type($any($event.target).value)" (blur)="touch()"></textarea>
    } @else {
      <input
        class="kb-field"
        [id]="id"
        [type]="kind()"
        [value]="text()"
        [disabled]="isDisabled()"
        [attr.autocomplete]="autocomplete()"
        [attr.inputmode]="inputMode() || null"
        [attr.min]="min() || null"
        [attr.list]="suggestions().length > 0 ? id + '-list' : null"
        [attr.aria-invalid]="message() ? true : null"
        [attr.aria-describedby]="noteId()"
        (input)="type($any($event.target).value)"
        (blur)="touch()"
      />
      @if (suggestions().length > 0) {
        <datalist [id]="id + '-list'">
          @for (suggestion of suggestions(); track suggestion) {
            <option [value]="suggestion"></option>
          }
        </datalist>
      }
    }
    @if (message() || hint()) {
      <p class="note" [class.wrong]="message()" [id]="id + '-note'">{{ message() || hint() }}</p>
    }
  `,
  styleUrl: './field.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TextField extends Field<string | null> {
  readonly kind = input<'text' | 'date' | 'time' | 'email' | 'password'>('text');
  readonly lines = input(1);
  readonly isNullable = input(false);
  readonly autocomplete = input('off');
  readonly inputMode = input('');
  readonly min = input('');
  readonly suggestions = input<readonly string[]>([]);

  protected readonly text = signal('');
  protected readonly noteId = computed(() => (this.message() || this.hint() ? `${this.id}-note` : null));

  override writeValue(value: string | null): void {
    this.text.set(value ?? '');
  }

  protected type(text: string): void {
    this.text.set(text);
    this.tell(this.isNullable() && text.trim() === '' ? null : text);
  }
}
