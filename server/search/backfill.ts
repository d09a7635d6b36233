import { and, asc, eq, gt, inArray, isNull } from 'drizzle-orm';
import { sheetSearch } from '#drizzle/schema/search';
import { revisions } from '#drizzle/schema/sheets';
import { type Deps } from '../deps';
import { type Tx } from '../platform/database';
import { DamagedObjectError } from '../platform/storage';
import { carriesValues } from '../sds/reader/reading';
import { asPlainText } from '../sds/sheet-fields';
import { objectKey } from '../sds/sheets-service';
import { type SheetReader } from '../sds/sheets-work';
import { indexRevision } from './search-store';

const batch = 50;

/**
 * Gives sheets that were read before their text was kept a text to be found by. Only that: what was read of them, and what
 * a person made of it, stays. Resumable, because a sheet that was looked at has a text, be it an empty one; an ended
 * process goes on where it was. Answers how many were looked at; rejects while the storage is out of reach.
 */
export function searchBackfill({ database, storage, log }: Pick<Deps, 'database' | 'storage' | 'log'>, readers: { readonly text: SheetReader; readonly pictures: SheetReader }) {
  const without = (tx: Tx, after: string) =>
    tx
      .select({ id: revisions.id, sha256: revisions.sha256, readerState: revisions.readerState })
      .from(revisions)
      .leftJoin(sheetSearch, and(eq(sheetSearch.organisationId, revisions.organisationId), eq(sheetSearch.revisionId, revisions.id)))
      .where(and(eq(revisions.organisationId, tx.organisationId), inArray(revisions.readerState, ['read', 'read-by-ocr']), inArray(revisions.state, ['read', 'confirmed', 'set-aside']), isNull(sheetSearch.fullText), gt(revisions.id, after)))
      .orderBy(asc(revisions.id))
      .limit(batch);

  return async (isStopped: () => boolean = () => false): Promise<number> => {
    let looked = 0;
    for (const { door_organisations: organisationId } of await database.atTheDoor<{ door_organisations: string }>('SELECT door_organisations()', [])) {
      for (let after = '00000000-0000-0000-0000-000000000000'; ; ) {
        const rows = await database.inOrganisation(organisationId, (tx) => without(tx, after));
        for (const row of rows) {
          if (isStopped()) return looked;
          const text = await textOf(organisationId, row);
          await database.inOrganisation(organisationId, (tx) => indexRevision(tx, row.id, text));
          looked += 1;
        }
        const last = rows.at(-1);
        if (!last || rows.length < batch) break;
        after = last.id;
      }
    }
    if (looked > 0) log.info({ sheets: looked }, 'older sheets can be found by their text');
    return looked;
  };

  /** Empty when the stored file is damaged, gone or no longer readable: looked at once is enough. */
  async function textOf(organisationId: string, { sha256, readerState }: { sha256: string; readerState: string | null }): Promise<string> {
    try {
      const bytes = await storage.getVerified(objectKey(organisationId, sha256), sha256);
      const reading = await (readerState === 'read-by-ocr' ? readers.pictures : readers.text).read(bytes);
      return carriesValues(reading.state) ? asPlainText(reading.text) : '';
    } catch (error) {
      if (error instanceof DamagedObjectError || (error instanceof Error && error.name === 'NoSuchKey')) return '';
      throw error;
    }
  }
}
