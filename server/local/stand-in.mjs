// @ts-check
/** One stand-in in a process of its own: `node stand-in.mjs s3|smtp FOLDER PREFERRED_PORT`; tells its parent the port. */
import { listenPreferring } from './ports.mjs';

const [kind, folder = '', preferredPort = '0'] = process.argv.slice(2);
const server = kind === 's3' ? await (await import('./s3.mjs')).s3Server(folder) : (await import('./smtp.mjs')).smtpServer(folder);
const port = await listenPreferring(server, Number(preferredPort));
process.send?.({ port });
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => process.exit(0));
