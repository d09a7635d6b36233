import { createHash } from 'node:crypto';
import { and, eq, getTableColumns, inArray, sql } from 'drizzle-orm';
import { type Checklist } from '#compliance/answer';
import { acknowledgements, correctiveActions } from '#drizzle/schema/acknowledgements';
import { answerSets, checklistPeople, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { exposureBases } from '#drizzle/schema/jobs';
import { recordlogEntries, recordlogHeads, recordlogRecords } from '#drizzle/schema/recordlog';
import { revisions } from '#drizzle/schema/sheets';
import { pinEvents } from '#drizzle/schema/pins';
import { deliveries } from '#drizzle/schema/tablets';
import { type Config } from '../config';
import { type Database, type Tx } from '../platform/database';
import { findFalsePin } from './kept-pins-check';
import { parseLeaf, type LeafKind } from './leaf';
import { acknowledgementDiffers, actionDiffers, answersDiffer, basisDiffers, pinDiffers, sheetDiffers, versionDiffers, type ShownAcknowledgement, type ShownVersion } from './shown-rows';

const entriesAtOnce = 500;
type Recorded = Readonly<Record<string, unknown>>;
type Entry = Pick<typeof recordlogEntries.$inferSelect, 'index' | 'kind' | 'subjectId' | 'leaf'> & { readonly record: Buffer | null };

/** How the rows of one kind of entry are read and held against the record. */
interface Rows {
  /** Where pages show it. */
  readonly where: string;
  read(tx: Tx, ids: string[]): Promise<ReadonlyMap<string, unknown>>;
  differs(recorded: Recorded, shown: never): string | undefined;
}
const rowsOf: Readonly<Partial<Record<LeafKind, Rows>>> = {
  acknowledgement: { where: 'history', read: readAcknowledgements, differs: acknowledgementDiffers },
  briefing: { where: 'answers', read: readAnswers, differs: answersDiffer },
  'start-check': { where: 'answers', read: readAnswers, differs: answersDiffer },
  'corrective-action': { where: 'corrective actions', read: readActions, differs: actionDiffers },
  'checklist-version': { where: 'published checklists', read: readVersions, differs: versionDiffers },
  pin: { where: 'list of PINs', read: readPinEvents, differs: pinDiffers },
  'exposure-basis': { where: 'signed bases', read: readBases, differs: basisDiffers },
  'sheet-confirmed': { where: 'library', read: readSheets, differs: sheetDiffers },
};
/** Where a record names what it is about. */
const idIn = (record: Recorded): unknown => record['id'] ?? record['versionId'] ?? record['revisionId'];

/**
 * The first place where rows that pages show are not what the log recorded, in words; null when there is none. Whoever
 * owns the database could change such a row and leave the log alone: the log's own check would not see it.
 */
export async function findFalseRow(database: Database, keys: Config['keys'], organisationId: string): Promise<string | null> {
  for (let after = -1; ; ) {
    const found = await database.inOrganisation(organisationId, async (tx) => {
      const entries = await readEntriesWithSubjects(tx, after);
      return { last: entries.at(-1)?.index, trouble: await falseAmong(tx, entries) };
    });
    if (found.trouble) return found.trouble;
    if (found.last === undefined) break;
    after = found.last;
  }
  return database.inOrganisation(organisationId, async (tx) => (await findUnrecordedRow(tx)) ?? findFalsePin(tx, keys));
}

function readEntriesWithSubjects(tx: Tx, after: number): Promise<Entry[]> {
  const { index, kind, subjectId, leaf } = recordlogEntries;
  return tx
    .select({ index, kind, subjectId, leaf, record: recordlogRecords.bytes })
    .from(recordlogEntries)
    .leftJoin(recordlogRecords, and(eq(recordlogRecords.organisationId, recordlogEntries.organisationId), eq(recordlogRecords.index, recordlogEntries.index)))
    .where(and(eq(recordlogEntries.organisationId, tx.organisationId), sql`${recordlogEntries.index} > ${after}`))
    .orderBy(recordlogEntries.index)
    .limit(entriesAtOnce);
}

async function falseAmong(tx: Tx, entries: readonly Entry[]): Promise<string | undefined> {
  const shown = new Map<string, ReadonlyMap<string, unknown>>();
  for (const [kind, rows] of Object.entries(rowsOf)) {
    const ids = entries.filter((entry) => entry.kind === kind).map((entry) => entry.subjectId);
    if (ids.length > 0) shown.set(kind, await rows.read(tx, ids));
  }
  for (const { index, kind, subjectId, leaf, record } of entries) {
    const rows = rowsOf[kind as LeafKind];
    const row = shown.get(kind)?.get(subjectId);
    // After retention both are gone; a row that outlived its record can no longer be vouched for.
    if (record === null && row === undefined) continue;
    if (record === null) return `Entry ${index}: its record is gone, but the ${rows?.where ?? 'service'} still shows a row of it.`;
    const recorded = JSON.parse(record.toString()) as Recorded;
    if (parseLeaf(leaf).kind !== kind || (rows && String(idIn(recorded)).toLowerCase() !== subjectId)) return `Entry ${index} is filed under another record than its own.`;
    if (!rows) continue;
    if (row === undefined) return `Entry ${index} is recorded, but its row is missing from the ${rows.where}.`;
    const field = kind === 'acknowledgement' && (row as { entryIndex: number }).entryIndex !== index ? 'its number' : rows.differs(recorded, row as never);
    if (field) return `Entry ${index}: the ${rows.where} ${rows.where.endsWith('s') ? 'do' : 'does'} not show what was recorded: ${field} was changed.`;
  }
  return undefined;
}

/** Rows that nobody recorded, and the counter that the history's total comes from. */
async function findUnrecordedRow(tx: Tx): Promise<string | null> {
  const { rows } = await tx.execute<{ place: string; id: string }>(sql`
    SELECT place, id FROM (
      SELECT 'history' AS place, a.id, a.organisation_id, ARRAY['acknowledgement'] AS kinds, 1 AS wanted FROM acknowledgements a
      UNION ALL SELECT 'answers', s.id, s.organisation_id, ARRAY['briefing', 'start-check'], 1 FROM answer_sets s
      UNION ALL SELECT 'corrective actions', c.id, c.organisation_id, ARRAY['corrective-action'], CASE WHEN c.resolved_at IS NULL THEN 1 ELSE 2 END FROM corrective_actions c
      UNION ALL SELECT 'published checklists', v.id, v.organisation_id, ARRAY['checklist-version'], 1 FROM checklist_versions v
      UNION ALL SELECT 'list of PINs', p.id, p.organisation_id, ARRAY['pin'], 1 FROM pin_events p
      UNION ALL SELECT 'signed bases', b.id, b.organisation_id, ARRAY['exposure-basis'], 1 FROM exposure_bases b
      UNION ALL SELECT 'library', r.id, r.organisation_id, ARRAY['sheet-confirmed'], 1 FROM revisions r WHERE r.state = 'confirmed'
    ) shown
    WHERE (SELECT count(*) FROM recordlog_entries e WHERE e.organisation_id = shown.organisation_id AND e.subject_id = shown.id AND e.kind = ANY (shown.kinds)) < shown.wanted
    LIMIT 1`);
  const [first] = rows;
  if (first) return `The ${first.place} show${first.place.endsWith('s') ? '' : 's'} a row that was never recorded: ${first.id}.`;
  const [head] = await tx.select({ counted: recordlogHeads.acknowledgementCount, stored: sql<number>`(SELECT count(*)::float8 FROM acknowledgements)` }).from(recordlogHeads);
  return head && head.counted !== head.stored ? `The history's total says ${head.counted}, it holds ${head.stored}.` : null;
}

const byId = <Row extends { readonly id: string }>(rows: readonly Row[]): ReadonlyMap<string, Row> => new Map(rows.map((row) => [row.id, row]));
const deliveredHash = sql<string | null>`encode(sha256(${deliveries.bytes}), 'hex')`;

async function readAcknowledgements(tx: Tx, ids: string[]): Promise<ReadonlyMap<string, ShownAcknowledgement>> {
  const { strokes, ...columns } = getTableColumns(acknowledgements);
  const rows = await tx
    .select({ ...columns, strokesSha256: sql<string>`encode(sha256(convert_to(${strokes}, 'UTF8')), 'hex')`, envelopeSha256: deliveredHash })
    .from(acknowledgements)
    .leftJoin(deliveries, and(eq(deliveries.organisationId, acknowledgements.organisationId), eq(deliveries.id, acknowledgements.deliveryId)))
    .where(and(eq(acknowledgements.organisationId, tx.organisationId), inArray(acknowledgements.id, ids)));
  return byId(rows);
}
async function readAnswers(tx: Tx, ids: string[]) {
  const rows = await tx
    .select({ ...getTableColumns(answerSets), envelopeSha256: deliveredHash })
    .from(answerSets)
    .leftJoin(deliveries, and(eq(deliveries.organisationId, answerSets.organisationId), eq(deliveries.id, answerSets.deliveryId)))
    .where(and(eq(answerSets.organisationId, tx.organisationId), inArray(answerSets.id, ids)));
  return byId(rows);
}
async function readPinEvents(tx: Tx, ids: string[]) {
  const rows = await tx
    .select({ ...getTableColumns(pinEvents), envelopeSha256: deliveredHash })
    .from(pinEvents)
    .leftJoin(deliveries, and(eq(deliveries.organisationId, pinEvents.organisationId), eq(deliveries.id, pinEvents.deliveryId)))
    .where(and(eq(pinEvents.organisationId, tx.organisationId), inArray(pinEvents.id, ids)));
  return byId(rows);
}
async function readActions(tx: Tx, ids: string[]) {
  return byId(await tx.select().from(correctiveActions).where(and(eq(correctiveActions.organisationId, tx.organisationId), inArray(correctiveActions.id, ids))));
}
async function readBases(tx: Tx, ids: string[]) {
  return byId(await tx.select().from(exposureBases).where(and(eq(exposureBases.organisationId, tx.organisationId), inArray(exposureBases.id, ids))));
}
async function readSheets(tx: Tx, ids: string[]) {
  return byId(await tx.select().from(revisions).where(and(eq(revisions.organisationId, tx.organisationId), inArray(revisions.id, ids))));
}

async function readVersions(tx: Tx, ids: string[]): Promise<ReadonlyMap<string, ShownVersion & { readonly id: string }>> {
  const rows = await tx.select().from(checklistVersions).where(and(eq(checklistVersions.organisationId, tx.organisationId), inArray(checklistVersions.id, ids)));
  const texts = await tx
    .select({ versionId: checklistTexts.versionId, language: checklistTexts.language, sha256: checklistTexts.sha256, bytesSha256: sql<string>`encode(sha256(${checklistTexts.bytes}), 'hex')` })
    .from(checklistTexts)
    .where(and(eq(checklistTexts.organisationId, tx.organisationId), inArray(checklistTexts.versionId, ids)));
  const asked = await tx.select().from(checklistPeople).where(and(eq(checklistPeople.organisationId, tx.organisationId), inArray(checklistPeople.versionId, ids)));
  const person = ({ personId, name, language }: { personId: string; name: string; language: string }) => `${personId} ${name} ${language}`;
  return byId(
    rows.map(({ facts, checklist, factsSha256, ...row }) => {
      const own = texts.filter((text) => text.versionId === row.id);
      return {
        ...row,
        hashes: { 'facts.json': sha256(facts), 'checklist.json': sha256(checklist), ...Object.fromEntries(own.map((text) => [`text.${text.language}.json`, text.bytesSha256])) },
        claimed: { 'facts.json': factsSha256, ...Object.fromEntries(own.map((text) => [`text.${text.language}.json`, text.sha256])) },
        peopleInChecklist: peopleIn(checklist).map(person).sort(),
        peopleAsked: asked.filter((each) => each.versionId === row.id).map(person).sort(),
      };
    }),
  );
}
/** None when the bytes are no longer a checklist; their hash then says so. */
function peopleIn(checklist: Buffer): Checklist['people'] {
  try {
    return (JSON.parse(checklist.toString()) as Checklist).people;
  } catch {
    return [];
  }
}
const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');
