import { createHash } from 'node:crypto';

/** What an entry is about. A kind, once used, keeps its word: old leaves are never rewritten. */
export const LEAF_KINDS = [
  'checklist-version', 'briefing', 'acknowledgement', 'start-check', 'corrective-action', 'sheet-confirmed',
  'exposure-basis', 'pin', 'plan-approved', 'correction', 'key-rotation',
] as const;
export type LeafKind = (typeof LEAF_KINDS)[number];

export const LEAF_FORMAT = 'kneeboard-leaf/1';
/**
 * Salts have one length. With a free length, bytes could move between salt and record and one hash would stand for
 * two records.
 */
export const SALT_BYTES = 16;

export interface Leaf {
  kind: LeafKind;
  /** Server time, ISO 8601 in UTC with milliseconds: `2026-12-01T11:25:00.000Z`. Never earlier than the entry before. */
  recordedAt: string;
  /** SHA-256(salt ‖ record bytes) as 64 hex digits. */
  recordHash: string;
}

const LEAF = /^\{"format":"kneeboard-leaf\/1","kind":"([a-z-]+)","recordedAt":"(\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z)","recordHash":"([0-9a-f]{64})"\}$/;

/** SHA-256(salt ‖ record bytes) as hex. Salt and record are erased together, or the record could be guessed back. */
export function recordHash(salt: Uint8Array, record: Uint8Array): string {
  if (salt.length !== SALT_BYTES) throw new RangeError(`A salt has ${SALT_BYTES} bytes, this has ${salt.length}.`);
  return createHash('sha256').update(salt).update(record).digest('hex');
}

/**
 * The leaf as the one line of JSON that is hashed: keys in the order format, kind, recordedAt, recordHash, no spaces,
 * ASCII only, and no names in it. Throws when a part has not its form.
 */
export function leafText({ kind, recordedAt, recordHash: hash }: Leaf): string {
  const text = JSON.stringify({ format: LEAF_FORMAT, kind, recordedAt, recordHash: hash });
  parseLeaf(text);
  return text;
}

/** Reads a leaf back. Throws when it is not exactly in the form `leafText` writes. */
export function parseLeaf(text: string): Leaf {
  const [, kind, recordedAt, hash] = LEAF.exec(text) ?? [];
  if (!isLeafKind(kind) || !recordedAt || !hash || !isInstant(recordedAt)) {
    throw new TypeError(`This is not a leaf of the form ${LEAF_FORMAT}: ${text.slice(0, 200)}`);
  }
  return { kind, recordedAt, recordHash: hash };
}

/**
 * The time of the next leaf: now, or the time of the entry before when the clock has been set back, so that time in the
 * log never runs backwards and a moved entry shows. `previous` is undefined for the first entry.
 */
export function nextRecordedAt(now: Date, previous: string | undefined): string {
  const at = now.toISOString();
  return previous !== undefined && previous > at ? previous : at;
}

function isLeafKind(kind: string | undefined): kind is LeafKind {
  return LEAF_KINDS.some((known) => known === kind);
}

/** Whether the text, already of the right shape, names a moment that exists (no 30 February). */
function isInstant(text: string): boolean {
  const time = Date.parse(text);
  return !Number.isNaN(time) && new Date(time).toISOString() === text;
}
