import { foreignKey, index, integer, pgTable, primaryKey, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import { people } from './people';

/** Many wrong sign-ins for one person's account, as the owner is told of them: one row while it lasts. */
export const guessAlarms = pgTable(
  'guess_alarms',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    personId: uuid().notNull(),
    email: text().notNull(),
    failures: integer().notNull(),
    /** From how many addresses; each counted once. */
    addresses: integer().notNull(),
    firstAt: timestamp({ withTimezone: true }).notNull(),
    lastAt: timestamp({ withTimezone: true }).notNull(),
    mailedAt: timestamp({ withTimezone: true }),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    index('guess_alarms_by_time').on(t.organisationId, t.lastAt),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
  ],
);
