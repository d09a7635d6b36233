import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Note } from '#ui/note';
import { differencesOf, type Difference } from './differences';

/** Somebody saved first: both versions side by side, and the person chooses. */
@Component({
  selector: 'kb-conflict',
  imports: [MatButton, Note],
  template: `
    <kb-note kind="caution" [announce]="true">
      <p><b>Somebody changed {{ what() }} after you opened it.</b> Nothing of yours is lost. Choose which version stands.</p>
      @if (shown().length > 0) {
        <div class="kb-scroll" tabindex="0" role="region" aria-label="Both versions">
          <table class="kb-table">
            <thead>
              <tr>
                <th scope="col"><span class="kb-visually-hidden">What</span></th>
                <th scope="col">Yours</th>
                <th scope="col">Stored now</th>
              </tr>
            </thead>
            <tbody>
              @for (difference of shown(); track difference.path) {
                <tr>
                  <th scope="row">{{ difference.path }}</th>
                  <td>{{ difference.mine }}</td>
                  <td>{{ difference.theirs }}</td>
                </tr>
              }
            </tbody>
          </table>
        </div>
      } @else {
        <p>Both say the same.</p>
      }
      <div class="kb-actions">
        <button type="button" matButton="filled" (click)="keepMine.emit()">Keep mine</button>
        <button type="button" matButton="outlined" (click)="takeTheirs.emit()">Take what is stored</button>
      </div>
    </kb-note>
  `,
  styles: `
    .kb-scroll {
      margin: 0.5rem 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Conflict {
  /** The thing, as it stands in a sentence: "this job". */
  readonly what = input.required<string>();
  readonly mine = input<unknown>();
  readonly theirs = input<unknown>();
  /** Differences already put in words, in place of the plain comparison. */
  readonly differences = input<readonly Difference[] | null>(null);
  readonly keepMine = output<void>();
  readonly takeTheirs = output<void>();

  protected readonly shown = computed(() => this.differences() ?? differencesOf(this.mine(), this.theirs()));
}
