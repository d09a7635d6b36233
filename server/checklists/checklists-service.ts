import { createHash } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { v7 as newId } from 'uuid';
import { dayPlan, renderChecklistText } from '#compliance';
import { type ShiftFacts } from '#compliance/facts';
import { languages, type Language } from '#compliance/outcome';
import { checklistPeople, checklistTexts, checklistVersions } from '#drizzle/schema/checklists';
import { productUses } from '#drizzle/schema/library';
import { type PublishedVersion, type Shift } from '#shared/jobs';
import { type Deps } from '../deps';
import { ConflictError, NotFoundError, RefusedError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { draftChecklist, findShift, newestVersion, readShift, readVersions } from '../jobs/shift-store';
import { type Tx } from '../platform/database';
import { appendEntry } from '../recordlog/recordlog-store';

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

export function checklistsService({ database, clock }: Deps) {
  return {
    /**
     * Freezes the day: computes the answer again here, makes the bytes once, stores and hashes them as they are.
     * Two publishers at once queue on the shift's row; the second sees that the plan's version or the facts are published.
     */
    publish: (actor: PersonActor, shiftId: string, version: number): Promise<PublishedVersion> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer', 'crew-lead');
        const row = await findShift(tx, shiftId, true);
        const publishedAt = clock.now();
        const shift = await readShift(tx, shiftId, publishedAt);
        if (row.version !== version) throw new ConflictError('Somebody changed this shift after you opened it. Look at it again, then publish.', shift);
        const { facts, answer, checklist, factsBytes, checklistBytes } = draftChecklist(shift, publishedAt);
        refuseUnfinished(facts);
        const newest = await newestVersion(tx, shiftId);
        if (newest?.checklist.equals(checklistBytes)) throw new RefusedError(`Nothing that people sign has changed since version ${newest.number}. It stands as it is.`);
        const texts = languages.map((language) => {
          const bytes = Buffer.from(renderChecklistText(checklist, language));
          return { language, bytes, sha256: sha256(bytes) };
        });
        const factsSha256 = sha256(factsBytes);
        const manifest = [`${factsSha256}  facts.json`, `${sha256(checklistBytes)}  checklist.json`, ...texts.map((text) => `${text.sha256}  text.${text.language}.json`), ''].join('\n');
        const manifestSha256 = sha256(Buffer.from(manifest));

        const plan = Buffer.from(JSON.stringify(dayPlan(facts, answer)));
        const id = newId();
        const number = (newest?.number ?? 0) + 1;
        const own = { organisationId: tx.organisationId, versionId: id };
        await tx.insert(checklistVersions).values({ organisationId: tx.organisationId, id, shiftId, jobId: shift.jobId, date: shift.date, number, facts: factsBytes, checklist: checklistBytes, plan, factsSha256, manifest, manifestSha256, publishedBy: actor.personId, publishedByName: actor.personName, publishedAt });
        await tx.insert(checklistTexts).values(texts.map((text) => ({ ...own, ...text })));
        await tx.insert(checklistPeople).values(checklist.people.map((person) => ({ ...own, personId: person.personId, name: person.name, language: person.language })));
        await registerUses(tx, shift, facts);
        const published = (await readVersions(tx, shiftId)).find((each) => each.id === id) as PublishedVersion;
        await appendEntry(tx, clock, {
          kind: 'checklist-version',
          subjectId: id,
          record: { versionId: id, number, jobId: shift.jobId, shiftId, date: shift.date, jobName: facts.jobName, siteName: facts.siteName, manifest, manifestSha256, publishedBy: { id: actor.personId, name: actor.personName }, publishedAt: publishedAt.toISOString(), replaces: newest?.id ?? null },
        });
        return published;
      }),

    /** The stored bytes of one language, as hashed and signed. */
    readText: (actor: PersonActor, versionId: string, language: string): Promise<{ bytes: Buffer; sha256: string }> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const [row] = await tx
          .select()
          .from(checklistTexts)
          .where(and(eq(checklistTexts.organisationId, tx.organisationId), eq(checklistTexts.versionId, versionId), eq(checklistTexts.language, language as Language)));
        if (!row) throw new NotFoundError('checklist text');
        return { bytes: row.bytes, sha256: row.sha256 };
      }),
  };
}
export type ChecklistsService = ReturnType<typeof checklistsService>;

/** Where and when each product was used stays on record 30 years (29 CFR 1910.1020(d)(1)(ii)(B)). */
async function registerUses(tx: Tx, shift: Shift, facts: ShiftFacts): Promise<void> {
  const parts = facts.kits.flatMap((kit) => kit.parts.flatMap((part) => (part.sheet ? [{ ...part, sheet: part.sheet }] : [])));
  if (parts.length === 0) return;
  const place = { organisationId: tx.organisationId, jobId: shift.jobId, jobName: facts.jobName, siteName: facts.siteName, shiftId: shift.id, usedOn: shift.date };
  await tx.insert(productUses).values(parts.map((part) => ({ ...place, id: newId(), productId: part.productId, productName: part.productName, revisionId: part.sheet.revisionId }))).onConflictDoNothing();
}

function refuseUnfinished(facts: ShiftFacts): void {
  const assigned = new Set(facts.tasks.flatMap((task) => task.assignments.map((each) => each.personId)));
  if (assigned.size === 0) throw new RefusedError('Nobody has a task yet. Put people on the shift strip, then publish.');
  if (!facts.competentPersonId || !facts.people.some((person) => person.id === facts.competentPersonId)) throw new RefusedError('Name the competent person of the day first: the crew must know who it is.');
  const strangers = [...assigned].filter((id) => !facts.people.some((person) => person.id === id));
  if (strangers.length > 0) throw new RefusedError('A task is given to somebody who is not on this shift or no longer active. Take them off the strip, then publish.');
  const idle = facts.tasks.filter((task) => task.assignments.length === 0);
  if (idle.length > 0) throw new RefusedError(`${idle.length === 1 ? 'One task has' : `${idle.length} tasks have`} nobody on ${idle.length === 1 ? 'it' : 'them'}. Give ${idle.length === 1 ? 'it' : 'them'} to somebody or remove ${idle.length === 1 ? 'it' : 'them'}.`);
}
