import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type RevisionSummary } from '#shared/sheets';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { SheetsApi } from '../sheets-api';
import { datedWords, mayReadAgain, revisionState } from '../sheet-words';

/** Revisions as a list: product or file, supplier, date, state in words; for one that could not be read, what can be done. */
@Component({
  selector: 'kb-sheet-rows',
  imports: [Note, RouterLink, State],
  template: `
    @if (refusal()) {
      <kb-note kind="stop" [announce]="true">{{ refusal() }}</kb-note>
    }
    <ul class="kb-rows" style="--kb-columns: minmax(12rem, 1.6fr) minmax(8rem, 1fr) 12.5rem 12rem" [attr.aria-label]="label()">
      @for (row of rows(); track row.revision.id) {
        <li>
          <a [routerLink]="row.revision.id"><b>{{ row.revision.productName ?? row.revision.fileName }}</b></a>
          <span>{{ row.revision.supplier ?? '' }}</span>
          <span class="kb-quiet">{{ row.date }}</span>
          <span>
            <kb-state [kind]="row.state.kind">{{ row.state.words }}</kb-state>
            @if (mayRead() && row.mayReadAgain) {
              <span class="steps kb-small">
                <button type="button" class="kb-link" [disabled]="isSending()" (click)="readAgain(row.revision)">Read again<span class="kb-visually-hidden">: {{ row.revision.fileName }}</span></button>
                @if (row.revision.state === 'needs-entry') {
                  <a [routerLink]="row.revision.id">Enter by hand<span class="kb-visually-hidden">: {{ row.revision.fileName }}</span></a>
                }
              </span>
            }
          </span>
        </li>
      }
    </ul>
  `,
  styles: `
    .steps {
      display: flex;
      flex-wrap: wrap;
      gap: 0 14px;
      align-items: center;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetRows {
  private readonly api = inject(SheetsApi);
  private readonly access = inject(Access);

  readonly label = input.required<string>();
  readonly revisions = input.required<readonly RevisionSummary[]>();
  /** A sheet went back to be read: the lists have changed. */
  readonly changed = output<void>();

  protected readonly mayRead = computed(() => this.access.may('readRevisionAgain'));
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');

  protected readonly rows = computed(() =>
    this.revisions().map((revision) => ({
      revision,
      state: revisionState(revision),
      mayReadAgain: mayReadAgain(revision, new Date()),
      date: datedWords(revision),
    })),
  );

  protected async readAgain({ id }: RevisionSummary): Promise<void> {
    this.isSending.set(true);
    this.refusal.set('');
    try {
      await firstValueFrom(this.api.readAgain(id));
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    } finally {
      this.isSending.set(false);
    }
    this.changed.emit();
  }
}
