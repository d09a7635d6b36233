import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { Connection } from '../connection/connection';
import { Frame } from '../frame/frame';
import { injectJob } from '../jobs/found-job';
import { NoJob } from '../jobs/no-job';
import { Words } from '../words/words';
import { KeptSheets } from './kept-sheets';

/** The safety data sheets of a job. Those kept on the tablet open without signal; for the others the page says where else they are. */
@Component({
  selector: 'kb-sheets',
  imports: [Frame, NoJob, Note, Empty, RouterLink],
  template: `
    @let say = words.say();
    @if (found(); as job) {
      @if (job.state === 'good') {
        <kb-frame [title]="say.sheets.heading" [kicker]="job.view.text.jobName" [back]="['/jobs', shiftId()]" [backLabel]="say.job.backToJob">
          @if (isOffline() && isMissing(job.view.job.sheets)) {
            <kb-note kind="caution" [announce]="true">{{ say.sheets.offline }}</kb-note>
          }
          @if (job.view.job.sheets.length === 0) {
            <kb-empty [heading]="say.sheets.none" />
          }
          <ul class="kb-plain">
            @for (sheet of job.view.job.sheets; track sheet.revisionId) {
              <li>
                @if (isOffline() && !kept().has(sheet.revisionId)) {
                  <span class="sheet">{{ sheet.productName }}</span>
                } @else {
                  <a class="sheet" [routerLink]="[sheet.revisionId]">{{ sheet.productName }}</a>
                }
                @if (kept().has(sheet.revisionId)) {
                  <span class="kb-quiet">{{ say.sheets.kept }}</span>
                }
              </li>
            }
          </ul>
          <p kbFoot>{{ job.view.text.notice }}</p>
        </kb-frame>
      } @else {
        <kb-no-job [found]="job" />
      }
    }
  `,
  styles: `
    .sheet {
      display: flex;
      align-items: center;
      min-height: 4.5rem;
      font-size: 1.3125rem;
      font-weight: 600;
      border-bottom: var(--kb-hairline);
    }

    kb-note {
      margin-top: 1rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Sheets {
  readonly shiftId = input.required<string>();
  private readonly connection = inject(Connection);
  protected readonly kept = inject(KeptSheets).kept;
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);
  protected readonly isOffline = computed(() => this.connection.state() !== 'online' && this.connection.state() !== 'checking');

  protected isMissing(sheets: readonly { readonly revisionId: string }[]): boolean {
    return sheets.some(({ revisionId }) => !this.kept().has(revisionId));
  }
}
