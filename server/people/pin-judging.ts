import { and, eq, inArray, sql } from 'drizzle-orm';
import { pins, spentSeals, startPins } from '#drizzle/schema/pins';
import { type PinState } from '#shared/acknowledgements';
import { type PinProof } from '#shared/people';
import { type Config } from '../config';
import { type Tx } from '../platform/database';
import { isSamePinDigest, pinDigest } from './pin-digest';
import { unsealPin } from './pin-unsealing';
import { readLeads } from './witnesses';

/** Wrong PINs before waiting begins, for one person on one tablet, asked online or delivered. */
export const freePinTries = 5;
export const pinGuessKey = (personId: string, tabletId: string): string => `pin ${personId} on ${tabletId}`;
/** A start PIN is guessed at from every tablet together: it belongs to no tablet, and there is one. */
export const startPinGuessKey = (personId: string): string => `start pin ${personId}`;

/** A PIN on record; `isPaused` while too many wrong ones came from this tablet. */
interface KnownPin {
  readonly digest: string;
  readonly proof: PinProof;
  isPaused: boolean;
}
interface KnownStartPin {
  readonly digest: string;
  readonly givenBy: string;
  readonly givenByName: string;
  readonly expiresAt: Date;
  isPaused: boolean;
}
/** What is known of PINs before deliveries are judged, and changes as they are. */
export interface KnownPins {
  readonly pins: Map<string, KnownPin>;
  readonly startPins: Map<string, KnownStartPin>;
  /** Names of who may witness, by id. */
  readonly leads: ReadonlyMap<string, string>;
}

/** What the tablet sealed. */
export interface Sealed {
  readonly sealedPin: string;
  readonly nonce: string;
}
export interface Voucher {
  readonly proof: PinProof;
  readonly byPersonId: string | null;
  readonly byName: string | null;
}

/** The PINs of these people now; start PINs and leads only where a PIN is to be set. */
export async function readPins(tx: Tx, ids: readonly string[], tabletId: string, settingIds: readonly string[], now: Date): Promise<KnownPins> {
  const rows =
    ids.length === 0
      ? []
      : await tx.select({ personId: pins.personId, digest: pins.digest, proof: pins.proof, waitSeconds: sql<number | null>`door_wait('pin ' || ${pins.personId} || ' on ' || ${tabletId}::text, ${freePinTries})` }).from(pins).where(and(eq(pins.organisationId, tx.organisationId), inArray(pins.personId, [...ids])));
  const starts =
    settingIds.length === 0
      ? []
      : await tx
          .select({ row: startPins, waitSeconds: sql<number | null>`door_wait('start pin ' || ${startPins.personId}, ${freePinTries})` })
          .from(startPins)
          .where(and(eq(startPins.organisationId, tx.organisationId), inArray(startPins.personId, [...settingIds])));
  return {
    pins: new Map(rows.map(({ personId, digest, proof, waitSeconds }) => [personId, { digest, proof: proof as PinProof, isPaused: (waitSeconds ?? 0) > 0 }])),
    startPins: new Map(starts.map(({ row, waitSeconds }) => [row.personId, { ...row, isPaused: (waitSeconds ?? 0) > 0 }])),
    leads: new Map(settingIds.length === 0 ? [] : (await readLeads(tx, now)).map(({ id, name }) => [id, name])),
  };
}

/** The PIN, when the seal opens and stands for this very text and nonce. */
export function openSeal(keys: Config['keys'], { sealedPin, nonce }: Sealed, textHash: string): string | undefined {
  try {
    const opened = unsealPin(sealedPin, keys.pinSealingKey);
    return opened.textHash === textHash && opened.nonce === nonce ? opened.pin : undefined;
  } catch {
    return undefined;
  }
}

/** Judges PINs that came in deliveries of one tablet. Wrong guesses count with those asked online; while that pause lasts no PIN counts as right, or guesses could hide in deliveries. */
export function pinJudge(tx: Tx, keys: Config['keys'], { id: deliveryId, tabletId }: { readonly id: string; readonly tabletId: string }, known: KnownPins) {
  const digestOf = (personId: string, pin: string) => pinDigest(keys.pinPepper, tx.organisationId, personId, pin);
  async function failed(key: string): Promise<boolean> {
    const { rows } = await tx.execute<{ failures: number }>(sql`SELECT door_failed(${key}) AS failures`);
    return (rows[0]?.failures ?? 0) > freePinTries;
  }

  /** Whether this seal has proven no other delivery: one copied from a tablet's storage must not witness or open a task again. */
  async function spend(nonce: string): Promise<boolean> {
    const taken = await tx.insert(spentSeals).values({ organisationId: tx.organisationId, nonce, deliveryId }).onConflictDoNothing().returning({ nonce: spentSeals.nonce });
    if (taken.length > 0) return true;
    const [spent] = await tx.select({ deliveryId: spentSeals.deliveryId }).from(spentSeals).where(and(eq(spentSeals.organisationId, tx.organisationId), eq(spentSeals.nonce, nonce)));
    return spent?.deliveryId === deliveryId;
  }

  async function judge(personId: string, sealed: Sealed, textHash: string): Promise<PinState> {
    const stored = known.pins.get(personId);
    if (!stored) return 'not-set';
    const pin = openSeal(keys, sealed, textHash);
    if (pin === undefined || stored.isPaused) return 'not-confirmed';
    if (isSamePinDigest(stored.digest, digestOf(personId, pin))) return (await spend(sealed.nonce)) ? (stored.proof === 'none' ? 'unwitnessed' : 'confirmed') : 'not-confirmed';
    stored.isPaused = await failed(pinGuessKey(personId, tabletId));
    return 'not-confirmed';
  }

  /** Who vouches for the person that sets a PIN; a sentence where what came in proof is false. */
  async function vouch(ownerId: string, ownerName: string, textHash: string, witness: (Sealed & { readonly personId: string }) | null, start: Sealed | null, at: Date): Promise<Voucher | string> {
    if (witness) {
      const state = witness.personId === ownerId ? 'not-confirmed' : await judge(witness.personId, witness, textHash);
      // Who is named as witness has shown their own PIN: anything less would put a witness on record who saw nothing.
      if (state !== 'confirmed' && state !== 'unwitnessed') return `The PIN that was to witness ${ownerName}'s new one was not the witness's own. Ask them to set it again.`;
      const name = known.leads.get(witness.personId);
      if (name === undefined) return `Who witnessed ${ownerName}'s new PIN is neither a lead nor an officer. Ask them to set it again before one.`;
      return { proof: state === 'confirmed' ? 'lead' : 'none', byPersonId: witness.personId, byName: name };
    }
    if (!start) return { proof: 'none', byPersonId: null, byName: null };
    const given = known.startPins.get(ownerId);
    if (!given || given.expiresAt < at) return `The start PIN that ${ownerName} used is not good any more. Give a new one; they then set their PIN again.`;
    const pin = openSeal(keys, start, textHash);
    const isRight = pin !== undefined && !given.isPaused && isSamePinDigest(given.digest, digestOf(ownerId, pin));
    if (!isRight) {
      if (pin !== undefined && !given.isPaused) given.isPaused = await failed(startPinGuessKey(ownerId));
      return `The start PIN that ${ownerName} used is not the one the office gave. They set their PIN again with the right one.`;
    }
    known.startPins.delete(ownerId);
    return { proof: 'office', byPersonId: given.givenBy, byName: given.givenByName };
  }

  return { judge, vouch, digestOf };
}
