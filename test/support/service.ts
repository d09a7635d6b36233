import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import { type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import { createApp } from '#server/app';
import { readConfig } from '#server/config';
import { type Deps } from '#server/deps';
import { createDatabase } from '#server/platform/database';
import { createMail } from '#server/platform/mail';
import { createQueue, patienceFor } from '#server/platform/queue';
import { createStorage } from '#server/platform/storage';
import { readSheet } from '#server/sds/reader/read-sheet';
import { readSheetWork } from '#server/sds/sheets-work';
import { ensureKeys } from '../../server/local/secrets.mjs';
import { testEnvironment } from './environment';

/** The origin that the service under test believes to be its own. */
export const ownOrigin = 'http://kneeboard.test';

/** Server time that a test can move. */
export class TestClock {
  offsetMs = 0;
  now(): Date {
    return new Date(Date.now() + this.offsetMs);
  }
}

export interface Service {
  readonly deps: Deps;
  readonly clock: TestClock;
  readonly server: Server;
  /** What a spawned process needs to be the same service: same keys, database and bucket. */
  readonly environment: Record<string, string>;
  /** Lines logged as errors: a test that provokes no fault expects none. */
  readonly faults: string[];
  /** Reads one waiting sheet here and now, as the worker would. */
  readSheetNow(organisationId: string, revisionId: string): Promise<void>;
  stop(): Promise<void>;
}

/** The service over real PostgreSQL, bucket and mail, as the application role, listening on a port of its own. */
export async function startService(changes: Record<string, string> = {}): Promise<Service> {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-service-'));
  ensureKeys(join(folder, 'keys'));
  const environment = {
    DATABASE_URL: testEnvironment('TEST_APP_DATABASE_URL'),
    S3_ENDPOINT: testEnvironment('TEST_S3_ENDPOINT'),
    S3_BUCKET: testEnvironment('TEST_S3_BUCKET'),
    S3_ACCESS_KEY_ID: 'S3RVER',
    S3_SECRET_ACCESS_KEY: 'S3RVER',
    SMTP_URL: `smtp://127.0.0.1:${testEnvironment('TEST_SMTP_PORT')}`,
    KNEEBOARD_KEYS: join(folder, 'keys'),
    UPLOAD_FOLDER: join(folder, 'uploads'),
    PUBLIC_URL: ownOrigin,
    // Each organisation of the tests calls from an address of its own, so that slowed guessing stays apart.
    TRUST_PROXY: 'loopback',
    LOG_LEVEL: 'error',
    ...changes,
  };
  const config = readConfig(environment);
  const faults: string[] = [];
  const log = pino({ level: 'error', base: null }, { write: (line: string) => void faults.push(line) });
  const clock = new TestClock();
  const database = createDatabase(config.DATABASE_URL, { max: 12 });
  const queue = await createQueue(config.DATABASE_URL, { isServing: false, expireSeconds: patienceFor(config), mailRetrySeconds: config.MAIL_RETRY_SECONDS, onError: (error) => log.error({ err: error }, 'queue') });
  const storage = createStorage({ endpoint: config.S3_ENDPOINT, region: config.S3_REGION, bucket: config.S3_BUCKET, accessKeyId: config.S3_ACCESS_KEY_ID, secretAccessKey: config.S3_SECRET_ACCESS_KEY });
  const deps: Deps = { config, database, queue, storage, clock, log, mail: createMail(config.SMTP_URL, config.MAIL_FROM) };
  const { app, close } = createApp(deps);
  const server = createServer(app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    deps,
    clock,
    server,
    environment,
    faults,
    readSheetNow: (organisationId, revisionId) => readSheetWork(deps, { read: (bytes) => readSheet(bytes), close: async () => undefined })({ organisationId, revisionId }),
    async stop() {
      close();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      await queue.stop();
      await database.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

export const portOf = (server: Server): number => (server.address() as AddressInfo).port;
