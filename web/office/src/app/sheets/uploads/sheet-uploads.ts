import { computed, effect, inject, Injectable, signal, untracked } from '@angular/core';
import { lastValueFrom, tap } from 'rxjs';
import * as z from 'zod';
import { type Problem } from '#shared/common';
import { ZipOutcome } from '#shared/library';
import { RevisionSummary } from '#shared/sheets';
import { problemOf, problemWords } from '#ui/problem';
import { SessionApi } from '../../session/session-api';
import { SheetsApi } from '../sheets-api';
import { onlyTab } from './only-tab';
import { UploadStore } from './upload-store';

/** What became of a file, in a form that this browser keeps. */
const Shown = z.object({
  revision: RevisionSummary.nullable(),
  /** Whether the same bytes were here already. */
  isKnown: z.boolean(),
  zip: ZipOutcome.nullable(),
  trouble: z.string(),
});

export interface SheetUpload extends z.infer<typeof Shown> {
  readonly id: string;
  readonly at: number;
  readonly name: string;
  /** Null once the server has it. */
  readonly file: File | null;
  readonly state: 'waiting' | 'sending' | 'done' | 'failed';
  readonly percent: number;
}

const atOnce = 3;
const tryAgainMilliseconds = 5_000;
const nothing = { revision: null, isKnown: false, zip: null, trouble: '' } as const;

/**
 * Files on their way to the library, a few at once. They are kept in this browser until the server has them: the page may be
 * left, and a reload goes on where it stopped. What the server refuses stays with its reason; a lost connection is waited out.
 */
@Injectable({ providedIn: 'root' })
export class SheetUploads {
  private readonly api = inject(SheetsApi);
  private readonly store = inject(UploadStore);
  private readonly session = inject(SessionApi).session;
  private readonly personId = computed(() => this.session()?.person.id ?? null);

  private readonly all = signal<readonly SheetUpload[]>([]);
  readonly uploads = this.all.asReadonly();
  readonly isPaused = signal(false);
  /** Why nothing is sent just now, though nobody paused. */
  readonly waitsFor = signal('');
  /** This browser does not keep the files: they are lost when the page is loaded again. */
  readonly isUnkept = signal(false);
  readonly isBusy = computed(() => this.all().some(({ state }) => state === 'sending' || (state === 'waiting' && !this.isPaused())));

  /** Whose files are in the list. */
  private owner: string | null = null;
  private readonly mayRestore = onlyTab('kneeboard-uploads');
  private restored: string | null = null;
  private last = 0;
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    effect(() => {
      const [personId, mayRestore] = [this.personId(), this.mayRestore()];
      untracked(() => personId !== null && void this.take(personId, mayRestore));
    });
    globalThis.addEventListener?.('online', () => this.goOn());
  }

  add(files: readonly File[]): void {
    const added = files.map((file): SheetUpload => ({ ...nothing, id: crypto.randomUUID(), at: (this.last = Math.max(this.last + 1, Date.now())), name: file.name, file, state: 'waiting', percent: 0 }));
    this.all.update((uploads) => [...uploads, ...added]);
    for (const upload of added) this.keep(upload);
    this.sendNext();
  }

  pause(): void {
    this.isPaused.set(true);
    this.store.setPaused(this.owner, true);
  }

  resume(): void {
    this.isPaused.set(false);
    this.store.setPaused(this.owner, false);
    this.goOn();
  }

  sendAgain(id: string): void {
    this.put(id, { state: 'waiting', percent: 0, trouble: '' });
    this.goOn();
  }

  sendFailedAgain(): void {
    for (const { id, state } of this.all()) if (state === 'failed') this.put(id, { state: 'waiting', percent: 0, trouble: '' });
    this.goOn();
  }

  /** Takes what is finished off the list; what failed stays until it is sent or taken off. */
  clear(): void {
    this.drop(this.all().filter(({ state }) => state === 'done'));
  }

  remove(id: string): void {
    this.drop(this.all().filter((upload) => upload.id === id && upload.state !== 'sending'));
  }

  /** This person's files, with those an earlier page left. */
  private async take(personId: string, mayRestore: boolean): Promise<void> {
    if (this.owner !== personId) {
      this.all.set([]);
      this.restored = null;
    }
    this.owner = personId;
    this.isPaused.set(this.store.isPaused(personId));
    if (mayRestore && this.restored !== personId) {
      this.restored = personId;
      const left = await this.store.of(personId).catch(() => []);
      if (this.owner !== personId) return;
      const here = new Set(this.all().map(({ id }) => id));
      const back = left.filter(({ id }) => !here.has(id)).flatMap((row): SheetUpload[] => {
        const shown = Shown.safeParse(row.shown);
        return row.file === null && row.state !== 'done' ? [] : [{ ...nothing, ...(shown.success ? shown.data : {}), id: row.id, at: row.at, name: row.name, file: row.file, state: row.state, percent: row.state === 'done' ? 100 : 0 }];
      });
      this.all.update((uploads) => [...back, ...uploads]);
    }
    this.goOn();
  }

  private goOn(): void {
    clearTimeout(this.timer);
    this.waitsFor.set('');
    this.sendNext();
  }

  private sendNext(): void {
    if (this.isPaused() || this.waitsFor() !== '' || this.personId() === null) return;
    const uploads = this.all();
    const free = atOnce - uploads.filter(({ state }) => state === 'sending').length;
    uploads
      .filter(({ state }) => state === 'waiting')
      .slice(0, Math.max(0, free))
      .forEach((upload) => void this.send(upload));
  }

  private async send({ id, file }: SheetUpload): Promise<void> {
    if (file === null) return;
    this.put(id, { state: 'sending' }, false);
    const owner = this.owner;
    try {
      const last = await lastValueFrom((isZip(file) ? this.api.uploadZip(file) : this.api.upload(file)).pipe(tap((step) => 'percent' in step && this.put(id, { percent: step.percent }, false))));
      if ('uploaded' in last) this.put(id, { state: 'done', file: null, percent: 100, revision: last.uploaded.revision, isKnown: last.uploaded.isKnown });
      if ('unpacked' in last) this.put(id, { state: 'done', file: null, percent: 100, zip: last.unpacked });
    } catch (error) {
      if (owner === this.owner) this.fail(id, problemOf(error));
    }
    this.sendNext();
  }

  private fail(id: string, problem: Problem): void {
    const isForLater = problem.status === 0 || problem.status === 401 || problem.status === 429 || problem.status === 503;
    if (!isForLater) return this.put(id, { state: 'failed', trouble: [problemWords(problem), ...(problem.errors ?? []).map(({ message }) => message)].join(' ') });
    this.put(id, { state: 'waiting', percent: 0 }, false);
    // A session that ended: whoever signs in again goes on.
    if (problem.status === 401) return;
    this.waitsFor.set(problem.status === 0 ? 'Kneeboard cannot be reached. It goes on by itself.' : 'The server asks to wait a moment. It goes on by itself.');
    clearTimeout(this.timer);
    this.timer = setTimeout(() => this.goOn(), problem.retryAfterSeconds === undefined ? tryAgainMilliseconds : 1000 * problem.retryAfterSeconds);
  }

  private put(id: string, change: Partial<SheetUpload>, isKept = true): void {
    this.all.update((uploads) => uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)));
    const upload = this.all().find((one) => one.id === id);
    if (isKept && upload) this.keep(upload);
  }

  private keep({ id, at, name, file, state, revision, isKnown, zip, trouble }: SheetUpload): void {
    if (this.owner === null) return;
    this.store.put({ id, personId: this.owner, at, name, file, state: state === 'sending' ? 'waiting' : state, shown: { revision, isKnown, zip, trouble } }).catch(() => this.isUnkept.set(true));
  }

  private drop(gone: readonly SheetUpload[]): void {
    const ids = gone.map(({ id }) => id);
    this.all.update((uploads) => uploads.filter(({ id }) => !ids.includes(id)));
    this.store.remove(ids).catch(() => this.isUnkept.set(true));
  }
}

export const isZip = ({ name, type }: { readonly name: string; readonly type: string }): boolean => /\.zip$/i.test(name) || type === 'application/zip' || type === 'application/x-zip-compressed';
