import { afterAll, beforeEach, describe, expect, it } from '@jest/globals';
import { mkdirSync, mkdtempSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { sourceHash } from './build.mjs';

describe('sourceHash', () => {
  const base = mkdtempSync(join(tmpdir(), 'kneeboard-hash-'));
  afterAll(() => rmSync(base, { recursive: true, force: true }));
  let before = '';
  const now = () => sourceHash(base, ['server', 'package.json', 'absent']);

  beforeEach(() => {
    rmSync(join(base, 'server'), { recursive: true, force: true });
    mkdirSync(join(base, 'server/jobs'), { recursive: true });
    writeFileSync(join(base, 'server/jobs/job.ts'), 'one');
    writeFileSync(join(base, 'package.json'), '{}');
    before = now();
  });

  it('stays while nothing changes, also when a spec or something outside does', () => {
    writeFileSync(join(base, 'server/jobs/job.spec.ts'), 'test');
    writeFileSync(join(base, 'README.md'), 'words');
    expect(now()).toBe(before);
  });

  it.each([
    ['a file changes', () => writeFileSync(join(base, 'server/jobs/job.ts'), 'two')],
    ['a file is added', () => writeFileSync(join(base, 'server/extra.ts'), '')],
    ['a file is renamed', () => renameSync(join(base, 'server/jobs/job.ts'), join(base, 'server/jobs/task.ts'))],
    ['a file goes', () => rmSync(join(base, 'server/jobs/job.ts'))],
    ['a single named file changes', () => writeFileSync(join(base, 'package.json'), '{"a":1}')],
  ])('changes when %s', (_situation, change) => {
    change();
    expect(now()).not.toBe(before);
  });
});
