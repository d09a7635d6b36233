import { boolean, foreignKey, index, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { people } from './people';
import { revisions } from './sheets';

/**
 * What an officer's correction of one value explains: where it stands on sheets of this supplier and layout, or how it is written.
 * Offered on later sheets, never applied; can be removed. One a sheet and field: corrected again, it is learned again.
 */
export const sheetCorrections = pgTable(
  'sheet_corrections',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    revisionId: uuid().notNull(),
    field: text().notNull(),
    kind: text().notNull(),
    /** kind label: the words, where the value stands, and for a date whether its day is written first. */
    label: text(),
    place: text(),
    isDayFirst: boolean(),
    /** What the reader had found; null when nothing. */
    readValue: text(),
    value: text().notNull(),
    supplier: text().notNull(),
    readSupplier: text(),
    language: text(),
    heading: text().notNull(),
    correctedAt: timestamp({ withTimezone: true }).notNull(),
    correctedBy: uuid().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    uniqueIndex('sheet_corrections_once').on(t.organisationId, t.revisionId, t.field),
    index('sheet_corrections_by_time').on(t.organisationId, t.correctedAt, t.id),
    foreignKey({ columns: [t.organisationId, t.revisionId], foreignColumns: [revisions.organisationId, revisions.id] }),
    foreignKey({ columns: [t.organisationId, t.correctedBy], foreignColumns: [people.organisationId, people.id] }),
  ],
);
