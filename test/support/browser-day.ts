import { setTimeout as pause } from 'node:timers/promises';
import { v7 as newId } from 'uuid';
import { type Equipment } from '#shared/equipment';
import { type Job, type PublishedVersion, type Shift, type ShiftPlan } from '#shared/jobs';
import { type Kit } from '#shared/products';
import { type Revision, type UploadedSheet } from '#shared/sheets';
import { siteTimeZone, type Seat } from './browser';
import { answerOf, callFrom } from './browser-organisation';
import { collectorEdit, equipmentEdit, jobEdit, kitEdit, sheetEdit } from './edits';

export interface Day {
  readonly job: Job;
  readonly shift: Shift;
  /** The shift's page in the office. */
  readonly path: string;
}

/** Today's shift with floor grinding from 07:00 to 09:10 by the first person (ready under Table 1) and spreading by the rest when a kit is given. */
export async function planDay(seat: Seat, personIds: readonly string[], kit?: Kit): Promise<Day> {
  const [lead = '', ...crew] = personIds;
  const grinder = await answerOf<Equipment>(callFrom(seat, 'addEquipment', { body: equipmentEdit() }));
  const collector = await answerOf<Equipment>(callFrom(seat, 'addEquipment', { body: collectorEdit() }));
  const job = await answerOf<Job>(callFrom(seat, 'addJob', { body: jobEdit() }));
  const date = new Intl.DateTimeFormat('en-CA', { timeZone: siteTimeZone }).format(new Date());
  const made = await answerOf<Shift>(callFrom(seat, 'addShift', { params: { jobId: job.id }, body: { date, copyFromShiftId: null } }));
  const bare = { equipmentId: null, collectorId: null, dustMethod: null, kitId: null };
  const plan: ShiftPlan = {
    competentPersonId: lead,
    personIds: [...personIds],
    kits: kit ? [{ kitId: kit.id, count: null }] : [],
    tasks: [
      { ...bare, id: newId(), kind: 'floor-grinding', assignments: [{ personId: lead, startMinute: 420, endMinute: 550 }], equipmentId: grinder.id, collectorId: collector.id, dustMethod: 'vacuum' },
      ...(kit ? [{ ...bare, id: newId(), kind: 'spreading' as const, assignments: crew.map((personId) => ({ personId, startMinute: 600, endMinute: 690 })), kitId: kit.id }] : []),
    ],
  };
  const shift = await answerOf<Shift>(callFrom(seat, 'editShiftPlan', { params: { shiftId: made.id }, body: plan, version: made.version }));
  return { job, shift, path: `/jobs/${job.id}/shifts/${shift.id}` };
}

export const publishDay = (seat: Seat, { shift }: Day): Promise<PublishedVersion> => answerOf(callFrom(seat, 'publishShift', { params: { shiftId: shift.id }, version: shift.version }));

/** A kit of one part whose sheet is this file, confirmed as it stands in `edits.ts`. */
export async function kitOf(seat: Seat, fileName: string, bytes: Uint8Array): Promise<Kit> {
  const file = { name: fileName, mimeType: 'application/pdf', buffer: Buffer.from(bytes) };
  const { revision } = await answerOf<UploadedSheet>(seat.page.request.post('/api/sheets', { multipart: { file }, headers: { Origin: new URL(seat.page.url()).origin } }));
  const read = () => answerOf<Revision>(callFrom(seat, 'readRevision', { params: { revisionId: revision.id } }));
  let now = await read();
  for (; now.state === 'waiting'; now = await read()) await pause(200);
  const fields = sheetEdit();
  const confirmed = await answerOf<Revision>(callFrom(seat, 'confirmRevision', { params: { revisionId: now.id }, version: now.version, body: { fields, product: { name: fields.productName, supplier: fields.supplier } } }));
  return answerOf<Kit>(callFrom(seat, 'addKit', { body: kitEdit(confirmed.productId ?? '') }));
}
