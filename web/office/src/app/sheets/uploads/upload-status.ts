import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { SheetUploads } from './sheet-uploads';
import { countUploads, shortSummary } from './upload-words';

/** In the frame of every page: files on their way to the library, from whichever page, with the way to pause them. Nothing when none are. */
@Component({
  selector: 'kb-upload-status',
  imports: [RouterLink],
  template: `
    @if (count().open > 0 || count().failed > 0) {
      <section aria-label="Sheets on their way">
        <a routerLink="/sheets">{{ words() }}</a>
        @if (count().open > 0) {
          <progress [max]="count().all" [value]="count().done" aria-label="Sheets stored"></progress>
          @if (uploads.isPaused()) {
            <button type="button" class="kb-link" (click)="uploads.resume()">Go on<span class="kb-visually-hidden"> sending sheets</span></button>
          } @else {
            <button type="button" class="kb-link" (click)="uploads.pause()">Pause<span class="kb-visually-hidden"> sending sheets</span></button>
          }
        }
      </section>
    }
  `,
  styles: `
    section {
      display: flex;
      flex-direction: column;
      align-items: flex-start;
      gap: 4px;
      padding: 10px 22px;
      border-top: var(--kb-hairline);
      font-size: var(--kb-small);
    }

    progress {
      width: 100%;
      height: 6px;
    }

    @media (max-width: 900px) {
      section {
        flex-direction: row;
        align-items: center;
        gap: 12px;
        padding: 6px var(--kb-page-x);
      }

      progress {
        flex: 1;
        width: auto;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UploadStatus {
  protected readonly uploads = inject(SheetUploads);
  protected readonly count = computed(() => countUploads(this.uploads.uploads()));
  protected readonly words = computed(() => shortSummary(this.count(), this.uploads.isPaused(), this.uploads.waitsFor() !== ''));
}
