import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it, jest } from '@jest/globals';
import { type RevisionSummary } from '#shared/sheets';
import { SessionApi } from '../../session/session-api';
import { SheetUploads } from './sheet-uploads';
import { UploadStore, type StoredUpload } from './upload-store';
import { shortSummary, uploadSummary, zipWords } from './upload-words';

const ines = '0190a0a0-0000-7000-8000-000000000001';
const dov = '0190a0a0-0000-7000-8000-000000000002';
const revision = (fileName: string): RevisionSummary => ({ id: ines, fileName, sha256: 'a'.repeat(64), byteLength: 3, pages: null, pagesRead: null, state: 'waiting', readerState: null, productId: null, productName: null, supplier: null, revisedOn: null, language: null, toLookAt: 0, isCurrent: false, uploadedAt: '2026-12-03T12:00:00Z', uploadedBy: 'Ines Halloran', confirmedAt: null, confirmedBy: null, version: 1 });
const pdf = (name: string) => new File(['%PDF'], name, { type: 'application/pdf' });

/** The browser's database, which outlives a page. */
class Kept {
  readonly rows = new Map<string, StoredUpload>();
  isRefusing = false;
  paused: string | null = null;
  isPaused(personId: string): boolean {
    return this.paused === personId;
  }
  setPaused(personId: string | null, isPaused: boolean): void {
    this.paused = isPaused ? personId : null;
  }
  of(personId: string): Promise<readonly StoredUpload[]> {
    return Promise.resolve([...this.rows.values()].filter((row) => row.personId === personId).sort((a, b) => a.at - b.at));
  }
  put(row: StoredUpload): Promise<void> {
    if (this.isRefusing) return Promise.reject(new Error('full'));
    this.rows.set(row.id, row);
    return Promise.resolve();
  }
  remove(ids: readonly string[]): Promise<void> {
    ids.forEach((id) => this.rows.delete(id));
    return Promise.resolve();
  }
}

describe('files on their way to the library', () => {
  let kept: Kept;
  beforeEach(() => {
    kept = new Kept();
  });
  afterEach(() => jest.useRealTimers());

  /** A page of this person; a second call is the page after a reload. */
  async function open(personId = ines) {
    TestBed.resetTestingModule();
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), { provide: UploadStore, useValue: kept }] });
    const server = TestBed.inject(HttpTestingController);
    const session = TestBed.inject(SessionApi).load();
    server.expectOne('/api/session').flush({ person: { id: personId, name: 'Somebody' }, role: 'safety-officer', organisation: { id: ines, name: 'Marrow & Slate Floors' } });
    await session;
    const uploads = TestBed.inject(SheetUploads);
    const settle = async () => {
      TestBed.tick();
      for (let turn = 0; turn < 10; turn += 1) await Promise.resolve();
    };
    await settle();
    const inFlight = () => server.match(({ url }) => url === '/api/sheets');
    const store = async (request: ReturnType<typeof inFlight>[number]) => {
      const file = (request.request.body as FormData).get('file') as File;
      request.flush({ revision: revision(file.name), isKnown: false });
      await settle();
    };
    const states = () => uploads.uploads().map(({ name, state }) => `${name} ${state}`);
    return { server, uploads, settle, inFlight, store, states };
  }

  it('sends three at a time and the next as soon as one is stored', async () => {
    const { uploads, inFlight, store, states, settle } = await open();
    uploads.add(['a', 'b', 'c', 'd'].map(pdf));
    await settle();
    const first = inFlight();
    expect(first.length).toBe(3);
    expect(states()).toEqual(['a sending', 'b sending', 'c sending', 'd waiting']);
    if (first[0]) await store(first[0]);
    expect(states()).toEqual(['a done', 'b sending', 'c sending', 'd sending']);
    expect(inFlight().length).toBe(1);
  });

  it('goes on after a reload with what was not stored, and sends nothing twice that was', async () => {
    const before = await open();
    before.uploads.add(['a', 'b', 'c', 'd', 'e'].map(pdf));
    await before.settle();
    const [first] = before.inFlight();
    if (first) await before.store(first);
    // The page goes away while four are still to come.
    const after = await open();
    expect(after.states()).toEqual(['a done', 'b sending', 'c sending', 'd sending', 'e waiting']);
    const sent = after.inFlight().map(({ request }) => ((request.body as FormData).get('file') as File).name);
    expect(sent).toEqual(['b', 'c', 'd']);
  });

  it('keeps no file once the server has it, only what became of it', async () => {
    const { uploads, inFlight, store, settle } = await open();
    uploads.add([pdf('a')]);
    await settle();
    expect([...kept.rows.values()].map(({ file }) => file?.name)).toEqual(['a']);
    const [only] = inFlight();
    if (only) await store(only);
    expect([...kept.rows.values()].map(({ file, state }) => [file, state])).toEqual([[null, 'done']]);
    uploads.clear();
    expect(kept.rows.size).toBe(0);
  });

  it('starts nothing new while paused, and goes on when told to', async () => {
    const { uploads, inFlight, store, states, settle } = await open();
    uploads.add(['a', 'b', 'c', 'd'].map(pdf));
    await settle();
    uploads.pause();
    for (const request of inFlight()) await store(request);
    expect(states()).toEqual(['a done', 'b done', 'c done', 'd waiting']);
    expect(inFlight().length).toBe(0);
    uploads.resume();
    await settle();
    expect(inFlight().length).toBe(1);
  });

  it('stays paused after a reload, until the person who paused says otherwise', async () => {
    const before = await open();
    before.uploads.add([pdf('a')]);
    before.uploads.pause();
    await before.settle();
    const after = await open();
    expect([after.states(), after.uploads.isPaused(), after.inFlight().length]).toEqual([['a waiting'], true, 0]);
    after.uploads.resume();
    await after.settle();
    expect(after.inFlight().length).toBe(1);
    expect((await open()).uploads.isPaused()).toBe(false);
  });

  it.each([
    [{ all: 3, done: 1, failed: 0, open: 2 }, false, false, 'Adding sheets: 1 of 3 stored'],
    [{ all: 3, done: 1, failed: 1, open: 1 }, true, false, 'Paused: 1 of 3 stored, 1 sheet not added'],
    [{ all: 3, done: 1, failed: 0, open: 2 }, false, true, 'Waiting for the server: 1 of 3 stored'],
    [{ all: 3, done: 1, failed: 2, open: 0 }, false, false, '2 sheets not added'],
  ] as const)('says in the frame of every page how they stand: %j', (count, isPaused, isWaiting, words) => {
    expect(shortSummary(count, isPaused, isWaiting)).toBe(words);
  });

  it('names why a file was refused, goes on with the others, and sends it again when asked', async () => {
    const { uploads, inFlight, store, states, settle } = await open();
    uploads.add([pdf('a'), pdf('b')]);
    await settle();
    const [a, b] = inFlight();
    a?.flush({ type: 'about:blank', title: 'This file is too large.', status: 413 }, { status: 413, statusText: 'No' });
    if (b) await store(b);
    expect(states()).toEqual(['a failed', 'b done']);
    expect(uploads.uploads()[0]?.trouble).toBe('This file is too large.');
    uploads.sendFailedAgain();
    await settle();
    const [again] = inFlight();
    if (again) await store(again);
    expect(states()).toEqual(['a done', 'b done']);
  });

  it('waits out a lost connection instead of failing two hundred files', async () => {
    jest.useFakeTimers({ doNotFake: ['queueMicrotask'] });
    const { uploads, inFlight, states, settle } = await open();
    uploads.add(['a', 'b', 'c', 'd'].map(pdf));
    await settle();
    for (const request of inFlight()) request.error(new ProgressEvent('error'));
    await settle();
    expect(states()).toEqual(['a waiting', 'b waiting', 'c waiting', 'd waiting']);
    expect(uploads.waitsFor()).toBe('Kneeboard cannot be reached. It goes on by itself.');
    expect(inFlight().length).toBe(0);
    jest.advanceTimersByTime(5_000);
    await settle();
    expect(inFlight().length).toBe(3);
  });

  it("neither shows nor sends another person's files", async () => {
    const first = await open(ines);
    first.uploads.add([pdf('a')]);
    await first.settle();
    const second = await open(dov);
    expect(second.states()).toEqual([]);
    expect(second.inFlight().length).toBe(0);
    expect((await open(ines)).states()).toEqual(['a sending']);
  });

  it('says when this browser does not keep the files', async () => {
    kept.isRefusing = true;
    const { uploads, settle } = await open();
    uploads.add([pdf('a')]);
    await settle();
    expect(uploads.isUnkept()).toBe(true);
  });

  it('sends a zip as a whole and counts what became of its files', async () => {
    const { uploads, server, settle } = await open();
    uploads.add([new File(['PK'], 'sheets.zip', { type: 'application/zip' })]);
    await settle();
    const outcome = { files: [{ fileName: 'a.pdf', outcome: 'added', because: null, revision: revision('a.pdf') }, { fileName: 'b.txt', outcome: 'refused', because: 'Not a PDF.', revision: null }] };
    server.expectOne('/api/sheet-zips').flush(outcome);
    await settle();
    expect(uploads.uploads().map(({ state, zip }) => [state, zip && zipWords(zip)])).toEqual([['done', '1 added, 1 refused']]);
  });

  it.each([
    [{ all: 200, done: 37, failed: 0, open: 163 }, false, '37 of 200 stored. You can leave this page; they are kept in this browser until they are stored.'],
    [{ all: 200, done: 37, failed: 2, open: 161 }, true, '37 of 200 stored, 2 not. Paused: what is on its way ends, nothing new starts.'],
    [{ all: 200, done: 199, failed: 1, open: 0 }, false, '199 of 200 stored, 1 not.'],
  ])('says how the list stands %#', (count, isPaused, words) => expect(uploadSummary(count, isPaused, '')).toBe(words));
});
