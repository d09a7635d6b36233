import { type Database } from './database';

/** How a guess stands before it is judged: to wait, or counted as wrong until it proves right. */
export type Guess = { readonly isPaused: true; readonly waitSeconds: number } | { readonly isPaused: false; readonly failures: number };

/**
 * Counts a guess at `key` as wrong before anybody looks whether it is, one at a time for one key: guesses that come all
 * at the same moment would otherwise each see that nothing had failed yet. Who was right calls `wasRight`.
 */
export async function takeGuess(database: Database, key: string, freeTries: number): Promise<Guess> {
  const client = await database.pool.connect();
  let broken: Error | undefined;
  try {
    await client.query('BEGIN');
    await client.query('SELECT pg_advisory_xact_lock(hashtextextended($1, 0))', [key]);
    const { rows: waits } = await client.query<{ seconds: number | null }>('SELECT door_wait($1, $2) AS seconds', [key, freeTries]);
    const waitSeconds = waits[0]?.seconds ?? 0;
    const counted = waitSeconds > 0 ? [] : (await client.query<{ failures: number }>('SELECT door_failed($1) AS failures', [key])).rows;
    await client.query('COMMIT');
    return waitSeconds > 0 ? { isPaused: true, waitSeconds } : { isPaused: false, failures: counted[0]?.failures ?? 1 };
  } catch (error) {
    await client.query('ROLLBACK').catch((failure: Error) => (broken = failure));
    throw error;
  } finally {
    client.release(broken);
  }
}

export const wasRight = (database: Database, key: string): Promise<unknown> => database.atTheDoor('SELECT door_succeeded($1)', [key]);
