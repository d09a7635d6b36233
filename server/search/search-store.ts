import { and, eq, inArray, sql } from 'drizzle-orm';
import type * as z from 'zod';
import { jobs, shiftKits, shifts } from '#drizzle/schema/jobs';
import { sheetSearch } from '#drizzle/schema/search';
import { kitParts } from '#drizzle/schema/sheets';
import { type SearchQuery } from '#shared/library';
import { type Tx } from '../platform/database';
import { type SearchTerms } from './search-terms';

/** The ways of finding, best first; the database function search_sheets() goes through them in this order. */
export type FoundBy = 'name' | 'keys' | 'name-start' | 'name-words' | 'supplier' | 'name-and-supplier' | 'name-part' | 'similar-name' | 'similar' | 'text';
export interface Found {
  readonly revisionId: string;
  readonly kind: FoundBy;
  /** With the two of `similar`: the words that were looked for instead. */
  readonly closest: string | null;
}

/** Longer texts than any sheet's are cut, characters. */
const longestText = 400_000;

/**
 * Puts the text the reader took beside what the revision is found by. Everything else (names, codes, state) follows by
 * itself when the revision or its product is written.
 */
export async function indexRevision(tx: Tx, revisionId: string, text: string): Promise<void> {
  const kept = text.slice(0, longestText).replace(/[^\P{Cc}\n\t]|\p{Cs}/gu, ' ');
  await tx.execute(sql`SELECT index_sheet(${revisionId}, ${kept})`);
}

/** Candidates of the organisation in scope, best first, from a function that sees the search table only. */
export async function findCandidates(tx: Tx, q: string, terms: SearchTerms, filters: Omit<z.output<typeof SearchQuery>, 'q' | 'limit'>, atMost: number): Promise<Found[]> {
  const among = filters.isInUse === undefined ? null : await productsInUse(tx);
  const { rows } = await tx.client.query<{ revision_id: string; kind: FoundBy; closest: string | null }>('SELECT * FROM search_sheets($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)', [
    q,
    terms.words,
    terms.casDigits,
    terms.codes,
    filters.state ?? null,
    filters.language ?? null,
    filters.signalWord ?? null,
    among,
    filters.isInUse === undefined ? null : filters.isInUse === 'true',
    atMost,
  ]);
  return rows.map((row) => ({ revisionId: row.revision_id, kind: row.kind, closest: row.closest }));
}

/** In use: part of a kit that is planned on any shift of an open job. */
async function productsInUse(tx: Tx): Promise<string[]> {
  const rows = await tx
    .selectDistinct({ id: kitParts.productId })
    .from(kitParts)
    .innerJoin(shiftKits, and(eq(shiftKits.organisationId, kitParts.organisationId), eq(shiftKits.kitId, kitParts.kitId)))
    .innerJoin(shifts, and(eq(shifts.organisationId, shiftKits.organisationId), eq(shifts.id, shiftKits.shiftId)))
    .innerJoin(jobs, and(eq(jobs.organisationId, shifts.organisationId), eq(jobs.id, shifts.jobId)))
    .where(and(eq(kitParts.organisationId, tx.organisationId), eq(jobs.isOpen, true)));
  return rows.map(({ id }) => id);
}

/** The texts of these revisions, and the word beginnings that `q` stands for in their languages. */
export async function readTexts(tx: Tx, q: string, revisionIds: readonly string[]): Promise<Map<string, { text: string; stems: string[] }>> {
  if (revisionIds.length === 0) return new Map();
  const rows = await tx
    .select({
      id: sheetSearch.revisionId,
      text: sql<string>`concat_ws(E'\n', ${sheetSearch.fullText}, ${sheetSearch.fieldText})`,
      stems: sql<string[]>`tsvector_to_array(to_tsvector(search_config(${sheetSearch.language}), search_plain(${q})) || to_tsvector(search_config(${sheetSearch.language}), ${q}))`,
    })
    .from(sheetSearch)
    .where(and(eq(sheetSearch.organisationId, tx.organisationId), inArray(sheetSearch.revisionId, [...revisionIds])));
  return new Map(rows.map(({ id, text, stems }) => [id, { text, stems }]));
}
