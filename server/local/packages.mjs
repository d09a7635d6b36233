// @ts-check
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { underLock } from './lock.mjs';
import { Refusal, step } from './progress.mjs';
import { run } from './processes.mjs';

/** Refuses a Node.js that the packages do not run on. */
export function demandNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  const fits = major > 20 ? major < 23 : major === 20 && minor >= 19;
  if (!fits) throw new Refusal(`Kneeboard needs Node.js 20.19 or newer, up to 22; this is ${process.versions.node}.`);
}

/**
 * Whether the packages in node_modules are those of the lock file: compares it with the record that npm itself keeps
 * there, so an npm install by hand counts too. Optional ones may be absent (other systems' binaries).
 * @param {Record<string, LockEntry>} wanted "packages" of package-lock.json
 * @param {Record<string, LockEntry>} present "packages" of node_modules/.package-lock.json
 * @typedef {{ version?: string, optional?: boolean }} LockEntry
 */
export function isInstalled(wanted, present) {
  return Object.entries(wanted).every(([path, { version, optional }]) => path === '' || (path in present ? present[path]?.version === version : optional === true));
}

/** @param {string} root */
function packagesArePresent(root) {
  const record = join(root, 'node_modules/.package-lock.json');
  if (!existsSync(record)) return false;
  const [wanted, present] = [join(root, 'package-lock.json'), record].map((path) => JSON.parse(readFileSync(path, 'utf8')).packages);
  return isInstalled(wanted, present);
}

/**
 * Installs the npm packages when they are missing or are not those of the lock file.
 * @param {string} root
 */
export async function ensurePackages(root) {
  if (packagesArePresent(root)) return;
  await underLock(`packages ${root}`, async () => {
    if (packagesArePresent(root)) return;
    await step('Installing npm packages (about a minute)', () => run('npm', ['ci', '--no-progress'], { cwd: root }));
  });
}
