import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { Client } from 'minio';
import { createStorage, DamagedObjectError, type Storage } from '#server/platform/storage';

const endpoint = new URL(process.env['TEST_S3_ENDPOINT'] ?? 'http://127.0.0.1:1');
const bucket = process.env['TEST_S3_BUCKET'] ?? 'kneeboard';
const keys = { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' };

/** What the service stores, read back by a client of another maker: neither can hide a fault of the other. */
describe('the file storage, with a second reader', () => {
  const second = new Client({ endPoint: endpoint.hostname, port: Number(endpoint.port), useSSL: false, accessKey: keys.accessKeyId, secretKey: keys.secretAccessKey, pathStyle: true });
  let storage: Storage;
  let folder: string;
  beforeAll(async () => {
    storage = createStorage({ endpoint: endpoint.href, region: 'us-east-1', bucket, ...keys });
    folder = await mkdtemp(join(tmpdir(), 'kneeboard-storage-'));
  });
  afterAll(() => rm(folder, { recursive: true, force: true }));

  const readSecond = async (key: string): Promise<Buffer> => {
    const pieces: Buffer[] = [];
    for await (const piece of await second.getObject(bucket, key)) pieces.push(piece as Buffer);
    return Buffer.concat(pieces);
  };

  it('holds a streamed file byte for byte, without bytes of its own', async () => {
    const bytes = randomBytes(300_001);
    const path = join(folder, 'sheet.pdf');
    await writeFile(path, bytes);
    const key = `${randomUUID()}/${createHash('sha256').update(bytes).digest('hex')}`;
    await storage.putFile(key, path, bytes.length, 'application/pdf');
    expect((await readSecond(key)).equals(bytes)).toBe(true);
    expect((await second.statObject(bucket, key)).size).toBe(bytes.length);
  });

  it('notices what somebody else changed in the bucket', async () => {
    const bytes = Buffer.from('%PDF-1.7 as it was');
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    const key = `${randomUUID()}/${sha256}`;
    await second.putObject(bucket, key, bytes);
    expect((await storage.getVerified(key, sha256)).equals(bytes)).toBe(true);
    await second.putObject(bucket, key, Buffer.from('%PDF-1.7 as it is now'));
    await expect(storage.getVerified(key, sha256)).rejects.toBeInstanceOf(DamagedObjectError);
  });
});
