import { createDecipheriv, createPrivateKey, createPublicKey, diffieHellman, hkdfSync, type KeyObject } from 'node:crypto';
import { PIN_SEAL, type PinStatement } from '#shared/pin-sealing';

/** DER of SubjectPublicKeyInfo of a P-256 key up to the uncompressed point: RFC 5480. */
const P256_SPKI_PREFIX = Buffer.from('3059301306072a8648ce3d020106082a8648ce3d030107034200', 'hex');
const HEAD_BYTES = 1 + PIN_SEAL.publicKeyBytes;
const SEALED_BYTES = HEAD_BYTES + PIN_SEAL.ivBytes + PIN_SEAL.plaintextBytes + PIN_SEAL.tagBytes;

/** A sealed PIN that cannot be opened: changed on the way, for another key, or of another form. Says no more than that. */
export class SealedPinError extends Error {
  override readonly name = 'SealedPinError';
}

/** The base64 of the public key that tablets seal to. */
export function pinPublicKeySpki(privateKeyPem: string): string {
  return createPublicKey(p256(privateKeyPem)).export({ format: 'der', type: 'spki' }).toString('base64');
}

/**
 * Opens what `sealPin` sealed. Give older private keys after the present one: an outbox may be days old. That the text
 * hash is that of the text signed, and that the nonce is new, is for the caller to check. Throws SealedPinError.
 */
export function unsealPin(sealed: string, privateKeyPem: string | readonly string[]): PinStatement {
  const pems = typeof privateKeyPem === 'string' ? [privateKeyPem] : privateKeyPem;
  const bytes = Buffer.from(sealed, 'base64');
  if (bytes.length !== SEALED_BYTES || bytes[0] !== PIN_SEAL.version) throw new SealedPinError('This is not a sealed PIN of a form that is known.');
  for (const pem of pems) {
    const statement = open(bytes, p256(pem));
    if (statement) return statement;
  }
  throw new SealedPinError('The sealed PIN cannot be opened: it was changed, or sealed to another key.');
}

/** The statement, or undefined when it is not sealed to this key. */
function open(bytes: Buffer, privateKey: KeyObject): PinStatement | undefined {
  const head = bytes.subarray(0, HEAD_BYTES);
  const iv = bytes.subarray(HEAD_BYTES, HEAD_BYTES + PIN_SEAL.ivBytes);
  const ciphertext = bytes.subarray(HEAD_BYTES + PIN_SEAL.ivBytes, -PIN_SEAL.tagBytes);
  const serverPoint = createPublicKey(privateKey).export({ format: 'der', type: 'spki' }).subarray(P256_SPKI_PREFIX.length);
  try {
    const spki = Buffer.concat([P256_SPKI_PREFIX, head.subarray(1)]);
    const secret = diffieHellman({ privateKey, publicKey: createPublicKey({ key: spki, format: 'der', type: 'spki' }) });
    const info = Buffer.concat([Buffer.from(PIN_SEAL.info), head.subarray(1), serverPoint]);
    const key = Buffer.from(hkdfSync('sha256', secret, Buffer.alloc(0), info, 32));
    const decipher = createDecipheriv('aes-256-gcm', key, iv, { authTagLength: PIN_SEAL.tagBytes });
    decipher.setAAD(head).setAuthTag(bytes.subarray(-PIN_SEAL.tagBytes));
    return statementOf(Buffer.concat([decipher.update(ciphertext), decipher.final()]).toString());
  } catch {
    // A point off the curve, a tag that does not fit, JSON of another form: all the same to the caller.
    return undefined;
  }
}

function statementOf(json: string): PinStatement {
  const { pin, textHash, nonce }: Record<string, unknown> = Object(JSON.parse(json));
  if (typeof pin !== 'string' || typeof textHash !== 'string' || typeof nonce !== 'string') throw new TypeError('Not a PIN statement.');
  return { pin, textHash, nonce };
}

function p256(pem: string): KeyObject {
  const key = createPrivateKey(pem);
  if (key.asymmetricKeyDetails?.namedCurve !== 'prime256v1') throw new TypeError('The key for PINs is a P-256 key.');
  return key;
}
