import { and, desc, eq, isNull, lt, or, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { sheetRequests } from '#drizzle/schema/library';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { products } from '#drizzle/schema/sheets';
import { type Page } from '#shared/common';
import { type AskSupplier, type OpenRequest, type RequestsQuery, type ReturnSheet, type SheetRequest, type SheetReturnDraft } from '#shared/library';
import { type Deps } from '../deps';
import { ConflictError, NotFoundError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { type UploadedFile } from '../http/mount';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { dropLink, makeLink, openLink } from '../platform/links';
import { type Work } from '../platform/queue';
import { findingsOn } from '../sds/sheet-fields';
import { type SheetsService } from '../sds/sheets-service';
import { fieldsOf, findRevision, hasValues, toRevision, toSummary } from '../sds/sheets-store';
import { returnMessage } from './return-words';

const goodForDays = 30;

const select = (tx: Tx) =>
  tx
    .select({
      request: sheetRequests,
      productName: sql<string>`coalesce(${products.name}, ${sheetRequests.productName}, '')`,
      supplier: sql<string>`coalesce(${products.supplier}, ${sheetRequests.supplier}, '')`,
      askedByName: people.name,
      organisationName: organisations.name,
    })
    .from(sheetRequests)
    .leftJoin(products, and(eq(products.organisationId, sheetRequests.organisationId), eq(products.id, sheetRequests.productId)))
    .innerJoin(people, and(eq(people.organisationId, sheetRequests.organisationId), eq(people.id, sheetRequests.askedBy)))
    .innerJoin(organisations, eq(organisations.organisationId, sheetRequests.organisationId));
type Row = Awaited<ReturnType<typeof select>>[number];

export function requestsService({ config, database, mail, queue, clock }: Deps, sheets: SheetsService) {
  const stateOf = ({ request }: Row, now: Date): SheetRequest['state'] => (request.answeredAt ? 'answered' : request.withdrawnAt ? 'withdrawn' : request.expiresAt <= now ? 'expired' : 'open');
  const toRequest = (row: Row): SheetRequest => {
    const { request } = row;
    return {
      id: request.id,
      productId: request.productId,
      productName: row.productName,
      supplier: row.supplier,
      aboutRevisionId: request.aboutRevisionId,
      email: request.email,
      message: request.message,
      language: request.language as SheetRequest['language'],
      state: stateOf(row, clock.now()),
      askedAt: request.askedAt.toISOString(),
      askedBy: row.askedByName,
      mailedAt: request.mailedAt?.toISOString() ?? null,
      expiresAt: request.expiresAt.toISOString(),
      answeredAt: request.answeredAt?.toISOString() ?? null,
      revisionId: request.revisionId,
    };
  };
  const find = async (tx: Tx, id: string): Promise<Row> => {
    const [row] = await select(tx).where(and(eq(sheetRequests.organisationId, tx.organisationId), eq(sheetRequests.id, id)));
    if (!row) throw new NotFoundError('request');
    return row;
  };

  async function open(tx: Tx, actor: PersonActor, values: Pick<typeof sheetRequests.$inferInsert, 'productId' | 'productName' | 'supplier' | 'aboutRevisionId' | 'email' | 'message' | 'language'>): Promise<SheetRequest> {
    const [now, id] = [clock.now(), newId()];
    await tx.insert(sheetRequests).values({ ...values, organisationId: tx.organisationId, id, askedAt: now, askedBy: actor.personId, expiresAt: new Date(now.getTime() + goodForDays * 24 * 3600 * 1000) });
    await queue.add(tx, 'mail-request', { organisationId: tx.organisationId, requestId: id });
    return toRequest(await find(tx, id));
  }
  /** The address this supplier was last asked at, whatever the product. */
  async function lastAskedAt(tx: Tx, supplier: string): Promise<string | undefined> {
    const [row] = await select(tx).where(and(eq(sheetRequests.organisationId, tx.organisationId), sql`lower(coalesce(${products.supplier}, ${sheetRequests.supplier})) = lower(${supplier})`)).orderBy(desc(sheetRequests.askedAt)).limit(1);
    return row?.request.email;
  }

  return {
    list: (actor: PersonActor, { after, limit, state, productId, revisionId }: z.output<typeof RequestsQuery>): Promise<Page<SheetRequest>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'instant', 'id');
        const now = sql`${clock.now().toISOString()}::timestamptz`;
        const open = and(isNull(sheetRequests.answeredAt), isNull(sheetRequests.withdrawnAt));
        const states = { open: and(open, sql`${sheetRequests.expiresAt} > ${now}`), expired: and(open, sql`${sheetRequests.expiresAt} <= ${now}`), answered: sql`${sheetRequests.answeredAt} IS NOT NULL`, withdrawn: sql`${sheetRequests.withdrawnAt} IS NOT NULL AND ${sheetRequests.answeredAt} IS NULL` };
        const rows = await select(tx)
          .where(
            and(
              eq(sheetRequests.organisationId, tx.organisationId),
              state ? states[state] : undefined,
              productId ? eq(sheetRequests.productId, productId) : undefined,
              revisionId ? or(eq(sheetRequests.aboutRevisionId, revisionId), eq(sheetRequests.revisionId, revisionId)) : undefined,
              cursor ? or(lt(sheetRequests.askedAt, new Date(String(cursor[0]))), and(eq(sheetRequests.askedAt, new Date(String(cursor[0]))), lt(sheetRequests.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(desc(sheetRequests.askedAt), desc(sheetRequests.id))
          .limit(limit + 1);
        return toPage(rows, limit, ({ request }) => [request.askedAt.toISOString(), request.id], toRequest);
      }),

    /** Queues the mail with the request; the link is made when the mail goes, so that its secret is stored nowhere. */
    ask: (actor: PersonActor, { productId, email, message, language }: AskSupplier): Promise<SheetRequest> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const [product] = await tx.select({ id: products.id }).from(products).where(and(eq(products.organisationId, tx.organisationId), eq(products.id, productId)));
        if (!product) throw new NotFoundError('product');
        return open(tx, actor, { productId, email, message, language });
      }),

    /** A first wording of the mail that sends this sheet back, from its audit; and where its supplier was last asked. */
    draftReturn: (actor: PersonActor, revisionId: string): Promise<SheetReturnDraft> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const row = await findRevision(tx, revisionId);
        const fields = fieldsOf(row);
        const { productName, supplier, revisedOn, readerState, fileName } = toSummary(row);
        const isRead = hasValues(readerState) || row.revision.state === 'confirmed';
        const about = { productName: productName ?? fileName, fileName, revisedOn, readerState, findings: isRead ? findingsOn(fields, clock.now().toISOString().slice(0, 10)) : [] };
        return { productName: productName ?? '', supplier: supplier ?? '', email: (supplier && (await lastAskedAt(tx, supplier))) ?? '', messages: { en: returnMessage(about, 'en'), es: returnMessage(about, 'es') } };
      }),

    /** Sends a sheet back: a request like any other that knows which sheet it is about. The sheet itself is never changed. */
    returnSheet: (actor: PersonActor, revisionId: string, version: number, { productName, supplier, email, message, language, isSetAside }: ReturnSheet): Promise<SheetRequest> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        // One after the other: two officers who send back the same sheet would both see that nobody had.
        await tx.execute(sql`SELECT pg_advisory_xact_lock(hashtextextended(${`return ${revisionId}`}, 0))`);
        const row = await findRevision(tx, revisionId);
        if (row.revision.version !== version) throw new ConflictError('Somebody changed this sheet after you opened it. Compare, then do it again.', toRevision(row, clock.now().toISOString().slice(0, 10)));
        const waiting = (await select(tx).where(and(eq(sheetRequests.organisationId, tx.organisationId), eq(sheetRequests.aboutRevisionId, revisionId)))).find((each) => stateOf(each, clock.now()) === 'open');
        if (waiting) throw new RefusedError(`${waiting.askedByName} sent this sheet back already, to ${waiting.request.email}, and the answer is still open. Withdraw that request first.`);
        if (isSetAside && row.revision.state === 'confirmed') throw new RefusedError('A confirmed sheet stays in use until a newer one is confirmed. Send it back without setting it aside.');
        if (isSetAside && row.revision.state !== 'set-aside') await sheets.setAsideIn(tx, revisionId, version);
        return open(tx, actor, { productId: row.revision.productId, productName, supplier, aboutRevisionId: revisionId, email, message, language });
      }),

    withdraw: (actor: PersonActor, id: string): Promise<SheetRequest> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const row = await find(tx, id);
        if (row.request.answeredAt) throw new RefusedError('This request was answered already.');
        await dropLink(tx, 'sheet-request', id);
        await tx.update(sheetRequests).set({ withdrawnAt: sql`coalesce(${sheetRequests.withdrawnAt}, ${clock.now().toISOString()}::timestamptz)` }).where(and(eq(sheetRequests.organisationId, tx.organisationId), eq(sheetRequests.id, id)));
        return toRequest(await find(tx, id));
      }),

    /** Background: sends the mail once. A crash between sending and noting it sends a second mail whose link replaces the first. */
    async mailRequest({ organisationId, requestId }: Work['mail-request']): Promise<void> {
      const made = await database.inOrganisation(organisationId, async (tx) => {
        const row = await find(tx, requestId);
        if (row.request.mailedAt || stateOf(row, clock.now()) !== 'open') return undefined;
        return { row, token: await makeLink(tx, 'sheet-request', requestId, row.request.expiresAt) };
      });
      if (!made) return;
      const { row, token } = made;
      const address = `${config.publicUrl}/send-sheet#${token}`;
      const until = row.request.expiresAt.toISOString().slice(0, 10);
      const isReturn = row.request.aboutRevisionId !== null;
      const text =
        row.request.language === 'es'
          ? [`${row.organisationName} le ${isReturn ? 'devuelve su hoja y pide' : 'pide'} la hoja de datos de seguridad vigente de:`, row.productName, '', row.request.message, '', 'Puede enviarla aquí, sin cuenta, una sola vez:', address, `El enlace vale hasta el ${until}.`]
          : [`${row.organisationName} ${isReturn ? 'sends your sheet back and asks' : 'asks'} you for the current safety data sheet of:`, row.productName, '', row.request.message, '', 'You can send it here, without an account, once:', address, `The link is good until ${until}.`];
      const subject = row.request.language === 'es' ? `Hoja de datos de seguridad${isReturn ? ' devuelta' : ''}: ${row.productName}` : `Safety data sheet${isReturn ? ' sent back' : ''}: ${row.productName}`;
      await mail.send({ to: [row.request.email], subject, text: `${text.join('\n')}\n` });
      await database.inOrganisation(organisationId, (tx) => tx.update(sheetRequests).set({ mailedAt: clock.now() }).where(and(eq(sheetRequests.organisationId, organisationId), eq(sheetRequests.id, requestId))));
    },

    /** What the holder of a link may see: who asks for which product. */
    async open(token: string, address: string): Promise<OpenRequest> {
      const { organisationId, subjectId } = await openLink(database, 'sheet-request', token, clock.now(), address);
      const row = await database.inOrganisation(organisationId, (tx) => find(tx, subjectId));
      return { organisationName: row.organisationName, productName: row.productName, supplier: row.supplier, message: row.request.message, expiresAt: row.request.expiresAt.toISOString() };
    },

    /** The link dies with its use. The sheet waits for the officer like any other. */
    async answer(token: string, file: UploadedFile, address: string): Promise<void> {
      const { organisationId, subjectId } = await openLink(database, 'sheet-request', token, clock.now(), address);
      const row = await database.inOrganisation(organisationId, (tx) => find(tx, subjectId));
      const onBehalf: PersonActor = { kind: 'person', organisationId, organisationName: row.organisationName, personId: row.request.askedBy, personName: row.askedByName, role: 'safety-officer' };
      const { revision } = await sheets.upload(onBehalf, file);
      await database.inOrganisation(organisationId, async (tx) => {
        if (!(await dropLink(tx, 'sheet-request', subjectId))) throw new NotFoundError('open link');
        await tx.update(sheetRequests).set({ answeredAt: clock.now(), revisionId: revision.id }).where(and(eq(sheetRequests.organisationId, organisationId), eq(sheetRequests.id, subjectId)));
      });
    },
  };
}
export type RequestsService = ReturnType<typeof requestsService>;
