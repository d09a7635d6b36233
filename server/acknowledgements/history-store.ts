import { and, asc, between, desc, eq, getTableColumns, gte, lt, lte, type SQL } from 'drizzle-orm';
import type * as z from 'zod';
import { acknowledgements } from '#drizzle/schema/acknowledgements';
import { checklistTexts } from '#drizzle/schema/checklists';
import { jobs } from '#drizzle/schema/jobs';
import { recordlogEntries, recordlogHeads } from '#drizzle/schema/recordlog';
import { type AcknowledgementRow, type HistoryExportQuery, type HistoryQuery } from '#shared/acknowledgements';
import { NotFoundError } from '../errors';
import { readCursor } from '../paging';
import { type Tx } from '../platform/database';

export type AcknowledgementRecord = typeof acknowledgements.$inferSelect & { readonly timeZone: string };
export const foundCap = 1_000;

export const toRow = (row: AcknowledgementRecord): AcknowledgementRow => ({
  id: row.id,
  capturedAt: row.capturedAt.toISOString(),
  receivedAt: row.receivedAt.toISOString(),
  personId: row.personId,
  personName: row.personName,
  jobId: row.jobId,
  jobName: row.jobName,
  timeZone: row.timeZone,
  shiftDate: row.shiftDate,
  versionNumber: row.versionNumber,
  language: row.language as AcknowledgementRow['language'],
  kind: row.kind as AcknowledgementRow['kind'],
  pinState: row.pinState as AcknowledgementRow['pinState'],
  wasSuperseded: row.wasSuperseded,
  tabletName: row.tabletName,
  timeDoubt: row.timeDoubt as AcknowledgementRow['timeDoubt'],
  entryIndex: row.entryIndex,
});

const ofJob = and(eq(jobs.organisationId, acknowledgements.organisationId), eq(jobs.id, acknowledgements.jobId));
const columns = { ...getTableColumns(acknowledgements), timeZone: jobs.timeZone };

type Filter = z.output<typeof HistoryExportQuery>;
const matching = (tx: Tx, { jobId, personId, from, to, kind }: Filter): SQL | undefined =>
  and(
    eq(acknowledgements.organisationId, tx.organisationId),
    jobId ? eq(acknowledgements.jobId, jobId) : undefined,
    personId ? eq(acknowledgements.personId, personId) : undefined,
    from && to ? between(acknowledgements.shiftDate, from, to) : from ? gte(acknowledgements.shiftDate, from) : to ? lte(acknowledgements.shiftDate, to) : undefined,
    kind ? eq(acknowledgements.kind, kind) : undefined,
  );

/** Newest entry first. */
export async function listHistory(tx: Tx, query: z.output<typeof HistoryQuery>): Promise<AcknowledgementRecord[]> {
  const cursor = readCursor(query.after, 'index');
  return tx
    .select(columns)
    .from(acknowledgements)
    .innerJoin(jobs, ofJob)
    .where(and(matching(tx, query), cursor ? lt(acknowledgements.entryIndex, Number(cursor[0])) : undefined))
    .orderBy(desc(acknowledgements.entryIndex))
    .limit(query.limit + 1);
}
/** How many match, counted no further than the cap. */
export async function countFound(tx: Tx, query: Filter): Promise<number> {
  const rows = await tx.select({ entryIndex: acknowledgements.entryIndex }).from(acknowledgements).where(matching(tx, query)).limit(foundCap + 1);
  return rows.length;
}
/** Kept in the log's head, so that it costs one row. */
export async function totalAcknowledgements(tx: Tx): Promise<number> {
  const [head] = await tx.select({ total: recordlogHeads.acknowledgementCount }).from(recordlogHeads);
  return head?.total ?? 0;
}
/** Oldest first, in pieces: for exports. */
export const readHistoryAfter = (tx: Tx, query: Filter, after: number, limit: number): Promise<AcknowledgementRecord[]> =>
  tx
    .select(columns)
    .from(acknowledgements)
    .innerJoin(jobs, ofJob)
    .where(and(matching(tx, query), gte(acknowledgements.entryIndex, after + 1)))
    .orderBy(asc(acknowledgements.entryIndex))
    .limit(limit);

export async function findAcknowledgement(tx: Tx, id: string): Promise<{ row: AcknowledgementRecord; text: Buffer; leaf: string; leafHash: Buffer }> {
  const [found] = await tx
    .select({ row: columns, text: checklistTexts.bytes, leaf: recordlogEntries.leaf, leafHash: recordlogEntries.leafHash })
    .from(acknowledgements)
    .innerJoin(jobs, ofJob)
    .innerJoin(checklistTexts, and(eq(checklistTexts.organisationId, acknowledgements.organisationId), eq(checklistTexts.versionId, acknowledgements.versionId), eq(checklistTexts.language, acknowledgements.language)))
    .innerJoin(recordlogEntries, and(eq(recordlogEntries.organisationId, acknowledgements.organisationId), eq(recordlogEntries.index, acknowledgements.entryIndex)))
    .where(and(eq(acknowledgements.organisationId, tx.organisationId), eq(acknowledgements.id, id)));
  if (!found) throw new NotFoundError('acknowledgement');
  return found;
}
