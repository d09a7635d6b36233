import { ChangeDetectionStrategy, Component, DestroyRef, inject, input, output } from '@angular/core';

let lastId = 0;

/** A search box that speaks after a short rest, so that a list is not asked for every letter. */
@Component({
  selector: 'kb-search-field',
  template: `
    <label [for]="id" class="kb-visually-hidden">{{ label() }}</label>
    <input class="kb-field" type="search" [id]="id" [placeholder]="label()" [value]="value()" (input)="wait($any($event.target).value)" (keydown.enter)="speak()" />
  `,
  styles: `
    :host {
      display: block;
      width: 22rem;
      max-width: 100%;
    }

    input {
      width: 100%;
      text-overflow: ellipsis;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SearchField {
  readonly label = input.required<string>();
  readonly value = input('');
  readonly sought = output<string>();

  protected readonly id = `kb-search-${(lastId += 1)}`;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private text = '';

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.timer));
  }

  protected wait(text: string): void {
    this.text = text.trim();
    clearTimeout(this.timer);
    this.timer = setTimeout(() => this.speak(), 250);
  }

  protected speak(): void {
    clearTimeout(this.timer);
    this.sought.emit(this.text);
  }
}
