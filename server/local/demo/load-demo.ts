import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { addDays } from 'date-fns';
import { v7 as newId } from 'uuid';
import { createHash, randomBytes } from 'node:crypto';
import { organisations } from '#drizzle/schema/organisations';
import { tablets as tabletRows } from '#drizzle/schema/tablets';
import { type PublishedVersion, type Shift, type ShiftPlan } from '#shared/jobs';
import { type Kit } from '#shared/products';
import { pinSetText, sealPin } from '#shared/pin-sealing';
import { type Revision, type SheetEdit } from '#shared/sheets';
import { deliveriesService } from '../../acknowledgements/deliveries-service';
import { checklistsService } from '../../checklists/checklists-service';
import { type Deps } from '../../deps';
import { equipmentService } from '../../equipment/equipment-service';
import { type PersonActor, type TabletActor } from '../../http/actor';
import { jobsService, localDate } from '../../jobs/jobs-service';
import { peopleService } from '../../people/people-service';
import { pinsService } from '../../people/pins-service';
import { pinPublicKeySpki } from '../../people/pin-unsealing';
import { productsService } from '../../products/products-service';
import { recordlogService } from '../../recordlog/recordlog-service';
import { requestsService } from '../../library/requests-service';
import { readSheet } from '../../sds/reader/read-sheet';
import { readSheetWork } from '../../sds/sheets-work';
import { sheetsService } from '../../sds/sheets-service';
import { sql } from 'drizzle-orm';
import { hashPassword } from '../../session/passwords';
import { tabletsService } from '../../tablets/tablets-service';
import { buildDemoSheet, type DemoSheetSpec } from './demo-sheet';
import { demoEquipment, demoPassword, demoPeople, demoPins, kit as kitFigures, organisationName, signIns, sites } from './demo.data';
import { degreaser, primer, quarrybondPartA, quarrybondPartB, quarrybondPartC, quarrybondPartCSpanish } from './sheets.data';

const timeZone = 'America/Chicago';
const at = (hours: number, minutes = 0) => hours * 60 + minutes;
const pinSetHash = (personId: string) => createHash('sha256').update(pinSetText(personId)).digest('hex');

/** Loads the invented scenario through the services, as people would have: days of signing before today, and a sheet that waits. */
export async function loadDemo(deps: Deps & { clock: { now(): Date; set(at: Date): void } }): Promise<void> {
  const organisationId = newId();
  const realNow = deps.clock.now();
  const today = localDate(realNow, timeZone);
  const daysAgo = (days: number) => addDays(new Date(`${today}T00:00:00Z`), -days).toISOString().slice(0, 10);
  await deps.database.inOrganisation(organisationId, async (tx) => {
    await tx.insert(organisations).values({ organisationId, name: organisationName, createdAt: deps.clock.now(), auditorEmails: ['auditor@marrowslate.example'], phone: '555-0142' });
  });
  const actor = (personId: string, personName: string, role: PersonActor['role']): PersonActor => ({ kind: 'person', organisationId, organisationName, personId, personName, role });

  const people = peopleService(deps);
  const loader = actor(newId(), 'Demo loader', 'owner');
  const ids = new Map<string, string>();
  for (const edit of demoPeople(daysAgo)) ids.set(edit.name, (await people.add(loader, edit)).id);
  const idOf = (name: string): string => ids.get(name) ?? raise(`nobody in the demo is called ${name}`);
  const hash = await hashPassword(demoPassword);
  await deps.database.inOrganisation(organisationId, async (tx) => {
    for (const { name, role, email } of signIns) await tx.execute(sql`SELECT door_set_login(${idOf(name)}, ${email}, ${role}, ${hash})`);
  });
  const officer = actor(idOf('Ines Halloran'), 'Ines Halloran', 'safety-officer');
  const owner = actor(idOf('Hazel Marrow'), 'Hazel Marrow', 'owner');

  const equipment = equipmentService(deps);
  const machines = {} as Record<keyof ReturnType<typeof demoEquipment>, string>;
  for (const [key, edit] of Object.entries(demoEquipment(daysAgo))) machines[key as keyof typeof machines] = (await equipment.add(officer, edit)).id;

  deps.clock.set(addDays(realNow, -40));
  const kit = await loadLibrary(deps, officer);

  const jobs = jobsService(deps);
  const job = async (key: keyof typeof sites) => jobs.add(officer, { ...sites[key], jurisdictionId: 'us-federal', timeZone, isOpen: true });
  const kitchen = await job('kitchen');
  const freight = await job('freight');
  const creamery = await job('creamery');

  const tablets = tabletsService(deps);
  const { code } = await tablets.add(owner, 'Tablet 2');
  const paired = await tablets.pair(code, 'demo');
  const tablet: TabletActor = { kind: 'tablet', organisationId, organisationName, tabletId: paired.tablet.tabletId, tabletName: 'Tablet 2' };

  let sequence = 0;
  const sealingKey = pinPublicKeySpki(deps.config.keys.pinSealingKey);
  const deliveries = deliveriesService(deps);
  async function deliver(capturedAt: Date, kind: string, rest: Record<string, unknown>): Promise<void> {
    const id = newId();
    deps.clock.set(new Date(Math.max(capturedAt.getTime() + 4_000, deps.clock.now().getTime())));
    const { receipts } = await deliveries.deliver(tablet, { sentAt: deps.clock.now().toISOString(), envelopes: [{ id, bytes: JSON.stringify({ format: 'kneeboard-envelope/1', id, capturedAt: capturedAt.toISOString(), sequence: (sequence += 1), kind, ...rest }) }] });
    if (receipts[0]?.outcome !== 'recorded') raise(`demo envelope ${kind}: ${receipts[0]?.note}`);
  }
  const seal = async (name: string, textHash: string) => {
    const nonce = randomBytes(16).toString('hex');
    return { sealedPin: await sealPin({ pin: demoPins[name] ?? raise(`${name} has no demo PIN`), textHash, nonce }, sealingKey), nonce };
  };

  const unwitnessed = 'Per Aldana';
  const signers = ['Dov Lindqvist', 'Marisol Tena', 'Abe Kowalczyk', 'Tomasz Reyes', 'Per Aldana'];
  // The first lead has a start PIN from the office and then witnesses the others; one was set before anybody witnessed, and is marked.
  const [lead, ...others] = signers.map((name) => ({ name, id: idOf(name) })) as [{ name: string; id: string }, ...{ name: string; id: string }[]];
  deps.clock.set(addDays(realNow, -10));
  const { pin: startPin } = await pinsService(deps).giveStartPin(officer, lead.id);
  const startNonce = randomBytes(16).toString('hex');
  const startSealedPin = await sealPin({ pin: startPin, textHash: pinSetHash(lead.id), nonce: startNonce }, sealingKey);
  await deliver(addDays(realNow, -9), 'pin-set', { personId: lead.id, ...(await seal(lead.name, pinSetHash(lead.id))), witnessPersonId: null, startSealedPin, startNonce });
  for (const { name, id } of others) {
    const hash = pinSetHash(id);
    const witness = await seal(lead.name, hash);
    const witnessing = { witnessPersonId: lead.id, witnessSealedPin: witness.sealedPin, witnessNonce: witness.nonce };
    await deliver(addDays(realNow, -9), 'pin-set', { personId: id, ...(await seal(name, hash)), ...(name === unwitnessed ? { witnessPersonId: null } : witnessing) });
  }

  /** One day that was published, briefed and signed; `signedBy` in order. */
  async function pastDay(jobId: string, days: number, plan: ShiftPlan, signedBy: readonly string[]): Promise<Shift> {
    const morning = instantAt(daysAgo(days), at(6));
    deps.clock.set(new Date(Math.max(morning.getTime(), deps.clock.now().getTime())));
    const { version } = await publishDay(jobId, daysAgo(days), plan);
    for (const [turn, name] of signedBy.entries()) await sign(version, name, new Date(morning.getTime() + (20 + turn * 2) * 60_000));
    return jobs.readShift(officer, version.shiftId);
  }
  async function publishDay(jobId: string, date: string, plan: ShiftPlan): Promise<{ version: PublishedVersion & { shiftId: string } }> {
    const made = await jobs.addShift(officer, jobId, { date, copyFromShiftId: null });
    const shift = await jobs.editPlan(officer, made.id, made.version, plan);
    return { version: { ...(await checklistsService(deps).publish(officer, shift.id, shift.version)), shiftId: shift.id } };
  }
  async function sign(version: PublishedVersion, name: string, capturedAt: Date): Promise<void> {
    const person = version.asked.find((each) => each.name === name);
    const text = version.texts.find((each) => each.language === person?.language);
    if (!person || !text) return;
    await deliver(capturedAt, 'signed', { versionId: version.id, language: person.language, textSha256: text.sha256, personId: person.personId, strokes: scribble(name), ...(await seal(name, text.sha256)) });
  }

  const creameryPlan = creameryDay(idOf, machines, kit);
  const freightPlan = freightDay(idOf, machines);
  await pastDay(freight.id, 3, freightPlan, ['Per Aldana', 'Tomasz Reyes']);
  await pastDay(creamery.id, 2, withNewTasks(creameryPlan), ['Dov Lindqvist', 'Marisol Tena', 'Abe Kowalczyk', 'Tomasz Reyes']);
  await pastDay(creamery.id, 1, withNewTasks(creameryPlan), ['Dov Lindqvist', 'Marisol Tena', 'Abe Kowalczyk', 'Tomasz Reyes', 'Per Aldana']);
  deps.clock.set(realNow);
  const open = await jobs.addShift(officer, creamery.id, { date: today, copyFromShiftId: null });
  await jobs.editPlan(officer, open.id, open.version, withNewTasks(creameryPlan));
  await publishDay(freight.id, today, withNewTasks(freightPlan));
  const kitchenShift = await jobs.addShift(officer, kitchen.id, { date: today, copyFromShiftId: null });
  await jobs.editPlan(officer, kitchenShift.id, kitchenShift.version, kitchenDay(idOf, machines));

  await deps.database.inOrganisation(organisationId, (tx) => tx.update(tabletRows).set({ lastHeardAt: deps.clock.now() }));
  // A newer sheet of part C has come in and waits for the officer: it adds a statement.
  await addSheet(deps, officer, { ...quarrybondPartC, revisedOn: daysAgo(3), supersedesOn: '2023-05-11' });
  await sendOneBack(deps, officer);
  await recordlogService(deps).makeCheckpoint(organisationId);

  function instantAt(date: string, minute: number): Date {
    const guess = new Date(`${date}T${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}:00Z`);
    const local = new Date(guess.toLocaleString('en-US', { timeZone, hour12: false }).replace(', 24:', ', 00:'));
    const utc = new Date(guess.toLocaleString('en-US', { timeZone: 'UTC', hour12: false }).replace(', 24:', ', 00:'));
    return new Date(guess.getTime() + (utc.getTime() - local.getTime()));
  }
}

/** One sheet was not fit for use, before it belonged to a product: its supplier has it back and has not answered yet. */
async function sendOneBack(deps: Deps, officer: PersonActor): Promise<void> {
  const { id, version, productName, supplier } = await addSheet(deps, officer, { ...primer, fileName: 'northlode-joint-filler-8.pdf', productName: 'Northlode Joint Filler 8', productCode: 'NJF-8' });
  await requestsService(deps, sheetsService(deps)).returnSheet(officer, id, version, {
    productName: productName ?? 'Northlode Joint Filler 8',
    supplier: supplier ?? primer.supplier.name,
    email: 'sheets@northlode.example',
    message: 'We cannot use your safety data sheet of Northlode Joint Filler 8.\n\nWhat we found:\n- Section 14 gives the class of the primer, not of the joint filler.\n\nPlease send a corrected sheet as a PDF, with all 16 sections.',
    language: 'en',
    isSetAside: true,
  });
}

async function addSheet(deps: Deps, officer: PersonActor, spec: DemoSheetSpec): Promise<Revision> {
  const folder = await mkdtemp(join(tmpdir(), 'kneeboard-demo-'));
  try {
    const bytes = await buildDemoSheet(spec);
    const path = join(folder, spec.fileName);
    await writeFile(path, bytes);
    const sheets = sheetsService(deps);
    const { revision } = await sheets.upload(officer, { path, byteLength: bytes.byteLength, fileName: spec.fileName });
    await readSheetWork(deps, { read: (bytes) => readSheet(bytes), close: async () => undefined })({ organisationId: officer.organisationId, revisionId: revision.id });
    return await sheets.read(officer, revision.id);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

/** The confirmed sheets and the kit made of them. Part C stands in its older form here. */
async function loadLibrary(deps: Deps, officer: PersonActor): Promise<Kit> {
  const olderPartC: DemoSheetSpec = { ...quarrybondPartC, fileName: 'quarrybond-40-part-c-2023.pdf', revisedOn: '2023-05-11', issuedOn: '2020-05-14', supersedesOn: '2020-05-14', hazards: quarrybondPartC.hazards.filter((code) => !code.startsWith('H350')) };
  const sheets = sheetsService(deps);
  const productIds = new Map<DemoSheetSpec, string>();
  for (const spec of [quarrybondPartA, quarrybondPartB, olderPartC, primer, degreaser]) {
    const revision = await addSheet(deps, officer, spec);
    const confirmed = await sheets.confirm(officer, revision.id, revision.version, { fields: asRead(revision, spec), product: { name: spec.productName, supplier: spec.supplier.name } });
    productIds.set(spec, confirmed.productId ?? raise('a confirmed sheet has no product'));
  }
  const spanish = await addSheet(deps, officer, { ...quarrybondPartCSpanish, revisedOn: '2023-05-11', hazards: quarrybondPartCSpanish.hazards.filter((code) => !code.startsWith('H350')) });
  await sheets.confirm(officer, spanish.id, spanish.version, { fields: asRead(spanish, quarrybondPartCSpanish), product: { id: productIds.get(olderPartC) ?? raise('part C is missing') } });
  const part = (spec: DemoSheetSpec, letter: string, form: 'liquid' | 'powder') => ({ productId: productIds.get(spec) ?? raise(`${spec.productName} is missing`), part: letter, form });
  return productsService(deps).addKit(officer, { ...kitFigures, parts: [part(quarrybondPartA, 'A', 'liquid'), part(quarrybondPartB, 'B', 'liquid'), part(olderPartC, 'C', 'powder')] });
}

/** What the officer confirms: the values as read, gaps filled from the sheet itself. */
function asRead({ fields }: Revision, spec: DemoSheetSpec): SheetEdit {
  return {
    productName: fields.productName?.value ?? spec.productName,
    supplier: fields.supplier?.value ?? spec.supplier.name,
    language: spec.language,
    revisedOn: fields.revisedOn?.value ?? spec.revisedOn,
    signalWord: fields.signalWord?.value ?? spec.signalWord,
    hazardCodes: fields.hazardCodes.map((field) => field.value),
    precautionaryCodes: fields.precautionaryCodes.map((field) => field.value),
    ingredients: fields.ingredients.map((field) => field.value),
    limits: fields.limits.map((field) => field.value),
    protectionWords: fields.protectionWords.map((field) => field.value),
  };
}

type Machines = Record<keyof ReturnType<typeof demoEquipment>, string>;
type Ids = (name: string) => string;
const bare = { equipmentId: null, collectorId: null, dustMethod: null, kitId: null };
const withNewTasks = (plan: ShiftPlan): ShiftPlan => ({ ...plan, tasks: plan.tasks.map((task) => ({ ...task, id: newId() })) });

function creameryDay(idOf: Ids, machines: Machines, kit: Kit): ShiftPlan {
  const [dov, marisol, abe, tomasz, per] = ['Dov Lindqvist', 'Marisol Tena', 'Abe Kowalczyk', 'Tomasz Reyes', 'Per Aldana'].map(idOf) as [string, string, string, string, string];
  const on = (personId: string, start: number, end: number) => ({ personId, startMinute: start, endMinute: end });
  const task = (kind: ShiftPlan['tasks'][number]['kind'], assignments: ShiftPlan['tasks'][number]['assignments'], rest: Partial<ShiftPlan['tasks'][number]> = {}) => ({ ...bare, id: newId(), kind, assignments, ...rest });
  return {
    competentPersonId: dov,
    personIds: [dov, marisol, abe, tomasz, per],
    kits: [{ kitId: kit.id, count: null }],
    consumableRates: [
      { item: 'shot', amount: 0.4, unit: 'kg', per: 'm2', statedBy: 'Abe Kowalczyk, counted on the last floor' },
      { item: 'cartridges', amount: 2, unit: 'pieces', per: 'person', statedBy: 'the change schedule of the kit' },
    ],
    tasks: [
      task('inspection', [on(dov, at(6, 30), at(7)), on(dov, at(9, 30), at(10))]),
      task('floor-grinding', [on(dov, at(7), at(9, 10))], { equipmentId: machines.grinder, collectorId: machines.grinderCollector, dustMethod: 'vacuum' }),
      task('edge-grinding', [on(marisol, at(7), at(7, 45))], { equipmentId: machines.edger, collectorId: machines.edgerVacuum, dustMethod: 'vacuum' }),
      task('collector-emptying', [on(marisol, at(7, 55), at(9))], { equipmentId: machines.grinderCollector }),
      task('shot-blasting', [on(abe, at(9, 30), at(12))], { equipmentId: machines.blaster, collectorId: machines.blasterCollector, dustMethod: 'vacuum' }),
      task('powder-mixing', [on(marisol, at(12, 36), at(14, 5)), on(tomasz, at(12, 36), at(14, 5))], { equipmentId: machines.mixer, collectorId: machines.mixerExtraction, dustMethod: 'vacuum', kitId: kit.id }),
      task('spreading', [on(dov, at(12, 42), at(14, 12))], { kitId: kit.id }),
      task('shot-pick-up', [on(abe, at(12, 42), at(13, 35))]),
      task('clean-up', [on(dov, at(14, 12), at(15)), on(marisol, at(14, 12), at(15)), on(abe, at(14, 12), at(15)), on(tomasz, at(14, 12), at(15)), on(per, at(14, 12), at(15))]),
    ],
  };
}

function freightDay(idOf: Ids, machines: Machines): ShiftPlan {
  const [per, tomasz] = ['Per Aldana', 'Tomasz Reyes'].map(idOf) as [string, string];
  return {
    competentPersonId: per,
    personIds: [per, tomasz],
    kits: [],
    tasks: [
      { ...bare, id: newId(), kind: 'floor-grinding', assignments: [{ personId: per, startMinute: at(7), endMinute: at(10, 25) }], equipmentId: machines.grinder, collectorId: machines.grinderCollector, dustMethod: 'vacuum' },
      { ...bare, id: newId(), kind: 'clean-up', assignments: [{ personId: tomasz, startMinute: at(10, 25), endMinute: at(11, 30) }, { personId: per, startMinute: at(10, 25), endMinute: at(11, 30) }] },
    ],
  };
}

function kitchenDay(idOf: Ids, machines: Machines): ShiftPlan {
  const junie = idOf('Junie Okafor');
  return {
    competentPersonId: null,
    personIds: [junie],
    kits: [],
    tasks: [{ ...bare, id: newId(), kind: 'floor-grinding', assignments: [{ personId: junie, startMinute: at(8), endMinute: at(11) }], equipmentId: machines.grinder, collectorId: machines.grinderCollector, dustMethod: 'vacuum' }],
  };
}

/** A made-up signature: a wave whose shape follows from the name. */
function scribble(name: string): { points: { x: number; y: number; time: number; pressure: number }[] }[] {
  const seed = [...name].reduce((sum, letter) => (sum * 31 + letter.charCodeAt(0)) % 9973, 7);
  const points = Array.from({ length: 60 }, (_, step) => ({
    x: 40 + step * 7,
    y: 90 + Math.sin(step / (2 + (seed % 5) / 2)) * (40 - step / 3) + Math.cos(step / (1.3 + (seed % 7) / 5)) * 14,
    time: step * 12,
    pressure: 0.5,
  }));
  return [{ points }];
}

function raise(what: string): never {
  throw new Error(what);
}
