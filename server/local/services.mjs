// @ts-check
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { rememberedPorts, rememberPorts } from './ports.mjs';
import { startPostgres } from './postgres.mjs';
import { startService, tied } from './processes.mjs';
import { accessKey, bucket } from './s3.mjs';

const standIn = fileURLToPath(new URL('stand-in.mjs', import.meta.url));

/**
 * @typedef {object} Services
 * @property {import('./postgres.mjs').Cluster} postgres
 * @property {string} s3Endpoint
 * @property {number} smtpPort
 * @property {string} mailFolder
 * @property {Promise<string>} ended the first of them that ended, and how; none does unless asked
 * @property {() => Promise<void>} stop
 */

/**
 * Brings up PostgreSQL and the S3 and SMTP stand-ins with their data in one folder, on the ports of last time where free.
 * @param {string} folder
 * @param {{ isThrowaway?: boolean }} [options]
 * @returns {Promise<Services>}
 */
export async function startServices(folder, { isThrowaway = false } = {}) {
  // Not 0700: as root, PostgreSQL runs as another user and has to walk through. Each folder in it is closed by itself.
  mkdirSync(folder, { recursive: true, mode: 0o711 });
  const ports = rememberedPorts(folder);
  const [s3, smtp] = [startStandIn('s3', 'objects'), startStandIn('smtp', 'mail')];
  try {
    const postgres = await startPostgres(folder, { preferredPort: ports['postgres'], isThrowaway });
    try {
      const [s3Port, smtpPort] = await Promise.all([s3.port(), smtp.port()]);
      rememberPorts(folder, { postgres: postgres.port, s3: s3Port, smtp: smtpPort });
      return {
        postgres,
        s3Endpoint: `http://127.0.0.1:${s3Port}`,
        smtpPort,
        mailFolder: join(folder, 'mail'),
        ended: Promise.race([{ name: 'PostgreSQL', ended: postgres.ended }, { name: 'The S3 stand-in', ended: s3.ended }, { name: 'The SMTP stand-in', ended: smtp.ended }].map(async ({ name, ended }) => `${name} ${await ended}`)),
        stop: async () => {
          await s3.stop();
          await smtp.stop();
          await postgres.stop();
        },
      };
    } catch (error) {
      await postgres.stop();
      throw error;
    }
  } catch (error) {
    await Promise.all([s3.stop(), smtp.stop()]);
    throw error;
  }

  /**
   * @param {'s3' | 'smtp'} kind
   * @param {string} subfolder
   */
  function startStandIn(kind, subfolder) {
    const own = join(folder, subfolder);
    mkdirSync(own, { recursive: true, mode: 0o700 });
    return startService(folder, kind, tied('SIGTERM', [], process.execPath, [standIn, kind, own, String(ports[kind] ?? 0)]), { mark: standIn, reportsPort: true });
  }
}

/**
 * What the service reads about the bucket.
 * @param {Services} services
 */
export function bucketEnvironment({ s3Endpoint }) {
  return { S3_ENDPOINT: s3Endpoint, S3_REGION: 'us-east-1', S3_BUCKET: bucket, S3_ACCESS_KEY_ID: accessKey, S3_SECRET_ACCESS_KEY: accessKey };
}

/**
 * What the tests read.
 * @param {Services} services
 */
export function testEnvironment({ postgres, s3Endpoint, smtpPort, mailFolder }) {
  return {
    TEST_OWNER_DATABASE_URL: postgres.ownerUrl,
    TEST_APP_DATABASE_URL: postgres.appUrl,
    TEST_SUPERUSER_DATABASE_URL: postgres.superuserUrl,
    TEST_S3_ENDPOINT: s3Endpoint,
    TEST_S3_BUCKET: bucket,
    TEST_SMTP_PORT: String(smtpPort),
    TEST_MAIL_FOLDER: mailFolder,
  };
}
