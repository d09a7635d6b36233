import { Injectable } from '@angular/core';
import { type DBSchema, openDB } from 'idb';

/** A file on its way as this browser keeps it; without the file once the server has it. */
export interface StoredUpload {
  readonly id: string;
  /** Whose it is: another person on this browser neither sees nor sends it. */
  readonly personId: string;
  /** Order of adding. */
  readonly at: number;
  readonly name: string;
  readonly file: File | null;
  readonly state: 'waiting' | 'done' | 'failed';
  /** What is shown of it, as plain data. */
  readonly shown: unknown;
}

interface Schema extends DBSchema {
  uploads: { key: string; value: StoredUpload; indexes: { person: string } };
}

const pausedKey = 'kneeboard-uploads-paused';

/** Files on their way, in this browser's own database, so that a reload or a closed lid loses none. Rejects where the browser refuses. */
@Injectable({ providedIn: 'root' })
export class UploadStore {
  private readonly database = once(() =>
    openDB<Schema>('kneeboard-office', 1, {
      upgrade: (database) => void database.createObjectStore('uploads', { keyPath: 'id' }).createIndex('person', 'personId'),
    }),
  );

  /** Whether this person paused: a queue that was stopped on purpose does not start by itself after a reload. */
  isPaused(personId: string): boolean {
    try {
      return localStorage.getItem(pausedKey) === personId;
    } catch {
      return false;
    }
  }

  setPaused(personId: string | null, isPaused: boolean): void {
    try {
      if (isPaused && personId !== null) localStorage.setItem(pausedKey, personId);
      else localStorage.removeItem(pausedKey);
    } catch {
      // Then it holds for this page only.
    }
  }

  async of(personId: string): Promise<readonly StoredUpload[]> {
    const rows = await (await this.database()).getAllFromIndex('uploads', 'person', personId);
    return rows.sort((a, b) => a.at - b.at);
  }

  async put(row: StoredUpload): Promise<void> {
    await (await this.database()).put('uploads', row);
  }

  async remove(ids: readonly string[]): Promise<void> {
    const transaction = (await this.database()).transaction('uploads', 'readwrite');
    await Promise.all([...ids.map((id) => transaction.store.delete(id)), transaction.done]);
  }
}

function once<T>(open: () => Promise<T>): () => Promise<T> {
  let opened: Promise<T> | undefined;
  return () => (opened ??= open());
}
