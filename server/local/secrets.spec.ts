import { afterAll, describe, expect, it } from '@jest/globals';
import { createPrivateKey } from 'node:crypto';
import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureKeys } from './secrets.mjs';

describe('ensureKeys', () => {
  const parent = mkdtempSync(join(tmpdir(), 'kneeboard-keys-'));
  const folder = join(parent, 'keys');
  afterAll(() => rmSync(parent, { recursive: true, force: true }));
  const contents = () => Object.fromEntries(readdirSync(folder).map((name) => [name, readFileSync(join(folder, name), 'utf8')]));

  it('makes each secret once, closed to everybody else', () => {
    ensureKeys(folder);
    const first = contents();
    expect(Object.keys(first).sort()).toEqual(['log-signing-key.pem', 'pin-pepper', 'pin-sealing-key.pem', 'session-secret']);
    expect(statSync(folder).mode & 0o777).toBe(0o700);
    for (const name of Object.keys(first)) expect(statSync(join(folder, name)).mode & 0o777).toBe(0o600);
    expect(first['session-secret']).not.toBe(first['pin-pepper']);
    expect(first['session-secret']).toMatch(/^[0-9a-f]{48}$/);
    ensureKeys(folder);
    expect(contents()).toEqual(first);
  });

  it('makes an Ed25519 key for the log and a P-256 key for PINs', () => {
    const key = (name: string) => createPrivateKey(readFileSync(join(folder, name)));
    expect(key('log-signing-key.pem').asymmetricKeyType).toBe('ed25519');
    // prime256v1 is OpenSSL's name for P-256: RFC 8422, appendix A.
    expect(key('pin-sealing-key.pem').asymmetricKeyDetails?.namedCurve).toBe('prime256v1');
  });
});
