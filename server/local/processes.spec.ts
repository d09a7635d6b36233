import { afterEach, describe, expect, it } from '@jest/globals';
import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { leftovers, parentFromStat, processStartTicks, run, startTicksFromStat } from './processes.mjs';

// proc(5), /proc/pid/stat: (1) pid (2) (comm) (3) state (4) ppid ... (22) starttime. comm may hold spaces and brackets.
const stat = (name: string, state: string) => `4711 (${name}) ${state} 42 4711 4711 0 -1 4194304 1 2 3 4 5 6 7 8 20 0 1 0 987654 1000 200 rest`;

describe('/proc/PID/stat', () => {
  it.each(['node', 'a b', 'x) S 1 (y', ')'])('gives start and parent for a program called %p', (name) => {
    expect(startTicksFromStat(stat(name, 'S'))).toBe(987_654);
    expect(parentFromStat(stat(name, 'S'))).toBe(42);
  });

  it('counts a zombie as gone', () => expect(startTicksFromStat(stat('node', 'Z'))).toBeUndefined());

  it('knows no start for a process that is not there', () => expect(processStartTicks(2 ** 22 + 1)).toBeUndefined());
});

describe('run', () => {
  it('gives what was printed', async () => expect(await run(process.execPath, ['-e', 'console.log("a"); console.error("b")'])).toBe('a\n'));

  it('says how a command ended and the end of its output', async () =>
    expect(run(process.execPath, ['-e', 'console.error("no room left"); process.exit(3)'])).rejects.toThrow(/ended with 3\. The end of what it printed:\nno room left/));

  it('says when a command is not there', async () => expect(run('/nowhere/at-all', [])).rejects.toThrow('could not be started'));
});

describe('leftovers', () => {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-leftovers-'));
  const children: ChildProcess[] = [];
  afterEach(() => {
    children.splice(0).forEach((child) => child.kill('SIGKILL'));
    rmSync(folder, { recursive: true, force: true });
  });

  function sleeping(seconds: string) {
    const child = spawn('sleep', [seconds]);
    children.push(child);
    return { child, pid: child.pid ?? 0, startedTicks: processStartTicks(child.pid ?? 0) ?? 0 };
  }
  function note(name: string, noted: object | string) {
    mkdirSync(join(folder, 'run'), { recursive: true });
    writeFileSync(join(folder, 'run', `${name}.json`), typeof noted === 'string' ? noted : JSON.stringify(noted));
  }

  it('are ended when they are what was noted', async () => {
    const { child, pid, startedTicks } = sleeping('301');
    note('web', { pid, startedTicks, mark: 'sleep 301' });
    const left = leftovers(folder);
    expect(left.map(({ name }) => name)).toEqual(['web']);
    const ended = new Promise((resolve) => child.once('exit', (_code, signal) => resolve(signal)));
    await Promise.all(left.map(({ end }) => end()));
    expect(await ended).toBe('SIGINT');
    expect(existsSync(join(folder, 'run', 'web.json'))).toBe(false);
  });

  it('are not confused with another process that has the number now', () => {
    const { child, pid, startedTicks } = sleeping('302');
    note('earlier', { pid, startedTicks: startedTicks - 1, mark: 'sleep 302' });
    note('other', { pid, startedTicks, mark: 'dist/server/main.mjs' });
    note('empty-mark', { pid, startedTicks, mark: '' });
    note('half', '{"pid":');
    expect(leftovers(folder)).toEqual([]);
    expect(child.exitCode).toBeNull();
    expect(existsSync(join(folder, 'run', 'half.json'))).toBe(false);
  });

  it('are none in a new folder', () => expect(leftovers(join(folder, 'new'))).toEqual([]));
});
