import { execFile } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { entryOf, newSigner, ORIGIN, TestLog } from '#test/support/test-log';
import { checkpointText, signNote } from './checkpoint';
import { keyRotationRecord, nextKey } from './key-rotation';
import { leafHash, merkleRoot } from './merkle';
import { verifyLog } from './verify.mjs';

let folder = '';
let files = 0;
beforeAll(() => { folder = mkdtempSync(join(tmpdir(), 'kneeboard-log-')); });
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const fileOf = (text: string): string => {
  const path = join(folder, `${(files += 1)}.jsonl`);
  writeFileSync(path, text);
  return path;
};
/** What the verifier says first. */
const said = (lines: string[], options: Parameters<typeof verifyLog>[1] = {}): string => {
  const { isGood, lines: [first = ''] } = verifyLog(fileOf(lines.join('')), options);
  expect(first.startsWith('Good: ')).toBe(isGood);
  return first;
};
/** Line 0 is the header, so entry n stands on line n + 1. */
const edit = (lines: string[], index: number, change: (line: string) => string): string[] => lines.map((line, at) => (at === index + 1 ? change(line) : line));
const renumber = (lines: string[]): string[] => {
  const inner = lines.slice(1, -1).map((line, index) => line.replace(/^\{"index":\d+/, `{"index":${index}`));
  const last = (lines.at(-1) ?? '').replace(/"entries":\d+/, `"entries":${inner.length}`);
  return [lines[0] ?? '', ...inner, last];
};

describe('a good log', () => {
  it.each([0, 1, 2, 7, 64, 100])('of %i entries', async (count) => {
    const log = new TestLog(count);
    const root = merkleRoot(log.entries.map((entry) => entry.leafHash)).toString('hex');
    const text = said(await log.export(), { keys: [log.signer.key.vkey] });
    expect(text).toBe(`Good: ${count} entries, checkpoint of ${ORIGIN}, root ${root}, signed by key ${log.signer.key.keyId}.`);
  });

  it('continues every earlier checkpoint, in the file and kept apart', async () => {
    const log = new TestLog(100);
    const kept = fileOf(log.checkpoint(33));
    const result = verifyLog(fileOf((await log.export({ older: [1, 2, 50, 64, 99, 100] })).join('')), { keys: [fileOf(`${log.signer.key.vkey}\n`)], earlier: [kept] });
    expect(result).toMatchObject({ isGood: true, warnings: [], lines: [expect.stringMatching(/^Good: 100/), 'It continues 7 earlier checkpoints.'] });
  });

  it('says so when the key came from the file itself', async () => {
    const log = new TestLog(3);
    const { isGood, warnings } = verifyLog(fileOf((await log.export()).join('')));
    expect(isGood).toBe(true);
    expect(warnings).toEqual([`Warning: the key came from the file itself; compare it with the one you were given: ${log.signer.key.vkey}`]);
  });

  it('stays good, and says so, when retention has erased records with their salts', async () => {
    const log = new TestLog(10);
    log.entries = log.entries.map((entry, index) => (index < 4 && index > 1 ? { ...entry, salt: null, record: null } : entry));
    expect(verifyLog(fileOf((await log.export()).join(''))).lines).toContain('Records erased by retention: 2, the first of entry 2. Their hashes still stand.');
    log.entries = log.entries.map((entry) => (entry.index === 7 ? { ...entry, record: null } : entry));
    expect(said(await log.export())).toBe('Entry 7 is wrong: its line is out of form.');
  });

  it('is read whatever the line length, over the edges of the read buffer', async () => {
    const log = new TestLog(0);
    log.entries = [900_000, 10, 3_000_000, 0, 1_048_576].map((length, index) => entryOf(index, 'x'.repeat(length)));
    expect(said(await log.export())).toMatch(/^Good: 5 entries/);
  });

  it('is read with Windows line ends too', async () => {
    expect(said((await new TestLog(5).export()).map((line) => line.replace('\n', '\r\n')))).toMatch(/^Good: 5/);
  });
});

describe('[REC-04] tampered with, hashes left as they were', () => {
  it('names an entry whose record was changed', async () => {
    const record = Buffer.from('{"signed":999}').toString('base64');
    const lines = edit(await new TestLog(30).export(), 17, (line) => line.replace(/"record":"[^"]*"/, `"record":"${record}"`));
    expect(said(lines)).toMatch(/^Entry 17 is wrong: its record does not match its hash/);
  });

  it('names an entry whose record is no longer whole base64', async () => {
    const lines = edit(await new TestLog(30).export(), 17, (line) => line.replace('"record":"ey', '"record":"e*'));
    expect(said(lines)).toMatch(/^Entry 17 is wrong: its record does not match its hash/);
    const padded = edit(await new TestLog(30).export(), 17, (line) => line.replace(/"record":"[^"]*/, (record) => `${record}!!!!`));
    expect(said(padded)).toMatch(/^Entry 17 is wrong: its record does not match its hash/);
  });

  it('names an entry whose leaf has a day that does not exist, or a kind', async () => {
    for (const [from, to] of [['2026-12-01', '2026-02-30'], ['acknowledgement', 'opinion']] as const) {
      const log = new TestLog(3);
      log.entries = log.entries.map((entry, index) => {
        const leaf = entry.leaf.replace(from, to);
        return index === 1 ? { ...entry, leaf, leafHash: leafHash(Buffer.from(leaf)) } : entry;
      });
      expect(said(await log.export())).toBe('Entry 1 is wrong: its leaf is out of form.');
    }
  });

  it('names an entry whose leaf was changed', async () => {
    const lines = edit(await new TestLog(30).export(), 17, (line) => line.replace('acknowledgement', 'start-check'));
    expect(said(lines)).toMatch(/^Entry 17 is wrong: its leaf does not match the stored leaf hash/);
  });

  it.each([
    ['taken out', (lines: string[]) => lines.toSpliced(18, 1), 'Entry 17 is missing: entry 18 follows entry 16.'],
    ['the first taken out', (lines: string[]) => lines.toSpliced(1, 1), 'Entry 0 is missing: the log begins with entry 1.'],
    ['the last taken out', (lines: string[]) => lines.toSpliced(30, 1), 'Entry 29 is missing, or one was taken out between entry 0 and entry 29 and the rest numbered anew: the file has 29 entries, its checkpoint 30.'],
    ['moved on', (lines: string[]) => [...lines.slice(0, 18), ...lines.slice(19, 25), ...lines.slice(18, 19), ...lines.slice(25)], 'Entry 17 is wrong: it is out of order, entry 18 follows entry 16.'],
    ['moved back', (lines: string[]) => [...lines.slice(0, 10), ...lines.slice(18, 19), ...lines.slice(10, 18), ...lines.slice(19)], 'Entry 9 is wrong: it is out of order, entry 17 follows entry 8.'],
    ['repeated', (lines: string[]) => lines.toSpliced(18, 0, lines[18] ?? ''), 'Entry 17 is wrong: its number comes a second time, after entry 17: an entry was inserted, repeated or moved.'],
    ['the end cut off', (lines: string[]) => lines.slice(0, 20), 'The file ends after 19 entries without its checkpoint: it was cut off.'],
    ['a line cut in two', (lines: string[]) => [...lines.slice(0, 18), (lines[18] ?? '').slice(0, 90)], 'Line 19 is not an entry: it is not JSON. It follows entry 16.'],
    ['a line after the checkpoint', (lines: string[]) => [...lines, lines[1] ?? ''], 'There are lines after the checkpoint, from line 33 on.'],
  ])('names an entry that was: %s', async (_what, change, expected) => {
    expect(said(change(await new TestLog(30).export()))).toBe(expected);
  });

  it('does not let a second value hide in a line', async () => {
    const lines = edit(await new TestLog(3).export(), 1, (line) => line.replace('"record":', '"record":"b3RoZXI=","record":'));
    expect(said(lines)).toBe('Entry 1 is wrong: its line is out of form.');
  });

  it.each(['"salt":"00', '"leafHash":"00', '\\"recordHash\\":\\"00'])('notices a byte changed after %s', async (place) => {
    const lines = edit(await new TestLog(30).export(), 17, (line) => {
      const at = line.indexOf(place.slice(0, -2)) + place.length - 2;
      return `${line.slice(0, at)}${line[at] === '0' ? '1' : '0'}${line.slice(at + 1)}`;
    });
    expect(said(lines)).toMatch(/^Entry 17 is wrong/);
  });
});

describe('tampered with by someone who works out all hashes anew, but has not the key', () => {
  const MARKS = [8, 16, 24];
  /** The log of 30 with its checkpoints; then the forger's entries under the true checkpoints. */
  async function forge(change: (log: TestLog) => void): Promise<{ lines: string[]; vkey: string; honest: string[]; kept: (size: number) => string }> {
    const log = new TestLog(30);
    const honest = await log.export({ older: MARKS });
    const notes = new Map([8, 16, 24, 17, 18].map((size) => [size, log.checkpoint(size)]));
    change(log);
    const forged = await log.export();
    return { lines: [...(honest.slice(0, 1)), ...forged.slice(1, -1), honest.at(-1) ?? ''], vkey: log.signer.key.vkey, honest, kept: (size) => notes.get(size) ?? '' };
  }
  const changed = (log: TestLog): void => { log.entries[17] = entryOf(17, '{"signed":"by nobody"}'); };

  it('names the stretch between two checkpoints', async () => {
    const { lines, vkey } = await forge(changed);
    expect(said(lines, { keys: [vkey] })).toBe('The first wrong entry is between entry 16 and entry 23: the root does not match the checkpoint of 24. All entries before entry 16 match the checkpoint of 16.');
  });

  it('names the entry when kept checkpoints stand on both sides of it', async () => {
    const { lines, vkey, kept } = await forge(changed);
    const earlier = [fileOf(kept(17)), fileOf(kept(18))];
    expect(said(lines, { keys: [vkey], earlier })).toMatch(/^Entry 17 is wrong: the root does not match the checkpoint of 18/);
  });

  it('names the entry when an earlier export was kept', async () => {
    const { lines, vkey, honest } = await forge(changed);
    expect(said(lines, { keys: [vkey], earlier: [fileOf(honest.join(''))] })).toBe('Entry 17 is wrong: it is not what it was in the earlier export.');
  });

  it('does not believe an earlier export that is itself forged', async () => {
    const { lines, vkey, honest } = await forge(changed);
    expect(said(honest, { keys: [vkey], earlier: [fileOf(lines.join(''))] })).toMatch(/^Good/);
  });

  it('says from where on when there is no earlier checkpoint', async () => {
    const { lines, vkey } = await forge(changed);
    const bare = [...lines.slice(0, -1), (lines.at(-1) ?? '').replace(/"consistency":\[.*\]/, '"consistency":[]')];
    expect(said(bare, { keys: [vkey] })).toBe('The first wrong entry is between entry 0 and entry 29: the root does not match the checkpoint of 30.');
  });

  it('names both of two entries that changed places', async () => {
    const { lines, vkey } = await forge((log) => {
      log.entries[17] = entryOf(17, '{"signed":18}', { second: 18 });
      log.entries[18] = entryOf(18, '{"signed":17}', { second: 17 });
    });
    expect(said(lines, { keys: [vkey] })).toMatch(/^Entry 18 is wrong: it was recorded at .*, before entry 17 at/);
  });

  it('names the stretch where one was taken out and the rest numbered anew', async () => {
    const { lines, vkey } = await forge(() => undefined);
    expect(said(renumber(lines.toSpliced(18, 1)), { keys: [vkey] })).toMatch(/^The first wrong entry is between entry 16 and entry 23/);
    expect(said(renumber(lines.toSpliced(27, 1)), { keys: [vkey] })).toMatch(/one was taken out between entry 24 and entry 29 .* 29 entries, its checkpoint 30\.$/);
  });

  it('names the stretch where one was put in and the rest numbered anew', async () => {
    const { lines, vkey } = await forge(() => undefined);
    expect(said(renumber(lines.toSpliced(18, 0, lines[17] ?? '')), { keys: [vkey] })).toMatch(/^The first wrong entry is between entry 16 and entry 23/);
    expect(said(renumber(lines.toSpliced(29, 0, lines[28] ?? '')), { keys: [vkey] })).toMatch(/^Entry 30 is wrong.* one was put in between entry 24 and entry 30/);
  });

  it('notices another root or size under the old signature', async () => {
    const log = new TestLog(30);
    const honest = await log.export();
    log.entries[17] = entryOf(17, 'x');
    const other = merkleRoot(log.entries.map((entry) => entry.leafHash)).toString('base64');
    const forged = (await log.export()).slice(1, -1);
    const last = (honest.at(-1) ?? '').replace(/\\n30\\n[^\\]+\\n/, `\\n30\\n${other}\\n`);
    expect(said([honest[0] ?? '', ...forged, last])).toBe('The signature does not fit the checkpoint: its text was changed after signing.');
  });

  it('notices a checkpoint signed by a key of the forger', async () => {
    const log = new TestLog(30);
    const vkey = log.signer.key.vkey;
    const kept = fileOf(log.checkpoint(20));
    log.signer = newSigner();
    changed(log);
    const lines = await log.export();
    expect(said(lines, { keys: [vkey] })).toBe(`The checkpoint is not signed by the key ${vkey}.`);
    expect(said(lines, { keys: [vkey], earlier: [kept] })).toMatch(/^The first wrong entry is between entry 0 and entry 19/);
    expect(said(lines)).toMatch(/^Good/); // which is why the warning stands above it
  });
});

describe('rewritten by someone who has the key', () => {
  it('does not continue the checkpoint an auditor kept', async () => {
    const log = new TestLog(30);
    const kept = fileOf(log.checkpoint(20));
    log.entries[17] = entryOf(17, 'other');
    const lines = await log.export();
    expect(said(lines)).toMatch(/^Good/);
    expect(said(lines, { earlier: [kept] })).toBe('The first wrong entry is between entry 0 and entry 19: the root does not match the checkpoint of 20.');
  });

  it('does not get shorter than a kept checkpoint', async () => {
    const log = new TestLog(30);
    const kept = fileOf(log.checkpoint());
    log.entries.pop();
    expect(said(await log.export(), { earlier: [kept] })).toMatch(/covers 30 entries, this log only 29: entries are missing at the end\.$/);
  });

  it('does not pass with an earlier checkpoint by a stranger, of another log, or with a wrong proof', async () => {
    const log = new TestLog(30);
    expect(said(await log.export(), { earlier: [fileOf(log.checkpoint(20, newSigner()))] })).toMatch(/\(20 entries\) is not signed by a key of this log\.$/);
    const lines = await log.export({ older: [20] });
    const proof = leafHash(Buffer.of(1)).toString('hex');
    const last = (lines.at(-1) ?? '').replace(/"proof":\["[0-9a-f]{64}/, `"proof":["${proof}`);
    expect(said([...lines.slice(0, -1), last])).toMatch(/is not proved to be the beginning of this log\.$/);
    const other = newSigner('kneeboard.example/log/other');
    const note = signNote(checkpointText({ origin: other.key.name, size: 20, root: Buffer.alloc(32) }), [other]);
    expect(said(lines, { earlier: [fileOf(note)] })).toMatch(/is of another log: kneeboard.example\/log\/other\.$/);
    expect(said(lines, { keys: [other.key.vkey] })).toMatch(/^The key is for kneeboard.example\/log\/other/);
  });
});

describe('an extract', () => {
  it('is good when each entry leads to the checkpoint', async () => {
    const log = new TestLog(30);
    expect(said(await log.export({ indexes: [4, 17, 29], older: [20] }))).toMatch(/^Good: 3 of 30 entries \(4, 17, 29\), checkpoint of/);
  });

  it('names an entry that was changed, with all its hashes', async () => {
    const log = new TestLog(30);
    const honest = await log.export({ indexes: [4, 17, 29] });
    log.entries[17] = entryOf(17, 'other');
    const forged = await log.export({ indexes: [4, 17, 29] });
    const lines = [...honest.slice(0, 2), forged[2]?.replace(/"proof".*/, (honest[2] ?? '').slice((honest[2] ?? '').indexOf('"proof"')).trim()) ?? '', '\n', ...honest.slice(3)];
    expect(said(lines)).toBe('Entry 17 is wrong: its proof does not lead to the checkpoint.');
  });

  it('names an entry under another number, without proof, out of order, or twice', async () => {
    const lines = await new TestLog(30).export({ indexes: [4, 17, 29] });
    expect(said(edit(lines, 1, (line) => line.replace('"index":17', '"index":16')))).toBe('Entry 16 is wrong: its proof does not lead to the checkpoint.');
    expect(said(edit(lines, 1, (line) => line.replace(/,"proof".*/, '}')))).toBe('Entry 17 is wrong: its proof does not lead to the checkpoint.');
    expect(said([0, 2, 1, 3, 4].map((at) => lines[at] ?? ''))).toBe('Entry 4 is wrong: it stands after entry 17, out of order or twice.');
    expect(said([0, 1, 1, 2, 3, 4].map((at) => lines[at] ?? ''))).toBe('Entry 4 is wrong: it stands after entry 4, out of order or twice.');
    expect(said(lines.toSpliced(2, 1))).toBe('The file has 2 entries, its last line says 3.');
  });

  it('has no entry beyond its checkpoint', async () => {
    const lines = await new TestLog(1).export({ indexes: [0] });
    expect(said(edit(lines, 0, (line) => line.replace('"index":0', '"index":5')))).toBe('Entry 5 is wrong: its proof does not lead to the checkpoint.');
  });

  it('speaks in its header of the log its checkpoint is of', async () => {
    const [header = '', ...rest] = await new TestLog(30).export({ indexes: [4] });
    expect(said([header.replace('"size":30', '"size":31'), ...rest])).toMatch(/^The header speaks of 31 entries/);
    expect(said([header.replace('whole', 'part').replace('extract', 'part'), ...rest])).toBe('The header is out of form.');
  });

  it('is not good beside a kept checkpoint it brings no proof from', async () => {
    const log = new TestLog(30);
    const earlier = [fileOf(log.checkpoint(20))];
    expect(said(await log.export({ indexes: [4] }), { earlier })).toMatch(/this extract has no proof from it/);
    expect(said(await log.export({ indexes: [4], older: [20] }), { earlier })).toMatch(/^Good/);
    expect(said(await log.export({ indexes: [4] }), { earlier: [fileOf(log.checkpoint())] })).toMatch(/^Good/);
  });
});

describe('a log whose key was changed', () => {
  async function rotated(): Promise<{ log: TestLog; keys: string[]; lines: string[] }> {
    const log = new TestLog(20);
    const signers = [log.signer, newSigner(), newSigner()] as const;
    const olderNotes = [log.checkpoint(10, signers[0]), log.checkpoint(15, signers[0])];
    log.entries[16] = entryOf(16, keyRotationRecord(signers[0], signers[1]), { kind: 'key-rotation' });
    log.entries[18] = entryOf(18, keyRotationRecord(signers[1], signers[2]), { kind: 'key-rotation' });
    log.signer = signers[2];
    return { log, keys: signers.map(({ key }) => key.vkey), lines: await log.export({ older: [10, 15], olderNotes }) };
  }

  it('is good with the first key, the last, or the one between', async () => {
    const { keys, lines } = await rotated();
    for (const key of keys) expect(said(lines, { keys: [key] })).toMatch(/^Good/);
  });

  it('leads from the old key to the new by a record both have signed', () => {
    const [first, second] = [newSigner(), newSigner()];
    const record = keyRotationRecord(first, second);
    expect(nextKey(record, first.key).vkey).toBe(second.key.vkey);
    expect(() => nextKey(record, newSigner().key)).toThrow('not signed by both keys');
    const halfSigned = record.split('\n').toSpliced(-2, 1).join('\n');
    expect(() => nextKey(halfSigned, first.key)).toThrow('not signed by both keys');
    expect(() => keyRotationRecord(first, first)).toThrow('the old one');
    expect(() => keyRotationRecord(first, newSigner('kneeboard.example/log/other'))).toThrow('The new key is for');
  });

  it('is not good under the old key once the new one is given, nor under a key that only says it follows', async () => {
    const { log, keys } = await rotated();
    const [oldKey = '', , newKey = ''] = keys;
    const stranger = newSigner();
    log.entries[19] = entryOf(19, keyRotationRecord(stranger, newSigner()), { kind: 'key-rotation' });
    log.signer = stranger;
    expect(said(await log.export(), { keys: [oldKey] })).toMatch(/^The checkpoint is not signed by/);
    expect(said(await log.export(), { keys: [newKey] })).toMatch(/^The checkpoint is not signed by/);
  });

  it('names a rotation that one of the keys did not sign', async () => {
    const { log } = await rotated();
    const [first, second] = [newSigner(), newSigner()];
    const [text = '', signatures = ''] = keyRotationRecord(first, second).split('\n\n');
    for (const line of signatures.trim().split('\n')) {
      log.entries[19] = entryOf(19, `${text}\n\n${line}\n`, { kind: 'key-rotation' });
      expect(said(await log.export())).toBe('Entry 19 is wrong: its key rotation is not signed by both keys.');
    }
    log.entries[19] = entryOf(19, 'a new key', { kind: 'key-rotation' });
    expect(said(await log.export())).toBe('Entry 19 is wrong: its key rotation is out of form.');
  });
});

describe('as a command', () => {
  const run = async (...args: string[]): Promise<{ code: number; stdout: string; stderr: string }> => {
    try {
      return { code: 0, ...(await promisify(execFile)(process.execPath, [join(import.meta.dirname, 'verify.mjs'), ...args])) };
    } catch (error) {
      return error as { code: number; stdout: string; stderr: string };
    }
  };

  it('answers 0 for good, 1 for wrong, 2 for bad usage', async () => {
    const log = new TestLog(5);
    const lines = await log.export();
    const good = fileOf(lines.join(''));
    expect(await run(good, '--key', log.signer.key.vkey)).toMatchObject({ code: 0, stdout: expect.stringMatching(/^Good: 5 entries/), stderr: '' });
    expect(await run(good)).toMatchObject({ code: 0, stderr: expect.stringMatching(/^Warning: the key came from the file itself/) });
    expect(await run(fileOf(lines.toSpliced(3, 1).join('')))).toMatchObject({ code: 1, stdout: 'Entry 2 is missing: entry 3 follows entry 1.\n' });
    expect(await run(fileOf('hello\n'))).toMatchObject({ code: 1, stdout: expect.stringMatching(/^This is not a record log/) });
    expect(await run(fileOf(''))).toMatchObject({ code: 1 });
    for (const args of [[], [good, good], [good, '--keys', 'x'], [good, '--key'], [join(folder, 'none')], [good, '--key', 'none'], [good, '--key', good], [good, '--earlier', 'none'], [folder]]) {
      expect({ args, ...(await run(...args)) }).toMatchObject({ args, code: 2, stderr: expect.stringMatching(/Usage: node verify\.mjs/) });
    }
  });
});
