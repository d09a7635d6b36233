/**
 * Seals a PIN to the server's public key, so that what a tablet keeps until it has signal reveals nothing to try PINs
 * against. Runs in the browser and in Node.js on `globalThis.crypto.subtle` (secure contexts only).
 *
 * Sealed form 1, base64 of: version byte 1 ‖ ephemeral P-256 public key, uncompressed, 65 bytes ‖ iv, 12 bytes ‖
 * AES-256-GCM ciphertext with its 16-byte tag. The AES key is HKDF-SHA-256 over the ECDH secret, with no salt and the
 * info `kneeboard-pin/1` ‖ ephemeral key ‖ server key; version byte and ephemeral key are authenticated with it. The
 * plaintext is the JSON of `PinStatement`, padded with spaces to 256 bytes so that its length does not tell the PIN's.
 */
export interface PinStatement {
  pin: string;
  /** SHA-256, hex, of the text that is signed: the PIN counts for this text only. */
  textHash: string;
  /** New for every seal: the envelope names it too, so that the two belong together. */
  nonce: string;
}

/**
 * What stands, hashed, in a seal where a signature's text hash would when a PIN is set: whose it is. Owner and witness
 * both seal over it, so that a witness's seal taken from one tablet's storage witnesses nobody else.
 */
export const pinSetText = (ownerPersonId: string): string => `pin-set ${ownerPersonId.toLowerCase()}`;

/** The same for answers of a briefing or a start check: a seal proves these answers and no others. `taskId` is null for a briefing. */
export const answersText = (kind: string, versionId: string, taskId: string | null, answers: readonly { readonly lineId: string; readonly answer: string; readonly note: string | null }[]): string =>
  `${kind} ${versionId.toLowerCase()} ${taskId?.toLowerCase() ?? '-'} ${JSON.stringify(answers.map(({ lineId, answer, note }) => [lineId, answer, note]))}`;

export const PIN_SEAL = {
  version: 1,
  info: 'kneeboard-pin/1',
  publicKeyBytes: 65,
  ivBytes: 12,
  tagBytes: 16,
  plaintextBytes: 256,
} as const;

/** `serverPublicKeySpki`: base64 of the DER of a P-256 key. Throws when the key is none or the statement is too long. */
export async function sealPin(statement: PinStatement, serverPublicKeySpki: string): Promise<string> {
  const { subtle } = globalThis.crypto;
  const curve = { name: 'ECDH', namedCurve: 'P-256' };
  const serverKey = await subtle.importKey('spki', fromBase64(serverPublicKeySpki), curve, true, []);
  const ephemeral = await subtle.generateKey(curve, false, ['deriveBits']);
  const ephemeralPoint = new Uint8Array(await subtle.exportKey('raw', ephemeral.publicKey));
  const serverPoint = new Uint8Array(await subtle.exportKey('raw', serverKey));
  const secret = await subtle.deriveBits({ name: 'ECDH', public: serverKey }, ephemeral.privateKey, 256);
  const info = join(new TextEncoder().encode(PIN_SEAL.info), ephemeralPoint, serverPoint);
  const derived = await subtle.importKey('raw', secret, 'HKDF', false, ['deriveKey']);
  const hkdf = { name: 'HKDF', hash: 'SHA-256', salt: new Uint8Array(), info };
  const key = await subtle.deriveKey(hkdf, derived, { name: 'AES-GCM', length: 256 }, false, ['encrypt']);
  const iv = globalThis.crypto.getRandomValues(new Uint8Array(PIN_SEAL.ivBytes));
  const head = join(Uint8Array.of(PIN_SEAL.version), ephemeralPoint);
  const ciphertext = await subtle.encrypt({ name: 'AES-GCM', iv, additionalData: head }, key, plaintextOf(statement));
  return toBase64(join(head, iv, new Uint8Array(ciphertext)));
}

function plaintextOf({ pin, textHash, nonce }: PinStatement): Uint8Array<ArrayBuffer> {
  const json = new TextEncoder().encode(JSON.stringify({ pin, textHash, nonce }));
  if (json.length > PIN_SEAL.plaintextBytes) throw new RangeError(`A PIN statement has at most ${PIN_SEAL.plaintextBytes} bytes, this has ${json.length}.`);
  const padded = new Uint8Array(PIN_SEAL.plaintextBytes).fill(' '.charCodeAt(0));
  padded.set(json);
  return padded;
}

function join(...parts: Uint8Array[]): Uint8Array<ArrayBuffer> {
  const joined = new Uint8Array(parts.reduce((bytes, part) => bytes + part.length, 0));
  let at = 0;
  for (const part of parts) {
    joined.set(part, at);
    at += part.length;
  }
  return joined;
}

const toBase64 = (bytes: Uint8Array): string => btoa(String.fromCharCode(...bytes));
const fromBase64 = (text: string): Uint8Array<ArrayBuffer> => Uint8Array.from(atob(text), (character) => character.charCodeAt(0));
