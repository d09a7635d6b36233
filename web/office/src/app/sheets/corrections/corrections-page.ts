import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type SheetCorrection } from '#shared/corrections';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords } from '#ui/problem';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { momentShort } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { CorrectionsApi } from './corrections-api';
import { fieldNames, ruleWords } from './correction-words';

/** What is remembered of corrections, rule by rule, with the sheet it was learned on; each can be removed. */
@Component({
  selector: 'kb-corrections-page',
  imports: [Empty, MatButton, Note, PageHeader, RouterLink, Unready],
  template: `
    <div class="kb-page">
      <kb-page-header heading="Remembered corrections" kicker="SDS library"><a matButton="outlined" routerLink="/sheets">All sheets</a></kb-page-header>
      <p class="kb-quiet about">
        Names and dates that a person corrected are offered on the next sheet of the same supplier, language and first heading, beside what was read. Nothing is filled in by itself. Hazards, ingredients and protection are never remembered: they are read afresh from every sheet.
      </p>
      @if (refusal()) {
        <kb-note kind="stop" [announce]="true">{{ refusal() }}</kb-note>
      }
      @if (list.items().length > 0) {
        <ul class="kb-rows" style="--kb-columns: minmax(9rem, 1fr) minmax(14rem, 2fr) minmax(10rem, 1.2fr) 6rem" aria-label="Remembered corrections">
          @for (item of list.items(); track item.id) {
            <li>
              <span><b>{{ item.supplier }}</b><span class="kb-small kb-quiet block">{{ fieldNames[item.field] }}</span></span>
              <span>{{ ruleWords(item) }}</span>
              <span><a [routerLink]="['/sheets', item.revisionId]">{{ item.fileName }}</a><span class="kb-small kb-quiet block">{{ item.correctedBy }}, {{ momentShort(item.correctedAt) }}</span></span>
              <span>
                @if (mayRemove()) {
                  <button type="button" class="kb-link" (click)="remove(item)">Remove<span class="kb-visually-hidden">: {{ ruleWords(item) }}</span></button>
                }
              </span>
            </li>
          }
        </ul>
        @if (list.next()) {
          <div class="kb-actions"><button type="button" matButton="outlined" (click)="list.more()">Show more</button></div>
        }
      } @else if (list.status() === 'ready') {
        <kb-empty heading="Nothing is remembered yet" detail="Correct a product name, a supplier or a date while you check a sheet, and what explains it stands here." />
      }
      @if (list.status() !== 'ready') {
        <kb-unready what="remembered corrections" [error]="list.problem()" (retry)="list.reload()" />
      }
    </div>
  `,
  styles: `
    .about {
      max-width: 46rem;
    }

    .block {
      display: block;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CorrectionsPage {
  private readonly api = inject(CorrectionsApi);
  private readonly access = inject(Access);

  protected readonly list = new PagedList(signal(''), (_query: string, after) => this.api.list(after));
  protected readonly mayRemove = computed(() => this.access.may('removeCorrection'));
  protected readonly refusal = signal('');
  protected readonly fieldNames = fieldNames;
  protected readonly ruleWords = ruleWords;
  protected readonly momentShort = momentShort;

  protected async remove({ id }: SheetCorrection): Promise<void> {
    this.refusal.set('');
    try {
      await firstValueFrom(this.api.remove(id));
    } catch (error) {
      const problem = problemOf(error);
      // Somebody else removed it: what was wanted is so.
      if (problem.status !== 404) this.refusal.set(problemWords(problem));
    }
    this.list.refresh({ isWhole: true });
  }
}
