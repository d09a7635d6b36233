import { inject, Injectable, signal } from '@angular/core';
import { type TabletDay } from '#shared/envelopes';
import { CallFailed, TabletApi } from '../connection/tablet-api';
import { NotKept, Storage } from '../outbox/storage';

const prefix = 'sheet/';
/** Signatures come first: sheets stop filling the tablet well before it is full. */
const mostOfStorage = 0.8;

/** The safety data sheets of the day's jobs, kept on the tablet, so that they open with no signal: a link would be a barrier. */
@Injectable({ providedIn: 'root' })
export class KeptSheets {
  private readonly api = inject(TabletApi);
  private readonly storage = inject(Storage);
  private readonly ids = signal<ReadonlySet<string>>(new Set());
  /** Revision ids of the sheets that open without signal. */
  readonly kept = this.ids.asReadonly();
  private working: Promise<void> | null = null;

  /** Looks into the tablet's storage. */
  async load(): Promise<void> {
    const keys = await this.storage.use((database) => database.getAllKeys('kept'));
    this.ids.set(new Set(keys.filter((key) => key.startsWith(prefix)).map((key) => key.slice(prefix.length))));
  }

  /** The bytes of a kept sheet; null when it is not here. */
  async read(revisionId: string): Promise<ArrayBuffer | null> {
    try {
      const bytes = await this.storage.use((database) => database.get('kept', prefix + revisionId));
      return isBytes(bytes) ? bytes : null;
    } catch (error) {
      if (error instanceof NotKept) return null;
      throw error;
    }
  }

  /** Fetches what the day needs and lets go of what no job of it uses. Stops quietly without signal or room; never throws. */
  keepFor(day: TabletDay | null): Promise<void> {
    if (day === null) return Promise.resolve();
    this.working ??= this.work(day).finally(() => (this.working = null));
    return this.working;
  }

  private async work({ jobs }: TabletDay): Promise<void> {
    const needed = new Set(jobs.flatMap(({ sheets }) => sheets.map(({ revisionId }) => revisionId)));
    try {
      await this.load();
      for (const id of this.ids()) if (!needed.has(id)) await this.storage.use((database) => database.delete('kept', prefix + id));
      for (const id of needed) {
        if (this.ids().has(id)) continue;
        if (!(await hasRoom())) break;
        await this.fetchOne(id);
      }
      await this.load();
    } catch (error) {
      if (!(error instanceof CallFailed) && !(error instanceof NotKept)) console.error(error);
    }
  }

  private async fetchOne(id: string): Promise<void> {
    try {
      const bytes = await this.api.readSheetFile(id);
      await this.storage.use((database) => database.put('kept', bytes, prefix + id));
    } catch (error) {
      // One sheet that the office refuses must not cost the others.
      if (!(error instanceof CallFailed) || error.trouble !== 'refused') throw error;
    }
  }
}

/** By what it is called: bytes that come out of the storage may be of another realm. */
function isBytes(value: unknown): value is ArrayBuffer {
  return Object.prototype.toString.call(value) === '[object ArrayBuffer]';
}

async function hasRoom(): Promise<boolean> {
  if (typeof navigator === 'undefined' || !navigator.storage?.estimate) return true;
  const { usage, quota } = await navigator.storage.estimate();
  return usage === undefined || quota === undefined || usage < quota * mostOfStorage;
}
