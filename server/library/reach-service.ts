import { and, asc, desc, eq, gte, inArray, lt, ne, or } from 'drizzle-orm';
import type * as z from 'zod';
import { singleCodes } from '#compliance/hazcom/statements';
import { type SheetFacts } from '#compliance/facts';
import { jobs, shiftKits, shifts } from '#drizzle/schema/jobs';
import { productUses } from '#drizzle/schema/library';
import { kitParts, kits, products, revisions } from '#drizzle/schema/sheets';
import { type Page } from '#shared/common';
import { type AppliedRevision, type FieldChange, type ProductUse, type ProductUsesQuery, type Reach } from '#shared/library';
import { type SheetFields } from '#shared/sheets';
import { type ChecklistsService } from '../checklists/checklists-service';
import { type Deps } from '../deps';
import { KneeboardError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { localDate } from '../jobs/jobs-service';
import { draftChecklist, readShift } from '../jobs/shift-store';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { sheetFactsOf } from '../products/products-service';
import { fieldsOf, findRevision, type RevisionRow } from '../sds/sheets-store';

export function reachService({ database, clock }: Deps, checklists: ChecklistsService) {
  return {
    /** Before confirming: what the sheet would touch. Afterwards: what it touches. */
    read: (actor: PersonActor, revisionId: string): Promise<Reach> => database.inOrganisation(actor.organisationId, (tx) => reachOf(tx, revisionId)),

    /** Publishes every published checklist that the confirmed sheet changed. One that cannot be published is named; the others go on. */
    async apply(actor: PersonActor, revisionId: string): Promise<AppliedRevision> {
      demandRole(actor, 'safety-officer');
      const { revision, touched } = await database.inOrganisation(actor.organisationId, async (tx) => ({ revision: (await findRevision(tx, revisionId)).revision, touched: (await reachOf(tx, revisionId)).shifts }));
      if (revision.state !== 'confirmed' || !revision.isCurrent) throw new RefusedError('Only the confirmed current sheet of a product can be applied. Confirm it first.');
      const applied: AppliedRevision = { published: [], failed: [] };
      for (const { shiftId, jobName, date, publishedVersion, changesChecklist } of touched) {
        if (publishedVersion === null || !changesChecklist) continue;
        try {
          const { version } = await database.inOrganisation(actor.organisationId, (tx) => readShift(tx, shiftId, clock.now()));
          const { number, asked } = await checklists.publish(actor, shiftId, version);
          applied.published.push({ shiftId, jobName, date, number, asked: asked.length });
        } catch (error) {
          if (!(error instanceof KneeboardError)) throw error;
          applied.failed.push({ shiftId, jobName, because: error.message });
        }
      }
      return applied;
    },

    uses: (actor: PersonActor, { after, limit, productId, jobId }: z.output<typeof ProductUsesQuery>): Promise<Page<ProductUse>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'day', 'id');
        const rows = await tx
          .select({ use: productUses, revisedOn: revisions.revisedOn })
          .from(productUses)
          .innerJoin(revisions, and(eq(revisions.organisationId, productUses.organisationId), eq(revisions.id, productUses.revisionId)))
          .where(
            and(
              eq(productUses.organisationId, tx.organisationId),
              productId ? eq(productUses.productId, productId) : undefined,
              jobId ? eq(productUses.jobId, jobId) : undefined,
              cursor ? or(lt(productUses.usedOn, String(cursor[0])), and(eq(productUses.usedOn, String(cursor[0])), lt(productUses.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(desc(productUses.usedOn), desc(productUses.id))
          .limit(limit + 1);
        return toPage(rows, limit, ({ use }) => [use.usedOn, use.id], ({ use, revisedOn }) => ({ id: use.id, productName: use.productName, revisionId: use.revisionId, revisedOn, jobId: use.jobId, jobName: use.jobName, siteName: use.siteName, usedOn: use.usedOn }));
      }),
  };

  async function reachOf(tx: Tx, revisionId: string): Promise<Reach> {
    const row = await findRevision(tx, revisionId);
    const fields = fieldsOf(row);
    const productId = row.revision.productId ?? (await productNamed(tx, fields));
    if (!productId) return { previous: null, changes: [], kits: [], shifts: [] };
    const previous = await previousOf(tx, row, productId);
    const usedIn = await tx
      .selectDistinct({ id: kits.id, name: kits.name })
      .from(kitParts)
      .innerJoin(kits, and(eq(kits.organisationId, kitParts.organisationId), eq(kits.id, kitParts.kitId)))
      .where(and(eq(kitParts.organisationId, tx.organisationId), eq(kitParts.productId, productId)))
      .orderBy(asc(kits.name));
    return {
      previous: previous ? { revisionId: previous.id, revisedOn: previous.revisedOn, confirmedAt: previous.confirmedAt?.toISOString() ?? null } : null,
      changes: previous ? changesBetween(previous.fields as SheetFields, fields) : [],
      kits: usedIn,
      shifts: usedIn.length === 0 ? [] : await touchedShifts(tx, row, productId, usedIn.map((kit) => kit.id)),
    };
  }

  async function touchedShifts(tx: Tx, row: RevisionRow, productId: string, kitIds: readonly string[]): Promise<Reach['shifts']> {
    const now = clock.now();
    const yesterday = new Date(now.getTime() - 24 * 3600 * 1000).toISOString().slice(0, 10);
    const found = await tx
      .selectDistinct({ id: shifts.id, date: shifts.date, jobId: jobs.id, jobName: jobs.name, timeZone: jobs.timeZone })
      .from(shiftKits)
      .innerJoin(shifts, and(eq(shifts.organisationId, shiftKits.organisationId), eq(shifts.id, shiftKits.shiftId)))
      .innerJoin(jobs, and(eq(jobs.organisationId, shifts.organisationId), eq(jobs.id, shifts.jobId)))
      .where(and(eq(shiftKits.organisationId, tx.organisationId), inArray(shiftKits.kitId, [...kitIds]), eq(jobs.isOpen, true), gte(shifts.date, yesterday)))
      .orderBy(asc(shifts.date), asc(jobs.name));
    const touched: Reach['shifts'] = [];
    for (const { id, date, jobId, jobName } of found.filter((each) => each.date >= localDate(now, each.timeZone))) {
      const shift = await readShift(tx, id, now);
      const newest = shift.versions[0];
      // Not confirmed yet: as if this sheet were the product's current one.
      const sheet: SheetFacts = sheetFactsOf(row.revision.id, row.revision.revisedOn, fieldsOf(row));
      const asIf = { ...shift, context: { ...shift.context, kits: shift.context.kits.map((kit) => ({ ...kit, parts: kit.parts.map((part) => (part.productId === productId ? { ...part, sheet } : part)) })) } };
      const changesChecklist = row.revision.isCurrent ? shift.hasUnpublishedChanges : row.revision.state === 'confirmed' ? false : !draftChecklist(asIf, now).checklistBytes.equals(draftChecklist(shift, now).checklistBytes);
      touched.push({ shiftId: id, jobId, jobName, date, publishedVersion: newest?.number ?? null, changesChecklist, signed: newest?.asked.filter((person) => person.state === 'signed').length ?? 0, asked: newest?.asked.length ?? 0 });
    }
    return touched;
  }

  /** An unconfirmed sheet belongs to the product of the same name and supplier, if there is one. */
  async function productNamed(tx: Tx, fields: SheetFields): Promise<string | undefined> {
    const name = fields.productName?.value;
    if (!name) return undefined;
    const plain = (text: string) => text.normalize('NFKC').toLowerCase().replace(/[^\p{L}\p{N}]+/gu, ' ').trim();
    const rows = await tx.select({ id: products.id, name: products.name }).from(products).where(eq(products.organisationId, tx.organisationId)).limit(20_000);
    return rows.find((row) => plain(row.name) === plain(name))?.id;
  }

  /** What stood before: the current sheet, or for a sheet that is current already, the newest confirmed one before it. */
  async function previousOf(tx: Tx, { revision, ...row }: RevisionRow, productId: string) {
    const language = revision.language ?? fieldsOf({ revision, ...row }).language?.value ?? 'en';
    const [previous] = await tx
      .select()
      .from(revisions)
      .where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.productId, productId), eq(revisions.language, language), eq(revisions.state, 'confirmed'), ne(revisions.id, revision.id), revision.isCurrent ? undefined : eq(revisions.isCurrent, true)))
      .orderBy(desc(revisions.revisedOn), desc(revisions.confirmedAt))
      .limit(1);
    return previous;
  }
}
export type ReachService = ReturnType<typeof reachService>;

/** Field by field, what came and what went. */
export function changesBetween(before: SheetFields, after: SheetFields): FieldChange[] {
  const lists: Record<FieldChange['field'], (fields: SheetFields) => string[]> = {
    productName: (fields) => [fields.productName?.value ?? ''].filter(Boolean),
    supplier: (fields) => [fields.supplier?.value ?? ''].filter(Boolean),
    signalWord: (fields) => [fields.signalWord?.value ?? ''].filter(Boolean),
    hazardCodes: (fields) => fields.hazardCodes.map((field) => field.value),
    precautionaryCodes: (fields) => fields.precautionaryCodes.map((field) => field.value),
    ingredients: (fields) => fields.ingredients.map(({ value }) => [value.name, value.cas, value.concentration].filter(Boolean).join(', ')),
    limits: (fields) => fields.limits.map(({ value }) => [value.substance, value.kind, value.value, value.unit].filter(Boolean).join(' ')),
    protectionWords: (fields) => fields.protectionWords.map(({ value }) => `${value.topic}: ${value.text}`),
  };
  const knownHazards = new Set(singleCodes(lists.hazardCodes(before)));
  return (Object.keys(lists) as FieldChange['field'][]).flatMap((field) => {
    const [old, now] = [lists[field](before), lists[field](after)];
    const added = now.filter((value) => !old.includes(value));
    const removed = old.filter((value) => !now.includes(value));
    if (added.length === 0 && removed.length === 0) return [];
    return [{ field, added, removed, isNewHazard: field === 'hazardCodes' && singleCodes(added).some((code) => !knownHazards.has(code)) }];
  });
}
