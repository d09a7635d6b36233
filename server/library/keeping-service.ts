import { and, asc, eq, gte, inArray, isNull, sql } from 'drizzle-orm';
import type * as z from 'zod';
import { NOTICE } from '#compliance';
import { containerLabelFor } from '#compliance/hazcom/container-label';
import { jobs, shiftKits, shifts } from '#drizzle/schema/jobs';
import { sheetRequests } from '#drizzle/schema/library';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { kitParts, products, revisions } from '#drizzle/schema/sheets';
import { type Page, type PageQuery } from '#shared/common';
import { LibraryPolicy, type ContainerLabel, type LabelQuery, type LibraryTask } from '#shared/library';
import { type SheetFields } from '#shared/sheets';
import { type Deps } from '../deps';
import { NotFoundError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { readKitFacts, readPartFacts } from '../products/products-service';

const dayMs = 24 * 3600 * 1000;
const requestPatienceDays = 14;
const harm: Record<LibraryTask['level'], number> = { stop: 0, caution: 1, plain: 2 };

/** Keeping the library current: what to do next, the organisation's own limit of age, labels. */
export function keepingService({ database, clock }: Deps) {
  async function readPolicy(tx: Tx): Promise<LibraryPolicy> {
    const [row] = await tx.select({ settings: organisations.settings }).from(organisations);
    const parsed = LibraryPolicy.safeParse((row?.settings as { library?: unknown } | undefined)?.library);
    return parsed.success ? parsed.data : { reviewAfterYears: null };
  }

  return {
    readPolicy: (actor: PersonActor): Promise<LibraryPolicy> => database.inOrganisation(actor.organisationId, readPolicy),
    setPolicy: (actor: PersonActor, policy: LibraryPolicy): Promise<LibraryPolicy> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        await tx.update(organisations).set({ settings: sql`jsonb_set(${organisations.settings}, '{library}', ${JSON.stringify(policy)}::jsonb)` }).where(eq(organisations.organisationId, tx.organisationId));
        return policy;
      }),

    /** Worst first: what crews work with and has no sheet, then what waits for a person, then age and form. */
    listTasks: (actor: PersonActor, { after, limit }: z.output<typeof PageQuery>): Promise<Page<LibraryTask>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const all = (await tasks(tx)).sort((a, b) => harm[a.level] - harm[b.level] || Number(b.isInUse) - Number(a.isInUse) || a.text.localeCompare(b.text));
        const start = Number(readCursor(after, 'index')?.[0] ?? 0);
        const rows = all.slice(start, start + limit + 1).map((task, at) => ({ task, place: start + at + 1 }));
        return toPage(rows, limit, (row) => [row.place], (row) => row.task);
      }),

    kitLabel: (actor: PersonActor, kitId: string, { state }: z.output<typeof LabelQuery>): Promise<ContainerLabel> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const [kit] = await readKitFacts(tx, [kitId]);
        if (!kit) throw new NotFoundError('kit');
        return toLabel(containerLabelFor(kit.parts, state ?? 'mixing'));
      }),
    productLabel: (actor: PersonActor, productId: string): Promise<ContainerLabel> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const part = await readPartFacts(tx, productId);
        if (!part) throw new NotFoundError('product');
        return toLabel(containerLabelFor([part], 'wet'));
      }),
  };

  function toLabel({ blockedBy, statements, pictograms, effects, ...label }: ReturnType<typeof containerLabelFor>): ContainerLabel {
    return { ...label, pictograms: [...pictograms], effects: [...effects], statements: statements.map(({ code, text }) => ({ code, ...text })), partsWithoutSheet: [...blockedBy], notice: NOTICE };
  }

  async function tasks(tx: Tx): Promise<LibraryTask[]> {
    const now = clock.now();
    const today = now.toISOString().slice(0, 10);
    const inUse = await productsInUse(tx, now);
    const all = await tx.select().from(products).where(eq(products.organisationId, tx.organisationId)).orderBy(asc(products.name));
    const sheets = await tx.select().from(revisions).where(and(eq(revisions.organisationId, tx.organisationId), inArray(revisions.state, ['read', 'needs-entry', 'confirmed'])));
    const requests = await tx.select().from(sheetRequests).where(and(eq(sheetRequests.organisationId, tx.organisationId), isNull(sheetRequests.answeredAt), isNull(sheetRequests.withdrawnAt)));
    const { reviewAfterYears } = await readPolicy(tx);
    const hasSpanishReaders = (await tx.select({ id: people.id }).from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.isActive, true), eq(people.language, 'es'))).limit(1)).length > 0;
    const found: LibraryTask[] = [];
    const add = (kind: LibraryTask['kind'], level: LibraryTask['level'], productId: string | null, revisionId: string | null, text: string, detail: string) => found.push({ id: `${kind}-${revisionId ?? productId}`, kind, level, productId, revisionId, text, detail, isInUse: productId !== null && inUse.has(productId) });

    for (const product of all) {
      const current = sheets.filter((sheet) => sheet.productId === product.id && sheet.isCurrent);
      const isUsed = inUse.has(product.id);
      if (current.length === 0) {
        add('no-sheet', isUsed ? 'stop' : 'caution', product.id, null, `${product.name} has no confirmed sheet`, isUsed ? 'It is planned on an open job: its tasks are held.' : `Ask ${product.supplier} for it, or add it.`);
        continue;
      }
      for (const sheet of current) {
        const age = sheet.revisedOn ? yearsBetween(sheet.revisedOn, today) : null;
        if (reviewAfterYears !== null && age !== null && age >= reviewAfterYears) add('review-overdue', 'caution', product.id, sheet.id, `${product.name}: the sheet is ${Math.floor(age)} ${Math.floor(age) === 1 ? 'year' : 'years'} old`, `Your own limit is ${reviewAfterYears}; the law sets none. Ask the supplier whether it still stands.`);
        const sections = (sheet.fields as SheetFields).sections.length;
        if (sections > 0 && sections < 16) add('old-format', 'caution', product.id, sheet.id, `${product.name}: ${sections} of 16 sections found`, '29 CFR 1910.1200 App. D asks for 16. Ask the supplier for a sheet in the present form.');
      }
      if (isUsed && hasSpanishReaders && current.some((sheet) => sheet.language === 'en') && !current.some((sheet) => sheet.language === 'es')) add('no-spanish', 'plain', product.id, null, `${product.name} has no Spanish sheet`, 'People on the crew read Spanish. Ask the supplier for one.');
    }
    for (const sheet of sheets.filter((each) => each.state !== 'confirmed')) {
      const name = (sheet.fields as SheetFields | null)?.productName?.value ?? sheet.fileName;
      add('to-check', 'caution', null, sheet.id, `${name} waits to be checked`, sheet.state === 'read' ? 'It was read; a person confirms it.' : 'It could not be read: fill it in by hand.');
    }
    for (const request of requests) {
      const days = Math.floor((now.getTime() - request.askedAt.getTime()) / dayMs);
      const name = all.find((product) => product.id === request.productId)?.name ?? request.productName ?? 'a product';
      if (days >= requestPatienceDays) add('request-open', 'plain', request.productId, request.productId === null ? request.aboutRevisionId : null, `${name}: asked ${days} days ago, no answer`, `${request.email}. Ask again or telephone.`);
    }
    return found;
  }

  /** Products that stand in a kit of a shift from yesterday on, on an open job. */
  async function productsInUse(tx: Tx, now: Date): Promise<Set<string>> {
    const rows = await tx
      .selectDistinct({ productId: kitParts.productId })
      .from(shiftKits)
      .innerJoin(shifts, and(eq(shifts.organisationId, shiftKits.organisationId), eq(shifts.id, shiftKits.shiftId)))
      .innerJoin(jobs, and(eq(jobs.organisationId, shifts.organisationId), eq(jobs.id, shifts.jobId)))
      .innerJoin(kitParts, and(eq(kitParts.organisationId, shiftKits.organisationId), eq(kitParts.kitId, shiftKits.kitId)))
      .where(and(eq(shiftKits.organisationId, tx.organisationId), eq(jobs.isOpen, true), gte(shifts.date, new Date(now.getTime() - dayMs).toISOString().slice(0, 10))));
    return new Set(rows.map((row) => row.productId));
  }
}
export type KeepingService = ReturnType<typeof keepingService>;

const yearsBetween = (from: string, to: string): number => (Date.parse(to) - Date.parse(from)) / (365.25 * dayMs);
