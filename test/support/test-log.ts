import { createHash, generateKeyPairSync } from 'node:crypto';
import { checkpointText, logSigner, signNote, type LogSigner } from '#server/recordlog/checkpoint';
import { exportLog, type LogEntry } from '#server/recordlog/export';
import { leafText, recordHash, type LeafKind } from '#server/recordlog/leaf';
import { consistencyProof, inclusionProof, leafHash, merkleRoot } from '#server/recordlog/merkle';

export const ORIGIN = 'kneeboard.example/log/marrow-and-slate';

export function newSigner(name = ORIGIN): LogSigner {
  return logSigner(name, generateKeyPairSync('ed25519').privateKey.export({ format: 'pem', type: 'pkcs8' }).toString());
}

/** An entry whose hashes all fit, as the log itself, or a forger with its program, would write it. */
export function entryOf(index: number, record: string, { kind = 'acknowledgement', second = index }: { kind?: LeafKind; second?: number } = {}): LogEntry {
  const salt = createHash('sha256').update(`salt ${index} ${record}`).digest().subarray(0, 16);
  const bytes = Buffer.from(record);
  const recordedAt = new Date(Date.UTC(2026, 11, 1, 11, 25, second)).toISOString();
  const leaf = leafText({ kind, recordedAt, recordHash: recordHash(salt, bytes) });
  return { index, leaf, leafHash: leafHash(Buffer.from(leaf)), salt, record: bytes };
}

/** A log in memory: entries that can be tampered with, and checkpoints taken at any size. */
export class TestLog {
  signer = newSigner();
  entries: LogEntry[];

  constructor(count: number) {
    this.entries = Array.from({ length: count }, (_, index) => entryOf(index, `{"signed":${index},"note":"Ayer llovió"}`));
  }

  private hashes(size: number): Uint8Array[] {
    return this.entries.slice(0, size).map((entry) => entry.leafHash);
  }

  checkpoint(size = this.entries.length, signer = this.signer): string {
    return signNote(checkpointText({ origin: ORIGIN, size, root: merkleRoot(this.hashes(size)) }), [signer]);
  }

  /** The whole log, or an extract of some indexes, with proofs from the older sizes. */
  async export({ indexes, older = [], olderNotes }: { indexes?: number[]; older?: number[]; olderNotes?: string[] } = {}): Promise<string[]> {
    const size = this.entries.length;
    const entries = indexes
      ? indexes.flatMap((index) => this.entries.slice(index, index + 1).map((entry) => ({ ...entry, proof: inclusionProof(this.hashes(size), index) })))
      : this.entries;
    const consistency = older.map((first, at) => ({ checkpoint: olderNotes?.[at] ?? this.checkpoint(first), proof: consistencyProof(this.hashes(size), first) }));
    const lines: string[] = [];
    const form = indexes ? 'extract' : 'whole';
    const log = { form, organisation: 'Marrow & Slate Floors', vkey: this.signer.key.vkey, checkpoint: this.checkpoint(), consistency, entries } as const;
    for await (const line of exportLog(log)) lines.push(line);
    return lines;
  }
}
