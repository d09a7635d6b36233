// @ts-check
import { createHash } from 'node:crypto';
import { connect, createServer } from 'node:net';
import { isEnding } from './processes.mjs';
import { step, Stopped } from './progress.mjs';

/**
 * Holds a lock that the kernel drops with the process, however it ends: a name in Linux's abstract socket space.
 * Whoever finds it held is told what the holder says about itself.
 * @param {string} name what is locked, for example the real path of a folder
 * @param {() => string} describe what to tell others, asked each time
 * @returns {Promise<{ heldBy: string } | { release: () => Promise<void> }>}
 */
export async function tryLock(name, describe) {
  const address = `\0kneeboard-${createHash('sha256').update(name).digest('hex').slice(0, 32)}`;
  const server = createServer((socket) => socket.on('error', () => undefined).end(describe()));
  server.unref();
  const error = await new Promise((/** @type {(error: NodeJS.ErrnoException | undefined) => void} */ resolve) => {
    server.once('error', resolve);
    server.listen(address, () => resolve(undefined));
  });
  if (!error) return { release: () => new Promise((resolve) => server.close(() => resolve())) };
  if (error.code !== 'EADDRINUSE') throw error;
  return { heldBy: await ask(address) };
}

/**
 * Waits until the lock is free, saying so, then runs the work under it.
 * @template T
 * @param {string} name
 * @param {() => Promise<T>} work
 * @param {(text: string) => void} [write]
 * @returns {Promise<T>}
 */
export async function underLock(name, work, write) {
  const lock = await enter(name, write);
  try {
    return await work();
  } finally {
    await lock.release();
  }
}

/**
 * @param {string} name
 * @param {((text: string) => void) | undefined} write
 */
async function enter(name, write) {
  const take = () => tryLock(name, () => `process ${process.pid}`);
  const first = await take();
  if ('release' in first) return first;
  return step(`Waiting for another one at work in this folder (${first.heldBy})`, async () => {
    for (;;) {
      await new Promise((resolve) => setTimeout(resolve, 250));
      if (isEnding()) throw new Stopped();
      const lock = await take();
      if ('release' in lock) return lock;
    }
  }, write);
}

/**
 * @param {string} address
 * @returns {Promise<string>}
 */
function ask(address) {
  return new Promise((resolve) => {
    let text = '';
    const socket = connect(address);
    const done = () => resolve(text);
    socket.setTimeout(1000, () => socket.destroy());
    socket.on('data', (part) => (text += part)).on('error', done).on('close', done);
  });
}
