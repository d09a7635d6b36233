import { bigint, foreignKey, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { organisations } from './organisations';
import { bytea } from './people';

/** The head row: locked last in a business transaction, so that entries are numbered in commit order without a gap. */
export const recordlogHeads = pgTable('recordlog_heads', {
  organisationId: uuid().primaryKey().references(() => organisations.organisationId),
  size: bigint({ mode: 'number' }).notNull(),
  lastRecordedAt: timestamp({ withTimezone: true }).notNull(),
  /** Kept so that the history's total needs no count over millions of rows. */
  acknowledgementCount: bigint({ mode: 'number' }).notNull().default(0),
});

/** Leaves of the organisation's Merkle tree. No names in a leaf. Append-only. */
export const recordlogEntries = pgTable(
  'recordlog_entries',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    index: bigint({ mode: 'number' }).notNull(),
    kind: text().notNull(),
    subjectId: uuid().notNull(),
    recordedAt: timestamp({ withTimezone: true }).notNull(),
    leaf: text().notNull(),
    leafHash: bytea().notNull(),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.index] }), uniqueIndex('recordlog_entries_by_subject').on(t.organisationId, t.subjectId, t.kind, t.index)],
);

/** What a leaf stands for: salt and exact bytes, apart from the leaf so that the end of retention does not break the tree. Append-only. */
export const recordlogRecords = pgTable(
  'recordlog_records',
  { organisationId: uuid().notNull(), index: bigint({ mode: 'number' }).notNull(), salt: bytea().notNull(), bytes: bytea().notNull() },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.index] }),
    foreignKey({ columns: [t.organisationId, t.index], foreignColumns: [recordlogEntries.organisationId, recordlogEntries.index] }),
  ],
);

/** Signed notes over the tree; copies leave the database (bucket, mail). Append-only. */
export const recordlogCheckpoints = pgTable(
  'recordlog_checkpoints',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    size: bigint({ mode: 'number' }).notNull(),
    root: bytea().notNull(),
    note: text().notNull(),
    createdAt: timestamp({ withTimezone: true }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.size] })],
);
