import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { GetObjectCommand, HeadObjectCommand, ListObjectsV2Command, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { UnavailableError } from '../errors';

/** Objects are named by their content: `organisation/sha256`. */
export interface Storage {
  /** Stores a file of known length and hash; a damaged object of that name is healed. */
  putFile(key: string, path: string, byteLength: number, contentType: string): Promise<void>;
  putText(key: string, text: string): Promise<void>;
  /** Reads and hashes again; bytes whose hash is not the wanted one are never served. */
  getVerified(key: string, sha256: string): Promise<Buffer>;
  getText(key: string): Promise<string>;
  /** Keys that begin with the prefix, all of them. */
  list(prefix: string): Promise<string[]>;
  has(key: string): Promise<boolean>;
}

export interface StorageSettings {
  readonly endpoint?: string | undefined;
  readonly region: string;
  readonly bucket: string;
  readonly accessKeyId?: string | undefined;
  readonly secretAccessKey?: string | undefined;
}

export function createStorage(settings: StorageSettings): Storage {
  const client = new S3Client({
    region: settings.region,
    ...(settings.endpoint ? { endpoint: settings.endpoint } : {}),
    forcePathStyle: true,
    // Default checksums make the local fake store trailer bytes inside the object and still answer 200.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 3,
    requestHandler: { requestTimeout: 15_000, connectionTimeout: 3_000 },
    ...(settings.accessKeyId && settings.secretAccessKey ? { credentials: { accessKeyId: settings.accessKeyId, secretAccessKey: settings.secretAccessKey } } : {}),
  });
  const Bucket = settings.bucket;
  const reachable = async <T>(work: () => Promise<T>): Promise<T> => {
    try {
      return await work();
    } catch (error) {
      if (error instanceof DamagedObjectError || (error instanceof Error && error.name === 'NoSuchKey')) throw error;
      throw new UnavailableError(`The file storage does not answer (${error instanceof Error ? error.name : 'unknown'}). Nothing was changed; try again in a minute.`);
    }
  };
  return {
    putFile: (Key, path, byteLength, ContentType) =>
      reachable(async () => {
        await client.send(new PutObjectCommand({ Bucket, Key, Body: createReadStream(path), ContentLength: byteLength, ContentType }));
      }),
    putText: (Key, text) =>
      reachable(async () => {
        await client.send(new PutObjectCommand({ Bucket, Key, Body: text, ContentType: 'text/plain; charset=utf-8' }));
      }),
    getVerified: (Key, sha256) =>
      reachable(async () => {
        const answer = await client.send(new GetObjectCommand({ Bucket, Key }));
        const bytes = Buffer.from(await (answer.Body?.transformToByteArray() ?? new Uint8Array()));
        if (createHash('sha256').update(bytes).digest('hex') !== sha256) throw new DamagedObjectError(Key);
        return bytes;
      }),
    getText: (Key) =>
      reachable(async () => {
        const answer = await client.send(new GetObjectCommand({ Bucket, Key }));
        return (await answer.Body?.transformToString()) ?? '';
      }),
    list: (Prefix) =>
      reachable(async () => {
        const keys: string[] = [];
        for (let ContinuationToken: string | undefined; ; ) {
          const page = await client.send(new ListObjectsV2Command({ Bucket, Prefix, ...(ContinuationToken ? { ContinuationToken } : {}) }));
          keys.push(...(page.Contents ?? []).flatMap(({ Key }) => Key ?? []));
          ContinuationToken = page.NextContinuationToken;
          if (!page.IsTruncated || !ContinuationToken) return keys;
        }
      }),
    has: async (Key) => {
      try {
        await client.send(new HeadObjectCommand({ Bucket, Key }));
        return true;
      } catch (error) {
        if (error instanceof Error && (error.name === 'NotFound' || error.name === 'NoSuchKey')) return false;
        throw new UnavailableError('The file storage does not answer. Nothing was changed; try again in a minute.');
      }
    },
  };
}

export class DamagedObjectError extends Error {
  constructor(readonly key: string) {
    super(`The stored object ${key} does not have the hash it is named by.`);
  }
}
