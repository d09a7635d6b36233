import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type RevisionSummary } from '#shared/sheets';
import { State } from '#ui/state';
import { dayOf, momentShort } from '../../pieces/dates';
import { languageNames, revisionState } from '../sheet-words';

/** Revisions as a list: product or file, supplier, date, state in words. */
@Component({
  selector: 'kb-sheet-rows',
  imports: [RouterLink, State],
  template: `
    <ul class="kb-rows" style="--kb-columns: minmax(12rem, 1.6fr) minmax(8rem, 1fr) 11rem 13rem" [attr.aria-label]="label()">
      @for (row of rows(); track row.revision.id) {
        <li>
          <a [routerLink]="row.revision.id"><b>{{ row.revision.productName ?? row.revision.fileName }}</b></a>
          <span>{{ row.revision.supplier ?? '' }}</span>
          <span class="kb-quiet">{{ row.date }}</span>
          <kb-state [kind]="row.state.kind">{{ row.state.words }}</kb-state>
        </li>
      }
    </ul>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetRows {
  readonly label = input.required<string>();
  readonly revisions = input.required<readonly RevisionSummary[]>();

  protected readonly rows = computed(() =>
    this.revisions().map((revision) => ({
      revision,
      state: revisionState(revision),
      date: [revision.language === null || revision.language === 'en' ? '' : (languageNames[revision.language] ?? revision.language), revision.revisedOn ? `of ${dayOf(revision.revisedOn)}` : `added ${momentShort(revision.uploadedAt)}`].filter(Boolean).join(', '),
    })),
  );
}
