import { and, eq } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import type * as z from 'zod';
import { sheetCorrections } from '#drizzle/schema/corrections';
import { type Page, type PageQuery } from '#shared/common';
import { type SheetCorrection, type SheetSuggestions } from '#shared/corrections';
import { type SheetEdit, type SheetFields } from '#shared/sheets';
import { type Deps } from '../deps';
import { NotFoundError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { toPage } from '../paging';
import { type Clock } from '../platform/clock';
import { type Tx } from '../platform/database';
import { fieldsOf, findRevision, hasValues, type RevisionRow } from '../sds/sheets-store';
import { applyRule, isSame, isSameLayout, learnRule, rememberedFields, type RememberedField, type Rule } from './correction-rules';
import { correctionsOfSheet, listCorrections, ruleOf, textOfSheet, type CorrectionRow } from './corrections-store';

/** More rules than a contractor's suppliers ever need; the oldest beyond it are not asked. */
const mostAsked = 500;

export function correctionsService({ database }: Deps) {
  return {
    list: (actor: PersonActor, { after, limit }: z.output<typeof PageQuery>): Promise<Page<SheetCorrection>> =>
      database.inOrganisation(actor.organisationId, async (tx) => toPage(await listCorrections(tx, limit + 1, after), limit, ({ correction }) => [correction.correctedAt.toISOString(), correction.id], (row) => toCorrection(row, actor))),

    remove: (actor: PersonActor, id: string): Promise<void> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const gone = await tx.delete(sheetCorrections).where(and(eq(sheetCorrections.organisationId, tx.organisationId), eq(sheetCorrections.id, id))).returning({ id: sheetCorrections.id });
        if (gone.length === 0) throw new NotFoundError('correction');
      }),

    /** What earlier corrections say of this sheet, where it differs from what was read. Nothing is changed by asking. */
    suggest: (actor: PersonActor, revisionId: string): Promise<SheetSuggestions> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const row = await findRevision(tx, revisionId);
        const text = row.revision.state === 'read' && hasValues(row.revision.readerState) ? await textOfSheet(tx, revisionId) : null;
        if (text === null) return { items: [] };
        const fields = fieldsOf(row);
        const layout = layoutOf(fields);
        const rules = (await listCorrections(tx, mostAsked)).filter(({ correction }) => correction.revisionId !== revisionId && isSameLayout(correction, layout, text));
        return { items: rememberedFields.flatMap((field) => suggestionFor(field, fields, rules, text, actor) ?? []) };
      }),
  };
}
export type CorrectionsService = ReturnType<typeof correctionsService>;

const layoutOf = (fields: SheetFields) => ({ supplier: fields.supplier?.value ?? null, language: fields.language?.value ?? null, heading: fields.sections.find(({ number }) => number === 1)?.heading ?? '' });

/** The newest rule that leads somewhere else than the reader. What a person entered on this very sheet stands. */
function suggestionFor(field: RememberedField, fields: SheetFields, rules: readonly CorrectionRow[], text: string, actor: PersonActor): SheetSuggestions['items'][number] | null {
  const read = fields[field];
  if (read?.origin === 'entered') return null;
  for (const row of rules.filter(({ correction }) => correction.field === field)) {
    const value = applyRule(ruleOf(row), { field, readValue: read?.value ?? null, text, language: fields.language?.value ?? null });
    if (value !== null && !(read !== null && isSame(value, read.value))) return { field, value, from: toCorrection(row, actor) };
  }
  return null;
}

function toCorrection(row: CorrectionRow, actor: PersonActor): SheetCorrection {
  const { id, revisionId, field, readValue, value, supplier, correctedAt, correctedBy } = row.correction;
  return { id, revisionId, fileName: row.fileName, field: field as RememberedField, rule: ruleOf(row), readValue, value, supplier, correctedAt: correctedAt.toISOString(), correctedBy: row.correctedByName, isYours: correctedBy === actor.personId };
}

/**
 * Called where an officer's values are stored, in the same transaction: remembers what they explain, forgets what no longer holds.
 * Reads nothing but this sheet; the values themselves are the caller's business.
 */
export async function rememberCorrections(tx: Tx, clock: Clock, actor: PersonActor, row: RevisionRow, edit: SheetEdit): Promise<void> {
  if (!hasValues(row.revision.readerState)) return;
  const before = fieldsOf(row);
  const earlier = await correctionsOfSheet(tx, row.revision.id);
  const supplier = edit.supplier ?? before.supplier?.value;
  const text = supplier ? await textOfSheet(tx, row.revision.id) : null;
  const layout = layoutOf(before);
  const others = text === null ? [] : (await listCorrections(tx, mostAsked)).filter(({ correction }) => correction.revisionId !== row.revision.id && isSameLayout(correction, layout, text));
  for (const field of rememberedFields) {
    const known = earlier.find((each) => each.field === field);
    const read = before[field];
    const value = edit[field];
    const isAsBefore = value === (read?.value ?? null) && (known !== undefined || read === null || read.origin === 'read');
    if (isAsBefore || (read?.origin === 'entered' && known === undefined)) continue;
    const readValue = known ? known.readValue : (read?.value ?? null);
    const rule = text === null || !supplier || value === null || value === readValue ? null : learnRule({ field, readValue, value, text, language: edit.language });
    if (known) await tx.delete(sheetCorrections).where(and(eq(sheetCorrections.organisationId, tx.organisationId), eq(sheetCorrections.id, known.id)));
    // What an earlier correction already says, taken over from its suggestion, teaches nothing new.
    const isTaught = others.some((other) => other.correction.field === field && applyRule(ruleOf(other), { field, readValue, text: text ?? '', language: layout.language }) === value);
    if (!rule || value === null || !supplier || isTaught) continue;
    const readSupplier = earlier.find((each) => each.field === 'supplier')?.readValue ?? (before.supplier?.origin === 'read' ? before.supplier.value : null);
    await tx.insert(sheetCorrections).values({ organisationId: tx.organisationId, id: newId(), revisionId: row.revision.id, field, ...columnsOf(rule), readValue, value, supplier, readSupplier, language: layout.language, heading: layout.heading, correctedAt: clock.now(), correctedBy: actor.personId });
  }
}

const columnsOf = (rule: Rule) => (rule.kind === 'label' ? { kind: rule.kind, label: rule.label, place: rule.where, isDayFirst: rule.isDayFirst } : { kind: rule.kind });
