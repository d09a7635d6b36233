// @ts-check
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { endRunningCommands } from './processes.mjs';
import { startServices } from './services.mjs';

/**
 * Runs the work with services in a temporary folder, which goes with them; a Ctrl-C ends both.
 * @template T
 * @param {(services: import('./services.mjs').Services, folder: string, untilStopped: Promise<void>) => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withThrowawayServices(work) {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-test-'));
  chmodSync(folder, 0o711);
  /** @type {Promise<void>} */
  const untilStopped = new Promise((resolve) => {
    for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
      process.on(signal, () => {
        endRunningCommands();
        resolve();
      });
    }
  });
  try {
    const services = await startServices(folder, { isThrowaway: true });
    try {
      return await work(services, folder, untilStopped);
    } finally {
      await services.stop();
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
