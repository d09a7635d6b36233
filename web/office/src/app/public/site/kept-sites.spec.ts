import 'fake-indexeddb/auto';
import { deserialize, serialize } from 'node:v8';
import { IDBFactory } from 'fake-indexeddb';
import { beforeEach, describe, expect, it } from '@jest/globals';
import { type SitePage } from '#shared/library';
import { keptForDays, KeptSites } from './kept-sites';

const [first, second] = ['a'.repeat(43), 'b'.repeat(43)];
const pageWith = (...revisionIds: readonly string[]) => ({ jobName: 'Process hall floor', sheets: revisionIds.map((revisionId) => ({ revisionId })) }) as unknown as SitePage;
const now = new Date('2026-12-03T12:00:00Z');
const daysAgo = (days: number) => new Date(now.getTime() - days * 24 * 3600 * 1000).toISOString();

// jsdom has none, and the stand-in for the database copies with it.
Object.assign(globalThis, { structuredClone: (value: unknown) => deserialize(serialize(value)) as unknown });

describe('what a phone keeps of printed codes', () => {
  beforeEach(() => Object.assign(globalThis, { indexedDB: new IDBFactory() }));

  it('gives back the copy of a code, and without a code the one heard of last', async () => {
    const copies = new KeptSites();
    await copies.keep({ token: first, page: pageWith('one'), heardAt: daysAgo(1) });
    await copies.keep({ token: second, page: pageWith('two'), heardAt: daysAgo(2) });
    expect((await copies.read(second, now))?.token).toBe(second);
    expect((await copies.read(null, now))?.token).toBe(first);
  });

  it('drops sheets that are no longer the job’s, and everything of a withdrawn code; another code keeps its own', async () => {
    const copies = new KeptSites();
    for (const token of [first, second]) {
      await copies.keep({ token, page: pageWith('one', 'two'), heardAt: daysAgo(0) });
      for (const id of ['one', 'two']) await copies.keepSheet(token, id, new ArrayBuffer(3));
    }
    await copies.keep({ token: first, page: pageWith('two'), heardAt: daysAgo(0) });
    expect([await copies.sheet(first, 'one'), (await copies.sheet(first, 'two'))?.byteLength]).toEqual([null, 3]);
    await copies.drop(first);
    expect([await copies.read(first, now), await copies.sheet(first, 'two')]).toEqual([null, null]);
    expect((await copies.sheet(second, 'one'))?.byteLength).toBe(3);
  });

  it('shows no copy that nobody could ask the office about for too long', async () => {
    const copies = new KeptSites();
    await copies.keep({ token: first, page: pageWith('one'), heardAt: daysAgo(keptForDays + 1) });
    await copies.keepSheet(first, 'one', new ArrayBuffer(3));
    expect(await copies.read(first, now)).toBeNull();
    expect(await copies.sheet(first, 'one')).toBeNull();
    await copies.keep({ token: second, page: pageWith(), heardAt: daysAgo(keptForDays - 1) });
    expect(await copies.read(second, now)).not.toBeNull();
  });
});
