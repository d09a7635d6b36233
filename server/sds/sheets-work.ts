import { and, eq, sql } from 'drizzle-orm';
import { revisions } from '#drizzle/schema/sheets';
import { type Deps } from '../deps';
import { type Tx } from '../platform/database';
import { type Work } from '../platform/queue';
import { DamagedObjectError } from '../platform/storage';
import { indexRevision } from '../search/search-store';
import { carriesValues, type SheetReading } from './reader/reading';
import { asPlainText, fieldsFromReading } from './sheet-fields';
import { objectKey } from './sheets-service';

export interface SheetReader {
  read(bytes: Uint8Array, onPage?: (page: number, pages: number) => void): Promise<SheetReading>;
  close(): Promise<void>;
}

type ReadWork = Work['read-sheet'];

/** Where a sheet without a text layer goes on: handed to the queue, or left to a person when null. */
type Onward = ((tx: Tx, work: ReadWork) => Promise<void>) | null;

/**
 * Reads one waiting sheet. Safe to run again: a revision that is no longer waiting is left alone. One without a text
 * layer goes on waiting, for the reading of its pictures.
 */
export const readSheetWork = (deps: Deps, reader: SheetReader) => (work: ReadWork) => readWaiting(deps, work, reader, (tx) => deps.queue.add(tx, 'ocr-sheet', work));

/** Reads one waiting sheet from pictures of its pages and keeps count of them. Safe to run again, like the other. */
export const ocrSheetWork = (deps: Deps, reader: SheetReader) => (work: ReadWork) => readWaiting(deps, work, reader, null);

/** Reading failed at every try: the sheet waits no longer and is filled in by hand, or read again when a person asks. */
export const unreadSheetWork =
  ({ database, log }: Deps) =>
  async ({ organisationId, revisionId }: ReadWork): Promise<void> => {
    await database.inOrganisation(organisationId, (tx) =>
      tx
        .update(revisions)
        .set({ state: 'needs-entry', readerState: 'unavailable', pagesRead: null, version: sql`${revisions.version} + 1` })
        .where(and(eq(revisions.organisationId, organisationId), eq(revisions.id, revisionId), eq(revisions.state, 'waiting'))),
    );
    log.error({ revision: revisionId }, 'sheet not read at any try');
  };

async function readWaiting({ database, storage, log }: Deps, work: ReadWork, reader: SheetReader, onward: Onward): Promise<void> {
  const { organisationId, revisionId } = work;
  const own = and(eq(revisions.organisationId, organisationId), eq(revisions.id, revisionId), eq(revisions.state, 'waiting'));
  const [revision] = await database.inOrganisation(organisationId, (tx) => tx.select().from(revisions).where(own));
  if (!revision) return;
  // One after the other, so that the count never runs back; a lost count is no reason to stop reading.
  let counting: Promise<unknown> = Promise.resolve();
  const onPage = (page: number, pages: number): void => {
    counting = counting.then(() => database.inOrganisation(organisationId, (tx) => tx.update(revisions).set({ pages, pagesRead: page }).where(own))).catch((error: unknown) => log.warn({ err: error, revision: revisionId }, 'page count not kept'));
  };
  const reading = await readStored(revision.sha256);
  await counting;
  const readerState = reading?.state ?? 'unavailable';
  const goesOn = readerState === 'no-text-layer' && onward !== null;
  const found = reading && carriesValues(reading.state) ? reading : null;
  await database.inOrganisation(organisationId, async (tx) => {
    const kept = await tx
      .update(revisions)
      .set({
        state: goesOn ? 'waiting' : found ? 'read' : 'needs-entry',
        readerState,
        pages: reading?.pages || null,
        pagesRead: goesOn ? 0 : null,
        fields: found && fieldsFromReading(found),
        version: sql`${revisions.version} + 1`,
      })
      .where(own)
      .returning({ id: revisions.id });
    if (kept.length === 0) return;
    if (goesOn) await onward(tx, work);
    else if (found) await indexRevision(tx, revisionId, found.text);
  });
  log.info({ revision: revisionId, state: readerState, pages: reading?.pages }, 'sheet read');

  /** Null when the stored file is damaged or missing, which is for a person. */
  async function readStored(sha256: string): Promise<SheetReading | null> {
    try {
      return asPlainText(await reader.read(await storage.getVerified(objectKey(organisationId, sha256), sha256), onPage));
    } catch (error) {
      // Out of reach is tried again by the queue.
      if (!(error instanceof DamagedObjectError) && !(error instanceof Error && error.name === 'NoSuchKey')) throw error;
      return null;
    }
  }
}
