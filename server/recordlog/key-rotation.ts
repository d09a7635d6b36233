import { openNote, parseVkey, signNote, type LogSigner, type VerifierKey } from './checkpoint';

const FORMAT = 'kneeboard-key/1';

/**
 * The record of a `key-rotation` entry: a signed note with the lines format, origin, old and new verifier key, signed by
 * **both** keys. Who was given the old key can follow to the new, and the new one answers for older checkpoints.
 */
export function keyRotationRecord(oldSigner: LogSigner, newSigner: LogSigner): string {
  const origin = oldSigner.key.name;
  if (newSigner.key.name !== origin) throw new Error(`The new key is for ${newSigner.key.name}, the log is ${origin}.`);
  if (newSigner.key.vkey === oldSigner.key.vkey) throw new Error('The new key is the old one.');
  return signNote(`${FORMAT}\n${origin}\n${oldSigner.key.vkey}\n${newSigner.key.vkey}\n`, [oldSigner, newSigner]);
}

/** The key that follows `oldKey` by this record. Throws unless both keys signed it. */
export function nextKey(record: string, oldKey: VerifierKey): VerifierKey {
  const vkey = record.split('\n')[3] ?? '';
  const newKey = parseVkey(vkey);
  const { text, signedBy } = openNote(record, [oldKey, newKey]);
  if (text !== `${FORMAT}\n${oldKey.name}\n${oldKey.vkey}\n${vkey}\n` || newKey.name !== oldKey.name || signedBy.length !== 2) {
    throw new Error('This key rotation is not signed by both keys of this log.');
  }
  return newKey;
}
