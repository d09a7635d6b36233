// @ts-check
import { createServer } from 'node:http';
import S3rver from 's3rver';

export const bucket = 'kneeboard';
/** The one pair of keys that the stand-in knows. */
export const accessKey = 'S3RVER';

/**
 * An S3 stand-in over a folder, with the bucket made; not yet listening.
 * @param {string} folder
 * @returns {Promise<import('node:http').Server>}
 */
export async function s3Server(folder) {
  const stand = new S3rver({ directory: folder, silent: true, vhostBuckets: false, configureBuckets: [{ name: bucket, configs: [] }] });
  await stand.configureBuckets();
  // Its own run() leaves a taken port as an uncaught error.
  return createServer(stand.callback());
}
