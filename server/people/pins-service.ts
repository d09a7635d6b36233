import { randomInt } from 'node:crypto';
import { and, desc, eq, lt } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { people } from '#drizzle/schema/people';
import { pinEvents, pins, startPins } from '#drizzle/schema/pins';
import { type Page } from '#shared/common';
import { type PinEvent, type PinEventsQuery } from '#shared/people';
import { type Deps } from '../deps';
import { NotFoundError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { appendEntry, lockHead } from '../recordlog/recordlog-store';
import { pinDigest } from './pin-digest';

/** Long enough for a tablet that is out of signal for a while: it is judged when it arrives. */
const startPinDays = 14;
const startPinDigits = 8;

const toEvent = (row: typeof pinEvents.$inferSelect): PinEvent => ({
  id: row.id,
  event: row.event as PinEvent['event'],
  personId: row.personId,
  personName: row.personName,
  proof: row.proof as PinEvent['proof'],
  byName: row.byName,
  tabletName: row.tabletName,
  capturedAt: row.capturedAt?.toISOString() ?? null,
  at: row.at.toISOString(),
  entryIndex: row.entryIndex,
});

/** What the office does about PINs: gives a start PIN, resets, looks. It never chooses or sees a person's own. */
export function pinsService({ config, database, clock, log }: Deps) {
  async function demandPerson(tx: Tx, id: string): Promise<{ name: string; isActive: boolean }> {
    const [row] = await tx.select({ name: people.name, isActive: people.isActive }).from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.id, id)));
    if (!row) throw new NotFoundError('person');
    return row;
  }
  const own = (tx: Tx, id: string) => and(eq(pins.organisationId, tx.organisationId), eq(pins.personId, id));
  async function record(tx: Tx, actor: PersonActor, event: PinEvent['event'], personId: string, personName: string, more: Readonly<Record<string, unknown>> = {}): Promise<void> {
    const at = clock.now();
    const row = { id: newId(), event, personId, personName, proof: null, byPersonId: actor.personId, byName: actor.personName, tabletId: null, tabletName: null, deliveryId: null, capturedAt: null };
    const entryIndex = await appendEntry(tx, clock, { kind: 'pin', subjectId: row.id, record: { ...row, at: at.toISOString(), ...more } });
    await tx.insert(pinEvents).values({ organisationId: tx.organisationId, ...row, at, entryIndex });
  }

  return {
    /** One that replaces an earlier; good for one PIN. Answers the digits: they are kept nowhere. */
    giveStartPin: (actor: PersonActor, id: string): Promise<{ pin: string; expiresAt: string }> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        await lockHead(tx);
        const person = await demandPerson(tx, id);
        if (!person.isActive) throw new RefusedError(`${person.name} is not active. Make them active first.`);
        const [pin] = await tx.select({ proof: pins.proof }).from(pins).where(own(tx, id));
        if (pin && pin.proof !== 'none') throw new RefusedError(`${person.name} has a PIN. If they forgot it, reset it first.`);
        const digits = Array.from({ length: startPinDigits }, () => randomInt(10)).join('');
        const givenAt = clock.now();
        const expiresAt = new Date(givenAt.getTime() + startPinDays * 24 * 3600 * 1000);
        const row = { organisationId: tx.organisationId, personId: id, digest: pinDigest(config.keys.pinPepper, tx.organisationId, id, digits), givenBy: actor.personId, givenByName: actor.personName, givenAt, expiresAt };
        await tx.insert(startPins).values(row).onConflictDoUpdate({ target: [startPins.organisationId, startPins.personId], set: row });
        await record(tx, actor, 'start-pin-given', id, person.name, { expiresAt: expiresAt.toISOString() });
        log.info({ by: actor.personId, person: id }, 'start PIN given');
        return { pin: digits, expiresAt: expiresAt.toISOString() };
      }),

    /** The officer can reset a PIN, never choose one: the person sets a new one on a tablet. */
    reset: (actor: PersonActor, id: string): Promise<void> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        await lockHead(tx);
        const person = await demandPerson(tx, id);
        const had = await tx.delete(pins).where(own(tx, id)).returning({ personId: pins.personId });
        const given = await tx.delete(startPins).where(and(eq(startPins.organisationId, tx.organisationId), eq(startPins.personId, id))).returning({ personId: startPins.personId });
        if (had.length + given.length > 0) await record(tx, actor, 'reset', id, person.name);
        log.info({ by: actor.personId, person: id }, 'PIN reset');
      }),

    /** Newest entry first. */
    list: (actor: PersonActor, { after, limit, personId }: z.output<typeof PinEventsQuery>): Promise<Page<PinEvent>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'index');
        const rows = await tx
          .select()
          .from(pinEvents)
          .where(and(eq(pinEvents.organisationId, tx.organisationId), personId ? eq(pinEvents.personId, personId) : undefined, cursor ? lt(pinEvents.entryIndex, Number(cursor[0])) : undefined))
          .orderBy(desc(pinEvents.entryIndex))
          .limit(limit + 1);
        return toPage(rows, limit, (row) => [row.entryIndex], toEvent);
      }),
  };
}
export type PinsService = ReturnType<typeof pinsService>;
