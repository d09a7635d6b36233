import { and, desc, eq, lt, or } from 'drizzle-orm';
import { sheetCorrections } from '#drizzle/schema/corrections';
import { people } from '#drizzle/schema/people';
import { sheetSearch } from '#drizzle/schema/search';
import { revisions } from '#drizzle/schema/sheets';
import { readCursor } from '../paging';
import { type Tx } from '../platform/database';
import { type Rule } from './correction-rules';

const select = (tx: Tx) =>
  tx
    .select({ correction: sheetCorrections, correctedByName: people.name, fileName: revisions.fileName })
    .from(sheetCorrections)
    .innerJoin(people, and(eq(people.organisationId, sheetCorrections.organisationId), eq(people.id, sheetCorrections.correctedBy)))
    .innerJoin(revisions, and(eq(revisions.organisationId, sheetCorrections.organisationId), eq(revisions.id, sheetCorrections.revisionId)));
export type CorrectionRow = Awaited<ReturnType<typeof select>>[number];

export function ruleOf({ correction: { kind, label, place, isDayFirst, readValue, value } }: Pick<CorrectionRow, 'correction'>): Rule {
  return kind === 'label' ? { kind, label: label ?? '', where: place === 'next-line' ? 'next-line' : 'same-line', isDayFirst } : { kind: 'spelling', readValue: readValue ?? '', value };
}

/** Newest first. */
export function listCorrections(tx: Tx, limit: number, after?: string): Promise<CorrectionRow[]> {
  const cursor = readCursor(after, 'instant', 'id');
  const at = cursor && new Date(String(cursor[0]));
  return select(tx)
    .where(and(eq(sheetCorrections.organisationId, tx.organisationId), at ? or(lt(sheetCorrections.correctedAt, at), and(eq(sheetCorrections.correctedAt, at), lt(sheetCorrections.id, String(cursor[1])))) : undefined))
    .orderBy(desc(sheetCorrections.correctedAt), desc(sheetCorrections.id))
    .limit(limit);
}

export const correctionsOfSheet = (tx: Tx, revisionId: string) =>
  tx
    .select()
    .from(sheetCorrections)
    .where(and(eq(sheetCorrections.organisationId, tx.organisationId), eq(sheetCorrections.revisionId, revisionId)));

/** The text the reader took, line by line; null where none is kept. */
export async function textOfSheet(tx: Tx, revisionId: string): Promise<string | null> {
  const [row] = await tx
    .select({ text: sheetSearch.fullText })
    .from(sheetSearch)
    .where(and(eq(sheetSearch.organisationId, tx.organisationId), eq(sheetSearch.revisionId, revisionId)));
  return row?.text ?? null;
}
