import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureKeys } from '../../server/local/secrets.mjs';
import { testEnvironment } from './environment';
import { freshDatabase } from './fresh-database';

export const projectRoot = fileURLToPath(new URL('../..', import.meta.url));
const readyWithinMs = 60_000;

export interface RunningService {
  /** Where it answers, without a slash at the end. */
  readonly url: string;
  readonly appDatabaseUrl: string;
  /** Lines it logged as errors. */
  readonly faults: readonly string[];
  stop(): Promise<void>;
}

/** The built service (web and worker in one process), as people run it, on a free port, over a database of its own. */
export async function startRunningService(): Promise<RunningService> {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-browser-'));
  const database = await freshDatabase();
  const bundle = (name: string) => ['--enable-source-maps', join(projectRoot, 'dist/server', `${name}.mjs`)];
  const removeAll = async (): Promise<void> => {
    await database.drop();
    rmSync(folder, { recursive: true, force: true });
  };
  try {
    await runToEnd(bundle('migrate'), { OWNER_DATABASE_URL: database.ownerUrl });
    ensureKeys(join(folder, 'keys'));
    const port = await freePort();
    const url = `http://127.0.0.1:${port}`;
    const child = spawn(process.execPath, bundle('main'), {
      cwd: projectRoot,
      stdio: ['ignore', 'pipe', 'pipe'],
      env: {
        PATH: process.env['PATH'],
        NODE_ENV: 'production',
        HOST: '127.0.0.1',
        PORT: String(port),
        PUBLIC_URL: url,
        DATABASE_URL: database.appUrl,
        S3_ENDPOINT: testEnvironment('TEST_S3_ENDPOINT'),
        S3_BUCKET: testEnvironment('TEST_S3_BUCKET'),
        S3_ACCESS_KEY_ID: 'S3RVER',
        S3_SECRET_ACCESS_KEY: 'S3RVER',
        SMTP_URL: `smtp://127.0.0.1:${testEnvironment('TEST_SMTP_PORT')}`,
        KNEEBOARD_KEYS: join(folder, 'keys'),
        UPLOAD_FOLDER: join(folder, 'uploads'),
        WEB_ROOT: join(projectRoot, 'dist/web'),
        SHEET_READER_ENTRY: join(projectRoot, 'dist/server/sheet-reader.mjs'),
        LOG_LEVEL: 'error',
      },
    });
    const faults: string[] = [];
    child.stdout.on('data', (piece: Buffer) => faults.push(...piece.toString().trim().split('\n')));
    let lastWords = '';
    child.stderr.on('data', (piece: Buffer) => (lastWords = (lastWords + piece.toString()).slice(-4000)));
    const ended = new Promise<number | null>((resolve) => child.once('exit', resolve));
    const stop = async (): Promise<void> => {
      child.kill('SIGTERM');
      await ended;
      await removeAll();
    };
    try {
      await Promise.race([untilReady(url), ended.then((code) => Promise.reject(new Error(`The service ended with ${code}: ${faults.join('\n')}\n${lastWords}`)))]);
    } catch (error) {
      await stop();
      throw error;
    }
    return { url, appDatabaseUrl: database.appUrl, faults, stop };
  } catch (error) {
    await removeAll();
    throw error;
  }
}

async function untilReady(url: string): Promise<void> {
  for (const until = Date.now() + readyWithinMs; Date.now() < until; ) {
    const answer = await fetch(`${url}/readyz`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error(`The service was not ready within ${readyWithinMs / 1000} s.`);
}

function runToEnd(commandArguments: readonly string[], env: Record<string, string>): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, commandArguments, { cwd: projectRoot, stdio: 'inherit', env: { PATH: process.env['PATH'], ...env } });
    child.once('error', reject);
    child.once('exit', (code) => (code === 0 ? resolve() : reject(new Error(`${commandArguments.at(-1)} ended with ${code}`))));
  });
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      server.close(() => (address && typeof address === 'object' ? resolve(address.port) : reject(new Error('no port'))));
    });
  });
}
