import { and, desc, eq, gte, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import { guessAlarms } from '#drizzle/schema/alarms';
import { people } from '#drizzle/schema/people';
import { type Deps } from '../deps';
import { type Tx } from '../platform/database';
import { type Work } from '../platform/queue';

const dayMs = 24 * 3600 * 1000;
/** A slip or two is nobody's business; this many, or from so many places, is guessing. */
const toldFrom = { failures: 30, addresses: 10 };
/** Shown this long after the last wrong try. */
const shownDays = 7;

/** Tells the owner, and whose account it is, that somebody guesses at a password: on Today and by one mail a day while it lasts. */
export function guessAlarmsService({ config, database, queue, mail, clock, log }: Pick<Deps, 'config' | 'database' | 'queue' | 'mail' | 'clock' | 'log'>) {
  return {
    /** After a wrong sign-in for an account that exists. */
    async notice(organisationId: string, personId: string, account: string): Promise<void> {
      const [guesses] = await database.atTheDoor<{ failures: number; addresses: number }>('SELECT * FROM door_guesses($1)', [account]);
      if (!guesses || (guesses.failures < toldFrom.failures && guesses.addresses < toldFrom.addresses)) return;
      const { failures, addresses } = guesses;
      await database.inOrganisation(organisationId, async (tx) => {
        // One alarm, however many processes find out at once.
        await tx.execute(sql`SELECT pg_advisory_xact_lock(hashtextextended(${`guesses at ${personId}`}, 0))`);
        const now = clock.now();
        const own = eq(guessAlarms.organisationId, tx.organisationId);
        const [going] = await tx.select().from(guessAlarms).where(and(own, eq(guessAlarms.personId, personId), gte(guessAlarms.firstAt, new Date(now.getTime() - dayMs)))).orderBy(desc(guessAlarms.firstAt)).limit(1);
        if (going) {
          await tx.update(guessAlarms).set({ lastAt: now, failures: Math.max(going.failures, failures), addresses: Math.max(going.addresses, addresses) }).where(and(own, eq(guessAlarms.id, going.id)));
          return;
        }
        const id = newId();
        await tx.insert(guessAlarms).values({ organisationId, id, personId, email: account, failures, addresses, firstAt: now, lastAt: now });
        await queue.add(tx, 'mail-guessing', { organisationId, alarmId: id });
        log.warn({ organisation: organisationId, person: personId, failures, addresses }, 'somebody guesses at a password');
      });
    },

    /** Background: to every owner, and to the person. */
    async mailAlarm({ organisationId, alarmId }: Work['mail-guessing']): Promise<void> {
      const found = await database.inOrganisation(organisationId, async (tx) => {
        const [alarm] = await tx.select({ alarm: guessAlarms, name: people.name }).from(guessAlarms).innerJoin(people, and(eq(people.organisationId, guessAlarms.organisationId), eq(people.id, guessAlarms.personId))).where(and(eq(guessAlarms.organisationId, tx.organisationId), eq(guessAlarms.id, alarmId)));
        const { rows } = await tx.execute<{ email: string }>(sql`SELECT DISTINCT email FROM door_members() WHERE role = 'owner' OR person_id = ${alarm?.alarm.personId ?? null}`);
        return alarm && alarm.alarm.mailedAt === null ? { ...alarm, to: rows.map(({ email }) => email) } : undefined;
      });
      if (!found) return;
      const { alarm, name, to } = found;
      const text = [
        `Somebody tries passwords for the sign-in of ${name} (${alarm.email}): ${alarm.failures} wrong tries from ${alarm.addresses} addresses since ${alarm.firstAt.toISOString()}.`,
        '',
        'Nobody got in by these tries. They are slowed down. Where this person has signed in before, signing in goes on as ever; from a new machine it may have to wait up to 15 minutes.',
        'If these tries were not your own people: make sure that the password is long and used nowhere else. An owner can give a new one:',
        `${config.publicUrl}/people/${alarm.personId}`,
      ];
      await mail.send({ to, subject: `Kneeboard: somebody guesses at the password of ${name}`, text: `${text.join('\n')}\n` });
      await database.inOrganisation(organisationId, (tx) => tx.update(guessAlarms).set({ mailedAt: clock.now() }).where(and(eq(guessAlarms.organisationId, organisationId), eq(guessAlarms.id, alarmId))));
    },
  };
}
export type GuessAlarmsService = ReturnType<typeof guessAlarmsService>;

/** What is to be told now, newest first. */
export const readGuessAlarms = (tx: Tx, now: Date) =>
  tx
    .select({ id: guessAlarms.id, personId: guessAlarms.personId, email: guessAlarms.email, failures: guessAlarms.failures, addresses: guessAlarms.addresses, lastAt: guessAlarms.lastAt, name: people.name })
    .from(guessAlarms)
    .innerJoin(people, and(eq(people.organisationId, guessAlarms.organisationId), eq(people.id, guessAlarms.personId)))
    .where(and(eq(guessAlarms.organisationId, tx.organisationId), gte(guessAlarms.lastAt, new Date(now.getTime() - shownDays * dayMs))))
    .orderBy(desc(guessAlarms.lastAt))
    .limit(20);
