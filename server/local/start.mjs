// @ts-check
/** `npm start`: from a fresh clone to a running Kneeboard with its demo. Needs nothing but Node.js until the packages are there. */
import { accessSync, constants, mkdirSync, readFileSync, realpathSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensurePostgres } from './debian.mjs';
import { tryLock } from './lock.mjs';
import { demandNode, ensurePackages } from './packages.mjs';
import { demandPort, parsePort } from './ports.mjs';
import { endRunningCommands, leftovers, logPath, parentOf, processName, run } from './processes.mjs';
import { Refusal, say, sayError, step, Stopped } from './progress.mjs';
import { ensureKeys } from './secrets.mjs';
import { signInLines, signInsFrom } from './sign-ins.mjs';
import { keepRunning } from './supervise.mjs';

const usualPort = 4380;
const readyWithinMs = 60_000;
const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
/** What to stop, in the order it was started. */
/** @type {(() => Promise<void>)[]} */
const stops = [];
let isStopping = false;

for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
  process.on(signal, () => void stopEverything());
}

// A closed terminal or pipe must not end us before our children.
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined);
// npm and su pass signals on, but when they are killed outright nobody is left to press Ctrl-C.
if (process.env['npm_lifecycle_event']) {
  const atFirst = whoCanStopUs();
  setInterval(() => void (whoCanStopUs() === atFirst ? undefined : stopEverything()), 1000).unref();
}

try {
  await start();
} catch (error) {
  // A step that a Ctrl-C interrupts fails; that is no news.
  if (!isStopping) {
    sayError(error);
    process.exitCode = 1;
  }
  await stopEverything();
}

async function start() {
  demandNode();
  const port = parsePort(process.env['PORT'], usualPort);
  const url = process.env['PUBLIC_URL'] || `http://127.0.0.1:${port}`;
  const folder = dataFolder();
  const lock = await tryLock(`data ${folder}`, () => `at ${url}; to end it press Ctrl-C there or type: kill ${process.pid}`);
  if ('heldBy' in lock) throw new Refusal(`Kneeboard already runs from ${folder}, ${lock.heldBy}`);
  const left = leftovers(folder);
  if (left.length > 0) await step(`Ending what an earlier start left running: ${left.map(({ name }) => name).join(', ')}`, () => Promise.all(left.map(({ end }) => end())));
  await demandPort(port);

  await ensurePackages(root);
  goOn();
  await ensurePostgres();
  goOn();
  // Only now: these need the packages.
  const { buildIfStale, migrate } = await import('./build.mjs');
  const { startServices, bucketEnvironment } = await import('./services.mjs');
  await buildIfStale();
  goOn();
  const services = await step('Starting PostgreSQL, S3 and mail', () => startServices(folder));
  stops.push(services.stop);
  goOn();

  const keys = join(folder, 'keys');
  ensureKeys(keys);
  const environment = {
    ...process.env,
    NODE_ENV: 'production',
    HOST: '127.0.0.1',
    PORT: String(port),
    PUBLIC_URL: url,
    DATABASE_URL: services.postgres.appUrl,
    ...bucketEnvironment(services),
    SMTP_URL: `smtp://127.0.0.1:${services.smtpPort}`,
    KNEEBOARD_KEYS: keys,
    WEB_ROOT: join(root, 'dist/web'),
    SHEET_READER_ENTRY: join(root, 'dist/server/sheet-reader.mjs'),
  };
  await step('Bringing the database up to date', () => migrate({ OWNER_DATABASE_URL: services.postgres.ownerUrl }));
  goOn();
  const seeded = await step('Loading the demo', () => run(process.execPath, ['--enable-source-maps', join(root, 'dist/server/seed.mjs')], { cwd: root, env: { ...environment, KNEEBOARD_ROLE: 'web' } }));
  goOn();
  const main = join(root, 'dist/server/main.mjs');
  // The worker first, so that it is stopped last: what the web process queues still finds it.
  const failures = ['worker', 'web'].map((role) => {
    const kept = keepRunning(folder, role, main, { cwd: root, env: { ...environment, KNEEBOARD_ROLE: role } });
    stops.push(kept.stop);
    return kept.gaveUp.then((how) => `The ${role} process ${how}.\n${endOfLog(folder, role)}`);
  });
  failures.push(services.ended.then((how) => `${how}, which Kneeboard cannot do without; see ${join(folder, 'logs')}.`));
  const failure = Promise.race(failures);
  await step('Starting Kneeboard', async () => {
    const sentence = await Promise.race([failure, untilReady(`http://127.0.0.1:${port}/readyz`, folder)]);
    if (sentence !== undefined) throw new Refusal(sentence);
  });
  goOn();
  void failure.then(giveUp);

  const signIns = signInsFrom(seeded);
  say(`\nKneeboard is ready at ${url}`);
  if (signIns.length > 0) say(`\nDemo sign-ins (role, e-mail, password):\n${signInLines(signIns).join('\n')}`);
  say(`\nCtrl-C stops it. Data, mail and logs are in ${folder}`);
}

/** npm (our parent, or the parent of the shell that it runs us in) and, at a terminal, what npm was typed into. */
function whoCanStopUs() {
  const npm = ['sh', 'dash', 'bash'].includes(processName(process.ppid)) ? parentOf(process.ppid) : process.ppid;
  return process.stdout.isTTY ? `${npm} ${parentOf(npm)}` : String(npm);
}

/** Makes the data folder where it was asked for, .data beside the program otherwise. */
function dataFolder() {
  // npm changes to the project's folder; a relative path was meant from where the command was typed.
  const folder = resolve(process.env['INIT_CWD'] ?? '.', process.env['KNEEBOARD_DATA'] || join(root, '.data'));
  try {
    mkdirSync(folder, { recursive: true, mode: 0o711 });
    accessSync(folder, constants.W_OK | constants.X_OK);
    return realpathSync(folder);
  } catch (error) {
    throw new Refusal(`The data folder ${folder} cannot be used (${error instanceof Error ? error.message : String(error)}); set KNEEBOARD_DATA to another one.`);
  }
}

function goOn() {
  if (isStopping) throw new Stopped();
}

/**
 * @param {string} url
 * @param {string} folder
 * @returns {Promise<undefined>}
 */
async function untilReady(url, folder) {
  for (const until = Date.now() + readyWithinMs; Date.now() < until; ) {
    goOn();
    try {
      if ((await fetch(url, { signal: AbortSignal.timeout(2000) })).status === 200) return undefined;
    } catch {
      // not listening yet
    }
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Refusal(`Kneeboard was not ready within ${readyWithinMs / 1000} s.\n${endOfLog(folder, 'web')}`);
}

/**
 * @param {string} folder
 * @param {string} name
 */
function endOfLog(folder, name) {
  const path = logPath(folder, name);
  return `The end of ${path}:\n${readFileSync(path, 'utf8').trimEnd().split('\n').slice(-15).join('\n')}`;
}

/** @param {string} sentence */
function giveUp(sentence) {
  if (isStopping) return;
  process.exitCode = 1;
  sayError(new Refusal(sentence));
  void stopEverything();
}

async function stopEverything() {
  if (isStopping) return;
  isStopping = true;
  endRunningCommands();
  if (stops.length > 0) process.stdout.write('\n');
  await (stops.length > 0 ? step('Stopping', stopInOrder) : undefined);
}

/** The last started first: web, worker, then the services. */
async function stopInOrder() {
  for (const stop of stops.reverse()) await stop();
}
