import { and, asc, eq, gt, inArray, isNull, or, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { acknowledgements, correctiveActions } from '#drizzle/schema/acknowledgements';
import { answerSets } from '#drizzle/schema/checklists';
import { pinEvents, pins, startPins } from '#drizzle/schema/pins';
import { deliveries, deliveryOutcomes, tablets } from '#drizzle/schema/tablets';
import { type Page, type PageQuery } from '#shared/common';
import { type CheckPin, type Deliveries, type Receipt, type Receipts } from '#shared/envelopes';
import { type KeptAside } from '#shared/today';
import { type Deps } from '../deps';
import { RefusedError, SlowDownError } from '../errors';
import { type PersonActor, type TabletActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { pinDigest, isSamePinDigest } from '../people/pin-digest';
import { freePinTries, openSeal, pinGuessKey, startPinGuessKey } from '../people/pin-judging';
import { databaseErrorCode, type Tx } from '../platform/database';
import { takeGuess, wasRight } from '../platform/guesses';
import { appendEntries, lockHead } from '../recordlog/recordlog-store';
import { interpret, readEnvelope, readPinsOf, type Delivery, type Interpretation } from './interpret';

const deliveredAs = { id: deliveries.id, bytes: deliveries.bytes, receivedAt: deliveries.receivedAt, sentAt: deliveries.sentAt, tabletId: deliveries.tabletId, tabletName: tablets.name };

export function deliveriesService({ config, database, clock, log }: Deps) {
  /** Step one: the bytes, before anyone tries to understand them. A changed repeat of an id is kept under a number of its own. */
  async function store(actor: TabletActor, { sentAt, envelopes }: Deliveries, receivedAt: Date): Promise<Map<string, string>> {
    return database.inOrganisation(actor.organisationId, async (tx) => {
      const row = (id: string, bytes: string) => ({ organisationId: tx.organisationId, id, tabletId: actor.tabletId, bytes: Buffer.from(bytes), receivedAt, sentAt: new Date(sentAt) });
      const unique = [...new Map(envelopes.map((envelope) => [envelope.id, envelope])).values()];
      await tx.insert(deliveries).values(unique.map(({ id, bytes }) => row(id, bytes))).onConflictDoNothing();
      const stored = await tx.select({ id: deliveries.id, bytes: deliveries.bytes }).from(deliveries).where(and(eq(deliveries.organisationId, tx.organisationId), inArray(deliveries.id, unique.map((each) => each.id))));
      const storedAs = new Map<string, string>();
      for (const { id, bytes } of envelopes) {
        const isSame = stored.find((each) => each.id === id)?.bytes.equals(Buffer.from(bytes));
        if (isSame) storedAs.set(id, id);
        else {
          const own = newId();
          await tx.insert(deliveries).values(row(own, bytes));
          storedAs.set(id, own);
        }
      }
      return storedAs;
    });
  }

  /** Step two, also run again for what an ended process left uninterpreted. One transaction for all, in the tablet's order. */
  async function interpretStored(organisationId: string, ids: readonly string[]): Promise<Receipt[]> {
    return database.inOrganisation(organisationId, async (tx) => {
      const rows: Delivery[] = await tx
        .select(deliveredAs)
        .from(deliveries)
        .innerJoin(tablets, and(eq(tablets.organisationId, deliveries.organisationId), eq(tablets.id, deliveries.tabletId)))
        .leftJoin(deliveryOutcomes, and(eq(deliveryOutcomes.organisationId, deliveries.organisationId), eq(deliveryOutcomes.deliveryId, deliveries.id)))
        .where(and(eq(deliveries.organisationId, tx.organisationId), inArray(deliveries.id, [...ids]), isNull(deliveryOutcomes.deliveryId)));
      const ordered = rows.map(readEnvelope).sort((a, b) => (a.envelope?.sequence ?? 0) - (b.envelope?.sequence ?? 0));
      if (ordered.length === 0) return [];
      // A PIN that is set changes what the next envelopes prove: nobody else sets or resets one meanwhile.
      if (ordered.some(({ envelope }) => envelope?.kind === 'pin-set')) await lockHead(tx);
      const known = await readPinsOf(tx, ordered, clock.now());
      const interpretations: Interpretation[] = [];
      for (const delivery of ordered) interpretations.push(await interpret(tx, config.keys, delivery, known));
      return write(tx, interpretations);
    });
  }

  /** Under the lock of the log's head: what was decided concurrently is visible now, so that one signature stands per person and version. */
  async function write(tx: Tx, interpretations: readonly Interpretation[]): Promise<Receipt[]> {
    await lockHead(tx);
    const decided = new Set((await tx.select({ id: deliveryOutcomes.deliveryId }).from(deliveryOutcomes).where(and(eq(deliveryOutcomes.organisationId, tx.organisationId), inArray(deliveryOutcomes.deliveryId, interpretations.map((each) => each.delivery.id))))).map((row) => row.id));
    const receipts: Receipt[] = [];
    for (const { delivery, keptAside, acknowledgement, answers, pin, actions, drafts } of interpretations) {
      if (decided.has(delivery.id)) continue;
      const receipt: Receipt = { id: delivery.id, outcome: keptAside === undefined ? 'recorded' : 'kept-aside', acknowledgementId: null, entryIndex: null, ...pinStateOf(acknowledgement?.pinState ?? answers?.pinState), isSuperseded: false, note: keptAside ?? null };
      if (acknowledgement && acknowledgement.kind !== 'signed') Object.assign(receipt, { pinState: null });
      const before = acknowledgement?.kind === 'signed' ? await signatureOf(tx, acknowledgement.versionId, acknowledgement.personId) : undefined;
      // A signature that its PIN does not prove stands in the way of no proven one.
      const standing = before?.pinState !== 'confirmed' && acknowledgement?.pinState === 'confirmed' ? undefined : before;
      if (standing) {
        Object.assign(receipt, { outcome: 'second', acknowledgementId: standing.id, entryIndex: standing.entryIndex, ...pinStateOf(standing.pinState), isSuperseded: standing.wasSuperseded, note: `${standing.personName} had signed this version already, at ${standing.capturedAt.toISOString()}${standing.tabletName ? ` on ${standing.tabletName}` : ''}. This one is kept beside it.` });
      } else if (pin && !(await takePin(tx, pin.row))) {
        Object.assign(receipt, { outcome: 'kept-aside', note: `${pin.event.personName} set a PIN elsewhere at the same moment. That one counts.` });
      } else {
        const [entryIndex] = await appendEntries(tx, clock, drafts, acknowledgement ? 1 : 0);
        if (acknowledgement) {
          await tx.insert(acknowledgements).values({ ...acknowledgement, entryIndex: entryIndex as number });
          Object.assign(receipt, { acknowledgementId: acknowledgement.id, isSuperseded: acknowledgement.wasSuperseded });
        }
        if (answers) await tx.insert(answerSets).values(answers);
        if (pin) await tx.insert(pinEvents).values({ ...pin.event, entryIndex: entryIndex as number });
        if (actions.length > 0) await tx.insert(correctiveActions).values([...actions]);
        receipt.entryIndex = entryIndex ?? null;
      }
      await tx.insert(deliveryOutcomes).values({ organisationId: tx.organisationId, deliveryId: delivery.id, outcome: receipt.outcome, subjectId: receipt.acknowledgementId ?? answers?.id ?? null, because: receipt.outcome === 'kept-aside' ? receipt.note : null, decidedAt: clock.now(), receipt: JSON.stringify(receipt) });
      receipts.push(receipt);
    }
    return receipts;
  }
  /** False where somebody else's delivery was first: then nothing is changed. */
  async function takePin(tx: Tx, row: typeof pins.$inferInsert): Promise<boolean> {
    if (row.proof === 'office' && (await tx.delete(startPins).where(and(eq(startPins.organisationId, tx.organisationId), eq(startPins.personId, row.personId))).returning({ personId: startPins.personId })).length === 0) return false;
    const taken = await tx
      .insert(pins)
      .values(row)
      .onConflictDoUpdate({ target: [pins.organisationId, pins.personId], set: row, setWhere: sql`${pins.proof} = 'none' AND ${row.proof ?? 'none'} <> 'none'` })
      .returning({ personId: pins.personId });
    return taken.length > 0;
  }
  const signatureOf = async (tx: Tx, versionId: string, personId: string) =>
    (await tx.select().from(acknowledgements).where(and(eq(acknowledgements.organisationId, tx.organisationId), eq(acknowledgements.versionId, versionId), eq(acknowledgements.personId, personId), eq(acknowledgements.kind, 'signed'))).orderBy(sql`${acknowledgements.pinState} <> 'confirmed'`, asc(acknowledgements.entryIndex)).limit(1))[0];

  /** One bad envelope must not hold the others back: it is set aside by itself, with the fault in the log. */
  async function interpretEach(organisationId: string, ids: readonly string[]): Promise<Receipt[]> {
    const receipts: Receipt[] = [];
    for (const id of ids) {
      try {
        receipts.push(...(await interpretStored(organisationId, [id])));
      } catch (error) {
        if (isPassing(error)) throw error;
        log.error({ err: error, delivery: id }, 'delivery could not be interpreted');
        receipts.push(await setAside(organisationId, id));
      }
    }
    return receipts;
  }
  const findPin = async (tx: Tx, personId: string) => (await tx.select({ digest: pins.digest }).from(pins).where(and(eq(pins.organisationId, tx.organisationId), eq(pins.personId, personId))))[0];
  const findStartPin = async (tx: Tx, personId: string) =>
    (await tx.select({ digest: startPins.digest }).from(startPins).where(and(eq(startPins.organisationId, tx.organisationId), eq(startPins.personId, personId), gt(startPins.expiresAt, clock.now()))))[0];
  async function setAside(organisationId: string, id: string): Promise<Receipt> {
    const note = 'The service could not record it. It is stored; the safety officer sees it.';
    const receipt: Receipt = { id, outcome: 'kept-aside', acknowledgementId: null, entryIndex: null, pinState: null, isUnwitnessed: false, isSuperseded: false, note };
    await database.inOrganisation(organisationId, (tx) => tx.insert(deliveryOutcomes).values({ organisationId, deliveryId: id, outcome: 'kept-aside', because: note, decidedAt: clock.now(), receipt: JSON.stringify(receipt) }).onConflictDoNothing());
    return receipt;
  }

  return {
    async deliver(actor: TabletActor, sent: Deliveries): Promise<Receipts> {
      const receivedAt = clock.now();
      const storedAs = await store(actor, sent, receivedAt);
      const ids = [...new Set(storedAs.values())];
      let fresh: Receipt[];
      try {
        fresh = await interpretStored(actor.organisationId, ids);
      } catch (error) {
        if (isPassing(error)) throw error;
        fresh = await interpretEach(actor.organisationId, ids);
      }
      const earlier = await database.inOrganisation(actor.organisationId, (tx) => tx.select().from(deliveryOutcomes).where(and(eq(deliveryOutcomes.organisationId, tx.organisationId), inArray(deliveryOutcomes.deliveryId, ids))));
      const receipts = [...storedAs].map(([sentId, storedId]): Receipt => {
        const now = fresh.find((each) => each.id === storedId);
        const before = earlier.find((each) => each.deliveryId === storedId);
        const known = now ?? (before && { ...(JSON.parse(before.receipt) as Receipt), outcome: 'duplicate' as const });
        if (!known) throw new Error(`delivery ${storedId} has no outcome`);
        return { ...known, id: sentId };
      });
      return { receivedAt: receivedAt.toISOString(), receipts };
    },

    /** Interprets what was stored by a process that ended before it could. Run by the worker. */
    async interpretLeftOver(): Promise<void> {
      for (const { door_organisations: organisationId } of await database.atTheDoor<{ door_organisations: string }>('SELECT door_organisations()', [])) {
        const rows = await database.inOrganisation(organisationId, (tx) =>
          tx
            .select({ id: deliveries.id })
            .from(deliveries)
            .leftJoin(deliveryOutcomes, and(eq(deliveryOutcomes.organisationId, deliveries.organisationId), eq(deliveryOutcomes.deliveryId, deliveries.id)))
            .where(and(eq(deliveries.organisationId, tx.organisationId), isNull(deliveryOutcomes.deliveryId), sql`${deliveries.receivedAt} < ${new Date(clock.now().getTime() - 10_000).toISOString()}::timestamptz`))
            .orderBy(asc(deliveries.id))
            .limit(200),
        );
        await interpretEach(organisationId, rows.map((row) => row.id));
      }
    },

    /** Says at once whether the PIN is the person's own. Five wrong tries per person and tablet, then waiting. */
    async checkPin(actor: TabletActor, { kind, personId, sealedPin, textSha256, nonce }: z.output<typeof CheckPin>): Promise<void> {
      const isStart = kind === 'start-pin';
      const key = isStart ? startPinGuessKey(personId) : pinGuessKey(personId, actor.tabletId);
      const stored = await database.inOrganisation(actor.organisationId, (tx) => (isStart ? findStartPin(tx, personId) : findPin(tx, personId)));
      if (!stored) throw new RefusedError(isStart ? 'The office gave no start PIN that is still good. Call them for one.' : 'This person has no PIN yet: set one first.', { reason: 'pin-not-set' });
      const guess = await takeGuess(database, key, freePinTries);
      if (guess.isPaused) throw new SlowDownError(`Too many wrong PINs. Wait ${guess.waitSeconds} ${guess.waitSeconds === 1 ? 'second' : 'seconds'}.`, guess.waitSeconds);
      const pin = openSeal(config.keys, { sealedPin, nonce }, textSha256);
      if (pin !== undefined && isSamePinDigest(stored.digest, pinDigest(config.keys.pinPepper, actor.organisationId, personId, pin))) {
        await wasRight(database, key);
        return;
      }
      const left = Math.max(0, freePinTries - guess.failures);
      throw new RefusedError(`This is not the right PIN. ${left === 1 ? '1 try is' : `${left} tries are`} left before a pause.`, { reason: 'pin-wrong', triesLeft: left });
    },

    /** What tablets sent and the service could not record, newest last: for the safety officer. */
    listKeptAside: (actor: PersonActor, { after, limit }: z.output<typeof PageQuery>): Promise<Page<z.input<typeof KeptAside>>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'instant', 'id');
        const rows = await tx
          .select({ id: deliveries.id, receivedAt: deliveries.receivedAt, tabletName: tablets.name, bytes: deliveries.bytes, because: deliveryOutcomes.because })
          .from(deliveryOutcomes)
          .innerJoin(deliveries, and(eq(deliveries.organisationId, deliveryOutcomes.organisationId), eq(deliveries.id, deliveryOutcomes.deliveryId)))
          .innerJoin(tablets, and(eq(tablets.organisationId, deliveries.organisationId), eq(tablets.id, deliveries.tabletId)))
          .where(and(eq(deliveryOutcomes.organisationId, tx.organisationId), eq(deliveryOutcomes.outcome, 'kept-aside'), cursor ? or(gt(deliveries.receivedAt, new Date(String(cursor[0]))), and(eq(deliveries.receivedAt, new Date(String(cursor[0]))), gt(deliveries.id, String(cursor[1])))) : undefined))
          .orderBy(asc(deliveries.receivedAt), asc(deliveries.id))
          .limit(limit + 1);
        return toPage(rows, limit, (row) => [row.receivedAt.toISOString(), row.id], (row) => ({ id: row.id, receivedAt: row.receivedAt.toISOString(), tabletName: row.tabletName, kind: /"kind"\s*:\s*"([a-z-]{1,40})"/.exec(row.bytes.toString('utf8'))?.[1] ?? null, because: row.because ?? '' }));
      }),
  };
}

/** `unwitnessed` in the words that every version of the tablet's app knows. */
const pinStateOf = (state: string | undefined): Pick<Receipt, 'pinState' | 'isUnwitnessed'> =>
  state === 'unwitnessed' ? { pinState: 'not-confirmed', isUnwitnessed: true } : { pinState: (state ?? null) as Receipt['pinState'], isUnwitnessed: false };

export type DeliveriesService = ReturnType<typeof deliveriesService>;

/** Whether the fault is the database's or the network's for now, and the tablet should simply send again. */
function isPassing(error: unknown): boolean {
  const code = databaseErrorCode(error);
  return code === undefined ? !(error instanceof TypeError || error instanceof RangeError || error instanceof SyntaxError) : /^(?:08|40|53|55|57|58)/.test(code);
}
