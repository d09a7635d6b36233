import { and, eq, sql } from 'drizzle-orm';
import { revisions } from '#drizzle/schema/sheets';
import { type Deps } from '../deps';
import { type Work } from '../platform/queue';
import { DamagedObjectError } from '../platform/storage';
import { indexRevision } from '../search/search-store';
import { type SheetReading } from './reader/reading';
import { asPlainText, fieldsFromReading } from './sheet-fields';
import { objectKey } from './sheets-service';

export interface SheetReader {
  read(bytes: Uint8Array): Promise<SheetReading>;
  close(): Promise<void>;
}

/** Reads one waiting sheet. Safe to run again: a revision that is no longer waiting is left alone. */
export const readSheetWork =
  ({ database, storage, log }: Deps, reader: SheetReader) =>
  async ({ organisationId, revisionId }: Work['read-sheet']): Promise<void> => {
    const own = and(eq(revisions.organisationId, organisationId), eq(revisions.id, revisionId), eq(revisions.state, 'waiting'));
    const [revision] = await database.inOrganisation(organisationId, (tx) => tx.select().from(revisions).where(own));
    if (!revision) return;
    const { text, ...outcome } = await readStored();
    await database.inOrganisation(organisationId, async (tx) => {
      const kept = await tx.update(revisions).set({ ...outcome, version: sql`${revisions.version} + 1` }).where(own).returning({ id: revisions.id });
      if (text !== null && kept.length > 0) await indexRevision(tx, revisionId, text);
    });
    log.info({ revision: revisionId, state: outcome.readerState, pages: outcome.pages }, 'sheet read');

    async function readStored(): Promise<Pick<typeof revisions.$inferInsert, 'state' | 'readerState' | 'pages' | 'fields'> & { readerState: string; text: string | null }> {
      try {
        const bytes = await storage.getVerified(objectKey(organisationId, revision!.sha256), revision!.sha256);
        const reading = asPlainText(await reader.read(bytes));
        const isRead = reading.state === 'read';
        return { state: isRead ? 'read' : 'needs-entry', readerState: reading.state, pages: reading.pages || null, fields: isRead ? fieldsFromReading(reading) : null, text: isRead ? reading.text : null };
      } catch (error) {
        // Out of reach is tried again by the queue; a damaged or missing object is for a person.
        if (!(error instanceof DamagedObjectError) && !(error instanceof Error && error.name === 'NoSuchKey')) throw error;
        return { state: 'needs-entry', readerState: 'unavailable', pages: null, fields: null, text: null };
      }
    }
  };
