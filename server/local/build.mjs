// @ts-check
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { underLock } from './lock.mjs';
import { run } from './processes.mjs';
import { sayError, step } from './progress.mjs';

export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

const serverEntries = { main: 'server/main.ts', migrate: 'server/cli/migrate.ts', seed: 'server/cli/seed.ts', 'sheet-reader': 'server/sds/reader/child.ts' };

/** What is built, from which sources: a change in one of them makes that part stale, and only that part. */
const parts = {
  office: { sources: ['web/office', 'web/ui', 'shared', 'compliance', 'angular.json', 'tsconfig.json', 'tsconfig.web.json', 'package-lock.json'], build: () => angular('office') },
  tablet: { sources: ['web/tablet', 'web/ui', 'shared', 'compliance', 'angular.json', 'tsconfig.json', 'tsconfig.web.json', 'package-lock.json'], build: () => angular('tablet') },
  server: { sources: ['server', 'drizzle', 'shared', 'compliance', 'tsconfig.json', 'package.json', 'package-lock.json'], build: bundleServer },
};
/** @typedef {keyof typeof parts} Part */

/**
 * Builds what is stale into dist/: dist/web/office, dist/web/tablet, dist/server. Two builds in one folder wait for each other.
 * @param {readonly Part[]} [wanted]
 */
export async function buildIfStale(wanted = /** @type {Part[]} */ (Object.keys(parts))) {
  await underLock(`dist ${root}`, async () => {
    const stale = wanted.map((name) => ({ name, hash: sourceHash(root, parts[name].sources) })).filter(({ name, hash }) => !isBuilt(name, hash));
    if (stale.length === 0) return;
    await step(`Building ${stale.map(({ name }) => name).join(', ')}`, async () => {
      const results = await Promise.allSettled(stale.map(({ name, hash }) => buildPart(name, hash)));
      for (const result of results) if (result.status === 'rejected') throw result.reason;
    });
  });
}

/**
 * @param {Part} name
 * @param {string} hash
 */
const isBuilt = (name, hash) => existsSync(stampPath(name)) && readFileSync(stampPath(name), 'utf8') === hash;

/** @param {Part} name */
const stampPath = (name) => join(root, 'dist/.built', name);

/**
 * @param {Part} name
 * @param {string} hash of the sources before the build: what is edited meanwhile is stale afterwards
 */
async function buildPart(name, hash) {
  rmSync(stampPath(name), { force: true });
  await parts[name].build();
  mkdirSync(join(root, 'dist/.built'), { recursive: true });
  writeFileSync(stampPath(name), hash);
}

/**
 * One hash over the names and contents of all files under the given paths, specs left out.
 * @param {string} base
 * @param {readonly string[]} paths relative to base; one that is absent counts as empty
 * @returns {string} SHA-256, hexadecimal
 */
export function sourceHash(base, paths) {
  const hash = createHash('sha256');
  for (const path of paths.flatMap((each) => filesUnder(base, each)).sort()) {
    hash.update(`${path}\0`).update(createHash('sha256').update(readFileSync(join(base, path))).digest());
  }
  return hash.digest('hex');
}

/**
 * @param {string} base
 * @param {string} path
 * @returns {string[]}
 */
function filesUnder(base, path) {
  const full = join(base, path);
  if (!existsSync(full)) return [];
  if (!statSync(full).isDirectory()) return path.endsWith('.spec.ts') ? [] : [path];
  return readdirSync(full).flatMap((name) => filesUnder(base, join(path, name)));
}

/** @param {'office' | 'tablet'} application */
async function angular(application) {
  await run(process.execPath, [join(root, 'node_modules/@angular/cli/bin/ng.js'), 'build', application], { cwd: root, env: { ...process.env, NG_CLI_ANALYTICS: 'false' } });
}

async function bundleServer() {
  const { build, stop } = await import('esbuild');
  const present = Object.entries(serverEntries).filter(([, path]) => existsSync(join(root, path)));
  rmSync(join(root, 'dist/server'), { recursive: true, force: true });
  if (present.length === 0) return;
  await build({
    absWorkingDir: root,
    entryPoints: Object.fromEntries(present),
    outdir: 'dist/server',
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    sourcemap: true,
    logLevel: 'silent',
  });
  // Its helper process would stay as long as we do.
  await stop();
}

/**
 * Brings the database to the present schema, by the bundle when it is there. Without one there is nothing to migrate yet.
 * @param {{ OWNER_DATABASE_URL: string }} environment
 */
export async function migrate(environment) {
  await buildIfStale(['server']);
  const bundle = join(root, 'dist/server/migrate.mjs');
  if (existsSync(bundle)) await run(process.execPath, ['--enable-source-maps', bundle], { cwd: root, env: { ...process.env, ...environment } });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  try {
    await buildIfStale();
  } catch (error) {
    sayError(error);
    process.exitCode = 1;
  }
}
