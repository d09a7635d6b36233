import { type DBSchema, type IDBPDatabase, openDB } from 'idb';
import { type Receipt, type TabletDay } from '#shared/envelopes';

/** One envelope as written: `bytes` is what gets sent and stored, and is never rewritten. */
export interface OutboxRow {
  readonly id: string;
  readonly sequence: number;
  readonly bytes: string;
  readonly state: 'waiting' | 'done';
  /** What the server said, once it has; null while waiting. */
  readonly receipt: Receipt | null;
  /** The server's clock when it answered. */
  readonly receivedAt: string | null;
}

/** The last day heard from the office, and the tablet's clock at that moment. */
export interface KeptDay {
  readonly day: TabletDay;
  readonly heardAt: string;
}

interface TabletSchema extends DBSchema {
  outbox: { key: string; value: OutboxRow };
  kept: { key: string; value: unknown };
}
export type TabletDatabase = IDBPDatabase<TabletSchema>;

export const databaseName = 'kneeboard-tablet';
const databaseVersion = 1;

/**
 * Opens the tablet's storage. A later app may have raised the version before this one came back:
 * then it is opened as it stands, because an outbox that cannot be opened is an outbox lost.
 */
export async function openTabletDatabase(onClosed: (why: 'gave-way' | 'terminated') => void): Promise<TabletDatabase> {
  const open = (version?: number): Promise<TabletDatabase> =>
    openDB<TabletSchema>(databaseName, version, {
      upgrade(database) {
        if (!database.objectStoreNames.contains('outbox')) database.createObjectStore('outbox', { keyPath: 'id' });
        if (!database.objectStoreNames.contains('kept')) database.createObjectStore('kept');
      },
      // Another tab wants to raise the version: give way, and open again as it stands.
      blocking: (_current, _blocked, event) => {
        (event.target as IDBDatabase | null)?.close();
        onClosed('gave-way');
      },
      terminated: () => onClosed('terminated'),
    });
  try {
    return await open(databaseVersion);
  } catch (error) {
    if (error instanceof DOMException && error.name === 'VersionError') return open();
    throw error;
  }
}
