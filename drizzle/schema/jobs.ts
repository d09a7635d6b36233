import { boolean, date, doublePrecision, foreignKey, index, integer, jsonb, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { organisations } from './organisations';
import { people } from './people';
import { kits } from './sheets';

export const equipment = pgTable(
  'equipment',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    name: text().notNull(),
    /** The rest of shared/equipment.ts, checked there. */
    facts: jsonb().notNull(),
    version: integer().notNull().default(1),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.id] }), index('equipment_by_name').on(t.organisationId, t.name, t.id)],
);

export const jobs = pgTable(
  'jobs',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    name: text().notNull(),
    siteName: text().notNull(),
    siteController: text(),
    jurisdictionId: text().notNull(),
    timeZone: text().notNull(),
    isOpen: boolean().notNull().default(true),
    site: jsonb().notNull(),
    createdAt: timestamp({ withTimezone: true }).notNull(),
    version: integer().notNull().default(1),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.id] }), index('jobs_by_creation').on(t.organisationId, t.createdAt, t.id)],
);

/** One day's work of a job. The plan is edited as a whole, under its version. */
export const shifts = pgTable(
  'shifts',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    jobId: uuid().notNull(),
    date: date().notNull(),
    plan: jsonb().notNull(),
    version: integer().notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    uniqueIndex('shifts_by_day').on(t.organisationId, t.jobId, t.date),
    index('shifts_by_date').on(t.organisationId, t.date),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
);

/** Who and what a plan names, as rows: the database refuses a plan that points at another organisation's person or kit. */
export const shiftPeople = pgTable(
  'shift_people',
  { organisationId: uuid().notNull(), shiftId: uuid().notNull(), personId: uuid().notNull() },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.shiftId, t.personId] }),
    index('shift_people_by_person').on(t.organisationId, t.personId),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
    foreignKey({ columns: [t.organisationId, t.personId], foreignColumns: [people.organisationId, people.id] }),
  ],
);
export const shiftKits = pgTable(
  'shift_kits',
  { organisationId: uuid().notNull(), shiftId: uuid().notNull(), kitId: uuid().notNull() },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.shiftId, t.kitId] }),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
    foreignKey({ columns: [t.organisationId, t.kitId], foreignColumns: [kits.organisationId, kits.id] }),
  ],
);
export const shiftEquipment = pgTable(
  'shift_equipment',
  { organisationId: uuid().notNull(), shiftId: uuid().notNull(), equipmentId: uuid().notNull() },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.shiftId, t.equipmentId] }),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
    foreignKey({ columns: [t.organisationId, t.equipmentId], foreignColumns: [equipment.organisationId, equipment.id] }),
  ],
);

/** A named person's signed decision about the exposure of a kind of task on a job. Append-only: a new one replaces an older. */
export const exposureBases = pgTable(
  'exposure_bases',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    jobId: uuid().notNull(),
    taskKind: text().notNull(),
    kind: text().notNull(),
    exposureMicrogramsPerM3: doublePrecision(),
    conditions: text().notNull(),
    endsOn: date().notNull(),
    interimApf: doublePrecision(),
    signedBy: uuid().notNull(),
    signedByName: text().notNull(),
    signedAt: timestamp({ withTimezone: true }).notNull(),
    signedOn: date().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    index('exposure_bases_by_job').on(t.organisationId, t.jobId),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({ columns: [t.organisationId, t.signedBy], foreignColumns: [people.organisationId, people.id] }),
  ],
);
