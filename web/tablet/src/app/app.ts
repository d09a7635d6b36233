import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { Note } from '#ui/note';
import { Words } from './words/words';

@Component({
  selector: 'kb-root',
  imports: [RouterOutlet, Note],
  template: `
    @if (!isSecure) {
      <kb-note kind="stop">{{ words.say().pair.notSecure }}</kb-note>
    }
    <router-outlet />
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {
  /** Plain http has no WebCrypto and no service worker: nothing could be checked, sealed or kept open offline. */
  protected readonly isSecure = isSecureContext;
  protected readonly words = inject(Words);
}
