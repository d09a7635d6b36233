// @ts-check
/** `node server/local/dev-services.mjs`: throwaway services for running api specs by hand; prints their TEST_… lines and stays until Ctrl-C. */
import { join } from 'node:path';
import { ensurePostgres } from './debian.mjs';
import { migrate } from './build.mjs';
import { sayError, say } from './progress.mjs';
import { testEnvironment } from './services.mjs';
import { withThrowawayServices } from './throwaway.mjs';

try {
  await ensurePostgres();
  await withThrowawayServices(async (services, folder, untilStopped) => {
    await migrate({ OWNER_DATABASE_URL: services.postgres.ownerUrl });
    for (const [name, value] of Object.entries(testEnvironment(services))) say(`export ${name}='${value}'`);
    say(`# logs in ${join(folder, 'logs')}; Ctrl-C ends the services and removes ${folder}`);
    await untilStopped;
  });
} catch (error) {
  sayError(error);
  process.exitCode = 1;
}
