// @ts-check
import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/**
 * Writes a file so that it is there whole or not at all, readable by its owner only.
 * @param {string} path
 * @param {string} text
 */
export function writeFileWhole(path, text) {
  const unfinished = `${path}.${process.pid}.new`;
  writeFileSync(unfinished, text, { mode: 0o600, flush: true });
  renameSync(unfinished, path);
}

/**
 * The content of a secret file, made the first time.
 * @param {string} path
 * @param {() => string} make
 */
export function secretFile(path, make) {
  if (!existsSync(path)) writeFileWhole(path, make());
  return readFileSync(path, 'utf8');
}

export const randomPassword = () => randomBytes(24).toString('hex');

/** @param {'ed25519' | 'p256'} kind */
function privateKeyPem(kind) {
  const { privateKey } = kind === 'ed25519' ? generateKeyPairSync('ed25519') : generateKeyPairSync('ec', { namedCurve: 'P-256' });
  return privateKey.export({ type: 'pkcs8', format: 'pem' }).toString();
}

/**
 * Makes what the service needs to keep secret, once per data folder; never replaces a file that is there, because
 * sessions, PINs and the record log's checkpoints depend on them.
 * @param {string} folder
 */
export function ensureKeys(folder) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  secretFile(join(folder, 'session-secret'), randomPassword);
  secretFile(join(folder, 'pin-pepper'), randomPassword);
  secretFile(join(folder, 'log-signing-key.pem'), () => privateKeyPem('ed25519'));
  secretFile(join(folder, 'pin-sealing-key.pem'), () => privateKeyPem('p256'));
}
