import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import pg from 'pg';
import { v7 as newId } from 'uuid';
import { type CallInput, call, expectProblem, ok } from '#test/support/call';
import { editOf } from '#test/support/edits';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation, type Organisation, type PublishedDay } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { type TestTablet } from '#test/support/tablet';
import { verifyExport } from '#test/support/verify-log';

let service: Service;
const superuser = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 2 });
beforeAll(async () => {
  service = await startService();
});
afterAll(async () => {
  await superuser.end();
  await service.stop();
});

interface Scene {
  organisation: Organisation;
  tablet: TestTablet;
  days: PublishedDay[];
  crew: string;
}
const crewName = '=HYPERLINK("x")';
/** Two jobs on two days, each signed by the lead and by somebody whose name a spreadsheet would run. */
async function scene(): Promise<Scene> {
  const organisation = await makeOrganisation(service);
  const crew = (await organisation.person(crewName, { language: 'es' })).id;
  const tablet = await organisation.tablet('+Tablet, "one"');
  const days = [];
  for (const date of ['2026-11-05', '2026-11-06']) {
    const day = await organisation.publishedDay({ crew: [crew], date });
    await tablet.deliverAll([await tablet.signed(day.version, organisation.lead.personId), tablet.couldNotSign(day.version, crew, { note: '@cmd, "no"\n-1' }), await tablet.signed(day.version, crew)]);
    days.push(day);
  }
  return { organisation, tablet, days, crew };
}

describe('the history', () => {
  it('is newest first in pages without gap or double, with what was found and what there is', async () => {
    const { organisation } = await scene();
    const { agent } = organisation.auditor;
    const whole = await ok(agent, 'listHistory');
    expect(whole).toMatchObject({ total: 6, found: 6, isFoundCapped: false, next: null });
    expect(whole.items.map(({ entryIndex }) => entryIndex)).toEqual([...whole.items.map(({ entryIndex }) => entryIndex)].sort((a, b) => b - a));
    const pages = [];
    for (let after: string | undefined; ; ) {
      const page = await ok(agent, 'listHistory', { query: { limit: 4, ...(after ? { after } : {}) } });
      pages.push(page.items);
      if (!page.next) break;
      after = page.next;
    }
    expect(pages.map((page) => page.length)).toEqual([4, 2]);
    expect(pages.flat()).toEqual(whole.items);
  });

  it('stays in place while more is signed: a page read before is not shifted', async () => {
    const { organisation, tablet, days } = await scene();
    const { agent } = organisation.auditor;
    const first = await ok(agent, 'listHistory', { query: { limit: 3 } });
    await tablet.deliver(tablet.couldNotSign(days[0]?.version ?? raise(), organisation.lead.personId));
    const second = await ok(agent, 'listHistory', { query: { limit: 3, after: first.next ?? '' } });
    expect(new Set([...first.items, ...second.items].map(({ id }) => id)).size).toBe(6);
  });

  it('answers by job, person, day and kind, each alone and together', async () => {
    const { organisation, days, crew } = await scene();
    const [first, second] = days as [PublishedDay, PublishedDay];
    const lead = organisation.lead.personId;
    const found = async (query: CallInput['query']) => {
      const page = await ok(organisation.auditor.agent, 'listHistory', { query: query ?? {} });
      expect([page.total, page.found]).toEqual([6, page.items.length]);
      return page.items.map(({ jobId, personId, shiftDate, kind }) => [jobId === first.job.id ? 1 : 2, personId === lead ? 'lead' : 'crew', shiftDate, kind]);
    };
    expect(await found({ jobId: first.job.id })).toEqual([[1, 'crew', '2026-11-05', 'signed'], [1, 'crew', '2026-11-05', 'could-not-sign'], [1, 'lead', '2026-11-05', 'signed']]);
    expect(await found({ personId: lead })).toEqual([[2, 'lead', '2026-11-06', 'signed'], [1, 'lead', '2026-11-05', 'signed']]);
    expect(await found({ from: '2026-11-06' })).toHaveLength(3);
    expect(await found({ to: '2026-11-05' })).toHaveLength(3);
    expect(await found({ from: '2026-11-05', to: '2026-11-06', kind: 'could-not-sign' })).toEqual([[2, 'crew', '2026-11-06', 'could-not-sign'], [1, 'crew', '2026-11-05', 'could-not-sign']]);
    expect(await found({ jobId: second.job.id, personId: crew, kind: 'signed', from: '2026-11-06', to: '2026-11-06' })).toEqual([[2, 'crew', '2026-11-06', 'signed']]);
    expect(await found({ from: '2026-11-07' })).toEqual([]);
    expect(await found({ personId: newId() })).toEqual([]);
  });

  it('shows the exact text that was signed, word for word, also after the job and the person got other names', async () => {
    const { organisation, days, crew } = await scene();
    const day = days[0] ?? raise();
    await organisation.publishAgain(day, 'A later fact.');
    const person = await ok(organisation.owner.agent, 'readPerson', { params: { personId: crew } });
    await ok(organisation.owner.agent, 'editPerson', { params: { personId: crew }, version: person.version, body: { ...editOf(person), name: 'Renamed Since' } });
    const [row] = (await ok(organisation.auditor.agent, 'listHistory', { query: { personId: crew, jobId: day.job.id, kind: 'signed' } })).items;
    expect(row).toMatchObject({ personName: crewName });
    const full = await ok(organisation.auditor.agent, 'readAcknowledgement', { params: { acknowledgementId: row?.id ?? '' } });
    const text = await ok(organisation.auditor.agent, 'readText', { params: { versionId: full.versionId, language: full.language } });
    expect(full.versionId).toBe(day.version.id);
    expect(text.toString()).toContain(JSON.stringify(full.sentence).slice(1, -1));
    expect(text.toString()).not.toContain('A later fact');
  });

  it('comes as CSV with every cell inert for a spreadsheet, filtered like the list (F21)', async () => {
    const { organisation, days } = await scene();
    const bytes = await ok(organisation.auditor.agent, 'exportHistory', { query: { jobId: days[0]?.job.id ?? '' } });
    const text = bytes.toString();
    expect(text.startsWith('\ufeffentry,')).toBe(true);
    const rows = parseCsv(text.slice(1));
    expect(rows).toHaveLength(4);
    for (const cell of rows.flat()) expect(cell).not.toMatch(/^[=+\-@\t\r]/);
    expect(rows.map((cells) => cells[3])).toEqual(['person', 'Dov Lindqvist', `'${crewName}`, `'${crewName}`]);
    expect(rows[2]?.[9]).toBe('is missing gear: @cmd, "no"\n-1');
    expect(rows[1]?.[12]).toBe(`'+Tablet, "one"`);
  });

  it("is nobody else's", async () => {
    await scene();
    const other = await makeOrganisation(service);
    expect(await ok(other.auditor.agent, 'listHistory')).toMatchObject({ items: [], total: 0, found: 0 });
    expect((await ok(other.auditor.agent, 'exportHistory')).toString().trim().split('\r\n')).toHaveLength(1);
    expectProblem(await call(other.auditor.agent, 'exportRecord'), 422);
    expect(await ok(other.auditor.agent, 'checkRecord')).toMatchObject({ entries: 0, isGood: true, checkpoint: null });
  });
});

describe('the record log', () => {
  it('exports a file that a verifier of its own finds good, with the key and against an older checkpoint', async () => {
    const { organisation, tablet, days } = await scene();
    const { agent } = organisation.auditor;
    const check = await ok(agent, 'checkRecord');
    expect(check).toMatchObject({ isGood: true, trouble: null, entries: 10 });
    const earlier = await ok(agent, 'exportRecord');
    await tablet.deliver(tablet.couldNotSign(days[0]?.version ?? raise(), organisation.lead.personId));
    const later = await ok(agent, 'exportRecord');
    expect(await verifyExport(later, '--key', check.key)).toMatchObject({ code: 0 });
    expect((await verifyExport(later, '--key', check.key.replace(/.{4}$/, 'AAAA'))).code).not.toBe(0);
    const lines = earlier.toString().split('\n');
    for (const [what, changed] of [['an entry less', [...lines.slice(0, 3), ...lines.slice(4)]], ['two entries exchanged', [...lines.slice(0, 2), lines[3], lines[2], ...lines.slice(4)]]] as const) expect([what, (await verifyExport(Buffer.from(changed.join('\n')))).code]).toEqual([what, 1]);
  });

  it('gives a receipt of one signature that the verifier finds good by itself, and a proof on the page', async () => {
    const { organisation } = await scene();
    const { agent } = organisation.auditor;
    const [row] = (await ok(agent, 'listHistory')).items;
    const params = { acknowledgementId: row?.id ?? '' };
    expect(await ok(agent, 'readAcknowledgement', { params })).toMatchObject({ proof: null, checkpoint: null });
    const receipt = await ok(agent, 'exportEntry', { params });
    expect(await verifyExport(receipt)).toMatchObject({ code: 0 });
    expect((await verifyExport(Buffer.from(receipt.toString().replace(/"salt":"../, '"salt":"zz')))).code).toBe(1);
    expect(await ok(agent, 'readAcknowledgement', { params })).toMatchObject({ proof: { index: row?.entryIndex }, checkpoint: { note: expect.stringContaining('kneeboard/') } });
  });

  /** As somebody who owns the machine can: triggers off, then whatever they like. */
  async function tamper(statements: readonly [string, readonly unknown[]][]): Promise<void> {
    const client = await superuser.connect();
    try {
      await client.query('BEGIN');
      await client.query(`SET LOCAL session_replication_role = 'replica'`);
      for (const [statement, values] of statements) expect((await client.query(statement, [...values])).rowCount).toBeGreaterThan(0);
      await client.query('COMMIT');
    } catch (error) {
      await client.query('ROLLBACK');
      throw error;
    } finally {
      client.release();
    }
  }
  const entries = 'organisation_id = $1 AND index';
  const moved = (table: string, from: number, to: number): string => `UPDATE ${table} SET index = ${to} WHERE ${entries} = ${from}`;
  const exchange = (table: string): string[] => [moved(table, 4, -1), moved(table, 5, 4), moved(table, -1, 5)];

  it.each<[string, string[], number]>([
    ['a record is rewritten', [`UPDATE recordlog_records SET bytes = convert_to(replace(convert_from(bytes, 'UTF8'), '"kind":"signed"', '"kind":"paper"'), 'UTF8') WHERE ${entries} = 4`], 4],
    ['a leaf is rewritten and its hash with it', [`UPDATE recordlog_entries SET leaf = replace(leaf, '"recordedAt":"20', '"recordedAt":"19'), leaf_hash = sha256('\\x00'::bytea || convert_to(replace(leaf, '"recordedAt":"20', '"recordedAt":"19'), 'UTF8')) WHERE ${entries} = 4`], 4],
    ['a leaf hash is rewritten', [`UPDATE recordlog_entries SET leaf_hash = sha256('x') WHERE ${entries} = 4`], 4],
    // Which one it was, nobody can tell from the file: the verifier says so, and what is missing at the end.
    ['an entry is removed and the rest closed up', ['recordlog_records', 'recordlog_entries'].flatMap((table) => [`DELETE FROM ${table} WHERE ${entries} = 4`, ...[5, 6, 7, 8, 9].map((index) => moved(table, index, index - 1))]), 9],
    ['an entry is removed', [`DELETE FROM recordlog_records WHERE ${entries} = 4`, `DELETE FROM recordlog_entries WHERE ${entries} = 4`], 4],
    ['two entries are exchanged', ['recordlog_entries', 'recordlog_records'].flatMap(exchange), 5],
  ])('shows a superuser\'s hand and names the first bad entry: %s (F28)', async (_, statements, first) => {
    const { organisation } = await scene();
    const { agent } = organisation.auditor;
    const kept = await ok(agent, 'exportRecord');
    expect(await verifyExport(kept)).toMatchObject({ code: 0 });
    await tamper(statements.map((statement) => [statement, [organisation.id]]));
    const { code, output } = await verifyExport(await ok(agent, 'exportRecord'));
    expect(code).toBe(1);
    expect(output).toMatch(new RegExp(`\\b(?:[Ee]ntry|entries) ${first}\\b`));
    expect(await ok(agent, 'checkRecord')).toMatchObject({ isGood: false, trouble: expect.any(String) });
  });

  it('shows a history rewritten from the start, with a key and checkpoints that fit, to whoever kept an older checkpoint (F28)', async () => {
    const { organisation, tablet, days } = await scene();
    const { agent } = organisation.auditor;
    const kept = await ok(agent, 'exportRecord');
    await tamper([
      [`UPDATE recordlog_records SET bytes = convert_to(replace(convert_from(bytes, 'UTF8'), '"kind":"signed"', '"kind":"paper"'), 'UTF8') WHERE ${entries} = 4`, [organisation.id]],
      [`UPDATE recordlog_entries e SET leaf = regexp_replace(leaf, '"recordHash":"[0-9a-f]{64}"', '"recordHash":"' || encode((SELECT sha256(salt || bytes) FROM recordlog_records r WHERE r.organisation_id = e.organisation_id AND r.index = e.index), 'hex') || '"') WHERE ${entries} = 4`, [organisation.id]],
      [`UPDATE recordlog_entries SET leaf_hash = sha256('\\x00'::bytea || convert_to(leaf, 'UTF8')) WHERE ${entries} = 4`, [organisation.id]],
      ['DELETE FROM recordlog_checkpoints WHERE organisation_id = $1', [organisation.id]],
    ]);
    // The service signs what it finds: within the database nothing is wrong any more.
    await tablet.deliver(tablet.couldNotSign(days[0]?.version ?? raise(), organisation.lead.personId));
    const rewritten = await ok(agent, 'exportRecord');
    expect(await verifyExport(rewritten)).toMatchObject({ code: 0 });
    expect(await verifyWithEarlier(rewritten, kept)).toMatchObject({ code: 1 });
  });
});

async function verifyWithEarlier(bytes: Buffer, earlier: Buffer): Promise<{ code: number | null; output: string }> {
  const { mkdtempSync, rmSync, writeFileSync } = await import('node:fs');
  const { join } = await import('node:path');
  const folder = mkdtempSync(join((await import('node:os')).tmpdir(), 'kneeboard-earlier-'));
  try {
    writeFileSync(join(folder, 'earlier.jsonl'), earlier);
    return await verifyExport(bytes, '--earlier', join(folder, 'earlier.jsonl'));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** RFC 4180, enough for what we write. */
function parseCsv(text: string): string[][] {
  const rows: string[][] = [[]];
  for (const [, quoted, plain = '', end] of text.matchAll(/(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n|$)/g)) {
    rows.at(-1)?.push(quoted === undefined ? plain : quoted.replace(/""/g, '"'));
    if (end === '\r\n') rows.push([]);
    if (end === '') break;
  }
  return rows.filter((cells) => cells.length > 1);
}
const raise = (): never => {
  throw new Error('the scene lacks a day');
};

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
