import { and, asc, eq, gt, ilike, inArray, or, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { kitHazards } from '#compliance/hazcom/kit-hazards';
import { type KitFacts, type SheetFacts } from '#compliance/facts';
import { kitParts, kits, products, revisions } from '#drizzle/schema/sheets';
import { type Page, type PageQuery } from '#shared/common';
import { type Kit, type KitEdit, type Product, type ProductsQuery } from '#shared/products';
import { type SheetFields } from '#shared/sheets';
import { type Deps } from '../deps';
import { ConflictError, InputError, NotFoundError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { makeProduct } from '../sds/sheets-service';

type ProductRow = typeof products.$inferSelect;
type KitRow = typeof kits.$inferSelect;

/** A sheet as the rules see it. */
export const sheetFactsOf = (revisionId: string, revisedOn: string | null, fields: SheetFields): SheetFacts => ({
  revisionId,
  revisedOn,
  signalWord: fields.signalWord?.value ?? null,
  hazardCodes: fields.hazardCodes.map((field) => field.value),
  precautionaryCodes: fields.precautionaryCodes.map((field) => field.value),
  casNumbers: fields.ingredients.flatMap(({ value }) => (value.cas ? [value.cas] : [])),
  protectionWords: fields.protectionWords.map((field) => field.value),
});

/** The confirmed current sheet of each product, English before any other language. */
async function currentSheets(tx: Tx, productIds: readonly string[]): Promise<Map<string, SheetFacts>> {
  if (productIds.length === 0) return new Map();
  const rows = await tx
    .select()
    .from(revisions)
    .where(and(eq(revisions.organisationId, tx.organisationId), inArray(revisions.productId, [...productIds]), eq(revisions.isCurrent, true)))
    .orderBy(sql`${revisions.language} = 'en'`, asc(revisions.language));
  return new Map(
    rows.map((row) => {
      return [row.productId as string, sheetFactsOf(row.id, row.revisedOn, row.fields as SheetFields)];
    }),
  );
}

/** Kits as the rules see them. `ids` null: all of the organisation. */
export async function readKitFacts(tx: Tx, ids: readonly string[] | null): Promise<KitFacts[]> {
  const rows = await tx.select().from(kits).where(and(eq(kits.organisationId, tx.organisationId), ids ? inArray(kits.id, [...ids]) : undefined)).orderBy(asc(kits.name), asc(kits.id));
  return toKitFacts(tx, rows);
}
/** One product as a part by itself, for its own label. */
export async function readPartFacts(tx: Tx, productId: string): Promise<KitFacts['parts'][number] | undefined> {
  const [product] = await tx.select().from(products).where(and(eq(products.organisationId, tx.organisationId), eq(products.id, productId)));
  return product && { productId, productName: product.name, part: '', form: 'liquid', sheet: (await currentSheets(tx, [productId])).get(productId) ?? null };
}
async function toKitFacts(tx: Tx, rows: readonly KitRow[]): Promise<KitFacts[]> {
  if (rows.length === 0) return [];
  const parts = await tx
    .select({ part: kitParts, productName: products.name })
    .from(kitParts)
    .innerJoin(products, and(eq(products.organisationId, kitParts.organisationId), eq(products.id, kitParts.productId)))
    .where(and(eq(kitParts.organisationId, tx.organisationId), inArray(kitParts.kitId, rows.map((row) => row.id))))
    .orderBy(asc(kitParts.position));
  const sheets = await currentSheets(tx, parts.map(({ part }) => part.productId));
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    volumeL: row.volumeL,
    mixMinutesPerKit: row.mixMinutesPerKit,
    bucketMinutes: row.bucketMinutes,
    count: null,
    surfaceException: exceptionOf(row),
    cartridgeSchedule: scheduleOf(row),
    parts: parts
      .filter(({ part }) => part.kitId === row.id)
      .map(({ part, productName }) => ({ productId: part.productId, productName, part: part.part, form: part.form as KitFacts['parts'][number]['form'], sheet: sheets.get(part.productId) ?? null })),
  }));
}

/** What was said of it in part stands as said: the rules see that it is not whole. */
function exceptionOf({ surfaceException }: KitRow): KitFacts['surfaceException'] {
  const said = surfaceException as Kit['surfaceException'] | null;
  if (said === null || [said.writtenBy, said.reference, said.text].every((each) => each === null)) return null;
  return { writtenBy: said.writtenBy ?? '', reference: said.reference ?? '', text: said.text ?? '' };
}
function scheduleOf({ cartridgeSchedule }: KitRow): KitFacts['cartridgeSchedule'] {
  const said = cartridgeSchedule as Kit['cartridgeSchedule'] | null;
  return said === null || (said.change === null && said.basedOn === null) ? null : { change: said.change ?? '', basedOn: said.basedOn ?? '' };
}

function toKit(row: KitRow, facts: KitFacts): Kit {
  const { codes, pictograms } = kitHazards(facts.parts);
  return {
    id: row.id,
    name: row.name,
    volumeL: row.volumeL,
    mixMinutesPerKit: row.mixMinutesPerKit,
    bucketMinutes: row.bucketMinutes,
    surfaceException: (row.surfaceException as Kit['surfaceException'] | null) ?? { writtenBy: null, reference: null, text: null },
    cartridgeSchedule: (row.cartridgeSchedule as Kit['cartridgeSchedule'] | null) ?? { change: null, basedOn: null },
    version: row.version,
    parts: facts.parts.map(({ sheet, ...part }) => ({ ...part, hasSheet: sheet !== null, hazardCodes: [...(sheet?.hazardCodes ?? [])] })),
    hazardCodes: [...codes],
    pictograms: [...pictograms],
  };
}

export function productsService({ database }: Deps) {
  async function toProducts(tx: Tx, rows: readonly ProductRow[]): Promise<Map<string, Product>> {
    const sheets = await currentSheets(tx, rows.map((row) => row.id));
    return new Map(
      rows.map(({ id, name, supplier, version }) => {
        const sheet = sheets.get(id);
        const shown = sheet && { revisionId: sheet.revisionId, revisedOn: sheet.revisedOn, signalWord: sheet.signalWord, hazardCodes: [...sheet.hazardCodes], pictograms: [...kitHazards([{ productId: id, productName: name, part: '', form: 'liquid', sheet }]).pictograms] };
        return [id, { id, name, supplier, version, sheet: shown ?? null }];
      }),
    );
  }
  async function readKit(tx: Tx, id: string): Promise<Kit> {
    const [row] = await tx.select().from(kits).where(and(eq(kits.organisationId, tx.organisationId), eq(kits.id, id)));
    const [facts] = row ? await toKitFacts(tx, [row]) : [];
    if (!row || !facts) throw new NotFoundError('kit');
    return toKit(row, facts);
  }
  async function writeParts(tx: Tx, kitId: string, parts: KitEdit['parts']): Promise<void> {
    const known = await tx.select({ id: products.id }).from(products).where(and(eq(products.organisationId, tx.organisationId), inArray(products.id, parts.map((part) => part.productId))));
    const strange = parts.findIndex((part) => !known.some((each) => each.id === part.productId));
    if (strange >= 0) throw new InputError('The kit was not saved.', [{ path: `parts.${strange}.productId`, message: 'There is no such product. Add it to the library first.' }]);
    await tx.delete(kitParts).where(and(eq(kitParts.organisationId, tx.organisationId), eq(kitParts.kitId, kitId)));
    await tx.insert(kitParts).values(parts.map((part, position) => ({ organisationId: tx.organisationId, kitId, position, ...part })));
  }

  return {
    list: (actor: PersonActor, { after, limit, q }: z.output<typeof ProductsQuery>): Promise<Page<Product>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'text', 'id');
        const like = q ? `%${q.replace(/[\\%_]/g, '\\$&')}%` : undefined;
        const rows = await tx
          .select()
          .from(products)
          .where(
            and(
              eq(products.organisationId, tx.organisationId),
              like ? or(ilike(products.name, like), ilike(products.supplier, like)) : undefined,
              cursor ? or(gt(products.name, String(cursor[0])), and(eq(products.name, String(cursor[0])), gt(products.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(asc(products.name), asc(products.id))
          .limit(limit + 1);
        const items = await toProducts(tx, rows);
        return toPage(rows, limit, (row) => [row.name, row.id], (row) => items.get(row.id) as Product);
      }),
    read: (actor: PersonActor, id: string): Promise<Product> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const rows = await tx.select().from(products).where(and(eq(products.organisationId, tx.organisationId), eq(products.id, id)));
        const product = (await toProducts(tx, rows)).get(id);
        if (!product) throw new NotFoundError('product');
        return product;
      }),
    add: (actor: PersonActor, edit: { name: string; supplier: string }): Promise<Product> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const id = await makeProduct(tx, edit);
        const rows = await tx.select().from(products).where(and(eq(products.organisationId, tx.organisationId), eq(products.id, id)));
        return (await toProducts(tx, rows)).get(id) as Product;
      }),
    listKits: (actor: PersonActor, { after, limit }: z.output<typeof PageQuery>): Promise<Page<Kit>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'text', 'id');
        const rows = await tx
          .select()
          .from(kits)
          .where(and(eq(kits.organisationId, tx.organisationId), cursor ? or(gt(kits.name, String(cursor[0])), and(eq(kits.name, String(cursor[0])), gt(kits.id, String(cursor[1])))) : undefined))
          .orderBy(asc(kits.name), asc(kits.id))
          .limit(limit + 1);
        const facts = new Map((await toKitFacts(tx, rows)).map((each) => [each.id, each]));
        return toPage(rows, limit, (row) => [row.name, row.id], (row) => toKit(row, facts.get(row.id) as KitFacts));
      }),
    readKit: (actor: PersonActor, id: string): Promise<Kit> => database.inOrganisation(actor.organisationId, (tx) => readKit(tx, id)),
    addKit: (actor: PersonActor, { parts, ...values }: KitEdit): Promise<Kit> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const id = newId();
        await tx.insert(kits).values({ organisationId: tx.organisationId, id, ...values });
        await writeParts(tx, id, parts);
        return readKit(tx, id);
      }),
    editKit: (actor: PersonActor, id: string, version: number, { parts, ...values }: KitEdit): Promise<Kit> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const changed = await tx
          .update(kits)
          .set({ ...values, version: sql`${kits.version} + 1` })
          .where(and(eq(kits.organisationId, tx.organisationId), eq(kits.id, id), eq(kits.version, version)))
          .returning({ id: kits.id });
        if (changed.length === 0) throw new ConflictError('Somebody changed this kit after you opened it. Compare, then save again.', await readKit(tx, id));
        await writeParts(tx, id, parts);
        return readKit(tx, id);
      }),
  };
}
export type ProductsService = ReturnType<typeof productsService>;
