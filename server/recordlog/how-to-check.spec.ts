import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from '@jest/globals';
import { entryOf, TestLog } from '#test/support/test-log';
import { HOW_TO_CHECK } from './how-to-check';

/** Runs the blocks of the page, as they stand, in bash with openssl and sha256sum; only the three settings are filled in. */
function follow(lines: string[], entry: number, vkey: string): string[] {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-check-'));
  try {
    writeFileSync(join(folder, 'log.jsonl'), lines.join(''));
    const blocks = [...HOW_TO_CHECK.matchAll(/~~~bash\n([^]*?)~~~/g)].map(([, block]) => block);
    const script = blocks.join('').replace('ENTRY=17', `ENTRY=${entry}`).replace('the key you were given', vkey);
    return execFileSync('bash', ['-c', script], { cwd: folder, encoding: 'utf8' }).trim().split('\n');
  } finally {
    rmSync(folder, { recursive: true });
  }
}

const verdicts = (lines: string[]): string[] => lines.map((line) => line.replace(/^(good|WRONG): ([^:]*).*/, '$1: $2'));

describe('the page, followed with openssl and sha256sum', () => {
  it.each([0, 5, 17, 18])('finds a whole log good, at entry %i', async (entry) => {
    const log = new TestLog(19);
    expect(follow(await log.export({ older: [3, 8] }), entry, log.signer.key.vkey)).toEqual([
      `good: record of entry ${entry}`, `good: leaf of entry ${entry}`, 'good: name of the log', 'good: signature',
      'good: number of entries', 'good: root of all entries',
    ]);
  });

  it.each([0, 5, 16, 18])('finds an extract good, at entry %i', async (entry) => {
    const log = new TestLog(19);
    expect(follow(await log.export({ indexes: [0, 5, 16, 18], older: [3] }), entry, log.signer.key.vkey)).toEqual([
      `good: record of entry ${entry}`, `good: leaf of entry ${entry}`, 'good: name of the log', 'good: signature',
      `good: way from entry ${entry} to the root`,
    ]);
  });

  it('finds a changed record, a changed leaf and a root that is no longer the same', async () => {
    const log = new TestLog(19);
    const lines = await log.export();
    const record = lines.map((line, at) => (at === 6 ? line.replace('"record":"eyJz', '"record":"eyJt') : line));
    expect(verdicts(follow(record, 5, log.signer.key.vkey))[0]).toBe('WRONG: record of entry 5');
    const leaf = lines.map((line, at) => (at === 6 ? line.replace('acknowledgement', 'start-check') : line));
    expect(verdicts(follow(leaf, 5, log.signer.key.vkey)).filter((line) => line.startsWith('WRONG'))).toEqual(['WRONG: leaf of entry 5', 'WRONG: root of all entries']);
    log.entries[5] = entryOf(5, 'another');
    const forged = [...(await log.export()).slice(0, -1), lines.at(-1) ?? ''];
    expect(verdicts(follow(forged, 5, log.signer.key.vkey)).filter((line) => line.startsWith('WRONG'))).toEqual(['WRONG: root of all entries']);
  });

  it('finds a forged extract and a checkpoint under another key', async () => {
    const log = new TestLog(19);
    const lines = await log.export({ indexes: [5] });
    const moved = lines.map((line) => line.replace('"index":5,', '"index":4,'));
    expect(verdicts(follow(moved, 4, log.signer.key.vkey)).at(-1)).toBe('WRONG: way from entry 4 to the root');
    expect(verdicts(follow(lines, 5, new TestLog(0).signer.key.vkey))).toContain('WRONG: signature');
  });
});
