import { createHash, randomBytes, randomInt } from 'node:crypto';
import { and, asc, eq, gt, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { organisations } from '#drizzle/schema/organisations';
import { tablets } from '#drizzle/schema/tablets';
import { type Page, type PageQuery } from '#shared/common';
import { type PairedTablet, type PairingCode, type Tablet } from '#shared/tablets';
import { type Deps } from '../deps';
import { NotFoundError, RefusedError, SlowDownError } from '../errors';
import { demandRole, type PersonActor, type TabletActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';

type TabletRow = typeof tablets.$inferSelect;
const pairingMinutes = 10;
// Without look-alikes: read from a screen, typed with gloves.
const codeLetters = 'ABCDEFGHJKMNPQRSTUVWXYZ23456789';
const sha256 = (text: string) => createHash('sha256').update(text).digest();

export function tabletsService({ database, clock, log }: Deps) {
  const toTablet = (row: TabletRow): Tablet => ({
    id: row.id,
    name: row.name,
    isPaired: row.pairedAt !== null && row.withdrawnAt === null,
    pairedAt: row.pairedAt?.toISOString() ?? null,
    lastHeardAt: row.lastHeardAt?.toISOString() ?? null,
    withdrawnAt: row.withdrawnAt?.toISOString() ?? null,
  });
  const find = async (tx: Tx, id: string): Promise<TabletRow> => {
    const [row] = await tx.select().from(tablets).where(and(eq(tablets.organisationId, tx.organisationId), eq(tablets.id, id)));
    if (!row) throw new NotFoundError('tablet');
    return row;
  };
  async function offerPairing(tx: Tx, row: TabletRow): Promise<PairingCode> {
    const code = Array.from({ length: 8 }, () => codeLetters[randomInt(codeLetters.length)]).join('');
    const expiresAt = new Date(clock.now().getTime() + pairingMinutes * 60_000);
    await tx.execute(sql`SELECT door_offer_pairing(${row.id}, ${sha256(code)}, ${expiresAt.toISOString()})`);
    return { tablet: toTablet(row), code: `${code.slice(0, 4)} ${code.slice(4)}`, expiresAt: expiresAt.toISOString() };
  }

  return {
    list: (actor: PersonActor, { after, limit }: z.output<typeof PageQuery>): Promise<Page<Tablet>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'id');
        const rows = await tx
          .select()
          .from(tablets)
          .where(and(eq(tablets.organisationId, tx.organisationId), cursor ? gt(tablets.id, String(cursor[0])) : undefined))
          .orderBy(asc(tablets.id))
          .limit(limit + 1);
        return toPage(rows, limit, (row) => [row.id], toTablet);
      }),

    add: (actor: PersonActor, name: string): Promise<PairingCode> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        const [row] = await tx.insert(tablets).values({ organisationId: tx.organisationId, id: newId(), name }).returning();
        return offerPairing(tx, row as TabletRow);
      }),

    /** A new code; pairing with it makes the old tablet's token worthless. */
    renewCode: (actor: PersonActor, id: string): Promise<PairingCode> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        const row = await find(tx, id);
        if (row.withdrawnAt) throw new RefusedError('This tablet was withdrawn. Add it as a new one.');
        return offerPairing(tx, row);
      }),

    withdraw: (actor: PersonActor, id: string): Promise<Tablet> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        await find(tx, id);
        await tx.execute(sql`SELECT door_withdraw_tablet(${id})`);
        const [row] = await tx
          .update(tablets)
          .set({ withdrawnAt: sql`coalesce(${tablets.withdrawnAt}, ${clock.now().toISOString()}::timestamptz)` })
          .where(and(eq(tablets.organisationId, tx.organisationId), eq(tablets.id, id)))
          .returning();
        log.info({ by: actor.personId, tablet: id }, 'tablet withdrawn');
        return toTablet(row as TabletRow);
      }),

    /** Exchanges a code for this device's token. The token goes into an HttpOnly cookie and is kept as a hash. */
    async pair(code: string, address: string): Promise<{ token: string; tablet: PairedTablet }> {
      const key = `pairing from ${address}`;
      const [wait] = await database.atTheDoor<{ seconds: number | null }>('SELECT door_wait($1, 5) AS seconds', [key]);
      if (wait?.seconds) throw new SlowDownError(`Too many wrong codes. Wait ${wait.seconds} ${wait.seconds === 1 ? 'second' : 'seconds'}.`, wait.seconds);
      const token = randomBytes(32).toString('base64url');
      const now = clock.now();
      const [paired] = await database.atTheDoor<{ organisation_id: string; tablet_id: string }>('SELECT * FROM door_pair($1, $2, $3)', [sha256(code.toUpperCase().replace(/[^A-Z0-9]/g, '')), sha256(token), now]);
      if (!paired) {
        await database.atTheDoor('SELECT door_failed($1)', [key]);
        throw new RefusedError('This code does not open a tablet. Codes work once and for ten minutes: ask the office for a new one.');
      }
      return database.inOrganisation(paired.organisation_id, async (tx) => {
        const [row] = await tx
          .update(tablets)
          .set({ pairedAt: now, lastHeardAt: now })
          .where(and(eq(tablets.organisationId, tx.organisationId), eq(tablets.id, paired.tablet_id)))
          .returning();
        const [organisation] = await tx.select().from(organisations);
        return { token, tablet: { tabletId: paired.tablet_id, name: row?.name ?? '', organisationName: organisation?.name ?? '' } };
      });
    },

    /** Which tablet speaks; notes that it was heard. Null for a token nobody has. */
    async readActor(token: string): Promise<TabletActor | null> {
      const [found] = await database.atTheDoor<{ organisation_id: string; tablet_id: string }>('SELECT * FROM door_tablet($1)', [sha256(token)]);
      if (!found) return null;
      return database.inOrganisation(found.organisation_id, async (tx) => {
        const [row] = await tx
          .update(tablets)
          .set({ lastHeardAt: clock.now() })
          .where(and(eq(tablets.organisationId, tx.organisationId), eq(tablets.id, found.tablet_id)))
          .returning();
        const [organisation] = await tx.select().from(organisations);
        return row && organisation && !row.withdrawnAt
          ? { kind: 'tablet', organisationId: tx.organisationId, organisationName: organisation.name, tabletId: row.id, tabletName: row.name }
          : null;
      });
    },
  };
}
export type TabletsService = ReturnType<typeof tabletsService>;
