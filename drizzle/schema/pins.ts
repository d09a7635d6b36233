import { bigint, foreignKey, index, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { people } from './people';
import { deliveries, tablets } from './tablets';

/**
 * HMAC of the PIN under a pepper that is not in the database; chosen by the person, never by the office.
 * `proof` says who vouched for the person when it was set: a lead with an own PIN, the office with a start PIN, or nobody.
 */
export const pins = pgTable(
  'pins',
  {
    organisationId: uuid().notNull(),
    personId: uuid().notNull(),
    digest: text().notNull(),
    setAt: timestamp({ withTimezone: true }).notNull(),
    witnessPersonId: uuid(),
    tabletId: uuid(),
    proof: text().notNull().default('none'),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.personId] }),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.witnessPersonId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.tabletId], foreignColumns: [tablets.organisationId, tablets.id] }),
  ],
);

/** A one-time PIN that the office gives to one person, who then sets an own one where no witness has a PIN yet. HMAC like a PIN. */
export const startPins = pgTable(
  'start_pins',
  {
    organisationId: uuid().notNull(),
    personId: uuid().notNull(),
    digest: text().notNull(),
    givenBy: uuid().notNull(),
    givenByName: text().notNull(),
    givenAt: timestamp({ withTimezone: true }).notNull(),
    expiresAt: timestamp({ withTimezone: true }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.personId] }),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.givenBy], foreignColumns: [people.organisationId, people.id] }),
  ],
);

/** Every PIN that was set or reset and every start PIN given, with who vouched for it; never the PIN. Append-only, each in the record log. */
export const pinEvents = pgTable(
  'pin_events',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    event: text().notNull(),
    personId: uuid().notNull(),
    personName: text().notNull(),
    proof: text(),
    /** The witness; or who in the office reset it or gave the start PIN. */
    byPersonId: uuid(),
    byName: text(),
    tabletId: uuid(),
    tabletName: text(),
    deliveryId: uuid(),
    capturedAt: timestamp({ withTimezone: true }),
    at: timestamp({ withTimezone: true }).notNull(),
    entryIndex: bigint({ mode: 'number' }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    uniqueIndex('pin_events_by_entry').on(t.organisationId, t.entryIndex),
    index('pin_events_by_person').on(t.organisationId, t.personId, t.entryIndex),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.byPersonId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.tabletId], foreignColumns: [tablets.organisationId, tablets.id] }),
    foreignKey({ columns: [t.organisationId, t.deliveryId], foreignColumns: [deliveries.organisationId, deliveries.id] }),
  ],
);

/** Seals that have proven something: each proves one delivery, so that none taken from a tablet's storage proves another. Append-only. */
export const spentSeals = pgTable(
  'spent_seals',
  {
    organisationId: uuid().notNull(),
    nonce: text().notNull(),
    deliveryId: uuid().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.nonce] }),
    foreignKey({ columns: [t.organisationId, t.deliveryId], foreignColumns: [deliveries.organisationId, deliveries.id] }),
  ],
);
