import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { signCheckpoint } from '#server/recordlog/checkpoint';
import { exportLog, type LogEntry } from '#server/recordlog/export';
import { StreamingRoot } from '#server/recordlog/merkle';
import { entryOf, newSigner, ORIGIN } from '#test/support/test-log';
import { verifyLog } from '../../server/recordlog/verify.mjs';
import { alternate, secondsOf, type Bench } from './bench';

const ENTRIES = 1_000_000;
const BAR = 1.5;

/** About what one acknowledgement holds: ids, the hash of the text signed, times of server and tablet. */
const recordOf = (index: number): string => JSON.stringify({
  id: `0195d4e0-7a10-7000-8000-${String(index).padStart(12, '0')}`, version: '0195d4e0-7a10-7000-8000-00000000c0de',
  text: 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad', signedAt: '2026-12-01T11:25:00.000Z',
});

function* entries(): Generator<LogEntry> {
  for (let index = 0; index < ENTRIES; index += 1) yield entryOf(index, recordOf(index));
}

/** Checking an export of a million entries, from disk, all checks; against hashing as many nodes as its tree has. */
export const verifyLogBench: Bench = {
  name: 'verify-log',
  async run(rounds) {
    const folder = await mkdtemp(join(tmpdir(), 'kneeboard-bench-'));
    try {
      const file = join(folder, 'log.jsonl');
      const signer = newSigner();
      const tree = new StreamingRoot();
      let leaf = Buffer.alloc(0);
      for (const entry of entries()) {
        tree.append(entry.leafHash);
        leaf = Buffer.from(entry.leaf);
      }
      const checkpoint = signCheckpoint({ origin: ORIGIN, size: ENTRIES, root: tree.root() }, signer);
      const lines = exportLog({ form: 'whole', organisation: 'Marrow & Slate Floors', vkey: signer.key.vkey, checkpoint, consistency: [], entries: entries() });
      await pipeline(Readable.from(lines), createWriteStream(file));
      const figures = await alternate(
        rounds,
        () => secondsOf(() => {
          const { isGood, lines: said } = verifyLog(file, { keys: [signer.key.vkey] });
          if (!isGood) throw new Error(`The log of the bench is not good: ${said.join(' ')}`);
        }),
        () => secondsOf(() => hashNodes(leaf)),
      );
      return { name: this.name, ...figures, unit: 's', bar: BAR, ok: figures.ratio <= BAR };
    } finally {
      await rm(folder, { recursive: true });
    }
  },
};

/** 2n − 1 nodes one by one with node:crypto: n leaves and n − 1 pairs. */
function hashNodes(leaf: Buffer): void {
  const [leafBytes, nodeBytes] = [Buffer.concat([Buffer.of(0), leaf]), Buffer.alloc(65, 1)];
  for (let index = 0; index < ENTRIES; index += 1) createHash('sha256').update(leafBytes).digest();
  for (let index = 1; index < ENTRIES; index += 1) createHash('sha256').update(nodeBytes).digest().copy(nodeBytes, 1);
}
