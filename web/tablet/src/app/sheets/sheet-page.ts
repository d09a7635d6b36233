import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { Empty } from '#ui/empty';
import { PageViewer } from '#ui/page-viewer/page-viewer';
import { CallFailed, TabletApi } from '../connection/tablet-api';
import { Frame } from '../frame/frame';
import { injectJob } from '../jobs/found-job';
import { NoJob } from '../jobs/no-job';
import { Words } from '../words/words';
import { KeptSheets } from './kept-sheets';

/** One sheet, page by page: from the tablet where it is kept, else from the office. */
@Component({
  selector: 'kb-sheet-page',
  imports: [Frame, NoJob, Empty, PageViewer],
  template: `
    @let say = words.say();
    @if (found(); as job) {
      @if (job.state === 'good') {
        <kb-frame [title]="name()" [kicker]="say.sheets.heading" [back]="['/jobs', shiftId(), 'sheets']" [backLabel]="say.sheets.back">
          @if (file(); as bytes) {
            @defer (on immediate) {
              <kb-page-viewer [source]="bytes" [name]="name()" [language]="words.language()" />
            } @loading {
              <kb-empty state="loading" [heading]="say.sheets.loading" />
            } @error {
              <kb-empty state="error" [heading]="say.sheets.failed" />
            }
          } @else if (trouble()) {
            <kb-empty state="error" [heading]="trouble()"><button type="button" class="kb-button outlined small" (click)="read()">{{ say.sheets.again }}</button></kb-empty>
          } @else {
            <kb-empty state="loading" [heading]="say.sheets.loading" />
          }
          <p kbFoot>{{ job.view.text.notice }}</p>
        </kb-frame>
      } @else {
        <kb-no-job [found]="job" />
      }
    }
  `,
  styles: `
    kb-page-viewer {
      flex: 1;
      height: auto;
      min-height: 60dvh;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetPage {
  readonly shiftId = input.required<string>();
  readonly revisionId = input.required<string>();
  private readonly api = inject(TabletApi);
  private readonly kept = inject(KeptSheets);
  protected readonly words = inject(Words);
  protected readonly found = injectJob(this.shiftId);
  protected readonly file = signal<ArrayBuffer | null>(null);
  protected readonly trouble = signal('');

  protected readonly name = computed(() => {
    const found = this.found();
    const sheets = found.state === 'good' ? found.view.job.sheets : [];
    return sheets.find(({ revisionId }) => revisionId === this.revisionId())?.productName ?? this.words.say().sheets.heading;
  });

  constructor() {
    effect(() => {
      this.revisionId();
      untracked(() => void this.read());
    });
  }

  protected async read(): Promise<void> {
    this.trouble.set('');
    this.file.set(null);
    try {
      this.file.set((await this.kept.read(this.revisionId())) ?? (await this.api.readSheetFile(this.revisionId())));
    } catch (error) {
      if (!(error instanceof CallFailed)) throw error;
      const say = this.words.say().sheets;
      this.trouble.set(error.trouble === 'no-signal' ? say.offline : say.failed);
    }
  }
}
