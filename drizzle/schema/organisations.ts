import { sql } from 'drizzle-orm';
import { jsonb, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core';

/** The tenant. Its own row is visible to itself only: `organisation_id` is its id, so that one policy fits every table. */
export const organisations = pgTable('organisations', {
  organisationId: uuid().primaryKey(),
  name: text().notNull(),
  createdAt: timestamp({ withTimezone: true }).notNull().defaultNow(),
  /** Where checkpoints are mailed, so that the log does not have to be trusted to this database alone. */
  auditorEmails: text().array().notNull().default(sql`'{}'::text[]`),
  phone: text(),
  settings: jsonb().notNull().default({}),
});
