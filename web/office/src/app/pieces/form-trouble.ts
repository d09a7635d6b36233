import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { Note } from '#ui/note';

/** Why a form was not taken, read out at once. Content: a way on, for example "Show what is stored now". */
@Component({
  selector: 'kb-form-trouble',
  imports: [Note],
  template: `
    @if (words()) {
      <kb-note kind="stop" [announce]="true">{{ words() }} <ng-content /></kb-note>
    }
  `,
  styles: `
    :host:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormTrouble {
  readonly words = input('');
}
