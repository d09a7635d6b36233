import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { State } from '#ui/state';
import { SheetUploads } from '../sheet-uploads';

/** Files on their way, each with its progress; finished ones say whether they were here before. */
@Component({
  selector: 'kb-upload-list',
  imports: [RouterLink, State],
  template: `
    <ul class="kb-rows" style="--kb-columns: minmax(10rem, 1.4fr) minmax(8rem, 1fr) 12rem 5rem" aria-label="Uploads">
      @for (upload of uploads.uploads(); track upload.id) {
        <li>
          @if (upload.revision; as revision) {
            <a [routerLink]="revision.id">{{ upload.file.name }}</a>
          } @else {
            <span>{{ upload.file.name }}</span>
          }
          @switch (upload.state) {
            @case ('done') {
              <span class="kb-quiet">{{ upload.isKnown ? 'The same file was here already: ' + (upload.revision?.productName ?? upload.revision?.fileName) : '' }}</span>
            }
            @case ('failed') {
              <span>{{ upload.trouble }}</span>
            }
            @default {
              <progress max="100" [value]="upload.percent" [attr.aria-label]="upload.file.name"></progress>
            }
          }
          @switch (upload.state) {
            @case ('done') {
              <kb-state kind="done">{{ upload.isKnown ? 'recognised' : 'added' }}</kb-state>
            }
            @case ('failed') {
              <kb-state kind="stop">not added</kb-state>
            }
            @default {
              <kb-state kind="plain">{{ upload.state === 'waiting' ? 'waiting' : upload.percent < 100 ? upload.percent + ' % sent' : 'being stored' }}</kb-state>
            }
          }
          <span>
            @if (upload.state === 'failed') {
              <button type="button" class="kb-link" [attr.aria-label]="'Send again: ' + upload.file.name" (click)="uploads.sendAgain(upload.id)">again</button>
              <button type="button" class="kb-link" [attr.aria-label]="'remove from the list: ' + upload.file.name" (click)="uploads.remove(upload.id)">remove</button>
            }
          </span>
        </li>
      }
    </ul>
    <p class="kb-small kb-quiet" role="status">
      {{ summary() }}
      @if (!uploads.isBusy()) {
        <button type="button" class="kb-link" (click)="uploads.clear()">Clear the list</button>
      }
    </p>
  `,
  styles: `
    progress {
      appearance: none;
      width: 100%;
      height: 6px;
      border: 0;
      background: var(--kb-ground-2);
    }

    progress::-webkit-progress-bar {
      background: var(--kb-ground-2);
    }

    progress::-webkit-progress-value {
      background: var(--kb-pigment);
    }

    progress::-moz-progress-bar {
      background: var(--kb-pigment);
    }

    p {
      margin-top: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UploadList {
  protected readonly uploads = inject(SheetUploads);
  protected readonly summary = computed(() => {
    const all = this.uploads.uploads();
    const done = all.filter(({ state }) => state === 'done').length;
    const failed = all.filter(({ state }) => state === 'failed').length;
    return this.uploads.isBusy() ? `${done} of ${all.length} stored. You can leave this page.` : `${done} stored${failed > 0 ? `, ${failed} not` : ''}.`;
  });
}
