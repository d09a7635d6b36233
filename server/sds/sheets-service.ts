import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { open } from 'node:fs/promises';
import { and, eq, isNull, ne, or, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { sheetRequests } from '#drizzle/schema/library';
import { products, revisions } from '#drizzle/schema/sheets';
import { type Page } from '#shared/common';
import { neededMessage, neededToConfirm, type ConfirmSheet, type Revision, type RevisionSummary, type SheetEdit, type SheetFields, type SheetsQuery, type UploadedSheet } from '#shared/sheets';
import { type Deps } from '../deps';
import { ConflictError, InputError, NotFoundError, RefusedError, UnavailableError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { type UploadedFile } from '../http/mount';
import { toPage } from '../paging';
import { databaseErrorCode, type Tx } from '../platform/database';
import { DamagedObjectError } from '../platform/storage';
import { rememberCorrections } from '../corrections/corrections-service';
import { appendEntry } from '../recordlog/recordlog-store';
import { applyEdit } from './sheet-fields';
import { fieldsOf, findByHash, findRevision, hasValues, listRevisions, toRevision, toSummary, type RevisionRow } from './sheets-store';

export const objectKey = (organisationId: string, sha256: string) => `${organisationId}/${sha256}`;

export function sheetsService({ database, storage, queue, clock, log }: Deps) {
  const today = () => clock.now().toISOString().slice(0, 10);
  const readBack = async (tx: Tx, id: string): Promise<Revision> => toRevision(await findRevision(tx, id), today());

  /** Changes one revision under the version the person saw, or says what is stored now. */
  async function change(tx: Tx, id: string, version: number, values: Partial<typeof revisions.$inferInsert>): Promise<Revision> {
    const changed = await tx
      .update(revisions)
      .set({ ...values, version: sql`${revisions.version} + 1` })
      .where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.id, id), eq(revisions.version, version)))
      .returning({ id: revisions.id });
    if (changed.length === 0) throw new ConflictError('Somebody changed this sheet after you opened it. Compare, then do it again.', await readBack(tx, id));
    return readBack(tx, id);
  }
  const demandState = (row: RevisionRow, allowed: readonly string[], why: string) => {
    if (!allowed.includes(row.revision.state)) throw new RefusedError(why);
  };

  async function setAsideIn(tx: Tx, id: string, version: number): Promise<Revision> {
    demandState(await findRevision(tx, id), ['read', 'needs-entry', 'waiting'], 'Only a sheet that is not confirmed can be set aside.');
    return change(tx, id, version, { state: 'set-aside' });
  }

  return {
    list: (actor: PersonActor, query: z.output<typeof SheetsQuery>): Promise<Page<RevisionSummary>> =>
      database.inOrganisation(actor.organisationId, async (tx) => toPage(await listRevisions(tx, query), query.limit, ({ revision }) => [revision.uploadedAt.toISOString(), revision.id], toSummary)),

    read: (actor: PersonActor, id: string): Promise<Revision> => database.inOrganisation(actor.organisationId, (tx) => readBack(tx, id)),

    /**
     * Object first, row second: a row never points at an object that is not there. The same bytes are recognised within
     * the organisation, and sending them again heals a damaged object. What is not a PDF is kept and named, not refused.
     */
    async upload(actor: PersonActor, file: UploadedFile): Promise<UploadedSheet> {
      demandRole(actor, 'owner', 'safety-officer', 'crew-lead');
      if (file.byteLength === 0) throw new InputError('The file is empty. Save it again from where you got it, then add it here.', [{ path: 'file', message: 'This file has no bytes.' }]);
      const sha256 = await hashFile(file.path);
      const isPdf = await startsLikePdf(file.path);
      await storage.putFile(objectKey(actor.organisationId, sha256), file.path, file.byteLength, isPdf ? 'application/pdf' : 'application/octet-stream');
      return database.inOrganisation(actor.organisationId, async (tx) => {
        const id = newId();
        const added = await tx
          .insert(revisions)
          .values({
            organisationId: tx.organisationId,
            id,
            sha256,
            byteLength: file.byteLength,
            fileName: file.fileName,
            state: isPdf ? 'waiting' : 'needs-entry',
            readerState: isPdf ? null : 'not-a-pdf',
            uploadedBy: actor.personId,
            uploadedAt: clock.now(),
          })
          .onConflictDoNothing({ target: [revisions.organisationId, revisions.sha256] })
          .returning({ id: revisions.id });
        const row = await findByHash(tx, sha256);
        if (!row) throw new UnavailableError('The sheet was being added by somebody else. Add it again.');
        const isKnown = added.length === 0;
        if (!isKnown && isPdf) await queue.add(tx, 'read-sheet', { organisationId: tx.organisationId, revisionId: id });
        return { revision: toSummary(row), isKnown };
      });
    },

    /** Bytes whose hash is right, or a named refusal: a damaged file is never served as good. */
    async readFile(organisationId: string, id: string, mustBeConfirmed: boolean): Promise<{ bytes: Buffer; fileName: string; isPdf: boolean }> {
      const { revision } = await database.inOrganisation(organisationId, (tx) => findRevision(tx, id));
      if (mustBeConfirmed && revision.state !== 'confirmed') throw new NotFoundError('sheet');
      try {
        const bytes = await storage.getVerified(objectKey(organisationId, revision.sha256), revision.sha256);
        return { bytes, fileName: revision.fileName, isPdf: revision.readerState !== 'not-a-pdf' };
      } catch (error) {
        if (!(error instanceof DamagedObjectError) && !(error instanceof Error && error.name === 'NoSuchKey')) throw error;
        log.error({ revision: id, key: objectKey(organisationId, revision.sha256) }, 'stored file damaged or missing');
        throw new UnavailableError('The stored file is damaged or missing and is not shown. Add the same file again: it will be recognised and put right.');
      }
    },

    save: (actor: PersonActor, id: string, version: number, edit: SheetEdit): Promise<Revision> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const row = await findRevision(tx, id);
        demandState(row, ['read', 'needs-entry'], row.revision.state === 'waiting' ? 'This sheet is still being read. Wait until it is done.' : 'A confirmed sheet does not change. Add the corrected sheet as a new revision.');
        // First the values: who saw an older version is told so, and waits here for whoever saves at the same moment.
        const revision = await change(tx, id, version, { fields: applyEdit(fieldsOf(row), edit) });
        await rememberCorrections(tx, clock, actor, row, edit);
        return revision;
      }),

    /** From here on the sheet reaches crews: named person, named product, one current revision per product and language. */
    async confirm(actor: PersonActor, id: string, version: number, { fields: edit, product }: z.output<typeof ConfirmSheet>): Promise<Revision> {
      try {
        return await database.inOrganisation(actor.organisationId, async (tx) => {
          demandRole(actor, 'safety-officer');
          const row = await findRevision(tx, id);
          demandState(row, ['read', 'needs-entry'], row.revision.state === 'waiting' ? 'This sheet is still being read. Wait until it is done.' : 'This sheet was confirmed or set aside already.');
          const missing = neededToConfirm.filter((name) => edit[name] === null);
          if (missing.length > 0) throw new InputError('The sheet cannot be confirmed yet.', missing.map((name) => ({ path: `fields.${name}`, message: neededMessage })));
          const productId = 'id' in product ? await demandProduct(tx, product.id) : await makeProduct(tx, product);
          const language = edit.language as string;
          const own = and(eq(revisions.organisationId, tx.organisationId), eq(revisions.productId, productId), eq(revisions.language, language), eq(revisions.isCurrent, true));
          const [current] = await tx.select({ revisedOn: revisions.revisedOn }).from(revisions).where(and(own, ne(revisions.id, id)));
          const isCurrent = !current?.revisedOn || (edit.revisedOn as string) >= current.revisedOn;
          if (isCurrent) await tx.update(revisions).set({ isCurrent: false }).where(own);
          const fields: SheetFields = applyEdit(fieldsOf(row), edit);
          const confirmedAt = clock.now();
          const revision = await change(tx, id, version, { fields, productId, language, revisedOn: edit.revisedOn, isCurrent, state: 'confirmed', confirmedBy: actor.personId, confirmedAt });
          await rememberCorrections(tx, clock, actor, row, edit);
          // A request about a sheet that had no product, or that brought this one, knows its product from now on.
          await tx.update(sheetRequests).set({ productId }).where(and(eq(sheetRequests.organisationId, tx.organisationId), isNull(sheetRequests.productId), or(eq(sheetRequests.aboutRevisionId, id), eq(sheetRequests.revisionId, id))));
          await appendEntry(tx, clock, { kind: 'sheet-confirmed', subjectId: id, record: { revisionId: id, sha256: row.revision.sha256, productId, isCurrent, values: edit, confirmedBy: { id: actor.personId, name: actor.personName }, confirmedAt: confirmedAt.toISOString() } });
          return revision;
        });
      } catch (error) {
        if (databaseErrorCode(error) === '23505') throw new RefusedError('Somebody confirmed a sheet of this product at the same moment. Look at the library, then confirm again.');
        throw error;
      }
    },

    setAside: (actor: PersonActor, id: string, version: number): Promise<Revision> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        return setAsideIn(tx, id, version);
      }),
    /** In the transaction of who sends the sheet back. */
    setAsideIn,
    takeBack: (actor: PersonActor, id: string, version: number): Promise<Revision> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const row = await findRevision(tx, id);
        demandState(row, ['set-aside'], 'This sheet is not set aside.');
        const { readerState, pagesRead } = row.revision;
        const state = hasValues(readerState) ? 'read' : readerState === null || pagesRead !== null ? 'waiting' : 'needs-entry';
        if (state === 'waiting') await queue.add(tx, 'read-sheet', { organisationId: tx.organisationId, revisionId: id });
        return change(tx, id, version, { state });
      }),
    /** Reads the file once more, for example after the storage was out of reach. */
    readAgain: (actor: PersonActor, id: string): Promise<Revision> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const row = await findRevision(tx, id);
        demandState(row, ['needs-entry', 'waiting'], 'This sheet was read already.');
        if (row.revision.readerState === 'not-a-pdf') throw new RefusedError('This file is not a PDF: there is nothing to read. Fill the fields in by hand, or add the sheet as a PDF.');
        await queue.add(tx, 'read-sheet', { organisationId: tx.organisationId, revisionId: id });
        return change(tx, id, row.revision.version, { state: 'waiting', readerState: null, pagesRead: null });
      }),
  };
}
export type SheetsService = ReturnType<typeof sheetsService>;

async function demandProduct(tx: Tx, id: string): Promise<string> {
  const [found] = await tx.select({ id: products.id }).from(products).where(and(eq(products.organisationId, tx.organisationId), eq(products.id, id)));
  if (!found) throw new NotFoundError('product');
  return found.id;
}
/** The product of that name and supplier, made when it is new. */
export async function makeProduct(tx: Tx, { name, supplier }: { name: string; supplier: string }): Promise<string> {
  await tx.insert(products).values({ organisationId: tx.organisationId, id: newId(), name, supplier }).onConflictDoNothing({ target: [products.organisationId, products.name, products.supplier] });
  const [found] = await tx.select({ id: products.id }).from(products).where(and(eq(products.organisationId, tx.organisationId), eq(products.name, name), eq(products.supplier, supplier)));
  if (!found) throw new UnavailableError('The product could not be made. Try again.');
  return found.id;
}

async function hashFile(path: string): Promise<string> {
  const hash = createHash('sha256');
  for await (const chunk of createReadStream(path)) hash.update(chunk as Buffer);
  return hash.digest('hex');
}
async function startsLikePdf(path: string): Promise<boolean> {
  const file = await open(path);
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(5), 0, 5, 0);
    return bytesRead === 5 && buffer.toString('latin1') === '%PDF-';
  } finally {
    await file.close();
  }
}
