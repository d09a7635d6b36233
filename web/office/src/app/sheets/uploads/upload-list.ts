import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Note } from '#ui/note';
import { State } from '#ui/state';
import { type SheetUpload, SheetUploads } from './sheet-uploads';
import { countUploads, uploadSummary, zipWords } from './upload-words';

const shownAtFirst = 12;
const order: Readonly<Record<SheetUpload['state'], number>> = { failed: 0, sending: 1, waiting: 2, done: 3 };

/** Files on their way, each with its progress and outcome; the whole can be paused and goes on after a reload. */
@Component({
  selector: 'kb-upload-list',
  imports: [MatButton, Note, RouterLink, State],
  templateUrl: './upload-list.html',
  styleUrl: './upload-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UploadList {
  protected readonly uploads = inject(SheetUploads);
  private readonly isWhole = signal(false);
  /** What wants a person first, then what moves, then what waits, then what is done. */
  private readonly sorted = computed(() => [...this.uploads.uploads()].sort((a, b) => order[a.state] - order[b.state] || a.at - b.at));
  protected readonly shown = computed(() => (this.isWhole() ? this.sorted() : this.sorted().slice(0, shownAtFirst)));
  protected readonly hidden = computed(() => this.sorted().length - this.shown().length);
  protected readonly count = computed(() => countUploads(this.uploads.uploads()));
  protected readonly summary = computed(() => uploadSummary(this.count(), this.uploads.isPaused(), this.uploads.waitsFor()));
  protected readonly zipWords = zipWords;

  protected showAll(): void {
    this.isWhole.set(true);
  }

  protected refusedOf({ zip }: SheetUpload): readonly { readonly fileName: string; readonly because: string | null }[] {
    return (zip?.files ?? []).filter(({ outcome }) => outcome === 'refused');
  }
}
