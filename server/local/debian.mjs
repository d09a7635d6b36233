// @ts-check
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { delimiter, dirname, join } from 'node:path';
import { run } from './processes.mjs';
import { Refusal, step } from './progress.mjs';

const isRoot = () => process.getuid?.() === 0;

/**
 * The folders that hold PostgreSQL's server, newest major version first.
 * @returns {{ folder: string, major: number }[]}
 */
export function postgresFolders() {
  const debian = '/usr/lib/postgresql';
  const installed = existsSync(debian) ? readdirSync(debian).map((version) => join(debian, version, 'bin')) : [];
  const onPath = (process.env['PATH'] ?? '').split(delimiter).filter((folder) => folder !== '');
  const folders = [...installed, ...onPath].filter((folder) => existsSync(join(folder, 'initdb')) && existsSync(join(folder, 'postgres')));
  return folders.map((folder) => ({ folder, major: Number(/postgresql\/(\d+)\/bin$/.exec(folder)?.[1] ?? 0) })).sort((a, b) => b.major - a.major);
}

/** Installs PostgreSQL's server when it is absent and we may; otherwise says in a sentence what to type. */
export async function ensurePostgres() {
  if (postgresFolders().length > 0) return;
  if (!isRoot() || !existsSync('/usr/bin/apt-get')) {
    throw new Refusal('Kneeboard needs the PostgreSQL server, which is not installed; type: sudo apt-get install -y postgresql');
  }
  await step('Installing PostgreSQL from Debian (about a minute)', async () => {
    preventMainCluster('/etc/postgresql-common/createcluster.conf');
    await aptInstall('postgresql');
  });
}

/**
 * Where Chromium is; undefined when it is absent and we may not install it.
 * @returns {Promise<string | undefined>}
 */
export async function ensureChromium() {
  const find = () => [process.env['TEST_CHROMIUM'] ?? '', '/usr/bin/chromium', '/usr/bin/chromium-browser'].find((path) => path !== '' && existsSync(path));
  if (!find() && isRoot() && existsSync('/usr/bin/apt-get')) await step('Installing Chromium from Debian for the browser tests', () => aptInstall('chromium'));
  return find();
}

/**
 * Debian's package starts a cluster of its own on port 5432 unless told before it is installed.
 * @param {string} path
 */
function preventMainCluster(path) {
  const before = existsSync(path) ? readFileSync(path, 'utf8') : '';
  if (/^\s*create_main_cluster\s*=\s*false/m.test(before)) return;
  mkdirSync(dirname(path), { recursive: true });
  writeFileSync(path, `${before}create_main_cluster = false\n`);
}

/** @param {string} name */
async function aptInstall(name) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  await run('apt-get', ['update', '-qq'], { env });
  await run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', '-o', 'Dpkg::Options::=--force-confold', name], { env });
}
