import { ChangeDetectionStrategy, Component, DestroyRef, inject, input } from '@angular/core';
import { type Language } from '#compliance/outcome';

/** Reads a text aloud with the tablet's own voice, for those who read slowly; absent where the browser has no voice. */
@Component({
  selector: 'kb-read-aloud',
  template: `
    @if (canSpeak) {
      <button type="button" class="kb-link" (click)="read()">{{ label() }}</button>
    }
  `,
  styles: `
    button {
      min-height: var(--kb-target);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReadAloud {
  readonly text = input.required<string>();
  readonly language = input.required<Language>();
  readonly label = input.required<string>();
  protected readonly canSpeak = typeof speechSynthesis !== 'undefined';

  constructor() {
    if (this.canSpeak) inject(DestroyRef).onDestroy(() => speechSynthesis.cancel());
  }

  protected read(): void {
    speechSynthesis.cancel();
    const spoken = new SpeechSynthesisUtterance(this.text());
    spoken.lang = this.language() === 'es' ? 'es-US' : 'en-US';
    speechSynthesis.speak(spoken);
  }
}
