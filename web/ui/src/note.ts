import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type StateKind } from './state';

/** A sentence set apart by a coloured edge. `announce` reads it out when it appears: at once for stop, politely otherwise. */
@Component({
  selector: 'kb-note',
  template: '<ng-content />',
  styles: ':host { display: block; }',
  host: { class: 'kb-note', '[class]': 'kind()', '[attr.role]': 'role()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Note {
  readonly kind = input<StateKind>('plain');
  readonly announce = input(false);

  protected readonly role = computed(() => {
    if (!this.announce()) return null;
    return this.kind() === 'stop' ? 'alert' : 'status';
  });
}
