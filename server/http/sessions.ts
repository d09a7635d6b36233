import { createHash } from 'node:crypto';
import connectPgSimple from 'connect-pg-simple';
import session, { type SessionData } from 'express-session';
import { type RequestHandler } from 'express';
import { type Database } from '../platform/database';

const PgStore = connectPgSimple(session);
const hashed = (sid: string) => createHash('sha256').update(sid).digest('hex');

/** Stores the hash of the session id: a copy of the table opens no session. */
class HashedStore extends PgStore {
  override get(sid: string, callback: (error: unknown, session?: SessionData | null) => void): void {
    super.get(hashed(sid), callback);
  }
  override set(sid: string, data: SessionData, callback?: (error?: unknown) => void): void {
    super.set(hashed(sid), data, callback);
  }
  override destroy(sid: string, callback?: (error?: unknown) => void): void {
    super.destroy(hashed(sid), callback);
  }
  override touch(sid: string, data: SessionData, callback?: () => void): void {
    super.touch(hashed(sid), data, callback);
  }
}

export const sessionCookieName = 'kneeboard_session';

/** Twelve hours, renewed while used. */
export function sessions(database: Database, secret: string, isSecure: boolean): { handler: RequestHandler; close: () => void } {
  const store = new HashedStore({ pool: database.pool, tableName: 'sessions', createTableIfMissing: false, pruneSessionInterval: 15 * 60 });
  return {
    handler: session({
      store,
      secret,
      name: sessionCookieName,
      resave: false,
      saveUninitialized: false,
      rolling: true,
      cookie: { httpOnly: true, sameSite: 'lax', secure: isSecure, maxAge: 12 * 3600 * 1000, path: '/' },
    }),
    close: () => store.close(),
  };
}
