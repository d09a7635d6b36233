import { date, foreignKey, index, integer, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { bytea, people } from './people';
import { jobs, shifts } from './jobs';
import { deliveries } from './tablets';

/** A published day's checklist. Append-only; the newest number of a shift counts. */
export const checklistVersions = pgTable(
  'checklist_versions',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    shiftId: uuid().notNull(),
    jobId: uuid().notNull(),
    date: date().notNull(),
    number: integer().notNull(),
    /** The facts the rules looked at and the checklist they made, as bytes: never re-serialised. */
    facts: bytea().notNull(),
    checklist: bytea().notNull(),
    /** The day's plan without names, as the printed code shows it; null in versions published before it was made. */
    plan: bytea(),
    factsSha256: text().notNull(),
    /** SHA-256 over the lines `sha256␠␠name` of facts, checklist and every text. */
    manifest: text().notNull(),
    manifestSha256: text().notNull(),
    publishedBy: uuid().notNull(),
    publishedByName: text().notNull(),
    publishedAt: timestamp({ withTimezone: true }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    uniqueIndex('checklist_versions_by_number').on(t.organisationId, t.shiftId, t.number),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({ columns: [t.organisationId, t.publishedBy], foreignColumns: [people.organisationId, people.id] }),
  ],
);

/** The bytes people read and sign, one row a language. Append-only. */
export const checklistTexts = pgTable(
  'checklist_texts',
  { organisationId: uuid().notNull(), versionId: uuid().notNull(), language: text().notNull(), bytes: bytea().notNull(), sha256: text().notNull() },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.versionId, t.language] }),
    foreignKey({ columns: [t.organisationId, t.versionId], foreignColumns: [checklistVersions.organisationId, checklistVersions.id] }),
  ],
);

/** Who a version asks to sign. Append-only. */
export const checklistPeople = pgTable(
  'checklist_people',
  { organisationId: uuid().notNull(), versionId: uuid().notNull(), personId: uuid().notNull(), name: text().notNull(), language: text().notNull() },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.versionId, t.personId] }),
    foreignKey({ columns: [t.organisationId, t.versionId], foreignColumns: [checklistVersions.organisationId, checklistVersions.id] }),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
  ],
);

/** The lead's morning answers, or the live answers at a task's start. Append-only. */
export const answerSets = pgTable(
  'answer_sets',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    kind: text().notNull(),
    versionId: uuid().notNull(),
    taskId: uuid(),
    personId: uuid().notNull(),
    answers: text().notNull(),
    capturedAt: timestamp({ withTimezone: true }).notNull(),
    receivedAt: timestamp({ withTimezone: true }).notNull(),
    deliveryId: uuid().notNull(),
    /** Whether the PIN that came with it was the person's own; 'not-set' where none came. */
    pinState: text().notNull().default('not-set'),
    timeDoubt: text(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    index('answer_sets_by_version').on(t.organisationId, t.versionId, t.capturedAt),
    foreignKey({ columns: [t.organisationId, t.versionId], foreignColumns: [checklistVersions.organisationId, checklistVersions.id] }),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.deliveryId], foreignColumns: [deliveries.organisationId, deliveries.id] }),
  ],
);
