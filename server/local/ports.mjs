// @ts-check
import { readFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { Refusal } from './progress.mjs';
import { writeFileWhole } from './secrets.mjs';

const loopback = '127.0.0.1';

/**
 * The port asked for in the environment, or the usual one.
 * @param {string | undefined} text
 * @param {number} usual
 */
export function parsePort(text, usual) {
  if (text === undefined || text === '') return usual;
  const port = /^\d{1,5}$/.test(text) ? Number(text) : 0;
  if (port < 1 || port > 65_535) throw new Refusal(`PORT must be a whole number from 1 to 65535, not "${text}".`);
  return port;
}

/**
 * Listens on the loopback port that was used last time, on any free one when somebody else has it now.
 * @param {import('node:net').Server} server
 * @param {number} preferredPort 0 for any
 * @returns {Promise<number>} the port
 */
export async function listenPreferring(server, preferredPort) {
  const error = await listen(server, preferredPort);
  if (error) {
    if (preferredPort === 0) throw error;
    const second = await listen(server, 0);
    if (second) throw second;
  }
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('listening on something that is not a port');
  return address.port;
}

/**
 * @param {import('node:net').Server} server
 * @param {number} port
 * @returns {Promise<NodeJS.ErrnoException | undefined>}
 */
function listen(server, port) {
  return new Promise((resolve) => {
    const failed = (/** @type {NodeJS.ErrnoException} */ error) => resolve(error);
    server.once('error', failed);
    server.listen(port, loopback, () => {
      server.removeListener('error', failed);
      resolve(undefined);
    });
  });
}

/**
 * A free loopback port: the preferred one if it is.
 * @param {number} [preferredPort]
 */
export async function freePort(preferredPort = 0) {
  const probe = createServer();
  const port = await listenPreferring(probe, preferredPort);
  await new Promise((resolve) => probe.close(resolve));
  return port;
}

/**
 * Refuses by name when the port cannot be had.
 * @param {number} port
 */
export async function demandPort(port) {
  const probe = createServer();
  const error = await listen(probe, port);
  if (error?.code === 'EACCES') throw new Refusal(`Port ${port} is reserved for root on this machine; set PORT to one above 1023, for example PORT=4381 npm start.`);
  if (error) throw new Refusal(`Port ${port} is taken; set PORT to a free one, for example PORT=${port < 65_535 ? port + 1 : 4381} npm start.`);
  await new Promise((resolve) => probe.close(resolve));
}

/**
 * The ports that the stand-ins had last time in this data folder.
 * @param {string} folder
 * @returns {Record<string, number>}
 */
export function rememberedPorts(folder) {
  try {
    const read = JSON.parse(readFileSync(join(folder, 'ports.json'), 'utf8'));
    return Object.fromEntries(Object.entries(read).flatMap(([name, port]) => (Number.isInteger(port) && port > 0 && port < 65_536 ? [[name, port]] : [])));
  } catch {
    return {};
  }
}

/**
 * @param {string} folder
 * @param {Record<string, number>} ports
 */
export function rememberPorts(folder, ports) {
  writeFileWhole(join(folder, 'ports.json'), `${JSON.stringify(ports)}\n`);
}
