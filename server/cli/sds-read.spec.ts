import { describe, expect, it } from '@jest/globals';
import { spawnSync } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildDemoSheet, primer } from '#test/support/demo-sheets';

const root = fileURLToPath(new URL('../..', import.meta.url));
const run = (...files: string[]) => spawnSync(process.execPath, ['--import', 'tsx', 'server/cli/sds-read.ts', ...files], { cwd: root, encoding: 'utf8', env: { ...process.env, NODE_OPTIONS: '' } });

describe('npm run -s sds:read -- FILE…', () => {
  it('prints one JSON line a file, also for a bad one, and says which file is missing', async () => {
    const folder = await mkdtemp(path.join(os.tmpdir(), 'kneeboard-'));
    await writeFile(path.join(folder, 'primer.pdf'), await buildDemoSheet(primer));
    await writeFile(path.join(folder, 'picture.pdf'), Buffer.from([0xff, 0xd8, 0xff]));
    const { stdout, stderr, status } = run(path.join(folder, 'primer.pdf'), path.join(folder, 'absent.pdf'), path.join(folder, 'picture.pdf'));
    const lines = stdout.trim().split('\n').map((line) => JSON.parse(line) as Record<string, unknown>);
    expect(lines).toMatchObject([
      { file: 'primer.pdf', state: 'read', pages: 3, has_text_layer: true, language: 'en', product_name: 'Northlode Primer 12', revision_date: '2022-08-16', signal_word: 'DANGER', h_codes: ['H226', 'H314', 'H317', 'H411'], section_count: 16 },
      { file: 'picture.pdf', state: 'not-a-pdf', has_text_layer: false, product_name: null, h_codes: [], components: [], section_count: null },
    ]);
    expect(stderr).toMatch(/absent\.pdf: no such file/);
    expect(status).toBe(1);
    await rm(folder, { recursive: true });
  }, 30_000);

  it('asks for a file when none is given', () => {
    expect(run()).toMatchObject({ status: 1, stderr: expect.stringMatching(/usage/) });
  }, 30_000);
});
