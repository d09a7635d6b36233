import { createCipheriv, createECDH, createPrivateKey, generateKeyPairSync, hkdfSync } from 'node:crypto';
import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { sealPin, type PinStatement } from '#shared/pin-sealing';
import { pinPublicKeySpki, SealedPinError, unsealPin } from './pin-unsealing';

const newKey = (): string => generateKeyPairSync('ec', { namedCurve: 'P-256' }).privateKey.export({ format: 'pem', type: 'pkcs8' }).toString();
const KEY = newKey();
const SPKI = pinPublicKeySpki(KEY);
const STATEMENT: PinStatement = { pin: '4071', textHash: 'ab'.repeat(32), nonce: '0195d4e0-7a10-7000-8000-00000000c0de' };

/** Seals by the written form with node:crypto's older calls alone, sharing no code with either side. */
function sealByHand(plaintext: string, spki: string, { version = 1, info = 'kneeboard-pin/1' } = {}): string {
  const ecdh = createECDH('prime256v1');
  ecdh.generateKeys();
  const serverPoint = Buffer.from(spki, 'base64').subarray(-65);
  const key = Buffer.from(hkdfSync('sha256', ecdh.computeSecret(serverPoint), '', Buffer.concat([Buffer.from(info), ecdh.getPublicKey(), serverPoint]), 32));
  const iv = Buffer.alloc(12, 3);
  const cipher = createCipheriv('aes-256-gcm', key, iv);
  const head = Buffer.concat([Buffer.of(version), ecdh.getPublicKey()]);
  cipher.setAAD(head);
  return Buffer.concat([head, iv, cipher.update(plaintext.padEnd(256)), cipher.final(), cipher.getAuthTag()]).toString('base64');
}

describe('sealing a PIN', () => {
  it('is undone by the server, whatever the PIN', async () => {
    expect(unsealPin(await sealPin(STATEMENT, SPKI), KEY)).toEqual(STATEMENT);
    await fc.assert(fc.asyncProperty(fc.string({ unit: 'binary', maxLength: 12 }), async (pin) => {
      expect(unsealPin(await sealPin({ ...STATEMENT, pin }, SPKI), KEY).pin).toBe(pin);
    }), { numRuns: 20 });
  });

  it('opens what was sealed by hand after the written form, and only after that', () => {
    expect(unsealPin(sealByHand(JSON.stringify(STATEMENT), SPKI), KEY)).toEqual(STATEMENT);
    expect(() => unsealPin(sealByHand(JSON.stringify(STATEMENT), SPKI, { info: 'other' }), KEY)).toThrow(SealedPinError);
    expect(() => unsealPin(sealByHand(JSON.stringify(STATEMENT), SPKI, { version: 2 }), KEY)).toThrow(SealedPinError);
    for (const other of ['null', '17', '{}', '{"pin":4071,"textHash":"","nonce":""}', 'not json']) {
      expect(() => unsealPin(sealByHand(other, SPKI), KEY)).toThrow(SealedPinError);
    }
  });

  it('never gives the same bytes twice, and the same length for every PIN', async () => {
    const [first, second, longer] = await Promise.all([sealPin(STATEMENT, SPKI), sealPin(STATEMENT, SPKI), sealPin({ ...STATEMENT, pin: '40711234' }, SPKI)]);
    expect(first).not.toBe(second);
    expect(longer).toHaveLength(first.length);
    expect(Buffer.from(first, 'base64').toString('latin1')).not.toContain('4071');
  });

  it('refuses a statement that is too long and a key of another kind', async () => {
    await expect(sealPin({ ...STATEMENT, nonce: 'n'.repeat(200) }, SPKI)).rejects.toThrow('at most 256 bytes');
    const ed25519 = generateKeyPairSync('ed25519').publicKey.export({ format: 'der', type: 'spki' }).toString('base64');
    await expect(sealPin(STATEMENT, ed25519)).rejects.toThrow();
  });
});

describe('opening a sealed PIN', () => {
  it('refuses every changed byte: version, key, iv, ciphertext, tag', async () => {
    const bytes = Buffer.from(await sealPin(STATEMENT, SPKI), 'base64');
    for (let at = 0; at < bytes.length; at += 1) {
      const changed = Buffer.from(bytes);
      changed[at] = (changed[at] ?? 0) ^ 1;
      expect(() => unsealPin(changed.toString('base64'), KEY)).toThrow(SealedPinError);
    }
  });

  it('refuses one that is cut, longer, empty, or sealed to another key', async () => {
    const sealed = await sealPin(STATEMENT, SPKI);
    const bytes = Buffer.from(sealed, 'base64');
    for (const other of [bytes.subarray(0, -1), bytes.subarray(1), Buffer.concat([bytes, Buffer.of(0)]), Buffer.alloc(0)]) {
      expect(() => unsealPin(other.toString('base64'), KEY)).toThrow('not a sealed PIN');
    }
    expect(() => unsealPin(sealed, newKey())).toThrow('cannot be opened');
  });

  it('opens with an older key that is still kept', async () => {
    expect(unsealPin(await sealPin(STATEMENT, SPKI), [newKey(), KEY])).toEqual(STATEMENT);
    expect(() => unsealPin('', [])).toThrow(SealedPinError);
  });

  it('takes no key of another curve', () => {
    const p384 = generateKeyPairSync('ec', { namedCurve: 'P-384' }).privateKey.export({ format: 'pem', type: 'pkcs8' }).toString();
    expect(() => pinPublicKeySpki(p384)).toThrow('P-256');
    expect(createPrivateKey(KEY).asymmetricKeyDetails?.namedCurve).toBe('prime256v1');
  });
});
