import { afterEach, beforeEach, describe, expect, it } from '@jest/globals';
import { createEnvironmentInjector, EnvironmentInjector } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { openDB } from 'idb';
import { Deliveries, Envelope, type Receipt } from '#shared/envelopes';
import { setUpTabletBrowser } from '../../testing/tablet-browser';
import { cannotSign, ids } from '../../testing/tablet-data';
import { Outbox, TooLong } from './outbox';
import { NotKept, Storage } from './storage';
import { databaseName } from './tablet-database';

const tabs: EnvironmentInjector[] = [];
afterEach(() => {
  for (const opened of tabs.splice(0)) opened.destroy();
});

/** Another tab of the same tablet: its own objects over the same storage. */
function tab(): Outbox {
  const injector = createEnvironmentInjector([Storage, Outbox], TestBed.inject(EnvironmentInjector));
  tabs.push(injector);
  return injector.get(Outbox);
}

function receiptFor(id: string, more: Partial<Receipt> = {}): Receipt {
  return { id, outcome: 'recorded', acknowledgementId: null, entryIndex: null, pinState: null, isUnwitnessed: false, isSuperseded: false, note: null, ...more };
}

describe('Outbox', () => {
  beforeEach(() => setUpTabletBrowser());

  it('has an envelope on disk before it says it is kept', async () => {
    const outbox = tab();
    const [envelope] = await outbox.add([cannotSign()]);
    const rows = await (await openDB(databaseName)).getAll('outbox');
    expect(rows).toHaveLength(1);
    expect(Envelope.parse(JSON.parse(rows[0].bytes))).toEqual(envelope);
    expect(outbox.waitingCount()).toBe(1);
  });

  it('writes what the contract takes: bytes, ids and times', async () => {
    const outbox = tab();
    await outbox.add([cannotSign()], new Date('2026-12-03T06:24:00-06:00'));
    const [row] = await outbox.nextBatch();
    expect(Deliveries.safeParse({ sentAt: '2026-12-03T06:25:00-06:00', envelopes: [{ id: row?.id, bytes: row?.bytes }] }).success).toBe(true);
    // RFC 9562 section 5.7: version 7 in the high bits of octet 6.
    expect(row?.id[14]).toBe('7');
    expect(new Date(JSON.parse(row?.bytes ?? '').capturedAt).toISOString()).toBe('2026-12-03T12:24:00.000Z');
  });

  it('numbers envelopes in one row over two tabs and a restart', async () => {
    const [first, second] = [tab(), tab()];
    await Promise.all([first.add([cannotSign()]), second.add([cannotSign(), cannotSign()])]);
    const later = tab();
    await later.add([cannotSign()]);
    expect((await later.nextBatch()).map((row) => row.sequence)).toEqual([0, 1, 2, 3]);
  });

  it('keeps an envelope waiting until a receipt names it', async () => {
    const outbox = tab();
    const [one, two] = await outbox.add([cannotSign(), cannotSign()]);
    await outbox.settle({ receivedAt: '2026-12-03T12:00:00Z', receipts: [receiptFor(two?.id ?? ''), receiptFor(ids.nobody)] });
    expect((await outbox.nextBatch()).map((row) => row.id)).toEqual([one?.id]);
    expect(outbox.posted().find(({ row }) => row.id === two?.id)?.row).toMatchObject({ state: 'done', receivedAt: '2026-12-03T12:00:00Z' });
  });

  it('drops what was answered for a day ago, by the server’s clock, and nothing that waits', async () => {
    const outbox = tab();
    const [old, waiting, fresh] = await outbox.add([cannotSign(), cannotSign(), cannotSign()], new Date('2020-01-01T00:00:00Z'));
    await outbox.settle({ receivedAt: '2026-12-01T12:00:00Z', receipts: [receiptFor(old?.id ?? '')] });
    await outbox.settle({ receivedAt: '2026-12-03T12:00:00Z', receipts: [receiptFor(fresh?.id ?? '')] });
    expect(outbox.posted().map(({ row }) => row.id)).toEqual([waiting?.id, fresh?.id]);
  });

  it('sends at most fifty at once, oldest first', async () => {
    const outbox = tab();
    await outbox.add(Array.from({ length: 60 }, () => cannotSign()));
    const batch = await outbox.nextBatch();
    expect(batch).toHaveLength(50);
    expect(batch[0]?.sequence).toBe(0);
    expect(batch[49]?.sequence).toBe(49);
  });

  it('keeps the bytes another app version wrote, unread and unchanged', async () => {
    const outbox = tab();
    await outbox.load();
    const bytes = '{"format":"kneeboard-envelope/9","new":true}';
    await (await openDB(databaseName)).put('outbox', { id: ids.nobody, sequence: 7, bytes, state: 'waiting', receipt: null, receivedAt: null });
    expect((await outbox.nextBatch())[0]?.bytes).toBe(bytes);
    expect(outbox.posted()[0]?.envelope).toBeNull();
    expect(outbox.waitingCount()).toBe(1);
  });

  it('opens a storage that a later app version has raised', async () => {
    await tab().add([cannotSign()]);
    (await openDB(databaseName, 9)).close();
    const outbox = tab();
    await outbox.load();
    expect(outbox.waitingCount()).toBe(1);
  });

  it('says at once that a full tablet kept nothing', async () => {
    const injector = createEnvironmentInjector([Storage, Outbox], TestBed.inject(EnvironmentInjector));
    const outbox = injector.get(Outbox);
    await outbox.load();
    const add = IDBObjectStore.prototype.add;
    IDBObjectStore.prototype.add = () => {
      throw new DOMException('no room', 'QuotaExceededError');
    };
    try {
      await expect(outbox.add([cannotSign()])).rejects.toThrow(NotKept);
    } finally {
      IDBObjectStore.prototype.add = add;
    }
    expect(injector.get(Storage).trouble()).toBe('full');
    expect(outbox.waitingCount()).toBe(0);
    expect(await outbox.nextBatch()).toEqual([]);
  });

  it('refuses an envelope over the contract’s length before writing anything', async () => {
    const outbox = tab();
    await expect(outbox.add([{ ...cannotSign(), extra: 'x'.repeat(400_000) }])).rejects.toThrow(TooLong);
    expect(await outbox.nextBatch()).toEqual([]);
  });
});

describe('a tablet whose storage was cleared', () => {
  beforeEach(() => {
    setUpTabletBrowser();
    document.cookie = 'kneeboard-waiting=0; path=/tablet; max-age=0';
    history.replaceState(null, '', '/tablet/');
  });

  it('says how many waiting envelopes are gone until somebody has read it, and then no more', async () => {
    await tab().add([cannotSign(), cannotSign()]);
    setUpTabletBrowser();
    const later = tab();
    await later.load();
    expect(later.lostCount()).toBe(2);
    await later.add([cannotSign()]);
    const again = tab();
    await again.load();
    expect(again.lostCount()).toBe(2);
    again.acknowledgeLoss();
    const last = tab();
    await last.load();
    expect(last.lostCount()).toBe(0);
    expect(last.waitingCount()).toBe(1);
  });

  it('alarms nobody when everything was sent', async () => {
    const outbox = tab();
    const [one] = await outbox.add([cannotSign()]);
    await outbox.settle({ receivedAt: '2026-12-03T12:00:00Z', receipts: [receiptFor(one?.id ?? '')] });
    setUpTabletBrowser();
    const later = tab();
    await later.load();
    expect(later.lostCount()).toBe(0);
  });
});
