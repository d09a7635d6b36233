import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import pg from 'pg';
import { v7 as newId } from 'uuid';
import { type SearchAnswer } from '#shared/library';
import { type Revision, type SheetEdit } from '#shared/sheets';
import { call, expectProblem, ok } from '#test/support/call';
import { noFields } from '#server/sds/sheet-fields';
import { buildDemoSheet, quarrybondPartB } from '#test/support/demo-sheets';
import { jobEdit, kitEdit } from '#test/support/edits';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

let service: Service;
let own: Organisation;
let other: Organisation;
const made: Record<string, Revision> = {};
const app = new pg.Pool({ connectionString: testEnvironment('TEST_APP_DATABASE_URL'), max: 2 });
const superuser = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 1 });

/** Castor oil 8001-79-4, xylene 1330-20-7, MDI 101-68-8: CAS Common Chemistry. */
const library: readonly Partial<SheetEdit>[] = [
  { productName: 'Quarrybond 40 Part A' },
  { productName: 'Quarrybond 40 Part B', signalWord: 'danger', hazardCodes: ['H334', 'H302+H332'], ingredients: [{ name: 'Methylenediphenyl diisocyanate', cas: '101-68-8', concentration: '30 - 60 %' }] },
  { productName: 'Quarrybond', hazardCodes: [], ingredients: [] },
  { productName: 'Tarnseal Epoxy Primer', supplier: 'Eastmere Coatings', ingredients: [{ name: 'Xylene', cas: '1330-20-7', concentration: '< 5 %' }], protectionWords: [{ topic: 'respiratory', text: 'Wear a respirator against quarrybond dust.' }] },
  { productName: 'Imprimación Señal', supplier: 'Río Claro Pinturas', language: 'es', protectionWords: [{ topic: 'respiratory', text: 'Asegure la ventilación adecuada.' }], ingredients: [] },
  { productName: 'Oil Off', supplier: 'Quarrybond Trading', ingredients: [] },
];

beforeAll(async () => {
  service = await startService();
  [own, other] = [await makeOrganisation(service), await makeOrganisation(service, 'Other Floors')];
  for (const changes of library) made[changes.productName ?? ''] = await own.confirmedSheet(changes);
  await other.confirmedSheet({ productName: 'Quarrybond 40 Part A' });
  await other.confirmedSheet({ productName: 'Zephyrite Sealer', supplier: 'Zephyrite Works', ingredients: [{ name: 'Zephyrite oil', cas: '67-64-1', concentration: null }], hazardCodes: ['H372'], protectionWords: [{ topic: 'hands', text: 'Zephyrite gloves.' }] });
});
afterAll(async () => {
  await Promise.all([app.end(), superuser.end()]);
  await service.stop();
});

const search = (q: string, more: Record<string, string | number> = {}, by = own): Promise<SearchAnswer> => ok(by.auditor.agent, 'searchSheets', { query: { q, ...more } });
const namesOf = ({ items }: SearchAnswer) => items.map(({ revision }) => revision.productName);
const found = async (q: string, more: Record<string, string | number> = {}) => namesOf(await search(q, more));

describe('what is found', () => {
  it('puts the exact name first, then names that begin so, then the supplier, then the text', async () => {
    const { items } = await search('quarrybond');
    expect(items.map(({ revision, matched }) => [revision.productName, matched])).toEqual([
      ['Quarrybond', 'Name'],
      ['Quarrybond 40 Part A', 'Name'],
      ['Quarrybond 40 Part B', 'Name'],
      ['Oil Off', 'Supplier'],
      ['Tarnseal Epoxy Primer', 'Text of the sheet'],
    ]);
    expect(items.at(-1)?.snippet).toContain('\u2068quarrybond\u2069 dust');
    expect(items.slice(0, 4).map(({ snippet }) => snippet)).toEqual([null, null, null, null]);
  });
  it.each([
    ['QUARRYBOND 40 part b', 'Quarrybond 40 Part B', 'Name'],
    ['quarrybond-40, part B', 'Quarrybond 40 Part B', 'Name'],
    ['part b quarry', 'Quarrybond 40 Part B', 'Name'],
    ['primer tarn', 'Tarnseal Epoxy Primer', 'Name'],
    ['eastmere', 'Tarnseal Epoxy Primer', 'Supplier'],
    ['coatings eastmere', 'Tarnseal Epoxy Primer', 'Supplier'],
    ['tarnseal eastmere', 'Tarnseal Epoxy Primer', 'Name and supplier'],
    ['seal epoxy', 'Tarnseal Epoxy Primer', 'Part of a name'],
    ['imprimacion senal', 'Imprimación Señal', 'Name'],
    ['rio claro', 'Imprimación Señal', 'Supplier'],
    ['xylene', 'Tarnseal Epoxy Primer', 'Text of the sheet'],
    ['oi', 'Oil Off', 'Name'],
    ['quarrybond H334', 'Quarrybond 40 Part B', 'Name, code H334'],
    ['quarrybond 101-68-8', 'Quarrybond 40 Part B', 'Name, CAS number 101-68-8'],
  ])('"%s" finds %s by its %s', async (q, name, matched) => {
    const [first] = (await search(q)).items;
    expect([first?.revision.productName, first?.matched]).toEqual([name, matched]);
  });
  it.each(['101-68-8', '101688', '000101-68-8', '0000101688', 'CAS 101-68-8', 'CAS-No.: 101-68-8', '101\u201168\u20118'])('the CAS number written "%s" finds its sheet alone', async (q) => {
    expect((await search(q)).items.map(({ revision, matched }) => [revision.productName, matched])).toEqual([['Quarrybond 40 Part B', 'CAS number 101-68-8']]);
  });
  it.each([['H334', 'Code H334'], ['h334', 'Code H334'], ['H302', 'Code H302'], ['H302+H332', 'Code H302, code H332']])('the code %s finds its sheet', async (q, matched) => {
    expect((await search(q)).items.map((item) => [item.revision.productName, item.matched])).toEqual([['Quarrybond 40 Part B', matched]]);
  });
  it('a code no sheet carries finds nothing', async () => {
    expect(await search('H372')).toEqual({ items: [], hasMore: false });
  });
});

describe('slips of the keyboard', () => {
  it.each([
    ['quarybond', 'Quarrybond'],
    ['qaurrybond', 'Quarrybond'],
    ['quarrybnod 40 part a', 'Quarrybond 40 Part A'],
    ['epxoy', 'Tarnseal Epoxy Primer'],
    ['epoxi', 'Tarnseal Epoxy Primer'],
    ['primre', 'Tarnseal Epoxy Primer'],
    ['eastmeer', 'Tarnseal Epoxy Primer'],
    ['tarnsael primmer', 'Tarnseal Epoxy Primer'],
    ['iol', 'Oil Off'],
    ['quarybo', 'Quarrybond'],
  ])('"%s" finds %s, and says what was looked for instead', async (q, name) => {
    const [first] = (await search(q)).items;
    expect([first?.revision.productName, first?.matched]).toEqual([name, expect.stringMatching(/^Similar to what you typed: \w/)]);
  });
  it('does not guess figures: another figure is another product', async () => {
    expect(await found('quarrybond 41')).toEqual([]);
  });
  it('does not guess where what was typed is known', async () => {
    expect((await search('quarrybond')).items.filter(({ matched }) => matched.startsWith('Similar'))).toEqual([]);
  });
  it.each(['zzzzzz', 'xq', 'kkkkkkkkkkkk'])('"%s" is like nothing here', async (q) => {
    expect(await search(q)).toEqual({ items: [], hasMore: false });
  });
});

describe('the text of a sheet', () => {
  it('is found by its words in any ending once the sheet was read, with the place', async () => {
    const { revision } = await ok(own.officer.agent, 'uploadSheet', { file: { bytes: await buildDemoSheet(quarrybondPartB), fileName: 'northlode-download.pdf' } });
    expect((await search('northlode download')).items.map((item) => item.revision.id)).toEqual([revision.id]);
    await service.readSheetNow(own.id, revision.id);
    const { items } = await search('breathe apparatus', { state: 'read' });
    expect(items.map((item) => [item.revision.id, item.matched])).toEqual([[revision.id, 'Text of the sheet']]);
    expect(items[0]?.snippet).toMatch(/\u2068\p{L}+\u2069/u);
    expect((await search('"breathing apparatus"', { state: 'read' })).items[0]?.revision.id).toBe(revision.id);
    expect((await search('isocyanates -methylenediphenyl', { state: 'read' })).items).toEqual([]);
    await ok(own.officer.agent, 'setRevisionAside', { params: { revisionId: revision.id }, version: (await ok(own.officer.agent, 'readRevision', { params: { revisionId: revision.id } })).version });
    expect((await search('breathing apparatus', { state: 'read' })).items).toEqual([]);
    expect((await search('breathing apparatus', { state: 'set-aside' })).items.map((item) => item.revision.id)).toEqual([revision.id]);
  });
  it.each(['ventilación', 'ventilacion', 'adecuadas'])('is found in Spanish: "%s"', async (q) => {
    expect(await found(q)).toContain('Imprimación Señal');
  });
});

describe('filters', () => {
  it('keep to a state, a language, a signal word', async () => {
    expect(await found('quarrybond', { signalWord: 'danger', state: 'confirmed' })).toEqual(['Quarrybond 40 Part B']);
    expect(await found('señal', { language: 'en' })).toEqual([]);
    expect(await found('señal', { language: 'es' })).toEqual(['Imprimación Señal']);
    expect(await found('quarrybond', { state: 'set-aside' })).not.toContain('Quarrybond');
    expect(names(expectProblem(await call(own.auditor.agent, 'searchSheets', { query: { q: 'x', state: 'gone' } }), 400))).toEqual(['state']);
  });
  it('in use: part of a kit planned on a shift of an open job, until the job is closed', async () => {
    const a = made['Quarrybond 40 Part A'];
    const kit = await ok(own.officer.agent, 'addKit', { body: kitEdit(a?.productId ?? '') });
    expect(await found('quarrybond', { isInUse: 'true' })).toEqual([]);
    const { job } = await own.plannedDay({ kits: [kit.id] });
    expect(await found('quarrybond', { isInUse: 'true' })).toEqual(['Quarrybond 40 Part A']);
    expect(await found('quarrybond', { isInUse: 'false' })).not.toContain('Quarrybond 40 Part A');
    await ok(own.officer.agent, 'editJob', { params: { jobId: job.id }, version: job.version, body: jobEdit({ isOpen: false }) });
    expect(await found('quarrybond', { isInUse: 'true' })).toEqual([]);
  });
  it('a limit, and whether there is more', async () => {
    const { items, hasMore } = await search('quarrybond', { limit: 2 });
    expect([items.length, hasMore]).toEqual([2, true]);
    expect((await search('tarnseal', { limit: 1 })).hasMore).toBe(false);
  });
  it('the current sheet of a product stands before the one it replaced', async () => {
    const newer = await own.confirmedSheet({ productName: 'Oil Off', supplier: 'Quarrybond Trading', revisedOn: '2025-01-07', ingredients: [] });
    expect((await search('oil off')).items.filter(({ matched }) => matched === 'Name').map(({ revision }) => [revision.id === newer.id, revision.isCurrent])).toEqual([[true, true], [false, false]]);
  });
});

describe('another organisation', () => {
  it.each(['zephyrite', 'zephyrite sealer', 'zehpyrite', 'sealer', '67-64-1', 'H372', 'zephyrite works', '"zephyrite gloves"'])('"%s" finds nothing of theirs', async (q) => {
    expect((await search(q)).items.filter(({ revision }) => Object.values(made).every(({ id }) => id !== revision.id) && revision.isCurrent && revision.supplier?.startsWith('Zeph'))).toEqual([]);
    expect(JSON.stringify(await search(q))).not.toMatch(/zephyrite (?:sealer|works|oil)/i);
    expect((await search(q, {}, other)).items.map(({ revision }) => revision.productName)).toEqual(['Zephyrite Sealer']);
  });
  it('the same name finds each one its own', async () => {
    const [mine, theirs] = [await search('quarrybond 40 part a'), await search('quarrybond 40 part a', {}, other)];
    expect(mine.items[0]?.revision.id).not.toBe(theirs.items[0]?.revision.id);
    expect(theirs.items).toHaveLength(1);
  });
  it('a forged scope in the address is refused by name', async () => {
    for (const key of ['organisationId', 'organisation', 'scope']) expect(names(expectProblem(await call(own.auditor.agent, 'searchSheets', { query: { q: 'zephyrite', [key]: other.id } }), 400))).toEqual([key]);
  });

  const raw = async (scope: string | null, statement: string, values: unknown[] = []) => {
    const client = await app.connect();
    try {
      await client.query('BEGIN');
      if (scope !== null) await client.query(`SELECT set_config('app.organisation', $1, true)`, [scope]);
      return (await client.query(statement, values)).rows as Record<string, unknown>[];
    } finally {
      await client.query('ROLLBACK');
      client.release();
    }
  };
  const direct = `SELECT * FROM search_sheets($1, $1, '{}', '{}', NULL, NULL, NULL, NULL, NULL, 500)`;
  it('the function itself answers nothing without a scope, and fails on one that is no id', async () => {
    expect(await raw(null, direct, ['zephyrite'])).toEqual([]);
    expect(await raw('', direct, ['zephyrite'])).toEqual([]);
    // Nor anything of theirs in ours, before it is joined back.
    for (const q of ['zephyrite', 'zephyrite sealer', 'zehpyrite', 'zephyrite gloves', 'phyrite']) expect([q, await raw(own.id, direct, [q])]).toEqual([q, []]);
    expect(await raw(other.id, direct, ['zephyrite'])).toHaveLength(1);
    // 22P02 invalid_text_representation, 42501 insufficient_privilege: PostgreSQL manual, appendix A.
    await expect(raw(`' OR true --`, direct, ['zephyrite'])).rejects.toMatchObject({ code: '22P02' });
  });
  it('the function is its role’s, whose path is fixed, which nobody signs in as and which sees nothing else', async () => {
    const { rows } = await superuser.query(`SELECT pg_get_userbyid(proowner) AS owner, prosecdef, proconfig, has_function_privilege('public', oid, 'EXECUTE') AS "isPublic" FROM pg_proc WHERE proname = 'search_sheets'`);
    expect(rows).toEqual([{ owner: 'kneeboard_search', prosecdef: true, proconfig: ['search_path=public, pg_temp', 'client_min_messages=warning', 'plan_cache_mode=force_generic_plan'], isPublic: false }]);
    const { rows: seen } = await superuser.query(`SELECT table_name AS name, array_agg(DISTINCT privilege_type::text) AS rights FROM information_schema.column_privileges WHERE grantee = 'kneeboard_search' GROUP BY 1 ORDER BY 1`);
    expect(seen).toEqual([{ name: 'sheet_search', rights: ['SELECT'] }, { name: 'sheet_words', rights: ['SELECT'] }]);
    const { rows: owned } = await superuser.query(`SELECT count(*)::int AS owned FROM pg_class WHERE relowner = 'kneeboard_search'::regrole`);
    expect(owned).toEqual([{ owned: 0 }]);
    await expect(raw(own.id, 'SET ROLE kneeboard_search')).rejects.toMatchObject({ code: '42501' });
  });
  it('the tables behind it show the service its own rows only, and take none in another’s name', async () => {
    for (const table of ['sheet_search', 'sheet_words']) {
      expect(await raw(own.id, `SELECT 1 FROM ${table} WHERE organisation_id = $1`, [other.id])).toEqual([]);
      expect(await raw(null, `SELECT 1 FROM ${table} LIMIT 1`)).toEqual([]);
      expect((await raw(own.id, `SELECT count(*)::int AS found FROM ${table}`))[0]?.['found']).toBeGreaterThan(4);
    }
    await expect(raw(own.id, `INSERT INTO sheet_words (organisation_id, word) VALUES ($1, 'planted')`, [other.id])).rejects.toMatchObject({ code: '42501' });
    expect(await raw(own.id, `SELECT index_sheet($1, 'planted words')`, [(await search('zephyrite', {}, other)).items[0]?.revision.id])).toEqual([{ index_sheet: '' }]);
    expect((await search('planted', {}, other)).items).toEqual([]);
  });
  it('no more than 500 candidates, whatever is asked for', async () => {
    const organisation = await makeOrganisation(service);
    await service.deps.database.inOrganisation(organisation.id, async ({ client }) => {
      await client.query(
        `INSERT INTO revisions (organisation_id, id, sha256, byte_length, file_name, state, fields, uploaded_by, uploaded_at)
         SELECT $1, gen_random_uuid(), md5(n::text) || md5(n::text), 1, 'marl.pdf', 'read', $3::jsonb || jsonb_build_object('productName', jsonb_build_object('value', 'Marlcoat ' || n, 'confidence', 1)), $2, now() FROM generate_series(1, 510) n`,
        [organisation.id, organisation.officer.personId, JSON.stringify(noFields())],
      );
    });
    for (const most of [500, 501, 1_000_000]) expect(await raw(organisation.id, direct.replace('500', String(most)), ['marlcoat'])).toHaveLength(500);
    expect((await search('marlcoat', { limit: 50 }, organisation)).items).toHaveLength(50);
  });
});

describe('what nobody types in earnest', () => {
  it.each([
    `'; DROP TABLE revisions; --`, `' OR '1'='1`, `quarrybond' & !'x`, '%', '_', '%%__', '\\', '\\\\', `\\'`, '(((', ')', '[a-z', '.*', '^$', '(?<!x)', '\\m\\M', '*', ':*', "'a':*", '!', '!!', '&', '|', '<->', '<2>', '-', '--', '"', '"""', '"quarry', '- -quarrybond', 'OR', 'or or or', 'and', 'the', 'a the of',
    '<script>alert(1)</script>', '$1', '${x}', '{}', '{a,b}', 'NULL', '0', '-1', '1e999', 'H', 'P', 'CAS', 'CAS:', '0-00-0', '\u200f\u202eابحث عن', 'شركة الطلاء', 'צבע רצפה', '床の塗料', '👷‍♀️🧪', 'ﬁller', 'ＱＵＡＲＲＹ', 'e\u0301poxy', 'İ', 'ß', `${'x'.repeat(100)}`, `${'a '.repeat(50)}`, `${'(a|'.repeat(33)}`, `${'"a" '.repeat(25)}`, `${'-a '.repeat(33)}`,
  ])('%s is answered', async (q) => {
    const before = service.faults.length;
    const response = await call(own.auditor.agent, 'searchSheets', { query: { q } });
    expect({ q, status: response.status }).toEqual({ q, status: q.trim() === '' ? 400 : 200 });
    expect(service.faults.slice(before)).toEqual([]);
  });
  it('a wide or ligatured letter is the letter it stands for', async () => {
    expect(await found('ＱＵＡＲＲＹＢＯＮＤ')).toContain('Quarrybond');
  });
  it('names in other scripts are found', async () => {
    await own.confirmedSheet({ productName: 'طلاء الأرضية 40', supplier: 'شركة الطلاء', ingredients: [] });
    expect(await found('طلاء الأرضية')).toEqual(['طلاء الأرضية 40']);
    expect(await found('شركة')).toEqual(['طلاء الأرضية 40']);
  });
  it.each([['101 characters', 'x'.repeat(101)], ['nothing', ''], ['spaces', '   '], ['a NUL', 'a\u0000b'], ['half a character', 'a\ud800']])('%s is refused by name', async (_, q) => {
    // Half a character cannot even be sent: the address would carry a replacement.
    const response = await call(own.auditor.agent, 'searchSheets', { query: { q } });
    if (q.includes('\ud800')) expect([200, 400]).toContain(response.status);
    else expect(names(expectProblem(response, 400))).toEqual(['q']);
  });
  it('one that is known but not signed in learns nothing', async () => {
    expectProblem(await call((await own.tablet(`Tablet ${newId().slice(-4)}`)).agent, 'searchSheets', { query: { q: 'quarrybond' } }), 401);
  });
});

const names = ({ errors }: { errors: { path: string }[] }): string[] => errors.map(({ path }) => path);
