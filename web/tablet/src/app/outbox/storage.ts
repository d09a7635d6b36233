import { Injectable, signal } from '@angular/core';
import { openTabletDatabase, type TabletDatabase } from './tablet-database';

/** full: nothing more can be written; cleared: the browser dropped what was stored; unavailable: it cannot be opened at all. */
export type StorageTrouble = 'full' | 'cleared' | 'unavailable';

/** Thrown when a write did not reach the tablet's storage: what was to be kept is not kept. */
export class NotKept extends Error {
  constructor(
    readonly trouble: StorageTrouble,
    options?: ErrorOptions,
  ) {
    super(`not kept: ${trouble}`, options);
    this.name = 'NotKept';
  }
}

/** The tablet's one way to its IndexedDB, with what went wrong with it in a signal. */
@Injectable({ providedIn: 'root' })
export class Storage {
  private opened: Promise<TabletDatabase> | null = null;
  private readonly whenCleared: (() => void)[] = [];
  private readonly troubleNow = signal<StorageTrouble | null>(null);
  readonly trouble = this.troubleNow.asReadonly();
  /** Whether the browser promised not to clear this storage by itself; null until asked. */
  readonly isPersistent = signal<boolean | null>(null);

  /** Runs work on the database; failures become NotKept and stay visible until a later write succeeds. */
  async use<T>(work: (database: TabletDatabase) => Promise<T>): Promise<T> {
    try {
      const result = await work(await this.database());
      this.troubleNow.set(null);
      return result;
    } catch (error) {
      const trouble = troubleOf(error);
      this.troubleNow.set(trouble);
      throw new NotKept(trouble, { cause: error });
    }
  }

  /** Asks the browser to keep this storage when space runs short. */
  async askToPersist(): Promise<void> {
    const storage = typeof navigator === 'undefined' ? undefined : navigator.storage;
    if (!storage?.persist) return;
    const isKept = (await storage.persisted()) || (await storage.persist());
    this.isPersistent.set(isKept);
  }

  /** Called when the browser dropped the storage under the running page: what is still in memory can be written again. */
  onCleared(listener: () => void): void {
    this.whenCleared.push(listener);
  }

  private database(): Promise<TabletDatabase> {
    this.opened ??= openTabletDatabase((why) => {
      this.opened = null;
      if (why === 'gave-way') return;
      this.troubleNow.set('cleared');
      for (const listener of this.whenCleared) listener();
    }).catch((error: unknown) => {
      this.opened = null;
      throw error;
    });
    return this.opened;
  }
}

function troubleOf(error: unknown): StorageTrouble {
  return error instanceof Error && error.name === 'QuotaExceededError' ? 'full' : 'unavailable';
}
