import { readdirSync, statSync } from 'node:fs';
import { connect, type Socket } from 'node:net';
import { join } from 'node:path';
import { ListObjectsV2Command, S3Client } from '@aws-sdk/client-s3';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from '@jest/globals';
import { makeLink } from '#server/platform/links';
import { call, expectProblem, ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation, pageAgent, testPassword, type Organisation } from '#test/support/organisation';
import { ownOrigin, portOf, startService, type Service } from '#test/support/service';

const megabyte = 1024 * 1024;
const boundary = 'kneeboard-test';
const head = `--${boundary}\r\nContent-Disposition: form-data; name="file"; filename="slow.pdf"\r\nContent-Type: application/pdf\r\n\r\n%PDF-1.7\n`;
const foot = `\r\n--${boundary}--\r\n`;

/** F19: an upload that is too large, empty, slow or cut off leaves no file, no row and no object behind, and holds up nobody. */
describe('uploads that go wrong', () => {
  let service: Service;
  let organisation: Organisation;
  const bucket = new S3Client({ endpoint: testEnvironment('TEST_S3_ENDPOINT'), region: 'us-east-1', forcePathStyle: true, credentials: { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' } });
  beforeAll(async () => {
    service = await startService();
  });
  beforeEach(async () => {
    organisation = await makeOrganisation(service);
  });
  afterAll(async () => {
    bucket.destroy();
    await service.stop();
  });

  const folder = () => service.environment['UPLOAD_FOLDER'] ?? '';
  const files = (): string[] => readdirSync(folder());
  const rows = async () => (await ok(organisation.officer.agent, 'listSheets')).items;
  const objects = async () => (await bucket.send(new ListObjectsV2Command({ Bucket: testEnvironment('TEST_S3_BUCKET'), Prefix: `${organisation.id}/` }))).Contents ?? [];
  const expectNothingLeft = async () => {
    await until(() => files().length === 0);
    expect([files(), await rows(), await objects()]).toEqual([[], [], []]);
  };
  /** However slow the machine: waits for what must come, and fails by name when it does not. */
  async function until(isSo: () => boolean | Promise<boolean>, withinMs = 60_000): Promise<void> {
    for (const end = Date.now() + withinMs; Date.now() < end; await new Promise((resolve) => setTimeout(resolve, 20))) if (await isSo()) return;
    throw new Error(`not so within ${withinMs} ms: ${isSo.toString()}`);
  }

  /** The cookie of an officer, for requests written by hand. */
  async function cookie(): Promise<string> {
    const { headers } = await call(pageAgent(service), 'signIn', { body: { email: organisation.officer.email, password: testPassword } });
    return (headers['set-cookie'] as unknown as string[]).map((each) => each.split(';')[0]).join('; ');
  }
  /** A multipart request that is begun and not ended. */
  async function begin(path: string, more: Record<string, string>, contentLength: number): Promise<Socket & { answered: () => string }> {
    const socket = connect(portOf(service.server), '127.0.0.1');
    await new Promise((resolve) => socket.once('connect', resolve));
    let said = '';
    socket.on('data', (piece: Buffer) => (said += piece.toString()));
    socket.on('error', () => undefined);
    const headers = { Host: '127.0.0.1', Origin: ownOrigin, 'Content-Type': `multipart/form-data; boundary=${boundary}`, 'Content-Length': String(contentLength), ...more };
    socket.write(`POST ${path} HTTP/1.1\r\n${Object.entries(headers).map(([name, value]) => `${name}: ${value}\r\n`).join('')}\r\n${head}`);
    return Object.assign(socket, { answered: () => said });
  }
  const isArriving = () => files().some((name) => statSync(join(folder(), name)).size > 0);

  it('over 25 MiB is refused by name, with the figure; just under it is stored', async () => {
    const { agent } = organisation.officer;
    const large = Buffer.alloc(26 * megabyte, 'x');
    large.write('%PDF-1.7');
    expect(expectProblem(await call(agent, 'uploadSheet', { file: { bytes: large, fileName: 'large.pdf' } }), 413)).toMatchObject({ title: 'Too large', detail: expect.stringContaining('25 MB') });
    await expectNothingLeft();
    expect((await call(agent, 'uploadSheet', { file: { bytes: large.subarray(0, 25 * megabyte), fileName: 'large.pdf' } })).status).toBe(202);
    expect(files()).toEqual([]);
  });

  it('of no bytes is refused by name', async () => {
    expect(expectProblem(await call(organisation.officer.agent, 'uploadSheet', { file: { bytes: Buffer.alloc(0), fileName: 'empty.pdf' } }), 400).errors).toMatchObject([{ path: 'file', message: expect.stringContaining('no bytes') }]);
    await expectNothingLeft();
  });

  it('that drips in holds up nobody, and is stored once it is whole', async () => {
    const body = 'invented for demonstration '.repeat(40);
    const socket = await begin('/api/sheets', { Cookie: await cookie() }, head.length + body.length + foot.length);
    await until(isArriving);
    for (let at = 0; at < body.length; at += 54) {
      socket.write(body.slice(at, at + 54));
      // Between two drops others are served.
      expect(await rows()).toEqual([]);
    }
    expect(await objects()).toEqual([]);
    socket.write(foot);
    await until(() => socket.answered().startsWith('HTTP/1.1 202'));
    socket.destroy();
    expect(await rows()).toHaveLength(1);
    expect(await objects()).toHaveLength(1);
    await until(() => files().length === 0);
  });

  it('whose sender goes away halfway leaves nothing, and is no fault of ours', async () => {
    const socket = await begin('/api/sheets', { Cookie: await cookie() }, 5 * megabyte);
    socket.write('x'.repeat(megabyte));
    await until(isArriving);
    socket.destroy();
    await expectNothingLeft();
    expect(service.faults).toEqual([]);
  });

  it('of a supplier who goes away halfway leaves nothing, and the link still works', async () => {
    const { agent } = organisation.officer;
    const product = await ok(agent, 'addProduct', { body: { name: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.' } });
    const { id, expiresAt } = await ok(agent, 'askSupplier', { body: { productId: product.id, email: 'sheets@northlode.example', message: 'Please send it.', language: 'en' } });
    const token = await service.deps.database.inOrganisation(organisation.id, (tx) => makeLink(tx, 'sheet-request', id, new Date(expiresAt)));
    const socket = await begin('/api/open-requests/sheet', { 'X-Kneeboard-Link': token }, 5 * megabyte);
    await until(isArriving);
    socket.destroy();
    await expectNothingLeft();
    expect((await call(pageAgent(service), 'answerRequest', { headers: { 'X-Kneeboard-Link': token }, file: { bytes: Buffer.from('%PDF-1.7\nwhole'), fileName: 'sheet.pdf' } })).status).toBe(204);
  });

  it('many at once whose senders go away leave nothing either', async () => {
    const session = await cookie();
    const sockets = await Promise.all(Array.from({ length: 12 }, () => begin('/api/sheets', { Cookie: session }, 5 * megabyte)));
    await until(() => files().length === sockets.length);
    for (const socket of sockets) socket.destroy();
    await expectNothingLeft();
    expect(service.faults).toEqual([]);
  });
});
