import { index, integer, jsonb, pgTable, primaryKey, text, timestamp, uuid, varchar } from 'drizzle-orm/pg-core';
import { bytea } from './people';

/**
 * The door: what must be read before an organisation is known. No policies here; the application role reaches
 * `logins`, `tablet_keys` and `attempts` only through the door_* functions. Secrets are hashed.
 */
export const logins = pgTable('logins', {
  email: text().primaryKey(),
  organisationId: uuid().notNull(),
  personId: uuid().notNull(),
  role: text().notNull(),
  passwordHash: text().notNull(),
  /** Sessions made before this instant are over. */
  sessionsValidFrom: timestamp({ withTimezone: true }).notNull().defaultNow(),
});

export const tabletKeys = pgTable('tablet_keys', {
  tabletId: uuid().primaryKey(),
  organisationId: uuid().notNull(),
  pairingHash: bytea(),
  pairingExpiresAt: timestamp({ withTimezone: true }),
  tokenHash: bytea().unique(),
});

/** Slowed guessing: one row per thing guessed at (account and address, address, person and tablet). */
export const attempts = pgTable('attempts', {
  key: text().primaryKey(),
  failures: integer().notNull(),
  lastFailureAt: timestamp({ withTimezone: true }).notNull(),
});

/** connect-pg-simple's table; `sid` holds the SHA-256 of the session id. */
export const sessions = pgTable(
  'sessions',
  { sid: varchar().notNull(), sess: jsonb().notNull(), expire: timestamp({ precision: 6 }).notNull() },
  (t) => [primaryKey({ columns: [t.sid] }), index('sessions_by_expire').on(t.expire)],
);

/** Tables without tenant policies, by name: a test demands forced policies on all others. */
export const doorTables = ['logins', 'tablet_keys', 'attempts', 'sessions', 'link_keys'] as const;
