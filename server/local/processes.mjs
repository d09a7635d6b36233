// @ts-check
import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, openSync, closeSync, readdirSync, readFileSync, renameSync, rmSync, statSync } from 'node:fs';
import { basename, join } from 'node:path';
import { Stopped } from './progress.mjs';
import { writeFileWhole } from './secrets.mjs';

/** Ends a child when its parent dies, even by kill -9 (Linux's parent-death signal); part of every Debian. */
const setpriv = '/usr/bin/setpriv';
const keptOutputCharacters = 200_000;
const logLimitBytes = 5_000_000;

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();
let areCommandsEnding = false;

/** A command that ended with something else than 0; the message carries the end of what it printed. */
export class CommandFailed extends Error {
  /**
   * @param {string} command
   * @param {string} how
   * @param {string} output
   */
  constructor(command, how, output) {
    super(`${command} ${how}.${output.trim() === '' ? '' : ` The end of what it printed:\n${output.trim().split('\n').slice(-40).join('\n')}`}`);
    this.stack = this.message;
  }
}

/**
 * Runs a command to its end and gives what it printed on standard output.
 * @param {string} command
 * @param {readonly string[]} commandArguments
 * @param {{ env?: NodeJS.ProcessEnv, cwd?: string }} [options]
 * @returns {Promise<string>}
 */
export function run(command, commandArguments, { env = process.env, cwd } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, commandArguments, { env, cwd, stdio: ['ignore', 'pipe', 'pipe'] });
    running.add(child);
    let printed = '';
    let all = '';
    child.stdout.setEncoding('utf8').on('data', (part) => {
      printed = (printed + part).slice(-keptOutputCharacters);
      all = (all + part).slice(-keptOutputCharacters);
    });
    child.stderr.setEncoding('utf8').on('data', (part) => (all = (all + part).slice(-keptOutputCharacters)));
    const name = [basename(command), ...commandArguments.slice(0, 2).map((argument) => basename(argument))].join(' ');
    child.on('error', (error) => {
      running.delete(child);
      reject(new CommandFailed(name, `could not be started (${error.message})`, ''));
    });
    child.on('close', (code, signal) => {
      running.delete(child);
      if (areCommandsEnding) reject(new Stopped());
      else if (code === 0) resolve(printed);
      else reject(new CommandFailed(name, signal ? `was ended by ${signal}` : `ended with ${code}`, all));
    });
  });
}

/** Ends the commands that `run` has going, for a Ctrl-C in the middle of a step; by force after two seconds. */
export function endRunningCommands() {
  areCommandsEnding = true;
  for (const child of running) child.kill('SIGTERM');
  setTimeout(() => running.forEach((child) => child.kill('SIGKILL')), 2000).unref();
}

/** Whether a Ctrl-C came: whoever waits should give up. */
export const isEnding = () => areCommandsEnding;

/**
 * A command line that ends with its parent. Read also by postgres.mjs, which adds the change of user.
 * @param {NodeJS.Signals} signal
 * @param {readonly string[]} privileges further setpriv arguments
 * @param {string} command
 * @param {readonly string[]} commandArguments
 * @returns {[string, string[]]}
 */
export function tied(signal, privileges, command, commandArguments) {
  if (!existsSync(setpriv)) return [command, [...commandArguments]];
  return [setpriv, [...privileges, `--pdeathsig=${signal.replace('SIG', '')}`, command, ...commandArguments]];
}

/**
 * @typedef {object} Service
 * @property {string} name
 * @property {number} pid
 * @property {Promise<string>} ended says how, once it has ended; never rejects
 * @property {() => Promise<number>} port the port that a stand-in reports once it listens (only with reportsPort)
 * @property {() => Promise<void>} stop asks it to end, waits, ends it by force after ten seconds
 */

/**
 * Starts a long-running child: in a session of its own, so that a Ctrl-C reaches only the parent and the order of stopping
 * is the parent's; tied to the parent's life; its output in logs/NAME.log; noted in run/NAME.json for the next start.
 * @param {string} folder the data folder
 * @param {string} name
 * @param {[string, string[]]} commandLine from `tied`
 * @param {{ env?: NodeJS.ProcessEnv, cwd?: string, mark: string, stopSignal?: NodeJS.Signals, reportsPort?: boolean }} options mark: a part of its command line that tells it from another process with the same number
 * @returns {Service}
 */
export function startService(folder, name, [command, commandArguments], { env = process.env, cwd, mark, stopSignal = 'SIGTERM', reportsPort = false }) {
  const log = openLog(folder, name);
  const child = spawn(command, commandArguments, { env, cwd, detached: true, stdio: reportsPort ? ['ignore', log, log, 'ipc'] : ['ignore', log, log] });
  closeSync(log);
  const note = join(folder, 'run', `${name}.json`);
  /** @type {Promise<string>} */
  const ended = new Promise((resolve) => {
    child.on('error', (error) => resolve(error.message));
    child.on('exit', (code, signal) => {
      rmSync(note, { force: true });
      resolve(signal ? `ended by ${signal}` : `ended with ${code}`);
    });
  });
  const pid = child.pid ?? 0;
  if (pid > 0) writeNote(note, pid, mark);
  const port = new Promise((/** @type {(port: number) => void} */ resolve, reject) => {
    child.once('message', (message) => resolve(Number(Object(message).port)));
    void ended.then((how) => reject(new Error(`${name} ${how}; see ${logPath(folder, name)}`)));
  });
  port.catch(() => undefined);
  return {
    name,
    pid,
    ended,
    port: () => port,
    stop: async () => {
      child.kill(stopSignal);
      const stubborn = setTimeout(() => child.kill('SIGKILL'), 10_000);
      await ended;
      clearTimeout(stubborn);
    },
  };
}

/**
 * @param {string} note
 * @param {number} pid
 * @param {string} mark
 */
function writeNote(note, pid, mark) {
  const startedTicks = processStartTicks(pid);
  if (startedTicks !== undefined) writeFileWhole(note, JSON.stringify({ pid, startedTicks, mark }));
}

/**
 * When a process started, in clock ticks since boot: with its number, what tells it from a later one. undefined when it is gone.
 * @param {number} pid
 */
export function processStartTicks(pid) {
  try {
    return startTicksFromStat(readFileSync(`/proc/${pid}/stat`, 'utf8'));
  } catch {
    return undefined;
  }
}

/**
 * The process that started another; 0 when either is gone.
 * @param {number} pid
 */
export function parentOf(pid) {
  try {
    return parentFromStat(readFileSync(`/proc/${pid}/stat`, 'utf8'));
  } catch {
    return 0;
  }
}

/**
 * The name of a process's program; empty when it is gone.
 * @param {number} pid
 */
export function processName(pid) {
  try {
    return readFileSync(`/proc/${pid}/comm`, 'utf8').trim();
  } catch {
    return '';
  }
}

/** @param {string} stat */
const fieldsAfterName = (stat) => stat.slice(stat.lastIndexOf(')') + 2).split(' ');

/**
 * Field 4 of /proc/PID/stat.
 * @param {string} stat
 */
export const parentFromStat = (stat) => Number(fieldsAfterName(stat)[1]);

/**
 * Field 22 of /proc/PID/stat. The second field is the command in brackets and may hold spaces and brackets itself.
 * A zombie counts as gone.
 * @param {string} stat
 * @returns {number | undefined}
 */
export function startTicksFromStat(stat) {
  const fields = fieldsAfterName(stat);
  return fields[0] === 'Z' || fields[0] === 'X' ? undefined : Number(fields[19]);
}

/**
 * Whether a noted process is still the one that was started from this folder.
 * @param {{ pid: number, startedTicks: number, mark: string }} noted
 */
function isStillOurs({ pid, startedTicks, mark }) {
  if (processStartTicks(pid) !== startedTicks) return false;
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ').includes(mark);
  } catch {
    return false;
  }
}

/**
 * What an earlier start left running in this data folder (after kill -9 and where the parent-death signal did not come).
 * @param {string} folder
 * @returns {{ name: string, end: () => Promise<void> }[]}
 */
export function leftovers(folder) {
  const notes = join(folder, 'run');
  if (!existsSync(notes)) return [];
  return readdirSync(notes).flatMap((file) => {
    const path = join(notes, file);
    const noted = readNote(path);
    if (!noted || !isStillOurs(noted)) {
      rmSync(path, { force: true });
      return [];
    }
    const end = async () => {
      // SIGINT is PostgreSQL's fast shutdown; the others take it as any request to end.
      await endByForce(noted, 'SIGINT', 10_000);
      await endByForce(noted, 'SIGKILL', 5_000);
      rmSync(path, { force: true });
    };
    return [{ name: basename(file, '.json'), end }];
  });
}

/**
 * @param {string} path
 * @returns {{ pid: number, startedTicks: number, mark: string } | undefined}
 */
function readNote(path) {
  try {
    const { pid, startedTicks, mark } = JSON.parse(readFileSync(path, 'utf8'));
    return Number.isInteger(pid) && pid > 1 && typeof mark === 'string' && mark !== '' ? { pid, startedTicks, mark } : undefined;
  } catch {
    return undefined;
  }
}

/**
 * @param {{ pid: number, startedTicks: number, mark: string }} noted
 * @param {NodeJS.Signals} signal
 * @param {number} patienceMs
 */
async function endByForce(noted, signal, patienceMs) {
  if (!isStillOurs(noted)) return;
  process.kill(noted.pid, signal);
  for (const until = Date.now() + patienceMs; Date.now() < until && isStillOurs(noted); ) await new Promise((resolve) => setTimeout(resolve, 50));
}

/**
 * @param {string} folder
 * @param {string} name
 */
export const logPath = (folder, name) => join(folder, 'logs', `${name}.log`);

/**
 * @param {string} folder
 * @param {string} name
 */
function openLog(folder, name) {
  for (const each of ['logs', 'run']) mkdirSync(join(folder, each), { recursive: true, mode: 0o700 });
  const path = logPath(folder, name);
  if (existsSync(path) && statSync(path).size > logLimitBytes) renameSync(path, `${path}.1`);
  return openSync(path, 'a', 0o600);
}
