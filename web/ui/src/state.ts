import { ChangeDetectionStrategy, Component, input } from '@angular/core';

export type StateKind = 'stop' | 'caution' | 'done' | 'plain';

/** A state in shape, colour and words: `<kb-state kind="stop">May not start</kb-state>`. The words are the content. */
@Component({
  selector: 'kb-state',
  template: '<ng-content />',
  host: { class: 'kb-state', '[class]': 'kind()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class State {
  readonly kind = input.required<StateKind>();
}
