import { createHash, randomBytes } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { NotFoundError, SlowDownError } from '../errors';
import { type Database, type Tx } from './database';

export type LinkKind = 'sheet-request' | 'site';
const hashOf = (token: string) => createHash('sha256').update(token).digest();

/** Makes the only link of this subject. The secret is answered once and kept as a hash. */
export async function makeLink(tx: Tx, kind: LinkKind, subjectId: string, expiresAt: Date | null): Promise<string> {
  const token = randomBytes(32).toString('base64url');
  await tx.execute(sql`SELECT door_make_link(${kind}, ${subjectId}, ${hashOf(token)}, ${expiresAt?.toISOString() ?? null})`);
  return token;
}

/** False when there was none: used up, withdrawn or never made. */
export async function dropLink(tx: Tx, kind: LinkKind, subjectId: string): Promise<boolean> {
  const { rows } = await tx.execute<{ dropped: boolean }>(sql`SELECT door_drop_link(${kind}, ${subjectId}) AS dropped`);
  return rows[0]?.dropped ?? false;
}

/** What a link opens. Unknown, used, expired and withdrawn links answer alike; guessing is slowed by address, but a link that opens always does: a whole site may share one address, and old codes of many phones must not shut out the new one. */
export async function openLink(database: Database, kind: LinkKind, token: string, now: Date, address: string): Promise<{ organisationId: string; subjectId: string }> {
  const [found] = await database.atTheDoor<{ organisation_id: string; subject_id: string }>('SELECT * FROM door_find_link($1, $2, $3)', [kind, hashOf(token), now]);
  if (found) return { organisationId: found.organisation_id, subjectId: found.subject_id };
  const key = `link from ${address}`;
  const [wait] = await database.atTheDoor<{ seconds: number | null }>('SELECT door_wait($1, 20) AS seconds', [key]);
  if (wait?.seconds) throw new SlowDownError(`Too many links that do not open. Wait ${wait.seconds} ${wait.seconds === 1 ? 'second' : 'seconds'}.`, wait.seconds);
  await database.atTheDoor('SELECT door_failed($1)', [key]);
  throw new NotFoundError('open link');
}
