import { migrateDatabase } from '#server/cli/migrate';
import { type Services } from '../../server/local/services.mjs';
import { testEnvironment } from '../../server/local/services.mjs';
import { withThrowawayServices } from '../../server/local/throwaway.mjs';

/** Runs a bench over a PostgreSQL, a bucket and a mail server of its own, migrated and thrown away afterwards. */
export function withServices<T>(work: (services: Services) => Promise<T>): Promise<T> {
  return withThrowawayServices(async (services) => {
    await migrateDatabase(services.postgres.ownerUrl);
    // What the support code of the tests reads.
    Object.assign(process.env, testEnvironment(services));
    return work(services);
  });
}
