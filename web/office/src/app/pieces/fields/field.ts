import { DestroyRef, Directive, inject, input, signal, type AfterContentInit } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NgControl, type ControlValueAccessor } from '@angular/forms';
import { fieldMessage } from '#ui/form-schema';

let lastId = 0;

/** What every labelled field shares: label above, hint or message below, both tied to the control. */
@Directive()
export abstract class Field<T> implements ControlValueAccessor, AfterContentInit {
  readonly label = input.required<string>();
  readonly hint = input('');

  protected readonly id = `kb-field-${(lastId += 1)}`;
  protected readonly isDisabled = signal(false);
  /** What is wrong, once the person has been here or asked to save. */
  protected readonly message = signal('');

  protected readonly control = inject(NgControl, { self: true });
  private readonly destroyRef = inject(DestroyRef);
  protected tell: (value: T) => void = () => undefined;
  protected touch: () => void = () => undefined;

  constructor() {
    this.control.valueAccessor = this;
  }

  // Not in ngOnInit: the form directive on the same element gets its control only after this component's own hook.
  ngAfterContentInit(): void {
    this.control.control?.events.pipe(takeUntilDestroyed(this.destroyRef)).subscribe(() => this.look());
    this.look();
  }

  abstract writeValue(value: T): void;

  registerOnChange(tell: (value: T) => void): void {
    this.tell = tell;
  }

  registerOnTouched(touch: () => void): void {
    this.touch = touch;
  }

  setDisabledState(isDisabled: boolean): void {
    this.isDisabled.set(isDisabled);
  }

  private look(): void {
    const { control } = this.control;
    this.message.set(control?.touched && control.invalid ? (fieldMessage(control.errors) ?? 'Check this entry.') : '');
  }
}
