import { boolean, customType, date, index, integer, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { organisations } from './organisations';

export const bytea = customType<{ data: Buffer; driverData: Buffer }>({ dataType: () => 'bytea' });

/** Anyone: crew, lead, officer, auditor. A sign-in (door table `logins`) and a PIN are optional. */
export const people = pgTable(
  'people',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    name: text().notNull(),
    language: text().notNull(),
    employer: text(),
    isAdultConfirmed: boolean().notNull().default(false),
    isKeptFromIsocyanates: boolean().notNull().default(false),
    silicaTrainedOn: date(),
    silicaTrainedBy: text(),
    hazcomTrainedOn: date(),
    hazcomTrainedBy: text(),
    respirators: jsonb().notNull().default([]),
    /** The unit each quantity was last typed in, by quantity: the same on every machine. Not part of what is edited and versioned. */
    units: jsonb().notNull().default({}),
    isActive: boolean().notNull().default(true),
    version: integer().notNull().default(1),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.id] }), index('people_by_name').on(t.organisationId, t.name, t.id)],
);
