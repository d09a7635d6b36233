import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { v7 as newId } from 'uuid';
import { type Equipment } from '#shared/equipment';
import { type Job, type PublishedVersion, type Shift, type ShiftPlan } from '#shared/jobs';
import { type Kit } from '#shared/products';
import { type Revision, type SheetEdit, type UploadedSheet } from '#shared/sheets';
import { answerOf, callFrom } from './browser-organisation';
import { type Seat } from './browser';
import { collectorEdit, equipmentEdit, jobEdit, kitEdit, sheetEdit } from './edits';
import { testEnvironment } from './environment';

/** A confirmed sheet that was typed in by hand, made without its page: for journeys that begin with one. */
export async function confirmedSheet(seat: Seat, changes: Partial<SheetEdit>): Promise<Revision> {
  const { page } = seat;
  const buffer = Buffer.from(`A sheet as plain text, ${newId()}`);
  const { revision } = await answerOf<UploadedSheet>(page.request.post('/api/sheets', { headers: { Origin: new URL(page.url()).origin }, multipart: { file: { name: 'typed-sheet.txt', mimeType: 'text/plain', buffer } } }));
  const params = { revisionId: revision.id };
  const { version } = await answerOf<Revision>(callFrom(seat, 'readRevision', { params }));
  const fields = sheetEdit(changes);
  return answerOf<Revision>(callFrom(seat, 'confirmRevision', { params, version, body: { fields, product: { name: fields.productName, supplier: fields.supplier } } }));
}

/** A sheet as a PDF, read by the worker and confirmed, without its page. */
export async function confirmedPdf(seat: Seat, file: { name: string; bytes: Uint8Array }, changes: Partial<SheetEdit>): Promise<Revision> {
  const { page } = seat;
  const { revision } = await answerOf<UploadedSheet>(page.request.post('/api/sheets', { headers: { Origin: new URL(page.url()).origin }, multipart: { file: { name: file.name, mimeType: 'application/pdf', buffer: Buffer.from(file.bytes) } } }));
  const params = { revisionId: revision.id };
  for (;;) {
    const { state, version } = await answerOf<Revision>(callFrom(seat, 'readRevision', { params }));
    if (state === 'waiting') {
      await new Promise((resolve) => setTimeout(resolve, 200));
      continue;
    }
    const fields = sheetEdit(changes);
    return answerOf<Revision>(callFrom(seat, 'confirmRevision', { params, version, body: { fields, product: { name: fields.productName, supplier: fields.supplier } } }));
  }
}

/** A kit of one powder, which is this product. */
export const powderKit = (seat: Seat, productId: string): Promise<Kit> => answerOf<Kit>(callFrom(seat, 'addKit', { body: kitEdit(productId, { parts: [{ productId, part: 'C', form: 'powder' }] }) }));

export interface JobWithKit {
  readonly job: Job;
  readonly shift: Shift;
  readonly version: PublishedVersion;
}

/** An open job whose shift of today grinds and mixes the kit; published. */
export async function publishedJob(seat: Seat, name: string, kitId: string, personIds: readonly string[]): Promise<JobWithKit> {
  const [lead = ''] = personIds;
  const job = await answerOf<Job>(callFrom(seat, 'addJob', { body: jobEdit({ name }) }));
  const grinder = await answerOf<Equipment>(callFrom(seat, 'addEquipment', { body: equipmentEdit({ name: `Grinder of ${name}` }) }));
  const collector = await answerOf<Equipment>(callFrom(seat, 'addEquipment', { body: { ...collectorEdit(), name: `Collector of ${name}` } }));
  const date = new Intl.DateTimeFormat('en-CA', { timeZone: job.timeZone }).format(new Date());
  const made = await answerOf<Shift>(callFrom(seat, 'addShift', { params: { jobId: job.id }, body: { date, copyFromShiftId: null } }));
  const bare = { equipmentId: null, collectorId: null, dustMethod: null, kitId: null };
  const plan: ShiftPlan = {
    competentPersonId: lead,
    personIds: [...personIds],
    kits: [{ kitId, count: null }],
    tasks: [
      { ...bare, id: newId(), kind: 'floor-grinding', assignments: [{ personId: lead, startMinute: 420, endMinute: 550 }], equipmentId: grinder.id, collectorId: collector.id, dustMethod: 'vacuum' },
      { ...bare, id: newId(), kind: 'liquid-mixing', assignments: personIds.map((personId) => ({ personId, startMinute: 600, endMinute: 660 })), kitId },
    ],
  };
  const shift = await answerOf<Shift>(callFrom(seat, 'editShiftPlan', { params: { shiftId: made.id }, version: made.version, body: plan }));
  const version = await answerOf<PublishedVersion>(callFrom(seat, 'publishShift', { params: { shiftId: shift.id }, version: shift.version }));
  return { job, shift, version };
}

/** The newest link of this kind in the mail that went to an address: path and fragment. */
export async function linkMailedTo(email: string, withinMs = 20_000): Promise<string> {
  const folder = testEnvironment('TEST_MAIL_FOLDER');
  for (const until = Date.now() + withinMs; Date.now() < until; ) {
    const mails = readdirSync(folder).map((name) => readFileSync(join(folder, name), 'utf8').replace(/=\r?\n/g, '').replace(/=3D/g, '='));
    const link = mails.filter((mail) => mail.includes(email)).flatMap((mail) => /\/send-sheet#[\w-]{43}/.exec(mail) ?? []).at(-1);
    if (link) return link;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error(`No mail with a link went to ${email}.`);
}
