// @ts-check
import { createWriteStream, mkdirSync, renameSync } from 'node:fs';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { SMTPServer } from 'smtp-server';

/**
 * A mail server that keeps what it gets as .eml files in a folder, named by the order of arrival; not yet listening.
 * @param {string} folder
 * @returns {import('node:net').Server}
 */
export function smtpServer(folder) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  let received = 0;
  const stand = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData: (stream, _session, done) => {
      received += 1;
      const name = `${new Date().toISOString().replaceAll(/[:.]/g, '-')}-${process.pid}-${received}`;
      const unfinished = join(folder, `.${name}.part`);
      pipeline(stream, createWriteStream(unfinished, { mode: 0o600 }))
        .then(() => renameSync(unfinished, join(folder, `${name}.eml`)))
        .then(() => done(), done);
    },
  });
  stand.on('error', (error) => console.error(error.message));
  return /** @type {import('node:net').Server} */ (stand.server);
}
