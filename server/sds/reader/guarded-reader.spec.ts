import { afterAll, afterEach, beforeAll, describe, expect, it } from '@jest/globals';
import { execFileSync } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { buildDemoSheet, quarrybondPartC } from '#test/support/demo-sheets';
import { decompressionBomb } from '#test/support/odd-pdfs';
import { createGuardedReader, residentBytes, type GuardedReader, type GuardedReaderOptions } from './guarded-reader';

const entry = fileURLToPath(new URL('./child.ts', import.meta.url));
const megabyte = 1024 * 1024;
const open: GuardedReader[] = [];
const reader = (options: Partial<GuardedReaderOptions> = {}): GuardedReader => {
  const made = createGuardedReader({ wallClockMs: 20_000, maxRssBytes: 1024 * megabyte, entry, ...options });
  open.push(made);
  return made;
};

// Inside the project, so that the bundle finds the packages it leaves outside.
let folderOfBundle = '';
let bundle = '';
beforeAll(async () => {
  folderOfBundle = await mkdtemp(fileURLToPath(new URL('../../../node_modules/.kneeboard-', import.meta.url)));
  bundle = path.join(folderOfBundle, 'sheet-reader.mjs');
  await build({ entryPoints: [entry], outfile: bundle, bundle: true, platform: 'node', format: 'esm', packages: 'external', target: 'node20' });
}, 60_000);
afterAll(async () => rm(folderOfBundle, { recursive: true, force: true }));

afterEach(async () => {
  await Promise.all(open.splice(0).map((each) => each.close()));
});

describe('the guarded reader', () => {
  it('reads bytes and paths, one after the other, in one warm child', async () => {
    const bytes = await buildDemoSheet(quarrybondPartC);
    const folder = await mkdtemp(path.join(os.tmpdir(), 'kneeboard-'));
    const file = path.join(folder, 'sheet.pdf');
    await writeFile(file, bytes);
    const guarded = reader();
    const readings = await Promise.all([guarded.read(bytes), guarded.read(file), guarded.read(new Uint8Array()), guarded.read(path.join(folder, 'absent.pdf'))]);
    expect(readings.map(({ state }) => state)).toEqual(['read', 'read', 'not-a-pdf', 'damaged']);
    expect(readings[0]).toEqual(readings[1]);
    expect(readings[0]?.productName?.value).toBe(quarrybondPartC.productName);
    await rm(folder, { recursive: true });
  }, 60_000);

  it('stops a sheet that takes too long, and reads the next', async () => {
    const guarded = reader({ wallClockMs: 1500 });
    expect((await guarded.read(decompressionBomb(60))).state).toBe('too-slow');
    expect((await guarded.read(new Uint8Array())).state).toBe('not-a-pdf');
  }, 90_000);

  it('stops a sheet that takes too much memory, and reads the next', async () => {
    // The bundle's own share is some 130 MB; run from source, the loader holds several times as much.
    const guarded = reader({ entry: bundle, maxRssBytes: 330 * megabyte });
    // Blanks are skipped fast: this one swells before it is slow.
    expect((await guarded.read(decompressionBomb(200, ' '))).state).toBe('too-much-memory');
    expect((await guarded.read(await buildDemoSheet(quarrybondPartC))).state).toBe('read');
  }, 90_000);

  it('outlives a child that dies', async () => {
    const folder = await mkdtemp(path.join(os.tmpdir(), 'kneeboard-'));
    const dying = path.join(folder, 'dying.mjs');
    await writeFile(dying, "process.on('message', () => process.exit(3)); process.send({ kind: 'ready' });");
    const guarded = reader({ entry: dying });
    expect((await guarded.read(new Uint8Array([1]))).state).toBe('damaged');
    expect((await guarded.read(new Uint8Array([1]))).state).toBe('damaged');
    await rm(folder, { recursive: true });
  }, 60_000);

  it('says clearly that its program does not start', async () => {
    const guarded = reader({ entry: path.join(os.tmpdir(), 'no-such-reader.mjs') });
    await expect(guarded.read(new Uint8Array([1]))).rejects.toThrow(/ended while starting/);
  }, 60_000);

  it('refuses work after it was closed', async () => {
    const guarded = reader();
    await guarded.close();
    await expect(guarded.read(new Uint8Array())).rejects.toThrow(/closed/);
  });

  it('works from the bundle as from the source', async () => {
    const reading = await reader({ entry: bundle }).read(await buildDemoSheet(quarrybondPartC));
    expect(reading).toMatchObject({ state: 'read', productName: { value: quarrybondPartC.productName } });
  }, 60_000);

  it('starts another child when the idle one was killed from outside', async () => {
    const guarded = reader({ entry: bundle });
    await guarded.read(new Uint8Array());
    const children = execFileSync('ps', ['-o', 'pid=,args=', '--ppid', String(process.pid)]).toString().split('\n');
    const own = children.filter((line) => line.includes(bundle)).map((line) => parseInt(line, 10));
    expect(own).toHaveLength(1);
    process.kill(own[0] ?? 0, 'SIGKILL');
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect((await guarded.read(await buildDemoSheet(quarrybondPartC))).state).toBe('read');
  }, 60_000);

  it('knows the memory of a living process and of none', async () => {
    expect(await residentBytes(process.pid)).toBeGreaterThan(10 * megabyte);
    expect(await residentBytes(undefined)).toBe(0);
  });
});
