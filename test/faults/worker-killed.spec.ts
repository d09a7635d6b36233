import { afterAll, beforeAll, expect, it } from '@jest/globals';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import pg from 'pg';
import { ok } from '#test/support/call';
import { buildDemoSheet, quarrybondPartA } from '#test/support/demo-sheets';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { buildServer, startProcess, until, type BuiltServer } from '#test/support/processes';
import { startService, type Service } from '#test/support/service';

/** F02: `kill -9` of the worker while it reads sheets. 5 rounds in `npm test`, 50 in `npm run test:faults`. */
const rounds = Number(process.env['FAULT_ROUNDS'] ?? '5');
const sheetsEachRound = 2;

let service: Service;
let built: BuiltServer;
let organisation: Organisation;
const superuser = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 2 });

beforeAll(async () => {
  built = await buildServer();
  // A short limit for one sheet: a killed worker's sheet is taken again soon after it.
  service = await startService({ SHEET_READ_SECONDS: '6' });
  organisation = await makeOrganisation(service);
});
afterAll(async () => {
  built.remove();
  await superuser.end();
  await service.stop();
});

const work = async (): Promise<{ state: string; revisionId: string }[]> =>
  (await superuser.query<{ state: string; revisionId: string }>(`SELECT state::text, data->>'revisionId' AS "revisionId" FROM pgboss.job WHERE name = 'read-sheet' AND data->>'organisationId' = $1`, [organisation.id])).rows;
const revisions = async () => (await ok(organisation.officer.agent, 'listSheets', { query: { limit: 100 } })).items;

function childrenOf(pid: number): number[] {
  return readdirSync('/proc').filter((name) => /^\d+$/.test(name)).map(Number).filter((each) => {
    try {
      return Number(readFileSync(`/proc/${each}/stat`, 'utf8').split(') ')[1]?.split(' ')[1]) === pid;
    } catch {
      return false;
    }
  });
}

it(`reads every sheet once in effect when the worker is killed while reading, ${rounds} times`, async () => {
  const expected = new Map<string, string>();
  let killedWhileReading = 0;
  for (let round = 0; round < rounds; round += 1) {
    for (let at = 0; at < sheetsEachRound; at += 1) {
      const productName = `Quarrybond ${round * sheetsEachRound + at + 100}`;
      const bytes = await buildDemoSheet({ ...quarrybondPartA, productName });
      const { revision } = await ok(organisation.officer.agent, 'uploadSheet', { file: { bytes, fileName: `${productName}.pdf` } });
      expected.set(revision.id, productName);
    }
    const worker = startProcess(built, 'worker', service.environment);
    await until(`a sheet under way in round ${round} (the worker printed: ${worker.output()})`, async () => (await work()).some(({ state }) => state === 'active'));
    // Every other round kills at once, while the sheet is certainly being read; the rest anywhere up to the writing of what was read.
    if (round % 2 === 1) await new Promise((resolve) => setTimeout(resolve, Math.random() * 900));
    // Held still while it is looked at, so that what is counted is what the kill met.
    worker.child.kill('SIGSTOP');
    const readers = childrenOf(worker.pid);
    if ((await work()).some(({ state }) => state === 'active')) killedWhileReading += 1;
    await worker.kill();
    await until('the end of the reader whose worker was killed', async () => readers.every((pid) => !existsSync(`/proc/${pid}`)), 30_000);
  }
  expect(killedWhileReading).toBeGreaterThanOrEqual(Math.floor(rounds / 2));

  const last = startProcess(built, 'worker', service.environment);
  await until('every sheet being read', async () => (await revisions()).every(({ state }) => state !== 'waiting'), 60_000 + rounds * 5_000);
  const read = await revisions();
  // Version 1 is the upload, version 2 the one reading that counted.
  expect(read.map(({ id, state, readerState, version, productName }) => ({ id, state, readerState, version, productName })).sort((a, b) => a.id.localeCompare(b.id))).toEqual(
    [...expected].map(([id, productName]) => ({ id, state: 'read', readerState: 'read', version: 2, productName })).sort((a, b) => a.id.localeCompare(b.id)),
  );
  await until('the queue being empty', async () => (await work()).every(({ state }) => state === 'completed'), 60_000);
  expect((await work()).map(({ revisionId }) => revisionId).sort()).toEqual([...expected.keys()].sort());
  last.child.kill('SIGTERM');
  expect(await last.ended).toEqual({ code: 0, signal: null });
}, 180_000 + rounds * 30_000);
