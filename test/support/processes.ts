import { spawn, type ChildProcess } from 'node:child_process';
import { rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { fileURLToPath } from 'node:url';
import { join } from 'node:path';

export const projectRoot = fileURLToPath(new URL('../..', import.meta.url));

/** A bundle of the service as it stands now, made as server/local/build.mjs makes it, in a folder of its own that goes with `remove`. */
export interface BuiltServer {
  readonly main: string;
  readonly sheetReader: string;
  remove(): void;
}
export async function buildServer(): Promise<BuiltServer> {
  const folder = join(projectRoot, 'dist', `under-test-${process.pid}`);
  const entries = ['main=server/main.ts', 'sheet-reader=server/sds/reader/child.ts'];
  const options = ['--bundle', '--platform=node', '--target=node20', '--format=esm', '--packages=external', '--out-extension:.js=.mjs', '--log-level=warning', `--outdir=${folder}`];
  const child = spawn(join(projectRoot, 'node_modules/esbuild/bin/esbuild'), [...entries, ...options], { cwd: projectRoot, stdio: ['ignore', 'ignore', 'inherit'] });
  const code = await new Promise((resolve) => child.once('close', resolve));
  if (code !== 0) throw new Error(`the service could not be bundled: ${String(code)}`);
  return { main: join(folder, 'main.mjs'), sheetReader: join(folder, 'sheet-reader.mjs'), remove: () => rmSync(folder, { recursive: true, force: true }) };
}

export async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  await new Promise((resolve) => server.close(resolve));
  return typeof address === 'object' && address ? address.port : 0;
}

export interface ServiceProcess {
  readonly child: ChildProcess;
  readonly pid: number;
  readonly url: string;
  /** What it printed so far, both streams. */
  output(): string;
  readonly ended: Promise<{ code: number | null; signal: NodeJS.Signals | null }>;
  /** kill -9, and waits until it is gone. */
  kill(): Promise<void>;
}

/** The built service in a process of its own, with nothing of this process's environment but the search path. */
export function startProcess(built: BuiltServer, role: 'web' | 'worker' | 'both', environment: Readonly<Record<string, string>>, port = 0): ServiceProcess {
  const child = spawn(process.execPath, [built.main], {
    cwd: projectRoot,
    env: { PATH: process.env['PATH'] ?? '', HOST: '127.0.0.1', NODE_NO_WARNINGS: '1', SHEET_READER_ENTRY: built.sheetReader, ...environment, PORT: String(port), KNEEBOARD_ROLE: role },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let printed = '';
  child.stdout.on('data', (piece: Buffer) => (printed += piece.toString()));
  child.stderr.on('data', (piece: Buffer) => (printed += piece.toString()));
  const ended = new Promise<{ code: number | null; signal: NodeJS.Signals | null }>((resolve) => child.once('close', (code, signal) => resolve({ code, signal })));
  return {
    child,
    pid: child.pid ?? 0,
    url: `http://127.0.0.1:${port}`,
    output: () => printed,
    ended,
    async kill() {
      child.kill('SIGKILL');
      await ended;
    },
  };
}

/** Waits until something holds, and says what did not when the time is over. */
export async function until(what: string, holds: () => Promise<boolean>, withinMs = 60_000): Promise<void> {
  for (const end = Date.now() + withinMs; Date.now() < end; ) {
    if (await holds()) return;
    await new Promise((resolve) => setTimeout(resolve, 25));
  }
  throw new Error(`${what} did not happen within ${withinMs / 1000} s`);
}

export const untilReady = (service: ServiceProcess): Promise<void> =>
  until(`${service.url} answering (it printed: ${service.output()})`, async () => {
    if (service.child.exitCode !== null) throw new Error(`the service ended with ${service.child.exitCode}: ${service.output()}`);
    return fetch(`${service.url}/readyz`).then((response) => response.ok, () => false);
  });
