import { createServer } from 'node:http';
import { createApp } from './app';
import { readConfig } from './config';
import { type Deps } from './deps';
import { systemClock } from './platform/clock';
import { createDatabase, refuseTooMuchPower } from './platform/database';
import { createLog } from './platform/log';
import { createMail } from './platform/mail';
import { createQueue, patienceFor } from './platform/queue';
import { createStorage } from './platform/storage';
import { startWorker } from './worker';

const config = readConfig(process.env);
const log = createLog(config.LOG_LEVEL);
const database = createDatabase(config.DATABASE_URL, { onError: (error) => log.warn({ err: error }, 'a database connection ended') });
try {
  await refuseTooMuchPower(database);
} catch (error) {
  // One sentence, for whoever starts the service.
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
}
const isWorker = config.KNEEBOARD_ROLE !== 'web';
const queue = await createQueue(config.DATABASE_URL, { isServing: isWorker, expireSeconds: patienceFor(config), mailRetrySeconds: config.MAIL_RETRY_SECONDS, onError: (error) => log.warn({ err: error }, 'queue') });
const deps: Deps = {
  config,
  database,
  queue,
  log,
  clock: systemClock,
  mail: createMail(config.SMTP_URL, config.MAIL_FROM),
  storage: createStorage({ endpoint: config.S3_ENDPOINT, region: config.S3_REGION, bucket: config.S3_BUCKET, accessKeyId: config.S3_ACCESS_KEY_ID, secretAccessKey: config.S3_SECRET_ACCESS_KEY }),
};

const endings: (() => Promise<void> | void)[] = [];
if (isWorker) endings.push(await startWorker(deps));
if (config.KNEEBOARD_ROLE !== 'worker') {
  const { app, close } = createApp(deps);
  const server = createServer(app);
  // A slow sender holds a connection, not the service.
  server.requestTimeout = 120_000;
  server.headersTimeout = 20_000;
  await new Promise<void>((resolve, reject) => server.once('error', reject).listen(config.PORT, config.HOST, resolve));
  log.info({ port: config.PORT, role: config.KNEEBOARD_ROLE }, 'listening');
  endings.push(async () => {
    server.closeIdleConnections();
    await new Promise((resolve) => server.close(resolve));
    close();
  });
} else log.info({ role: 'worker' }, 'working');

let isEnding = false;
for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.on(signal, () => {
    if (isEnding) return;
    isEnding = true;
    // Whatever hangs longer than this is ended with the process.
    setTimeout(() => process.exit(0), 10_000).unref();
    void (async () => {
      for (const end of endings) await end();
      await queue.stop();
      await database.close();
      process.exit(0);
    })();
  });
