import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { formatISO } from 'date-fns';
import { v7 } from 'uuid';
import { Envelope, type Receipt, type Receipts } from '#shared/envelopes';
import { Storage } from './storage';
import { type OutboxRow } from './tablet-database';
import { readWaitingMark, writeWaitingMark } from './waiting-mark';

type Known<T> = { [K in keyof T as string extends K ? never : K]: T[K] };
type Unstamped<T> = T extends unknown ? Omit<Known<T>, 'format' | 'id' | 'sequence' | 'capturedAt'> : never;
/** An envelope before the outbox gave it its id, number and time. Envelopes are loose: what else the tablet knows may go along. */
export type Draft = Unstamped<Envelope> & Readonly<Record<string, unknown>>;

/** An envelope on this tablet and how far it got. `envelope` is null when another app version wrote what this one cannot read. */
export interface Posted {
  readonly row: OutboxRow;
  readonly envelope: Envelope | null;
}

/** Longest envelope the contract takes, in characters (Deliveries). */
const mostCharacters = 400_000;
const batchEnvelopes = 50;
const batchCharacters = 1_000_000;
const lookAgainMs = 1_000;
/** Delivered envelopes stay readable on the tablet this long, so that a list can say what was sent. */
const keepDoneMs = 24 * 3_600_000;

/** Thrown when an envelope is longer than the contract takes: thousands of signature points. Nothing was written. */
export class TooLong extends Error {}

/**
 * What was signed, said and answered on this tablet. An envelope is on disk before anything is shown as kept,
 * is sent word for word as written, and goes only after the server answered for it.
 */
@Injectable({ providedIn: 'root' })
export class Outbox {
  private readonly storage = inject(Storage);
  private readonly channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel('kneeboard-outbox');
  private readonly parsed = new Map<string, Envelope | null>();
  private readonly rowsNow = signal<readonly OutboxRow[]>([]);

  /** In the order of writing. */
  readonly posted = computed<readonly Posted[]>(() => this.rowsNow().map((row) => ({ row, envelope: this.parse(row) })));
  readonly waitingCount = computed(() => this.rowsNow().filter((row) => row.state === 'waiting').length);

  /** Envelopes that waited here and are gone, because the browser dropped the storage; until somebody has read so. */
  readonly lostCount = signal(0);
  private isCompared = false;

  constructor() {
    this.channel?.addEventListener('message', () => void this.load());
    inject(DestroyRef).onDestroy(() => this.channel?.close());
    this.storage.onCleared(() => void this.restore());
  }

  /** Reads what other tabs and earlier runs wrote. */
  async load(): Promise<void> {
    const rows = await this.storage.use((database) => database.getAll('outbox'));
    this.rowsNow.set(inOrder(rows));
    if (!this.isCompared) await this.compareWithMark();
    this.mark();
  }

  /** Somebody read that envelopes are gone. */
  acknowledgeLoss(): void {
    this.lostCount.set(0);
    this.mark();
  }

  /**
   * Stamps and writes envelopes, all or none, and resolves once they are on disk.
   * @throws NotKept when the tablet could not write; TooLong when an envelope is over the limit
   */
  async add(drafts: readonly Draft[], now = new Date()): Promise<readonly Envelope[]> {
    // What was here before is looked at before anything is added, or an old loss would hide behind a new record.
    if (!this.isCompared) await this.load();
    const capturedAt = formatISO(now);
    const envelopes = drafts.map((draft) => checked({ format: 'kneeboard-envelope/1', id: v7(), capturedAt, sequence: 0, ...draft }));
    const written = await this.storage.use(async (database) => {
      const transaction = database.transaction(['outbox', 'kept'], 'readwrite', { durability: 'strict' });
      const kept = transaction.objectStore('kept');
      const last = await kept.get('sequence');
      const first = typeof last === 'number' ? last + 1 : 0;
      const stamped = envelopes.map((envelope, index) => ({ ...envelope, sequence: first + index }));
      const rows = stamped.map((envelope) => rowOf(envelope));
      await Promise.all([kept.put(first + stamped.length - 1, 'sequence'), ...rows.map((row) => transaction.objectStore('outbox').add(row)), transaction.done]);
      return { stamped, rows };
    });
    this.rowsNow.update((rows) => inOrder([...rows, ...written.rows]));
    this.mark();
    this.channel?.postMessage('changed');
    return written.stamped;
  }

  /** The oldest waiting envelopes, few enough for one request. Read from disk: another tab may have written or sent some. */
  async nextBatch(leaveOut: ReadonlySet<string> = new Set()): Promise<readonly OutboxRow[]> {
    await this.load();
    const batch: OutboxRow[] = [];
    let characters = 0;
    for (const row of this.rowsNow()) {
      if (row.state !== 'waiting' || leaveOut.has(row.id)) continue;
      characters += row.bytes.length;
      if (batch.length === batchEnvelopes || (batch.length > 0 && characters > batchCharacters)) break;
      batch.push(row);
    }
    return batch;
  }

  /** Writes down what the server answered. An envelope without an answer keeps waiting. */
  async settle(answer: Receipts): Promise<void> {
    const receipts = new Map<string, Receipt>(answer.receipts.map((receipt) => [receipt.id, receipt]));
    await this.storage.use(async (database) => {
      const transaction = database.transaction('outbox', 'readwrite', { durability: 'strict' });
      for (const row of await transaction.store.getAll()) {
        const receipt = receipts.get(row.id);
        if (receipt) await transaction.store.put({ ...row, state: 'done', receipt, receivedAt: answer.receivedAt });
        else if (isPast(row, answer.receivedAt)) await transaction.store.delete(row.id);
      }
      await transaction.done;
    });
    await this.load();
    this.channel?.postMessage('changed');
  }

  /** The browser dropped the storage while the page ran: what is in memory and not sent is written again. */
  private async restore(): Promise<void> {
    const waiting = this.rowsNow().filter((row) => row.state === 'waiting');
    const highest = Math.max(-1, ...this.rowsNow().map((row) => row.sequence));
    await this.storage.use(async (database) => {
      const transaction = database.transaction(['outbox', 'kept'], 'readwrite', { durability: 'strict' });
      for (const row of waiting) if (!(await transaction.objectStore('outbox').get(row.id))) await transaction.objectStore('outbox').put(row);
      const last = await transaction.objectStore('kept').get('sequence');
      if (typeof last !== 'number' || last < highest) await transaction.objectStore('kept').put(highest, 'sequence');
      await transaction.done;
    }).catch((error: unknown) => console.error(error));
  }

  private async compareWithMark(): Promise<void> {
    this.isCompared = true;
    if (readWaitingMark() <= this.waitingCount()) return;
    // Another tab may be between sending and saying so: look once more before alarming anybody.
    await new Promise((resolve) => setTimeout(resolve, lookAgainMs));
    this.rowsNow.set(inOrder(await this.storage.use((database) => database.getAll('outbox'))));
    this.lostCount.set(Math.max(0, readWaitingMark() - this.waitingCount()));
  }

  private mark(): void {
    writeWaitingMark(this.waitingCount() + this.lostCount());
  }

  private parse(row: OutboxRow): Envelope | null {
    let envelope = this.parsed.get(row.id);
    if (envelope === undefined) {
      const result = Envelope.safeParse(readJson(row.bytes));
      envelope = result.success ? result.data : null;
      this.parsed.set(row.id, envelope);
    }
    return envelope;
  }
}

/** Held against the contract before it is written: what the server cannot read helps nobody. */
function checked(envelope: unknown): Envelope {
  const result = Envelope.safeParse(envelope);
  if (result.success && JSON.stringify(result.data).length < mostCharacters - 20) return result.data;
  throw new TooLong('longer than an envelope may be', { cause: result.error });
}

function rowOf(envelope: Envelope): OutboxRow {
  return { id: envelope.id, sequence: envelope.sequence, bytes: JSON.stringify(envelope), state: 'waiting', receipt: null, receivedAt: null };
}

/** Compared on the server's clock: the tablet's may be days off. */
function isPast(row: OutboxRow, serverNow: string): boolean {
  return row.state === 'done' && row.receivedAt !== null && Date.parse(serverNow) - Date.parse(row.receivedAt) > keepDoneMs;
}

/** By number, then by id (UUIDv7 runs with time), so that rows of another app version have a place too. */
function inOrder(rows: readonly OutboxRow[]): readonly OutboxRow[] {
  return [...rows].sort((a, b) => a.sequence - b.sequence || (a.id < b.id ? -1 : 1));
}

function readJson(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return null;
  }
}
