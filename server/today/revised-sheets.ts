import { and, desc, eq, inArray, ne } from 'drizzle-orm';
import { kitParts, products, revisions } from '#drizzle/schema/sheets';
import { type Shift } from '#shared/jobs';
import { type SheetFields } from '#shared/sheets';
import { type TodayItem } from '#shared/today';
import { changesBetween } from '../library/reach-service';
import { type Tx } from '../platform/database';

const counted = (n: number, one: string, many: string) => `${n} ${n === 1 ? one : many}`;

/**
 * Published shifts whose text a sheet changed that was confirmed after they were published: one item a sheet, because one
 * action on its page publishes them all. `shiftIds` need no item of their own.
 */
export async function revisedSheets(tx: Tx, shifts: readonly Shift[]): Promise<{ items: TodayItem[]; shiftIds: ReadonlySet<string> }> {
  const changed = shifts.filter((shift) => shift.hasUnpublishedChanges && shift.versions.length > 0);
  const kitIds = [...new Set(changed.flatMap((shift) => shift.plan.kits.map(({ kitId }) => kitId)))];
  if (kitIds.length === 0) return { items: [], shiftIds: new Set() };
  const rows = await tx
    .select({ kitId: kitParts.kitId, revision: revisions, productName: products.name })
    .from(kitParts)
    .innerJoin(products, and(eq(products.organisationId, kitParts.organisationId), eq(products.id, kitParts.productId)))
    .innerJoin(revisions, and(eq(revisions.organisationId, kitParts.organisationId), eq(revisions.productId, kitParts.productId), eq(revisions.isCurrent, true)))
    .where(and(eq(kitParts.organisationId, tx.organisationId), inArray(kitParts.kitId, kitIds)));
  const shiftIds = new Set<string>();
  const items: TodayItem[] = [];
  for (const { revision, productName } of new Map(rows.map((row) => [row.revision.id, row])).values()) {
    const { id } = revision;
    const inKits = new Set(rows.filter((row) => row.revision.id === id).map(({ kitId }) => kitId));
    const touched = changed.filter((shift) => shift.plan.kits.some(({ kitId }) => inKits.has(kitId)) && (revision.confirmedAt?.toISOString() ?? '') > (shift.versions[0]?.publishedAt ?? ''));
    if (touched.length === 0) continue;
    for (const shift of touched) shiftIds.add(shift.id);
    const signed = touched.reduce((sum, shift) => sum + (shift.versions[0]?.asked.filter(({ state }) => state === 'signed').length ?? 0), 0);
    const jobs = new Set(touched.map(({ jobId }) => jobId)).size;
    items.push({ id: `revised-${id}`, level: 'stop', label: 'Sign again', text: `${productName}: ${await newsOf(tx, revision)}`, detail: `${counted(jobs, 'open job', 'open jobs')}, ${counted(signed, 'signature', 'signatures')} on the older sheet.`, aside: revision.revisedOn ? `sheet of ${revision.revisedOn}` : '', link: `/sheets/${id}`, linkText: 'See what changed' });
  }
  return { items, shiftIds };
}

async function newsOf(tx: Tx, revision: typeof revisions.$inferSelect): Promise<string> {
  const [previous] = await tx
    .select({ fields: revisions.fields })
    .from(revisions)
    .where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.productId, revision.productId ?? ''), eq(revisions.language, revision.language ?? 'en'), eq(revisions.state, 'confirmed'), ne(revisions.id, revision.id)))
    .orderBy(desc(revisions.revisedOn), desc(revisions.confirmedAt))
    .limit(1);
  const hazards = previous && changesBetween(previous.fields as SheetFields, revision.fields as SheetFields).find(({ field }) => field === 'hazardCodes');
  return hazards && hazards.added.length > 0 ? `the new sheet adds ${hazards.added.join(', ')}` : 'a new sheet is in use';
}
