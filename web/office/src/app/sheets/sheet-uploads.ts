import { computed, inject, Injectable, signal } from '@angular/core';
import { lastValueFrom, tap } from 'rxjs';
import { type RevisionSummary } from '#shared/sheets';
import { problemOf, problemWords } from '#ui/problem';
import { SheetsApi } from './sheets-api';

export interface SheetUpload {
  readonly id: number;
  readonly file: File;
  readonly state: 'waiting' | 'sending' | 'done' | 'failed';
  readonly percent: number;
  readonly revision: RevisionSummary | null;
  /** Whether the same bytes were here already. */
  readonly isKnown: boolean;
  readonly trouble: string;
}

const atOnce = 3;

/** Files on their way to the library. Lives as long as the application, so that the page can be left meanwhile. */
@Injectable({ providedIn: 'root' })
export class SheetUploads {
  private readonly api = inject(SheetsApi);

  private readonly all = signal<readonly SheetUpload[]>([]);
  readonly uploads = this.all.asReadonly();
  readonly isBusy = computed(() => this.all().some(({ state }) => state === 'waiting' || state === 'sending'));
  private lastId = 0;

  add(files: readonly File[]): void {
    this.all.update((uploads) => [...uploads, ...files.map((file): SheetUpload => ({ id: (this.lastId += 1), file, state: 'waiting', percent: 0, revision: null, isKnown: false, trouble: '' }))]);
    this.sendNext();
  }

  sendAgain(id: number): void {
    this.put(id, { state: 'waiting', percent: 0, trouble: '' });
    this.sendNext();
  }

  /** Takes what is finished off the list; what failed stays until it is sent or taken off. */
  clear(): void {
    this.all.update((uploads) => uploads.filter(({ state }) => state !== 'done'));
  }

  remove(id: number): void {
    this.all.update((uploads) => uploads.filter((upload) => upload.id !== id));
  }

  private sendNext(): void {
    const uploads = this.all();
    const free = atOnce - uploads.filter(({ state }) => state === 'sending').length;
    uploads
      .filter(({ state }) => state === 'waiting')
      .slice(0, Math.max(0, free))
      .forEach((upload) => void this.send(upload));
  }

  private async send({ id, file }: SheetUpload): Promise<void> {
    this.put(id, { state: 'sending' });
    try {
      const last = await lastValueFrom(this.api.upload(file).pipe(tap((step) => 'percent' in step && this.put(id, { percent: step.percent }))));
      if ('uploaded' in last) this.put(id, { state: 'done', percent: 100, revision: last.uploaded.revision, isKnown: last.uploaded.isKnown });
    } catch (error) {
      this.put(id, { state: 'failed', trouble: problemWords(problemOf(error)) });
    }
    this.sendNext();
  }

  private put(id: number, change: Partial<SheetUpload>): void {
    this.all.update((uploads) => uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)));
  }
}
