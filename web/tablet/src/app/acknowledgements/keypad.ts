import { ChangeDetectionStrategy, Component, computed, input, output, signal } from '@angular/core';
import { type Messages } from '../words/en';

/** A keypad for gloves. Digits are never shown; the PIN leaves it once, when OK is pressed, and is forgotten here. */
@Component({
  selector: 'kb-keypad',
    template: `
    <output class="dots">
      <span class="kb-visually-hidden">{{ say().pin.digits(typed().length) }}</span>
      @for (place of places(); track place) {
        <span class="dot" aria-hidden="true" [class.full]="place < typed().length" [class.spare]="place >= fewest()"></span>
      }
    </output>
    <div class="keys" role="group" [attr.aria-label]="say().pin.keypad">
      @for (digit of digits; track digit) {
        <button type="button" class="kb-pick key" [class.zero]="digit === '0'" (click)="type(digit)">{{ digit }}</button>
      }
      <button type="button" class="kb-pick key word" (click)="erase()">{{ say().pin.erase }}</button>
      <button type="button" class="kb-button filled ok" [disabled]="isBusy()" (click)="accept()">{{ say().pin.ok }}</button>
    </div>
  `,
  styleUrl: './keypad.scss',
  host: { '(document:keydown)': 'useKeyboard($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Keypad {
  readonly say = input.required<Messages>();
  readonly isBusy = input(false);
  /** Digits of a PIN; a start PIN has eight. */
  readonly fewest = input(4);
  readonly most = input(6);
  readonly entered = output<string>();
  /** OK was pressed with too few digits. */
  readonly tooShort = output<void>();

  protected readonly digits = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '0'];
  protected readonly places = computed(() => Array.from({ length: this.most() }, (_, place) => place));
  private readonly pin = signal('');
  protected readonly typed = computed(() => ({ length: this.pin().length }));

  protected type(digit: string): void {
    if (!this.isBusy()) this.pin.update((pin) => (pin.length < this.most() ? pin + digit : pin));
  }

  protected erase(): void {
    this.pin.update((pin) => pin.slice(0, -1));
  }

  protected accept(): void {
    if (this.isBusy()) return;
    const pin = this.pin();
    if (pin.length < this.fewest()) {
      this.tooShort.emit();
      return;
    }
    this.pin.set('');
    this.entered.emit(pin);
  }

  protected useKeyboard(event: KeyboardEvent): void {
    if (/^[0-9]$/.test(event.key)) this.type(event.key);
    else if (event.key === 'Backspace') this.erase();
  }
}
