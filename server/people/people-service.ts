import { and, asc, eq, gt, ilike, inArray, or, sql } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import { people } from '#drizzle/schema/people';
import { pins, startPins } from '#drizzle/schema/pins';
import { Role, type Page } from '#shared/common';
import { type Person, type PersonEdit, type PeopleQuery, type SetLogin } from '#shared/people';
import type * as z from 'zod';
import { type Deps } from '../deps';
import { ConflictError, ForbiddenError, InputError, NotFoundError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { readCursor, toPage } from '../paging';
import { type Tx } from '../platform/database';
import { hashPassword, refuseWeakPassword } from '../session/passwords';

type PersonRow = typeof people.$inferSelect;

export function peopleService({ database, clock, log }: Deps) {
  const toPerson = async (tx: Tx, row: PersonRow): Promise<Person> => (await toPeople(tx, [row]))[0] as Person;
  async function toPeople(tx: Tx, rows: readonly PersonRow[]): Promise<Person[]> {
    const logins = await tx.execute<{ person_id: string; email: string; role: string }>(sql`SELECT * FROM door_members()`);
    const byPerson = new Map(logins.rows.map((login) => [login.person_id, { email: login.email, role: Role.parse(login.role) }]));
    const ids = rows.map((row) => row.id);
    const proofs = new Map((ids.length === 0 ? [] : await tx.select({ personId: pins.personId, proof: pins.proof }).from(pins).where(and(eq(pins.organisationId, tx.organisationId), inArray(pins.personId, ids)))).map((pin) => [pin.personId, pin.proof]));
    const given = new Map((ids.length === 0 ? [] : await tx.select().from(startPins).where(and(eq(startPins.organisationId, tx.organisationId), inArray(startPins.personId, ids), gt(startPins.expiresAt, clock.now())))).map((start) => [start.personId, start]));
    const startPinOf = (id: string): Person['startPin'] => {
      const start = given.get(id);
      return start ? { givenBy: start.givenByName, givenAt: start.givenAt.toISOString(), expiresAt: start.expiresAt.toISOString() } : null;
    };
    return rows.map(({ organisationId: _, units: __, respirators, language, ...row }) => ({
      ...row,
      language: language as Person['language'],
      respirators: respirators as Person['respirators'],
      hasPin: proofs.has(row.id),
      pinProof: (proofs.get(row.id) as Person['pinProof']) ?? null,
      startPin: startPinOf(row.id),
      login: byPerson.get(row.id) ?? null,
    }));
  }
  const find = async (tx: Tx, id: string): Promise<PersonRow> => {
    const [row] = await tx.select().from(people).where(and(eq(people.organisationId, tx.organisationId), eq(people.id, id)));
    if (!row) throw new NotFoundError('person');
    return row;
  };

  return {
    list: (actor: PersonActor, { after, limit, q }: z.output<typeof PeopleQuery>): Promise<Page<Person>> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const cursor = readCursor(after, 'text', 'id');
        const rows = await tx
          .select()
          .from(people)
          .where(
            and(
              eq(people.organisationId, tx.organisationId),
              q ? ilike(people.name, `%${q.replace(/[\\%_]/g, '\\$&')}%`) : undefined,
              cursor ? or(gt(people.name, String(cursor[0])), and(eq(people.name, String(cursor[0])), gt(people.id, String(cursor[1])))) : undefined,
            ),
          )
          .orderBy(asc(people.name), asc(people.id))
          .limit(limit + 1);
        const items = new Map((await toPeople(tx, rows)).map((person) => [person.id, person]));
        return toPage(rows, limit, (row) => [row.name, row.id], (row) => items.get(row.id) as Person);
      }),

    read: (actor: PersonActor, id: string): Promise<Person> => database.inOrganisation(actor.organisationId, async (tx) => toPerson(tx, await find(tx, id))),

    add: (actor: PersonActor, edit: PersonEdit): Promise<Person> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        const [row] = await tx.insert(people).values({ organisationId: tx.organisationId, id: newId(), ...edit }).returning();
        return toPerson(tx, row as PersonRow);
      }),

    edit: (actor: PersonActor, id: string, version: number, edit: PersonEdit): Promise<Person> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'owner', 'safety-officer');
        if (!edit.isActive) await refuseLosingOwner(tx, actor, id);
        const [row] = await tx
          .update(people)
          .set({ ...edit, version: sql`${people.version} + 1` })
          .where(and(eq(people.organisationId, tx.organisationId), eq(people.id, id), eq(people.version, version)))
          .returning();
        if (!row) throw new ConflictError('Somebody changed this person after you opened it. Compare, then save again.', await toPerson(tx, await find(tx, id)));
        if (!edit.isActive) await removeLogin(tx, actor, id);
        return toPerson(tx, row);
      }),

    setLogin: async (actor: PersonActor, id: string, { login }: SetLogin): Promise<Person> => {
      demandRole(actor, 'owner');
      const person = await database.inOrganisation(actor.organisationId, (tx) => find(tx, id));
      if (login?.password) refuseWeakPassword(login.password, { email: login.email, name: person.name }, 'login.password');
      const hash = login?.password ? await hashPassword(login.password) : null;
      return database.inOrganisation(actor.organisationId, async (tx) => {
        if (!login) await removeLogin(tx, actor, id);
        else {
          if (id === actor.personId && login.role !== 'owner') throw new RefusedError('You would lock yourself out. Give another person the owner role first, and let them change yours.');
          if (!person.isActive) throw new RefusedError(`${person.name} is not active. Make them active first.`);
          const { rows } = await tx.execute<{ done: string }>(sql`SELECT door_set_login(${id}, ${login.email}, ${login.role}, ${hash}) AS done`);
          if (rows[0]?.done === 'taken') throw new InputError('The sign-in was not saved.', [{ path: 'login.email', message: 'Another person signs in with this address.' }]);
          if (rows[0]?.done === 'password-missing') throw new InputError('The sign-in was not saved.', [{ path: 'login.password', message: 'Give a first password of at least 12 characters.' }]);
        }
        log.info({ by: actor.personId, person: id, role: login?.role ?? null }, 'sign-in changed');
        return toPerson(tx, await find(tx, id));
      });
    },
  };

  /** Sign-ins are the owner's business: nobody else ends an owner's, and the last one stays. */
  async function refuseLosingOwner(tx: Tx, actor: PersonActor, id: string): Promise<void> {
    const { rows } = await tx.execute<{ person_id: string; role: string }>(sql`SELECT * FROM door_members()`);
    const owners = rows.filter((login) => login.role === 'owner').map((login) => login.person_id);
    if (!owners.includes(id)) return;
    if (actor.role !== 'owner') throw new ForbiddenError('This person is an owner. Another owner can make them inactive.');
    if (owners.length === 1) throw new RefusedError('This is the last owner. Give another person the owner role first.');
  }

  async function removeLogin(tx: Tx, actor: PersonActor, id: string): Promise<void> {
    if (id === actor.personId) throw new RefusedError('You cannot take away your own sign-in. Another owner can.');
    await tx.execute(sql`SELECT door_remove_login(${id})`);
  }
}
export type PeopleService = ReturnType<typeof peopleService>;
