import { randomBytes } from 'node:crypto';
import { and, asc, eq, gt, lte, sql } from 'drizzle-orm';
import { recordlogCheckpoints, recordlogEntries, recordlogHeads, recordlogRecords } from '#drizzle/schema/recordlog';
import { type Clock } from '../platform/clock';
import { type Tx } from '../platform/database';
import { leafText, nextRecordedAt, recordHash, SALT_BYTES, type LeafKind } from './leaf';
import { leafHash } from './merkle';

export interface EntryDraft {
  readonly kind: LeafKind;
  /** Id of the row the entry stands for. */
  readonly subjectId: string;
  /** Serialised once, here; these bytes are what is hashed, kept and exported. */
  readonly record: Readonly<Record<string, unknown>>;
}

type Head = typeof recordlogHeads.$inferSelect;

/** Locks the organisation's head row until the transaction ends. Take it as late as can be: one organisation's writers queue here. */
export async function lockHead(tx: Tx): Promise<Head> {
  const own = eq(recordlogHeads.organisationId, tx.organisationId);
  const [head] = await tx.select().from(recordlogHeads).where(own).for('update');
  if (head) return head;
  await tx.insert(recordlogHeads).values({ organisationId: tx.organisationId, size: 0, lastRecordedAt: new Date(0) }).onConflictDoNothing();
  const [made] = await tx.select().from(recordlogHeads).where(own).for('update');
  if (!made) throw new Error('the record log has no head');
  return made;
}

/** Appends entries in order, the last thing a business transaction does. Returns the index of each. */
export async function appendEntries(tx: Tx, clock: Clock, drafts: readonly EntryDraft[], newAcknowledgements = 0): Promise<number[]> {
  if (drafts.length === 0) return [];
  const head = await lockHead(tx);
  let recordedAt = head.size === 0 ? undefined : head.lastRecordedAt.toISOString();
  const rows = drafts.map(({ kind, subjectId, record }, at) => {
    const salt = randomBytes(SALT_BYTES);
    const bytes = Buffer.from(JSON.stringify(record));
    recordedAt = nextRecordedAt(clock.now(), recordedAt);
    const leaf = leafText({ kind, recordedAt, recordHash: recordHash(salt, bytes) });
    const index = head.size + at;
    return { entry: { organisationId: tx.organisationId, index, kind, subjectId, recordedAt: new Date(recordedAt), leaf, leafHash: leafHash(Buffer.from(leaf)) }, record: { organisationId: tx.organisationId, index, salt, bytes } };
  });
  await tx.insert(recordlogEntries).values(rows.map((row) => row.entry));
  await tx.insert(recordlogRecords).values(rows.map((row) => row.record));
  await tx
    .update(recordlogHeads)
    .set({ size: head.size + rows.length, lastRecordedAt: new Date(recordedAt as string), acknowledgementCount: sql`${recordlogHeads.acknowledgementCount} + ${newAcknowledgements}` })
    .where(eq(recordlogHeads.organisationId, tx.organisationId));
  return rows.map((row) => row.entry.index);
}
export const appendEntry = async (tx: Tx, clock: Clock, draft: EntryDraft): Promise<number> => (await appendEntries(tx, clock, [draft]))[0] as number;

/** Leaf hashes of the first `size` entries. */
export async function readLeafHashes(tx: Tx, size: number): Promise<Buffer[]> {
  const rows = await tx
    .select({ leafHash: recordlogEntries.leafHash })
    .from(recordlogEntries)
    .where(and(eq(recordlogEntries.organisationId, tx.organisationId), lte(recordlogEntries.index, size - 1)))
    .orderBy(asc(recordlogEntries.index));
  return rows.map((row) => row.leafHash);
}

export interface StoredEntry {
  readonly index: number;
  readonly leaf: string;
  readonly leafHash: Buffer;
  readonly salt: Buffer | null;
  readonly record: Buffer | null;
}
/** Entries after `after`, at most `limit`, in order: for exports in pieces. */
export async function readEntries(tx: Tx, after: number, upTo: number, limit: number): Promise<StoredEntry[]> {
  return tx
    .select({ index: recordlogEntries.index, leaf: recordlogEntries.leaf, leafHash: recordlogEntries.leafHash, salt: recordlogRecords.salt, record: recordlogRecords.bytes })
    .from(recordlogEntries)
    .leftJoin(recordlogRecords, and(eq(recordlogRecords.organisationId, recordlogEntries.organisationId), eq(recordlogRecords.index, recordlogEntries.index)))
    .where(and(eq(recordlogEntries.organisationId, tx.organisationId), gt(recordlogEntries.index, after), lte(recordlogEntries.index, upTo)))
    .orderBy(asc(recordlogEntries.index))
    .limit(limit);
}

/** Signed notes, smallest first. */
export const readCheckpoints = (tx: Tx) => tx.select().from(recordlogCheckpoints).where(eq(recordlogCheckpoints.organisationId, tx.organisationId)).orderBy(asc(recordlogCheckpoints.size));
