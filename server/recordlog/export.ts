import { parseCheckpointText, parseNote } from './checkpoint';

/**
 * An export of a record log is plain JSON Lines in UTF-8, checked by `verify.mjs` or by hand (`how-to-check.ts`). Keys
 * stand in the order given, without spaces; hashes and salts are lower-case hex, records standard base64.
 *
 * First line, the header:
 *   {"format":"kneeboard-log/1","form":"whole"|"extract","organisation":"…","origin":"…","size":24118,"vkey":"…"}
 *   size is the number of entries the checkpoint covers; vkey the public key it was signed with.
 * Then one line per entry, in order of index, counted from 0:
 *   {"index":0,"leaf":"…","leafHash":"…","salt":"…","record":"…"}
 *   leaf is the exact text that is hashed: leafHash = SHA-256(0x00 ‖ leaf), and inside the leaf
 *   recordHash = SHA-256(salt ‖ record). salt and record are both null once retention has erased them.
 *   In an extract each entry also has "proof":["…",…], its RFC 9162 inclusion proof in the checkpoint.
 * Last line, the trailer:
 *   {"entries":24118,"checkpoint":"…","consistency":[{"checkpoint":"…","proof":["…",…]},…]}
 *   entries counts the entry lines; checkpoint is the signed note; consistency holds older signed notes, smallest
 *   first, each with its RFC 9162 consistency proof to the checkpoint.
 *
 * A whole log has every entry, so the root is computed again. An extract shows that its entries are in the log, not that
 * there are no others.
 */
export const LOG_FORMAT = 'kneeboard-log/1';

export interface LogEntry {
  index: number;
  /** The exact text of the leaf. */
  leaf: string;
  /** As stored, not computed for the export: a row changed behind our back then shows at its own line. */
  leafHash: Uint8Array;
  /** Both null when erased. */
  salt: Uint8Array | null;
  record: Uint8Array | null;
  /** In an extract: from `inclusionProof`. */
  proof?: readonly Uint8Array[];
}

export interface EarlierCheckpoint {
  /** The signed note. */
  checkpoint: string;
  /** From `consistencyProof`. */
  proof: readonly Uint8Array[];
}

export interface LogExport {
  form: 'whole' | 'extract';
  organisation: string;
  vkey: string;
  /** The signed note. */
  checkpoint: string;
  /** Older signed notes, smallest first. */
  consistency: readonly EarlierCheckpoint[];
  /** In order of index. */
  entries: AsyncIterable<LogEntry> | Iterable<LogEntry>;
}

/**
 * The lines of an export, each with its line end. Writes what it is given, even when it is wrong, so that the verifier
 * can name it; throws only when the checkpoint note is not one.
 */
export async function* exportLog(log: LogExport): AsyncGenerator<string> {
  const { origin, size } = parseCheckpointText(parseNote(log.checkpoint).text);
  yield line({ format: LOG_FORMAT, form: log.form, organisation: log.organisation, origin, size, vkey: log.vkey });
  let entries = 0;
  for await (const entry of log.entries) {
    yield line({
      index: entry.index,
      leaf: entry.leaf,
      leafHash: hex(entry.leafHash),
      salt: entry.salt && hex(entry.salt),
      record: entry.record && view(entry.record).toString('base64'),
      ...(entry.proof && { proof: entry.proof.map(hex) }),
    });
    entries += 1;
  }
  const consistency = log.consistency.map(({ checkpoint, proof }) => ({ checkpoint, proof: proof.map(hex) }));
  yield line({ entries, checkpoint: log.checkpoint, consistency });
}

const line = (value: object): string => `${JSON.stringify(value)}\n`;
const view = (bytes: Uint8Array): Buffer => Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
const hex = (bytes: Uint8Array): string => view(bytes).toString('hex');
