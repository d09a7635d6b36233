import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { Field } from './field';

/** A box to tick. */
@Component({
  selector: 'kb-check-field',
  template: `
    <div class="tick">
      <input type="checkbox" [id]="id" [checked]="isOn()" [disabled]="isDisabled()" [attr.aria-describedby]="message() || hint() ? id + '-note' : null" (change)="tick($any($event.target).checked)" (blur)="touch()" />
      <label [for]="id">{{ label() }}</label>
    </div>
    @if (message() || hint()) {
      <p class="note" [class.wrong]="message()" [id]="id + '-note'">{{ message() || hint() }}</p>
    }
  `,
  styleUrl: './field.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CheckField extends Field<boolean> {
  protected readonly isOn = signal(false);

  override writeValue(value: boolean): void {
    this.isOn.set(value);
  }

  protected tick(isOn: boolean): void {
    this.isOn.set(isOn);
    this.tell(isOn);
  }
}
