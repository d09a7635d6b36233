import { readConfig } from '../config';
import { createDatabase } from '../platform/database';
import { createLog } from '../platform/log';
import { createMail } from '../platform/mail';
import { createQueue, patienceFor } from '../platform/queue';
import { createStorage } from '../platform/storage';
import { demoPassword, signIns } from '../local/demo/demo.data';
import { loadDemo } from '../local/demo/load-demo';

/** Loads the demo into an empty database; prints its sign-ins when it is there. An organisation of somebody's own is left alone. */
const config = readConfig({ ...process.env, LOG_LEVEL: 'warn' });
const log = createLog(config.LOG_LEVEL);
const database = createDatabase(config.DATABASE_URL);
const queue = await createQueue(config.DATABASE_URL, { isServing: false, expireSeconds: patienceFor(config), onError: (error) => log.warn({ err: error }, 'queue') });
try {
  const organisations = await database.atTheDoor('SELECT door_organisations()', []);
  const isThere = async () => (await database.atTheDoor('SELECT 1 FROM door_find_login($1)', [signIns[0]?.email])).length > 0;
  if (organisations.length === 0) {
    let now = new Date();
    await loadDemo({
      config,
      database,
      queue,
      log,
      mail: createMail(undefined, config.MAIL_FROM),
      storage: createStorage({ endpoint: config.S3_ENDPOINT, region: config.S3_REGION, bucket: config.S3_BUCKET, accessKeyId: config.S3_ACCESS_KEY_ID, secretAccessKey: config.S3_SECRET_ACCESS_KEY }),
      clock: { now: () => now, set: (at) => (now = at) },
    });
  }
  const shown = (await isThere()) ? signIns.map(({ role, email }) => ({ role, email, password: demoPassword })) : [];
  console.log(JSON.stringify({ signIns: shown }));
} finally {
  await queue.stop();
  await database.close();
}
