import { createHash, createPrivateKey, createPublicKey, sign, verify, type KeyObject } from 'node:crypto';

/**
 * Checkpoints in the open signed-note form: c2sp.org/signed-note and c2sp.org/tlog-checkpoint, with Ed25519
 * (signature type 0x01). A note is a text that ends in a line end, a blank line, then lines "— name base64".
 */
export interface Checkpoint {
  /** Which log: a schema-less URL without spaces or plus, the same as the signing key's name. */
  origin: string;
  /** Number of entries. */
  size: number;
  /** Merkle root of that many entries, 32 bytes. */
  root: Buffer;
}

export interface NoteSignature {
  name: string;
  /** Four bytes as eight hex digits. */
  keyId: string;
  signature: Buffer;
}

export interface SignedNote {
  text: string;
  signatures: NoteSignature[];
}

/** A public key with its name: what a verifier is given, as `name+keyid+base64(0x01 ‖ key)`. */
export interface VerifierKey {
  name: string;
  keyId: string;
  publicKey: KeyObject;
  vkey: string;
}

export interface LogSigner {
  key: VerifierKey;
  privateKey: KeyObject;
}

const ED25519_TYPE = 0x01;
const KEY_BYTES = 32;
/** DER of SubjectPublicKeyInfo up to the key itself, RFC 8410 section 4. */
const SPKI_PREFIX = Buffer.from('302a300506032b6570032100', 'hex');
const MAX_SIGNATURES = 16;
const SIGNATURE_LINE = /^— ([^\s+]+) ([A-Za-z0-9+/]+={0,2})$/u;

/** A signer from a PKCS#8 PEM of an Ed25519 key. Throws when the key is of another kind or the name not allowed. */
export function logSigner(name: string, privateKeyPem: string): LogSigner {
  const privateKey = createPrivateKey(privateKeyPem);
  return { key: verifierKey(name, createPublicKey(privateKey)), privateKey };
}

/** The verifier key of a name and an Ed25519 public key. */
export function verifierKey(name: string, publicKey: KeyObject): VerifierKey {
  if (!/^[^\s+]+$/u.test(name)) throw new TypeError(`A key name has no spaces and no plus: "${name}"`);
  if (publicKey.asymmetricKeyType !== 'ed25519') throw new TypeError('The log is signed with Ed25519 keys only.');
  const raw = publicKey.export({ format: 'der', type: 'spki' }).subarray(SPKI_PREFIX.length);
  const typed = Buffer.concat([Buffer.of(ED25519_TYPE), raw]);
  const keyId = createHash('sha256').update(`${name}\n`).update(typed).digest('hex').slice(0, 8);
  return { name, keyId, publicKey, vkey: `${name}+${keyId}+${typed.toString('base64')}` };
}

/** Reads `name+keyid+base64`. Throws when the id is not that of name and key. */
export function parseVkey(vkey: string): VerifierKey {
  const [, name = '', , base64 = ''] = /^([^\s+]+)\+([0-9a-f]{8})\+([A-Za-z0-9+/]+={0,2})$/u.exec(vkey) ?? [];
  const typed = Buffer.from(base64, 'base64');
  if (typed[0] !== ED25519_TYPE || typed.length !== KEY_BYTES + 1) throw new TypeError(`This is not an Ed25519 verifier key: "${vkey}"`);
  const publicKey = createPublicKey({ key: Buffer.concat([SPKI_PREFIX, typed.subarray(1)]), format: 'der', type: 'spki' });
  const key = verifierKey(name, publicKey);
  if (key.vkey !== vkey) throw new TypeError(`The key id does not belong to this name and key: "${vkey}"`);
  return key;
}

/** Signs a text (ending in a line end) as a note with one signature per signer. */
export function signNote(text: string, signers: readonly LogSigner[]): string {
  requireText(text);
  const lines = signers.map(({ key, privateKey }) => {
    const signature = sign(null, Buffer.from(text), privateKey);
    return `— ${key.name} ${Buffer.concat([Buffer.from(key.keyId, 'hex'), signature]).toString('base64')}\n`;
  });
  return `${text}\n${lines.join('')}`;
}

/** Takes a note apart without checking any signature. Throws when it has not the form of a note. */
export function parseNote(note: string): SignedNote {
  const cut = note.lastIndexOf('\n\n');
  const text = note.slice(0, cut + 1);
  const lines = note.slice(cut + 2).split('\n');
  if (cut < 1 || lines.pop() !== '' || lines.length === 0 || lines.length > MAX_SIGNATURES) throw new TypeError('This is not a signed note.');
  requireText(text);
  const signatures = lines.map((line) => {
    const [, name = '', base64 = ''] = SIGNATURE_LINE.exec(line) ?? [];
    const bytes = Buffer.from(base64, 'base64');
    if (bytes.length < 5) throw new TypeError('This is not a signed note: a signature line is out of form.');
    return { name, keyId: bytes.toString('hex', 0, 4), signature: bytes.subarray(4) };
  });
  return { text, signatures };
}

/**
 * The text of a note that at least one of the keys signed. Signatures by unknown keys are passed over; a wrong one by a
 * known key refuses the whole note.
 */
export function openNote(note: string, keys: readonly VerifierKey[]): { text: string; signedBy: VerifierKey[] } {
  const { text, signatures } = parseNote(note);
  const signedBy: VerifierKey[] = [];
  for (const { name, keyId, signature } of signatures) {
    const key = keys.find((known) => known.name === name && known.keyId === keyId);
    if (!key) continue;
    if (!verify(null, Buffer.from(text), key.publicKey, signature)) throw new Error(`The signature by ${name} (${keyId}) does not fit the text.`);
    signedBy.push(key);
  }
  if (signedBy.length === 0) throw new Error('None of the known keys has signed this.');
  return { text, signedBy };
}

/** The three lines that are signed: origin, decimal size, base64 root. */
export function checkpointText({ origin, size, root }: Checkpoint): string {
  const text = `${origin}\n${size}\n${root.toString('base64')}\n`;
  parseCheckpointText(text);
  return text;
}

/** Reads the signed lines. Throws when they are out of form; extension lines, which we never write, are refused. */
export function parseCheckpointText(text: string): Checkpoint {
  const [, origin, size, base64] = /^([^\s+]+)\n(0|[1-9]\d{0,15})\n([A-Za-z0-9+/]{43}=)\n$/u.exec(text) ?? [];
  const root = Buffer.from(base64 ?? '', 'base64');
  if (!origin || !Number.isSafeInteger(Number(size)) || root.toString('base64') !== base64) throw new TypeError('This is not a checkpoint.');
  return { origin, size: Number(size), root };
}

/** A checkpoint note under the signer's key, whose name must be the origin. */
export function signCheckpoint(checkpoint: Checkpoint, signer: LogSigner): string {
  if (signer.key.name !== checkpoint.origin) throw new Error(`The key is for ${signer.key.name}, the log is ${checkpoint.origin}.`);
  return signNote(checkpointText(checkpoint), [signer]);
}

/** The checkpoint of a note that one of the keys signed and whose origin is that key's name. Throws otherwise. */
export function openCheckpoint(note: string, keys: readonly VerifierKey[]): Checkpoint & { signedBy: VerifierKey } {
  const { text, signedBy } = openNote(note, keys);
  const checkpoint = parseCheckpointText(text);
  const key = signedBy.find((known) => known.name === checkpoint.origin);
  if (!key) throw new Error(`The checkpoint of ${checkpoint.origin} is signed by a key of another name.`);
  return { ...checkpoint, signedBy: key };
}

function requireText(text: string): void {
  const isControl = (character: string): boolean => character < ' ' && character !== '\n';
  if (!text.endsWith('\n') || [...text].some(isControl) || Buffer.from(text).toString() !== text) {
    throw new TypeError('The text of a note ends in a line end and has no other control characters.');
  }
}
