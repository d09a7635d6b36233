import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import pg from 'pg';
import { v7 as newId } from 'uuid';
import { doorTables } from '#drizzle/schema/door';
import { ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { buildServer, startProcess, type BuiltServer } from '#test/support/processes';
import { startService, type Service } from '#test/support/service';
import { makeWorld, type World } from '#test/support/world';

/** Codes of PostgreSQL's manual, appendix A. */
const insufficientPrivilege = '42501';
const restrictViolation = '23001';
const foreignKeyViolation = '23503';

/** What people signed and what proves it. */
const signedTables = ['deliveries', 'delivery_outcomes', 'checklist_versions', 'checklist_texts', 'checklist_people', 'answer_sets', 'acknowledgements', 'exposure_bases', 'pin_events', 'spent_seals', 'recordlog_entries', 'recordlog_records', 'recordlog_checkpoints'];

let service: Service;
let own: World;
let other: World;
const pools = { app: pool('TEST_APP_DATABASE_URL'), owner: pool('TEST_OWNER_DATABASE_URL'), superuser: pool('TEST_SUPERUSER_DATABASE_URL') };
type Login = keyof typeof pools;

beforeAll(async () => {
  service = await startService();
  [own, other] = [await makeWorld(service), await makeWorld(service)];
  const { organisation, tablet, day } = own;
  const text = JSON.parse((await ok(organisation.auditor.agent, 'readText', { params: { versionId: day.version.id, language: 'en' } })).toString()) as { morning: { id: string }[] };
  await tablet.setPin(organisation.lead.personId);
  await tablet.deliver(await tablet.briefing(day.version, organisation.lead.personId, text.morning.map(({ id }) => ({ lineId: id, answer: 'yes', note: null }))));
  await ok(organisation.officer.agent, 'signBasis', {
    params: { shiftId: day.shift.id },
    body: { taskKind: 'shot-blasting', kind: 'air-samples', exposureMicrogramsPerM3: 38, conditions: 'Closed blaster with its collector.', endsOn: '2099-01-31', interimApf: null, typedName: organisation.officer.name },
  });
});
afterAll(async () => {
  await Promise.all(Object.values(pools).map((each) => each.end()));
  await service.stop();
});

function pool(name: string): pg.Pool {
  return new pg.Pool({ connectionString: testEnvironment(name), max: 2 });
}
/** Runs one statement in a transaction under a scope and takes it back. */
async function under(login: Login, organisationId: string | null, statement: string, values: readonly unknown[] = []): Promise<pg.QueryResult> {
  const client = await pools[login].connect();
  try {
    await client.query('BEGIN');
    if (organisationId !== null) await client.query(`SELECT set_config('app.organisation', $1, true)`, [organisationId]);
    return await client.query(statement, [...values]);
  } finally {
    await client.query('ROLLBACK');
    client.release();
  }
}
const tenantTables = async (): Promise<string[]> => (await pools.superuser.query<{ name: string }>(`SELECT tablename AS name FROM pg_tables WHERE schemaname = 'public' AND tablename <> ALL($1) ORDER BY 1`, [[...doorTables]])).rows.map(({ name }) => name);

describe.each(signedTables)('what was signed: %s', (table) => {
  it('holds rows of this test', async () => {
    expect(Number((await under('app', own.organisation.id, `SELECT count(*) AS found FROM ${table}`)).rows[0].found)).toBeGreaterThan(0);
  });
  it.each([
    ['UPDATE', `UPDATE ${table} SET organisation_id = organisation_id`],
    ['DELETE', `DELETE FROM ${table}`],
    ['TRUNCATE', `TRUNCATE ${table} CASCADE`],
  ])('refuses %s: the service has no right to it, and the owner meets the trigger', async (_, statement) => {
    await expect(under('app', own.organisation.id, statement)).rejects.toMatchObject({ code: insufficientPrivilege });
    await expect(under('owner', own.organisation.id, statement)).rejects.toMatchObject({ code: restrictViolation });
    // The trigger stands above policies as well.
    await expect(under('superuser', null, statement)).rejects.toMatchObject({ code: restrictViolation });
  });
  it('refuses an upsert that would change a row', async () => {
    await expect(under('app', own.organisation.id, `INSERT INTO ${table} SELECT * FROM ${table} ON CONFLICT (${(await primaryKey(table)).join(', ')}) DO UPDATE SET organisation_id = excluded.organisation_id`)).rejects.toMatchObject({ code: insufficientPrivilege });
  });
});

it('the service may change or remove rows of no other table than these', async () => {
  const { rows } = await pools.superuser.query<{ name: string; update: boolean; delete: boolean; truncate: boolean; references: boolean; trigger: boolean }>(
    `SELECT tablename AS name, has_table_privilege('kneeboard_app', quote_ident(tablename), 'UPDATE') AS update, has_table_privilege('kneeboard_app', quote_ident(tablename), 'DELETE') AS delete,
       has_table_privilege('kneeboard_app', quote_ident(tablename), 'TRUNCATE') AS truncate, has_table_privilege('kneeboard_app', quote_ident(tablename), 'REFERENCES') AS references, has_table_privilege('kneeboard_app', quote_ident(tablename), 'TRIGGER') AS trigger
     FROM pg_tables WHERE schemaname = 'public' ORDER BY 1`,
  );
  const having = (right: 'update' | 'delete' | 'truncate' | 'references' | 'trigger') => rows.filter((row) => row[right]).map((row) => row.name);
  expect(having('update').filter((name) => signedTables.includes(name))).toEqual([]);
  // Deleted and written again with a plan or a kit, a PIN that is reset or a start PIN used, a session that ends, a remembered correction taken back: none of it signed.
  expect(having('delete')).toEqual(['kit_parts', 'pins', 'sessions', 'sheet_corrections', 'shift_equipment', 'shift_kits', 'shift_people', 'start_pins']);
  expect([having('truncate'), having('references'), having('trigger')]).toEqual([[], [], []]);
});

it('every table but the door has forced policies on the organisation in scope', async () => {
  const { rows } = await pools.superuser.query<{ name: string; isOn: boolean; isForced: boolean; policies: { permissive: string; cmd: string; qual: string; with_check: string }[] }>(
    `SELECT c.relname AS name, c.relrowsecurity AS "isOn", c.relforcerowsecurity AS "isForced",
       (SELECT coalesce(json_agg(p), '[]') FROM (SELECT permissive, cmd, qual, with_check FROM pg_policies WHERE schemaname = 'public' AND tablename = c.relname) p) AS policies
     FROM pg_class c WHERE c.relnamespace = 'public'::regnamespace AND c.relkind IN ('r', 'p') ORDER BY 1`,
  );
  expect(rows.map(({ name }) => name)).toEqual(expect.arrayContaining([...signedTables, ...doorTables]));
  const scope = `(organisation_id = (NULLIF(current_setting('app.organisation'::text, true), ''::text))::uuid)`;
  // The search role sees past them in its own tables (test/api/search.spec.ts tries its one function); its member the owner does not.
  const ofSearch = [{ permissive: 'PERMISSIVE', cmd: 'SELECT', qual: 'true', with_check: null }, { permissive: 'RESTRICTIVE', cmd: 'ALL', qual: scope, with_check: null }];
  for (const { name, ...found } of rows.filter(({ name }) => !doorTables.some((door) => door === name)))
    expect({ name, ...found }).toEqual({ name, isOn: true, isForced: true, policies: [{ permissive: 'PERMISSIVE', cmd: 'ALL', qual: scope, with_check: scope }, ...(/^sheet_(?:search|words)$/.test(name) ? ofSearch : [])] });
});

it('every key of such a table carries its organisation, and so does every reference', async () => {
  const { rows } = await pools.superuser.query<{ name: string; constraint: string; columns: string[] }>(
    `SELECT c.conrelid::regclass::text AS name, c.conname AS constraint, (SELECT array_agg(a.attname::text) FROM pg_attribute a WHERE a.attrelid = c.conrelid AND a.attnum = ANY(c.conkey)) AS columns
     FROM pg_constraint c WHERE c.connamespace = 'public'::regnamespace AND c.contype IN ('p', 'f')`,
  );
  const tables = await tenantTables();
  const ofTenants = rows.filter(({ name }) => tables.includes(name));
  expect(ofTenants.length).toBeGreaterThan(tables.length);
  expect(ofTenants.filter(({ columns }) => !columns.includes('organisation_id'))).toEqual([]);
});

it('every column that names another row is held by a key: none can name a row that is not there', async () => {
  const { rows } = await pools.superuser.query<{ column: string }>(
    `SELECT c.relname || '.' || a.attname AS column FROM pg_class c JOIN pg_attribute a ON a.attrelid = c.oid AND a.attnum > 0 AND NOT a.attisdropped
     WHERE c.relname = ANY($1) AND a.atttypid = 'uuid'::regtype AND a.attname NOT IN ('organisation_id', 'id')
       AND NOT EXISTS (SELECT 1 FROM pg_constraint k WHERE k.conrelid = c.oid AND k.contype = 'f' AND a.attnum = ANY(k.conkey)) ORDER BY 1`,
    [await tenantTables()],
  );
  // Tasks live in a shift's plan; an outcome and an entry name rows of several tables; what is searched is written by triggers.
  expect(rows.map(({ column }) => column)).toEqual(['answer_sets.task_id', 'corrective_actions.task_id', 'delivery_outcomes.subject_id', 'recordlog_entries.subject_id', 'sheet_search.product_id']);
});

describe('a forgotten scope', () => {
  it.each([['never set', null], ['empty, as it reads after a COMMIT', '']])('%s: shows nothing, in any table, to the service and to the owner', async (_, scope) => {
    for (const login of ['app', 'owner'] as const) for (const table of await tenantTables()) expect([table, (await under(login, scope, `SELECT * FROM ${table} LIMIT 1`)).rows]).toEqual([table, []]);
  });
  it('inserts nothing, changes nothing and removes nothing', async () => {
    const id = newId();
    await expect(under('app', null, `INSERT INTO people (organisation_id, id, name, language) VALUES ($1, $2, 'Nobody', 'en')`, [own.organisation.id, id])).rejects.toMatchObject({ code: insufficientPrivilege });
    await expect(under('app', '', `INSERT INTO organisations (organisation_id, name) VALUES ($1, 'Nobody')`, [id])).rejects.toMatchObject({ code: insufficientPrivilege });
    expect((await under('app', null, `UPDATE people SET name = 'Nobody'`)).rowCount).toBe(0);
    expect((await under('app', null, `DELETE FROM pins`)).rowCount).toBe(0);
  });
  it('does not stay from one transaction to the next on the same connection', async () => {
    const client = await pools.app.connect();
    try {
      await client.query('BEGIN');
      await client.query(`SELECT set_config('app.organisation', $1, true)`, [own.organisation.id]);
      expect((await client.query('SELECT 1 FROM people')).rowCount).toBeGreaterThan(0);
      await client.query('COMMIT');
      expect((await client.query('SELECT 1 FROM people')).rowCount).toBe(0);
    } finally {
      client.release();
    }
  });
});

describe("another organisation's rows", () => {
  it('are not seen, changed or removed under our scope, whatever the statement asks for', async () => {
    for (const table of await tenantTables()) expect([table, (await under('app', own.organisation.id, `SELECT * FROM ${table} WHERE organisation_id = $1`, [other.organisation.id])).rowCount]).toEqual([table, 0]);
    expect((await under('app', own.organisation.id, `UPDATE people SET name = 'Ours' WHERE organisation_id = $1`, [other.organisation.id])).rowCount).toBe(0);
    expect((await under('app', own.organisation.id, `DELETE FROM kit_parts WHERE organisation_id = $1`, [other.organisation.id])).rowCount).toBe(0);
  });
  it('cannot be written in their name, nor ours given to them', async () => {
    await expect(under('app', own.organisation.id, `INSERT INTO people (organisation_id, id, name, language) VALUES ($1, $2, 'Planted', 'en')`, [other.organisation.id, newId()])).rejects.toMatchObject({ code: insufficientPrivilege });
    await expect(under('app', own.organisation.id, `UPDATE people SET organisation_id = $1`, [other.organisation.id])).rejects.toMatchObject({ code: insufficientPrivilege });
  });
  it.each([
    ['a product in our kit', `INSERT INTO kit_parts (organisation_id, kit_id, position, product_id, part, form) VALUES ($1, $2, 9, $3, 'X', 'liquid')`, 'kitId', 'productId'],
    ['a person on our shift', `INSERT INTO shift_people (organisation_id, shift_id, person_id) VALUES ($1, $2, $3)`, 'shiftId', 'personId'],
    ['a kit on our shift', `INSERT INTO shift_kits (organisation_id, shift_id, kit_id) VALUES ($1, $2, $3)`, 'shiftId', 'kitId'],
    ['a machine on our shift', `INSERT INTO shift_equipment (organisation_id, shift_id, equipment_id) VALUES ($1, $2, $3)`, 'shiftId', 'equipmentId'],
    ['a person on our published version', `INSERT INTO checklist_people (organisation_id, version_id, person_id, name, language) VALUES ($1, $2, $3, 'X', 'en')`, 'versionId', 'personId'],
    ['our tablet under their delivery', `INSERT INTO deliveries (organisation_id, id, tablet_id, bytes, received_at, sent_at) VALUES ($1, $2, $3, '', now(), now())`, 'shiftId', 'tabletId'],
    ['a shift of their job', `INSERT INTO shifts (organisation_id, id, job_id, date, plan) VALUES ($1, gen_random_uuid(), coalesce($3, $2::uuid), '2030-01-01', '{}')`, 'jobId', 'jobId'],
    ['their person as witness of our PIN', `UPDATE pins SET witness_person_id = $3 WHERE organisation_id = $1 AND person_id = $2`, 'leadId', 'personId'],
    ['their tablet under our PIN', `UPDATE pins SET tablet_id = $3 WHERE organisation_id = $1 AND person_id = $2`, 'leadId', 'tabletId'],
    ['their version under our action', `UPDATE corrective_actions SET version_id = $3 WHERE organisation_id = $1 AND id = $2`, 'actionId', 'versionId'],
    ['their person as owner of our action', `UPDATE corrective_actions SET owner_person_id = coalesce($3, $2::uuid) WHERE organisation_id = $1`, 'personId', 'personId'],
  ])('cannot be referenced: %s', async (_, statement, ours, theirs) => {
    await expect(under('app', own.organisation.id, statement, [own.organisation.id, own.ids[ours], other.ids[theirs]])).rejects.toMatchObject({ code: foreignKeyViolation });
  });
});

describe('the door', () => {
  it.each(doorTables.filter((table) => table !== 'sessions'))('%s cannot be read or written by the service, in no scope', async (table) => {
    for (const scope of [null, own.organisation.id])
      for (const statement of [`SELECT * FROM ${table}`, `SELECT count(*) FROM ${table}`, `DELETE FROM ${table}`, `UPDATE ${table} SET ${table === 'attempts' ? 'failures = 0' : 'organisation_id = organisation_id'}`, `TRUNCATE ${table}`])
        await expect(under('app', scope, statement)).rejects.toMatchObject({ code: insufficientPrivilege });
  });
  it('opens only by functions whose search path is fixed and which the public may not run', async () => {
    const { rows } = await pools.superuser.query<{ name: string; config: string[] | null; isDefiner: boolean; isPublic: boolean; isApp: boolean }>(
      `SELECT proname AS name, proconfig AS config, prosecdef AS "isDefiner", has_function_privilege('public', oid, 'EXECUTE') AS "isPublic", has_function_privilege('kneeboard_app', oid, 'EXECUTE') AS "isApp" FROM pg_proc WHERE pronamespace = 'public'::regnamespace AND proname LIKE 'door%'`,
    );
    expect(rows.length).toBeGreaterThan(10);
    for (const { name, ...found } of rows) expect({ name, ...found }).toEqual({ name, config: ['search_path=public, pg_temp'], isDefiner: true, isPublic: false, isApp: true });
  });
  it('tells nothing about people when no organisation is in scope, and only of the one that is', async () => {
    expect((await under('app', null, 'SELECT * FROM door_members()')).rows).toEqual([]);
    expect((await under('app', null, 'SELECT * FROM door_member($1)', [own.organisation.owner.personId])).rows).toEqual([]);
    expect((await under('app', other.organisation.id, 'SELECT * FROM door_member($1)', [own.organisation.owner.personId])).rows).toEqual([]);
    const members = await under('app', own.organisation.id, 'SELECT email FROM door_members()');
    expect(members.rows.map((row: { email: string }) => row.email)).toEqual(expect.arrayContaining([own.organisation.owner.email]));
    expect(members.rows.map((row: { email: string }) => row.email)).not.toContain(other.organisation.owner.email);
  });
  it("does not let one organisation change, take or end another's sign-in or tablet", async () => {
    const { owner } = other.organisation;
    await expect(under('app', null, `SELECT door_set_login($1, 'new@marrowslate.example', 'owner', 'x')`, [owner.personId])).rejects.toThrow('no organisation in scope');
    expect((await under('app', own.organisation.id, `SELECT door_set_login($1, $2, 'owner', 'x') AS done`, [own.organisation.owner.personId, owner.email])).rows).toEqual([{ done: 'taken' }]);
    for (const statement of ['SELECT door_remove_login($1)', `SELECT door_set_password($1, 'x')`]) await under('app', own.organisation.id, statement, [owner.personId]);
    await under('app', own.organisation.id, 'SELECT door_withdraw_tablet($1)', [other.tablet.id]);
    await ok(owner.agent, 'readSession');
    await ok(other.tablet.agent, 'readTabletDay');
  });
  it('keeps sessions, tablets and codes as hashes only', async () => {
    const { code } = await ok(own.organisation.owner.agent, 'addTablet', { body: { name: 'Tablet 5' } });
    const dump = await pools.superuser.query<{ all: string }>(`SELECT (SELECT string_agg(s::text, ' ') FROM sessions s) || (SELECT string_agg(t::text || encode(coalesce(pairing_hash, ''), 'escape') || encode(coalesce(token_hash, ''), 'escape'), ' ') FROM tablet_keys t) AS all`);
    const cookies = ['kneeboard_session', 'kneeboard_tablet'].map((name) => [own.organisation.owner.agent, own.tablet.agent].flatMap((agent) => agent.jar.getCookie(name, { path: '/api/tablet', domain: '127.0.0.1', secure: false, script: false })?.value ?? [])[0]);
    expect(cookies).toEqual([expect.stringMatching(/^s%3A.{32}/), expect.stringMatching(/^[\w-]{43}$/)]);
    const secrets = [...cookies, decodeURIComponent(cookies[0] ?? '').slice(2, 34), code, code.replace(' ', '')];
    for (const secret of secrets) expect(dump.rows[0]?.all).not.toContain(secret);
  });
});

describe('the service role asking for more', () => {
  it.each(['ALTER TABLE acknowledgements DISABLE TRIGGER ALL', 'ALTER TABLE acknowledgements NO FORCE ROW LEVEL SECURITY', 'DROP TABLE acknowledgements', 'DROP TRIGGER append_only ON acknowledgements', `SET session_replication_role = 'replica'`, 'SET ROLE kneeboard_owner', 'SET SESSION AUTHORIZATION postgres', 'CREATE FUNCTION scope2() RETURNS int LANGUAGE sql AS $$ SELECT 1 $$', `COPY people TO PROGRAM 'cat'`, 'CREATE POLICY mine ON people USING (true)'])('is refused: %s', async (statement) => {
    await expect(under('app', own.organisation.id, statement)).rejects.toMatchObject({ code: insufficientPrivilege });
  });
});

describe('the service started as somebody who could lift the policies', () => {
  let built: BuiltServer;
  beforeAll(async () => {
    built = await buildServer();
  });
  afterAll(() => built.remove());
  it.each([['the owner', 'TEST_OWNER_DATABASE_URL', 'kneeboard_owner'], ['a superuser', 'TEST_SUPERUSER_DATABASE_URL', 'postgres']])('as %s: ends with a sentence that says so, without listening', async (_, variable, name) => {
    const started = startProcess(built, 'both', { ...service.environment, DATABASE_URL: testEnvironment(variable) });
    expect(await started.ended).toEqual({ code: 1, signal: null });
    expect(started.output().trim()).toBe(`The service refuses to start as database role "${name}": it could lift the policies that keep organisations apart. Use a role that owns no tables and has neither SUPERUSER nor BYPASSRLS.`);
  });
});

async function primaryKey(table: string): Promise<string[]> {
  const { rows } = await pools.superuser.query<{ columns: string[] }>(`SELECT array_agg(quote_ident(a.attname)) AS columns FROM pg_index i JOIN pg_attribute a ON a.attrelid = i.indrelid AND a.attnum = ANY(i.indkey) WHERE i.indrelid = $1::regclass AND i.indisprimary`, [table]);
  return rows[0]?.columns ?? [];
}
