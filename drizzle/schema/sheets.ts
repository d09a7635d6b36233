import { bigint, boolean, date, doublePrecision, foreignKey, index, integer, jsonb, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { sql } from 'drizzle-orm';
import { organisations } from './organisations';
import { people } from './people';

export const products = pgTable(
  'products',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    name: text().notNull(),
    supplier: text().notNull(),
    version: integer().notNull().default(1),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.id] }), uniqueIndex('products_by_name').on(t.organisationId, t.name, t.supplier)],
);

/** One dated version of a product's SDS. The file is stored under its hash; the row never points at an object that is not there. */
export const revisions = pgTable(
  'revisions',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    sha256: text().notNull(),
    byteLength: bigint({ mode: 'number' }).notNull(),
    fileName: text().notNull(),
    state: text().notNull(),
    readerState: text(),
    pages: integer(),
    /** The page being recognised, from 1, 0 while it waits its turn; null unless the sheet is read from pictures of its pages now. */
    pagesRead: integer(),
    fields: jsonb(),
    productId: uuid(),
    language: text(),
    revisedOn: date(),
    /** The confirmed sheet that counts for its product and language. */
    isCurrent: boolean().notNull().default(false),
    uploadedBy: uuid().notNull(),
    uploadedAt: timestamp({ withTimezone: true }).notNull(),
    confirmedBy: uuid(),
    confirmedAt: timestamp({ withTimezone: true }),
    version: integer().notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.id] }),
    uniqueIndex('revisions_by_hash').on(t.organisationId, t.sha256),
    uniqueIndex('revisions_current').on(t.organisationId, t.productId, t.language).where(sql`is_current`),
    index('revisions_by_upload').on(t.organisationId, t.uploadedAt, t.id),
    foreignKey({ columns: [t.organisationId, t.productId], foreignColumns: [products.organisationId, products.id] }),
    foreignKey({ columns: [t.organisationId, t.uploadedBy], foreignColumns: [people.organisationId, people.id] }),
    foreignKey({ columns: [t.organisationId, t.confirmedBy], foreignColumns: [people.organisationId, people.id] }),
  ],
);

export const kits = pgTable(
  'kits',
  {
    organisationId: uuid().notNull().references(() => organisations.organisationId),
    id: uuid().notNull(),
    name: text().notNull(),
    volumeL: doublePrecision().notNull(),
    mixMinutesPerKit: doublePrecision().notNull(),
    bucketMinutes: doublePrecision(),
    /** shared/products.ts, SurfaceException and CartridgeSchedule; null where nothing was said. */
    surfaceException: jsonb(),
    cartridgeSchedule: jsonb(),
    version: integer().notNull().default(1),
  },
  (t) => [primaryKey({ columns: [t.organisationId, t.id] })],
);

export const kitParts = pgTable(
  'kit_parts',
  {
    organisationId: uuid().notNull(),
    kitId: uuid().notNull(),
    position: integer().notNull(),
    productId: uuid().notNull(),
    part: text().notNull(),
    form: text().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.kitId, t.position] }),
    foreignKey({ columns: [t.organisationId, t.kitId], foreignColumns: [kits.organisationId, kits.id] }),
    foreignKey({ columns: [t.organisationId, t.productId], foreignColumns: [products.organisationId, products.id] }),
  ],
);
