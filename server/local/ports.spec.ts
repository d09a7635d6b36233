import { afterEach, describe, expect, it } from '@jest/globals';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type Server } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { demandPort, freePort, listenPreferring, parsePort, rememberedPorts, rememberPorts } from './ports.mjs';

const servers: Server[] = [];
async function takenPort() {
  const server = createServer();
  servers.push(server);
  return listenPreferring(server, 0);
}
afterEach(() => servers.splice(0).forEach((server) => server.close()));

describe('parsePort', () => {
  it.each([
    [undefined, 4380],
    ['', 4380],
    ['1', 1],
    ['8080', 8080],
    ['65535', 65_535],
  ])('reads %p as %d', (text, port) => expect(parsePort(text, 4380)).toBe(port));

  // TCP port numbers are 16 bits, 0 is reserved: RFC 9293, 3.1, and RFC 6335, 6.
  it.each(['0', '65536', '99999', '-1', '80a', '4380.5', ' 80', '0x50'])('refuses %p by name', (text) => expect(() => parsePort(text, 4380)).toThrow(`not "${text}"`));
});

describe('ports on this machine', () => {
  it('gives another port when the preferred one is taken', async () => {
    const taken = await takenPort();
    expect(await freePort(taken)).not.toBe(taken);
  });

  it('gives the preferred port when it is free', async () => {
    const port = await freePort();
    expect(await freePort(port)).toBe(port);
  });

  it('names a taken port and what to type', async () => {
    const taken = await takenPort();
    await expect(demandPort(taken)).rejects.toThrow(`Port ${taken} is taken; set PORT to a free one, for example PORT=`);
  });

  it('lets a free port pass and leaves it free', async () => {
    const port = await freePort();
    await demandPort(port);
    await expect(demandPort(port)).resolves.toBeUndefined();
  });
});

describe('remembered ports', () => {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-ports-'));
  afterEach(() => rmSync(folder, { recursive: true, force: true }));

  it('come back as they were, and damaged ones count as unknown', () => {
    expect(rememberedPorts(folder)).toEqual({});
    rememberPorts(folder, { postgres: 40_001, s3: 40_002 });
    expect(rememberedPorts(folder)).toEqual({ postgres: 40_001, s3: 40_002 });
    writeFileSync(join(folder, 'ports.json'), '{"postgres": "x", "s3": 70000, "smtp": 40003}');
    expect(rememberedPorts(folder)).toEqual({ smtp: 40_003 });
    writeFileSync(join(folder, 'ports.json'), '{"postg');
    expect(rememberedPorts(folder)).toEqual({});
  });
});
