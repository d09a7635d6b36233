import { and, eq, sql } from 'drizzle-orm';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { Role } from '#shared/common';
import { type ChangePassword, type KeepUnit, type Session, type SignIn } from '#shared/session';
import { type Deps } from '../deps';
import { InputError, SignedOutError, SlowDownError } from '../errors';
import { type PersonActor } from '../http/actor';
import { takeGuess, wasRight } from '../platform/guesses';
import { guessAlarmsService } from './guess-alarms';
import { hashPassword, refuseWeakPassword, verifyPassword } from './passwords';

/** Wrong tries before waiting begins: few for one account from one address, more for an address as a whole. */
const freeTries = { account: 5, address: 30, anywhere: 50 };

type Member = { role: string; email: string; passwordHash: string; sessionsValidFromMs: number; name: string; isActive: boolean; organisationName: string };

export function sessionService(deps: Deps) {
  const { database, clock, log } = deps;
  const alarms = guessAlarmsService(deps);
  async function readMember(organisationId: string, personId: string): Promise<Member | undefined> {
    return database.inOrganisation(organisationId, async (tx) => {
      const rows = await tx.execute<Member>(sql`
        SELECT m.role, m.email, m.password_hash AS "passwordHash", floor(extract(epoch FROM m.sessions_valid_from) * 1000)::float8 AS "sessionsValidFromMs", p.name, p.is_active AS "isActive", o.name AS "organisationName"
        FROM door_member(${personId}) m
        JOIN ${people} p ON p.id = ${personId} AND p.organisation_id = ${organisationId}
        JOIN ${organisations} o ON o.organisation_id = ${organisationId}`);
      return rows.rows[0];
    });
  }
  const toActor = (organisationId: string, personId: string, member: Member): PersonActor => ({
    kind: 'person',
    organisationId,
    organisationName: member.organisationName,
    personId,
    personName: member.name,
    role: Role.parse(member.role),
  });

  return {
    /**
     * Throws SlowDownError before looking, SignedOutError for a wrong address or password alike. A machine where this account signed in
     * before waits for its own wrong tries only: guessing from elsewhere locks nobody out of it.
     */
    async signIn({ email, password }: SignIn, address: string, knownMachine?: string): Promise<PersonActor> {
      const account = email.toLowerCase();
      const slowDown = (seconds: number) => new SlowDownError(`Too many wrong tries. Wait ${seconds} ${seconds === 1 ? 'second' : 'seconds'}, then try again.`, seconds);
      const own = knownMachine ? `account ${account} on machine ${knownMachine}` : `account ${account} from ${address}`;
      const wider = [
        { key: `address ${address}`, free: freeTries.address },
        { key: `account ${account}`, free: freeTries.anywhere },
      ];
      for (const { key, free } of knownMachine ? [] : wider) {
        const [wait] = await database.atTheDoor<{ seconds: number | null }>('SELECT door_wait($1, $2) AS seconds', [key, free]);
        if (wait?.seconds) throw slowDown(wait.seconds);
      }
      const guess = await takeGuess(database, own, freeTries.account);
      if (guess.isPaused) throw slowDown(guess.waitSeconds);
      const [login] = await database.atTheDoor<{ organisation_id: string; person_id: string; password_hash: string }>('SELECT * FROM door_find_login($1)', [account]);
      const fits = await verifyPassword(login?.password_hash, password);
      const member = login && fits ? await readMember(login.organisation_id, login.person_id) : undefined;
      if (!login || !member?.isActive) {
        for (const { key } of wider) await database.atTheDoor('SELECT door_failed($1)', [key]);
        log.warn({ address }, 'sign-in refused');
        // Told beside the answer, which takes as long for an account that nobody has.
        if (login) void alarms.notice(login.organisation_id, login.person_id, account).catch((error: unknown) => log.error({ err: error }, 'the owner could not be told of guesses'));
        throw new SignedOutError('This e-mail address and password do not belong together. Check both, or ask your owner for a new password.');
      }
      await wasRight(database, own);
      return toActor(login.organisation_id, login.person_id, member);
    },

    /** Who this session is now: role and membership are read at every request. Null ends the session. */
    async readActor(organisationId: string, personId: string, signedInAt: number): Promise<PersonActor | null> {
      const member = await readMember(organisationId, personId);
      return member?.isActive && member.sessionsValidFromMs <= signedInAt ? toActor(organisationId, personId, member) : null;
    },

    /** Ends every session of this person; answers from when new ones are good (ms). */
    async changePassword(actor: PersonActor, { current, next }: ChangePassword): Promise<number> {
      const key = `password change ${actor.personId}`;
      const guess = await takeGuess(database, key, freeTries.account);
      if (guess.isPaused) throw new SlowDownError(`Too many wrong tries. Wait ${guess.waitSeconds} seconds, then try again.`, guess.waitSeconds);
      const member = await readMember(actor.organisationId, actor.personId);
      if (!(await verifyPassword(member?.passwordHash, current))) {
        throw new InputError('The password was not changed.', [{ path: 'current', message: 'This is not your present password.' }]);
      }
      await wasRight(database, key);
      refuseWeakPassword(next, { email: member?.email ?? '', name: actor.personName }, 'next');
      const hash = await hashPassword(next);
      return database.inOrganisation(actor.organisationId, async (tx) => {
        const { rows } = await tx.execute<{ atMs: number }>(sql`SELECT floor(extract(epoch FROM door_set_password(${actor.personId}, ${hash})) * 1000)::float8 AS "atMs"`);
        return (rows[0]?.atMs ?? clock.now().getTime()) + 1;
      });
    },

    async toSession(actor: PersonActor): Promise<Session> {
      const [row] = await database.inOrganisation(actor.organisationId, (tx) => tx.select({ units: people.units }).from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.id, actor.personId))));
      return { person: { id: actor.personId, name: actor.personName }, role: actor.role, organisation: { id: actor.organisationId, name: actor.organisationName }, units: (row?.units ?? {}) as Session['units'] };
    },

    /** One row's one word: two machines of a person cannot undo each other's other quantities. */
    keepUnit: (actor: PersonActor, { quantity, unit }: KeepUnit): Promise<void> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        // A person keeps a few; whoever invents quantities by the thousand keeps none of them.
        await tx
          .update(people)
          .set({ units: sql`${people.units} || jsonb_build_object(${quantity}::text, ${unit}::text)` })
          .where(and(eq(people.organisationId, tx.organisationId), eq(people.id, actor.personId), sql`(SELECT count(*) FROM jsonb_object_keys(${people.units})) < 40 OR ${people.units} ? ${quantity}`));
      }),

    /** The organisation's name, for a paired tablet. */
    readOrganisation: (organisationId: string) =>
      database.inOrganisation(organisationId, async (tx) => (await tx.select().from(organisations).where(eq(organisations.organisationId, organisationId)))[0]),
  };
}
export type SessionService = ReturnType<typeof sessionService>;
