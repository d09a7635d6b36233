import { customType, foreignKey, index, pgTable, primaryKey, smallint, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import { revisions } from './sheets';

const tsvector = customType<{ data: string }>({ dataType: () => 'tsvector' });

/**
 * What a revision is found by, one row each; written by index_sheet(), which triggers call. A copy of what revisions and
 * products say, because the search function sees this table and no other.
 */
export const sheetSearch = pgTable(
  'sheet_search',
  {
    organisationId: uuid().notNull(),
    revisionId: uuid().notNull(),
    productId: uuid(),
    state: text().notNull(),
    language: text(),
    signalWord: text(),
    /** 0 current, 1 confirmed, 2 to be checked or read, 3 set aside: the order among equals. */
    standing: smallint().notNull(),
    uploadedAt: timestamp({ withTimezone: true }).notNull(),
    /** Product and supplier without case, accents and signs. */
    name: text().notNull(),
    supplier: text().notNull(),
    /** Exact keys by kind: `n word` of a name, `s word` of a supplier, `c 8001794` a CAS number's digits, `k h317` a code. */
    keys: tsvector().notNull(),
    /** Words of the sheet by its language, and `lang en`. */
    document: tsvector().notNull(),
    /** What the fields say in words, for sheets whose text nobody read. */
    fieldText: text().notNull(),
    /** The text as the reader took it, cut to a length. */
    fullText: text(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.revisionId] }),
    foreignKey({ columns: [t.organisationId, t.revisionId], foreignColumns: [revisions.organisationId, revisions.id] }),
    index('sheet_search_by_name').on(t.organisationId, t.name.op('text_pattern_ops')),
    // A pending list would make some searches wait for others' uploads.
    index('sheet_search_by_key').using('gin', t.organisationId, t.keys).with({ fastupdate: false }),
    index('sheet_search_by_word').using('gin', t.organisationId, t.document).with({ fastupdate: false }),
  ],
);

/** The words of an organisation's product and supplier names: what a mistyped word is compared with. */
export const sheetWords = pgTable(
  'sheet_words',
  { organisationId: uuid().notNull(), word: text().notNull() },
  (t) => [primaryKey({ columns: [t.organisationId, t.word] }), index('sheet_words_by_part').using('gin', t.organisationId, t.word.op('gin_trgm_ops')).with({ fastupdate: false })],
);
