import { sql } from 'drizzle-orm';
import { bigint, boolean, date, foreignKey, index, integer, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { checklistVersions } from './checklists';
import { jobs, shifts } from './jobs';
import { people } from './people';
import { deliveries, tablets } from './tablets';

/** One person's signature, refusal, paper or witnessed record on one version. Append-only. */
export const acknowledgements = pgTable(
  'acknowledgements',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    versionId: uuid().notNull(),
    versionNumber: integer().notNull(),
    jobId: uuid().notNull(),
    jobName: text().notNull(),
    shiftId: uuid().notNull(),
    shiftDate: date().notNull(),
    personId: uuid().notNull(),
    personName: text().notNull(),
    kind: text().notNull(),
    language: text().notNull(),
    textSha256: text().notNull(),
    reason: text(),
    strokes: text().notNull(),
    pinState: text().notNull(),
    wasSuperseded: boolean().notNull(),
    capturedAt: timestamp({ withTimezone: true }).notNull(),
    receivedAt: timestamp({ withTimezone: true }).notNull(),
    /** More than an integer holds where a tablet stands in another millennium. */
    clockOffsetSeconds: bigint({ mode: 'number' }),
    tabletId: uuid(),
    tabletName: text(),
    deliveryId: uuid(),
    entryIndex: bigint({ mode: 'number' }).notNull(),
    /** Why the tablet's time cannot be right; null where it can. */
    timeDoubt: text(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    // A signature that its PIN does not prove does not stand: one that is proven may still come.
    uniqueIndex('acknowledgements_one_proven').on(t.organisationId, t.versionId, t.personId).where(sql`kind = 'signed' AND pin_state = 'confirmed'`),
    uniqueIndex('acknowledgements_by_entry').on(t.organisationId, t.entryIndex),
    index('acknowledgements_by_person').on(t.organisationId, t.personId, t.shiftDate, t.entryIndex),
    index('acknowledgements_by_job').on(t.organisationId, t.jobId, t.shiftDate, t.entryIndex),
    index('acknowledgements_by_kind').on(t.organisationId, t.kind, t.entryIndex),
    index('acknowledgements_by_day').on(t.organisationId, t.shiftDate, t.entryIndex),
    foreignKey({ columns: [t.organisationId, t.versionId], foreignColumns: [checklistVersions.organisationId, checklistVersions.id] }),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.tabletId], foreignColumns: [tablets.organisationId, tablets.id] }),
    foreignKey({ columns: [t.organisationId, t.deliveryId], foreignColumns: [deliveries.organisationId, deliveries.id] }),
  ],
);

/** Opened by a "No", a refusal or a person; owned by someone; closed with evidence. Openings and closings stand in the record log. */
export const correctiveActions = pgTable(
  'corrective_actions',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    jobId: uuid().notNull(),
    shiftId: uuid().notNull(),
    versionId: uuid(),
    taskId: uuid(),
    lineId: text(),
    text: text().notNull(),
    openedAt: timestamp({ withTimezone: true }).notNull(),
    openedBy: text().notNull(),
    deliveryId: uuid(),
    ownerPersonId: uuid(),
    resolvedAt: timestamp({ withTimezone: true }),
    resolvedBy: text(),
    evidence: text(),
    version: integer().notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    index('corrective_actions_open').on(t.organisationId, t.shiftId).where(sql`resolved_at is null`),
    index('corrective_actions_by_opening').on(t.organisationId, t.openedAt, t.id),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
    foreignKey({ columns: [t.organisationId, t.versionId], foreignColumns: [checklistVersions.organisationId, checklistVersions.id] }),
    foreignKey({ columns: [t.organisationId, t.deliveryId], foreignColumns: [deliveries.organisationId, deliveries.id] }),
    foreignKey({ columns: [t.organisationId, t.ownerPersonId], foreignColumns: [people.organisationId, people.id] }),
  ],
);
