import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { type RecordCheck } from '#shared/acknowledgements';
import { type Problem } from '#shared/common';
import { Note } from '#ui/note';
import { problemWords } from '#ui/problem';
import { momentShort } from '../../pieces/dates';
import { shortHash } from '../history-words';
import { HowToCheckDialog } from './how-to-check-dialog';

/** What "Check the record" found, in words. */
@Component({
  selector: 'kb-record-result',
  imports: [Note],
  template: `
    @if (problem(); as problem) {
      <kb-note kind="caution" [announce]="true"><b>The record was not checked.</b> {{ words(problem) }}</kb-note>
    }
    @if (check(); as check) {
      <kb-note [kind]="check.isGood ? 'done' : 'stop'" [announce]="true">
        @if (check.isGood) {
          <b>{{ entries() }} are in order.</b> No entry was changed, removed or added in between. {{ checkpoint() }}
        } @else {
          <b>The record is not in order.</b> {{ check.trouble }} Save the record now and tell the owner and your auditor.
        }
        <span class="links">
          <a [href]="recordHref()" download>Save the record</a>
          <button type="button" class="kb-link" (click)="explain()">How to check without us</button>
        </span>
        <span class="kb-hash">root {{ shortHash(check.root) }}</span>
      </kb-note>
    }
  `,
  styles: `
    :host:empty {
      display: none;
    }

    .links {
      display: flex;
      gap: 1rem;
    }

    .kb-hash {
      display: block;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecordResult {
  private readonly dialogs = inject(MatDialog);

  readonly check = input<RecordCheck | null>(null);
  readonly problem = input<Problem | null>(null);
  readonly recordHref = input.required<string>();

  protected readonly entries = computed(() => {
    const count = this.check()?.entries ?? 0;
    return count === 1 ? 'The 1 entry of the record' : `All ${count.toLocaleString('en-US')} entries of the record`;
  });
  protected readonly checkpoint = computed(() => {
    const checkpoint = this.check()?.checkpoint;
    return checkpoint ? `The last checkpoint, ${momentShort(checkpoint.createdAt)}, covers ${checkpoint.size.toLocaleString('en-US')} of them.` : 'There is no checkpoint yet.';
  });
  protected readonly words = problemWords;
  protected readonly shortHash = shortHash;

  protected explain(): void {
    this.dialogs.open(HowToCheckDialog, { width: '44rem', maxWidth: '96vw' });
  }
}
