import { sql } from 'drizzle-orm';
import { check, date, foreignKey, index, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { bytea, people } from './people';
import { jobs, shifts } from './jobs';
import { products, revisions } from './sheets';

/** An e-mail to a supplier with a one-time upload link, tracked until answered. */
export const sheetRequests = pgTable(
  'sheet_requests',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    /** Null while the sheet that is sent back belongs to no product yet: then the two names below say what it is. */
    productId: uuid(),
    productName: text(),
    supplier: text(),
    /** The sheet that was sent back; null where one is merely asked for. */
    aboutRevisionId: uuid(),
    email: text().notNull(),
    message: text().notNull(),
    language: text().notNull(),
    askedAt: timestamp({ withTimezone: true }).notNull(),
    askedBy: uuid().notNull(),
    mailedAt: timestamp({ withTimezone: true }),
    expiresAt: timestamp({ withTimezone: true }).notNull(),
    withdrawnAt: timestamp({ withTimezone: true }),
    answeredAt: timestamp({ withTimezone: true }),
    revisionId: uuid(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    index('sheet_requests_by_asking').on(t.organisationId, t.askedAt, t.id),
    foreignKey({ columns: [t.organisationId, t.productId], foreignColumns: [products.organisationId, products.id] }),
    foreignKey({ columns: [t.organisationId, t.askedBy], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.revisionId], foreignColumns: [revisions.organisationId, revisions.id] }),
    foreignKey({ columns: [t.organisationId, t.aboutRevisionId], foreignColumns: [revisions.organisationId, revisions.id] }),
    check('sheet_requests_name_a_product', sql`${t.productId} IS NOT NULL OR (${t.productName} IS NOT NULL AND ${t.supplier} IS NOT NULL AND ${t.aboutRevisionId} IS NOT NULL)`),
  ],
);

/** Where and when a product was used, written at publishing; kept 30 years. Append-only. */
export const productUses = pgTable(
  'product_uses',
  {
    organisationId: uuid().notNull(),
    id: uuid().notNull(),
    productId: uuid().notNull(),
    productName: text().notNull(),
    revisionId: uuid().notNull(),
    jobId: uuid().notNull(),
    jobName: text().notNull(),
    siteName: text().notNull(),
    shiftId: uuid().notNull(),
    usedOn: date().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    uniqueIndex('product_uses_once').on(t.organisationId, t.productId, t.revisionId, t.shiftId),
    index('product_uses_by_day').on(t.organisationId, t.usedOn, t.id),
    foreignKey({ columns: [t.organisationId, t.productId], foreignColumns: [products.organisationId, products.id] }),
    foreignKey({ columns: [t.organisationId, t.revisionId], foreignColumns: [revisions.organisationId, revisions.id] }),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({ columns: [t.organisationId, t.shiftId], foreignColumns: [shifts.organisationId, shifts.id] }),
  ],
);

/** The printed code of a job. The secret itself is in the door's `link_keys`, hashed. */
export const siteCodes = pgTable(
  'site_codes',
  { organisationId: uuid().notNull(), jobId: uuid().notNull(), madeAt: timestamp({ withTimezone: true }).notNull(), madeBy: uuid().notNull(), revokedAt: timestamp({ withTimezone: true }) },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.jobId] }),
    foreignKey({ columns: [t.organisationId, t.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({ columns: [t.organisationId, t.madeBy], foreignColumns: [people.organisationId, people.id] }),
  ],
);

/** Door table: what a link opens, by the hash of its secret. One link a subject. */
export const linkKeys = pgTable('link_keys', {
  tokenHash: bytea().primaryKey(),
  kind: text().notNull(),
  organisationId: uuid().notNull(),
  subjectId: uuid().notNull(),
  expiresAt: timestamp({ withTimezone: true }),
});
