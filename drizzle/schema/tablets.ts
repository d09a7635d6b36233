import { pgTable, primaryKey, text, timestamp, uuid, foreignKey } from 'drizzle-orm/pg-core';
import { organisations } from './organisations';
import { bytea } from './people';

export const tablets = pgTable(
  'tablets',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    name: text().notNull(),
    pairedAt: timestamp({ withTimezone: true }),
    lastHeardAt: timestamp({ withTimezone: true }),
    withdrawnAt: timestamp({ withTimezone: true }),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.id] })],
);

/** Every envelope a tablet delivered, byte for byte, before anyone tries to understand it. Append-only. */
export const deliveries = pgTable(
  'deliveries',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    tabletId: uuid().notNull(),
    bytes: bytea().notNull(),
    receivedAt: timestamp({ withTimezone: true }).notNull(),
    sentAt: timestamp({ withTimezone: true }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    foreignKey({ columns: [t.organisationId, t.tabletId], foreignColumns: [tablets.organisationId, tablets.id] }),
  ],
);

/** What became of a delivery: one row once interpreted. Append-only. */
export const deliveryOutcomes = pgTable(
  'delivery_outcomes',
  {
    organisationId: uuid().notNull(),
    deliveryId: uuid().notNull(),
    outcome: text().notNull(),
    /** The record it made or, for a second signature, the one that stands. */
    subjectId: uuid(),
    because: text(),
    decidedAt: timestamp({ withTimezone: true }).notNull(),
    receipt: text().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.deliveryId] }),
    foreignKey({ columns: [t.organisationId, t.deliveryId], foreignColumns: [deliveries.organisationId, deliveries.id] }),
  ],
);
