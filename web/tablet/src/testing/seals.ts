import { webcrypto } from 'node:crypto';

/** A server's key pair, and the opening side of a PIN seal written from the format's description in shared/pin-sealing.ts. */
export async function sealingKeys(): Promise<{ readonly spki: string; readonly open: (sealed: string) => Promise<unknown> }> {
  const { subtle } = webcrypto;
  const keys = await subtle.generateKey({ name: 'ECDH', namedCurve: 'P-256' }, true, ['deriveBits']);
  const own = new Uint8Array(await subtle.exportKey('raw', keys.publicKey));
  const open = async (sealed: string): Promise<unknown> => {
    const bytes = Buffer.from(sealed, 'base64');
    const [head, point, iv, ciphertext] = [bytes.subarray(0, 66), bytes.subarray(1, 66), bytes.subarray(66, 78), bytes.subarray(78)];
    const ephemeral = await subtle.importKey('raw', point, { name: 'ECDH', namedCurve: 'P-256' }, false, []);
    const secret = await subtle.deriveBits({ name: 'ECDH', public: ephemeral }, keys.privateKey, 256);
    const derived = await subtle.importKey('raw', secret, 'HKDF', false, ['deriveKey']);
    const info = Buffer.concat([Buffer.from('kneeboard-pin/1'), point, own]);
    const key = await subtle.deriveKey({ name: 'HKDF', hash: 'SHA-256', salt: new Uint8Array(), info }, derived, { name: 'AES-GCM', length: 256 }, false, ['decrypt']);
    const plain = await subtle.decrypt({ name: 'AES-GCM', iv, additionalData: head }, key, ciphertext);
    return JSON.parse(Buffer.from(plain).toString('utf8')) as unknown;
  };
  return { spki: Buffer.from(await subtle.exportKey('spki', keys.publicKey)).toString('base64'), open };
}
