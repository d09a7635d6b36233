import { and, desc, eq, ilike, inArray, lt, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type * as z from 'zod';
import { people } from '#drizzle/schema/people';
import { products, revisions } from '#drizzle/schema/sheets';
import { type Revision, type RevisionSummary, type SheetFields, type SheetsQuery } from '#shared/sheets';
import { NotFoundError } from '../errors';
import { readCursor } from '../paging';
import { type Tx } from '../platform/database';
import { countToLookAt, noFields, remarksOn } from './sheet-fields';

const uploader = alias(people, 'uploader');
const confirmer = alias(people, 'confirmer');

const selectRevisions = (tx: Tx) =>
  tx
    .select({ revision: revisions, productName: products.name, supplier: products.supplier, uploadedByName: uploader.name, confirmedByName: confirmer.name })
    .from(revisions)
    .leftJoin(products, and(eq(products.organisationId, revisions.organisationId), eq(products.id, revisions.productId)))
    .innerJoin(uploader, and(eq(uploader.organisationId, revisions.organisationId), eq(uploader.id, revisions.uploadedBy)))
    .leftJoin(confirmer, and(eq(confirmer.organisationId, revisions.organisationId), eq(confirmer.id, revisions.confirmedBy)));
export type RevisionRow = Awaited<ReturnType<typeof selectRevisions>>[number];

export const fieldsOf = (row: RevisionRow): SheetFields => (row.revision.fields as SheetFields | null) ?? noFields();

/** Whether the reader found values, in text or in pictures of the pages. */
export const hasValues = (readerState: string | null): boolean => readerState === 'read' || readerState === 'read-by-ocr';

export function toSummary(row: RevisionRow): RevisionSummary {
  const { revision } = row;
  const fields = fieldsOf(row);
  return {
    id: revision.id,
    fileName: revision.fileName,
    sha256: revision.sha256,
    byteLength: revision.byteLength,
    pages: revision.pages,
    pagesRead: revision.pagesRead,
    state: revision.state as RevisionSummary['state'],
    readerState: revision.readerState as RevisionSummary['readerState'],
    productId: revision.productId,
    productName: row.productName ?? fields.productName?.value ?? null,
    supplier: row.supplier ?? fields.supplier?.value ?? null,
    revisedOn: revision.revisedOn ?? fields.revisedOn?.value ?? null,
    language: revision.language ?? fields.language?.value ?? null,
    toLookAt: revision.state === 'read' ? countToLookAt(fields) : 0,
    isCurrent: revision.isCurrent,
    uploadedAt: revision.uploadedAt.toISOString(),
    uploadedBy: row.uploadedByName,
    confirmedAt: revision.confirmedAt?.toISOString() ?? null,
    confirmedBy: row.confirmedByName,
    version: revision.version,
  };
}
export const toRevision = (row: RevisionRow, today: string): Revision => {
  const fields = fieldsOf(row);
  const isFilled = row.revision.state !== 'waiting' && (hasValues(row.revision.readerState) || row.revision.state === 'confirmed');
  return { ...toSummary(row), fields, remarks: isFilled ? remarksOn(fields, today) : [] };
};

export async function findRevision(tx: Tx, id: string): Promise<RevisionRow> {
  const [row] = await selectRevisions(tx).where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.id, id)));
  if (!row) throw new NotFoundError('sheet');
  return row;
}
/** In no order; those that are not there are left out. */
export const findRevisions = async (tx: Tx, ids: readonly string[]): Promise<RevisionRow[]> =>
  ids.length === 0 ? [] : selectRevisions(tx).where(and(eq(revisions.organisationId, tx.organisationId), inArray(revisions.id, [...ids])));
export const findByHash = async (tx: Tx, sha256: string): Promise<RevisionRow | undefined> =>
  (await selectRevisions(tx).where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.sha256, sha256))))[0];

/** Newest first. Text is looked for in file name, product and supplier. */
export function listRevisions(tx: Tx, { after, limit, state, q, productId }: z.output<typeof SheetsQuery>): Promise<RevisionRow[]> {
  const cursor = readCursor(after, 'instant', 'id');
  const like = q ? `%${q.replace(/[\\%_]/g, '\\$&')}%` : undefined;
  return selectRevisions(tx)
    .where(
      and(
        eq(revisions.organisationId, tx.organisationId),
        state ? eq(revisions.state, state) : undefined,
        productId ? eq(revisions.productId, productId) : undefined,
        like ? or(ilike(revisions.fileName, like), ilike(products.name, like), ilike(products.supplier, like), sql`${revisions.fields} -> 'productName' ->> 'value' ILIKE ${like}`) : undefined,
        cursor ? or(lt(revisions.uploadedAt, new Date(String(cursor[0]))), and(eq(revisions.uploadedAt, new Date(String(cursor[0]))), lt(revisions.id, String(cursor[1])))) : undefined,
      ),
    )
    .orderBy(desc(revisions.uploadedAt), desc(revisions.id))
    .limit(limit + 1);
}
