import { v7 as newId } from 'uuid';
import { makeLink } from '#server/platform/links';
import { emptyReading } from '#server/sds/reader/reading';
import { readSheetWork } from '#server/sds/sheets-work';
import { type EndpointName } from '#shared/endpoints';
import { type CallInput, type Agent, ok } from './call';
import { equipmentEdit, jobEdit, kitEdit, personEdit, sheetEdit } from './edits';
import { testPassword } from './organisation';
import { type World } from './world';

/** A request that the contract allows, ready to be spoilt. `agent` where a session of its own is needed. */
export type Example = CallInput & { readonly agent?: Agent };

const officerOf = (world: World): Agent => world.organisation.officer.agent;

/** One good request for every row of the contract. What a request uses up is made afresh each time. */
export const examples: Record<EndpointName, (world: World) => Promise<Example> | Example> = {
  signIn: ({ organisation }) => ({ body: { email: organisation.owner.email, password: testPassword } }),
  readSession: () => ({}),
  signOut: async ({ organisation }) => ({ agent: (await organisation.signIn('Junie Okafor', 'auditor')).agent }),
  changePassword: async ({ organisation }) => ({ agent: (await organisation.signIn('Junie Okafor', 'auditor')).agent, body: { current: testPassword, next: 'quarry lantern 40 mortar' } }),
  keepUnit: () => ({ body: { quantity: 'area', unit: 'm2' } }),
  readToday: () => ({}),
  listPeople: () => ({ query: { limit: 2, q: 'a' } }),
  addPerson: () => ({ body: personEdit('Abe Kowalczyk') }),
  readPerson: ({ ids }) => ({ params: pick(ids, 'personId') }),
  editPerson: async ({ organisation }) => {
    const { id, version } = await organisation.person('Tomasz Reyes');
    return { params: { personId: id }, version, body: personEdit('Tomasz Reyes', { language: 'es' }) };
  },
  setLogin: async ({ organisation }) => ({ params: { personId: (await organisation.person('Per Aldana')).id }, body: { login: { email: `${newId()}@marrowslate.example`, role: 'crew-lead', password: testPassword } } }),
  giveStartPin: async ({ organisation }) => ({ params: { personId: (await organisation.person('Per Aldana')).id } }),
  listPinEvents: ({ ids }) => ({ query: { limit: 1, personId: ids['leadId'] ?? '' } }),
  resetPin: ({ ids }) => ({ params: pick(ids, 'personId') }),
  listTablets: () => ({ query: { limit: 1 } }),
  addTablet: () => ({ body: { name: 'Tablet 9' } }),
  renewPairingCode: async ({ organisation }) => ({ params: { tabletId: (await ok(organisation.owner.agent, 'addTablet', { body: { name: 'Tablet 8' } })).tablet.id } }),
  withdrawTablet: async ({ organisation }) => ({ params: { tabletId: (await ok(organisation.owner.agent, 'addTablet', { body: { name: 'Tablet 7' } })).tablet.id } }),
  listEquipment: () => ({ query: { limit: 1 } }),
  addEquipment: () => ({ body: equipmentEdit({ airflow: { airflowM3PerH: 600, instrument: 'vane anemometer', place: 'at the shroud', filterState: 'new', takenBy: 'Dov Lindqvist', takenOn: '2026-11-30' } }) }),
  editEquipment: async (world) => {
    const { id, version } = await ok(officerOf(world), 'addEquipment', { body: equipmentEdit() });
    return { params: { equipmentId: id }, version, body: equipmentEdit({ hasManualOnFile: false }) };
  },
  listSheets: () => ({ query: { limit: 1, state: 'confirmed' } }),
  uploadSheet: () => ({ file: { bytes: Buffer.from(`%PDF-1.4 ${newId()}`), fileName: 'sheet.pdf' } }),
  readRevision: ({ ids }) => ({ params: pick(ids, 'revisionId') }),
  readRevisionFile: ({ ids }) => ({ params: pick(ids, 'revisionId') }),
  saveRevision: async ({ organisation }) => {
    const { id, version } = await organisation.sheetToEnter();
    return { params: { revisionId: id }, version, body: sheetEdit() };
  },
  confirmRevision: async ({ organisation, ids }) => {
    const { id, version } = await organisation.sheetToEnter();
    // Older than the one that counts, so that it does not take its place.
    const fields = sheetEdit({ revisedOn: '2019-03-18' });
    return { params: { revisionId: id }, version, body: { fields, product: { id: ids['productId'] } } };
  },
  setRevisionAside: async ({ organisation }) => {
    const { id, version } = await organisation.sheetToEnter();
    return { params: { revisionId: id }, version };
  },
  takeRevisionBack: async (world) => {
    const { id, version } = await world.organisation.sheetToEnter();
    const aside = await ok(officerOf(world), 'setRevisionAside', { params: { revisionId: id }, version });
    return { params: { revisionId: id }, version: aside.version };
  },
  readRevisionAgain: async (world) => {
    const { revision } = await ok(officerOf(world), 'uploadSheet', { file: { bytes: Buffer.from(`%PDF-1.4 again ${newId()}`), fileName: 'sheet.pdf' } });
    return { params: { revisionId: revision.id } };
  },
  searchSheets: () => ({ query: { limit: 1, q: 'quarrybond' } }),
  readReach: ({ ids }) => ({ params: pick(ids, 'revisionId') }),
  applyRevision: ({ ids }) => ({ params: pick(ids, 'revisionId') }),
  listProductUses: ({ ids }) => ({ query: { limit: 1, jobId: ids['jobId'] ?? '', productId: ids['productId'] ?? '' } }),
  listLibraryTasks: () => ({ query: { limit: 1 } }),
  readLibraryPolicy: () => ({}),
  setLibraryPolicy: () => ({ body: { reviewAfterYears: 3 } }),
  listRequests: ({ ids }) => ({ query: { limit: 1, state: 'open', productId: ids['productId'] ?? '', revisionId: ids['revisionId'] ?? '' } }),
  askSupplier: ({ ids }) => ({ body: { productId: ids['productId'], email: 'sheets@northlode.example', message: 'Please send the current sheet.', language: 'es' } }),
  draftReturn: ({ ids }) => ({ params: pick(ids, 'revisionId') }),
  returnSheet: async ({ organisation }) => {
    const { id, version } = await organisation.sheetToEnter();
    return { params: { revisionId: id }, version, body: { productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.', email: 'sheets@northlode.example', message: 'Section 14 is missing.', language: 'en', isSetAside: true } };
  },
  withdrawRequest: async (world) => ({ params: { requestId: (await openRequest(world)).id } }),
  openRequest: async (world) => ({ body: { token: (await openRequest(world)).token } }),
  answerRequest: async (world) => ({ headers: { 'X-Kneeboard-Link': (await openRequest(world)).token }, file: { bytes: Buffer.from(`%PDF-1.4 answer ${newId()}`), fileName: 'sheet.pdf' } }),
  listSuggestions: ({ ids }) => ({ params: pick(ids, 'revisionId') }),
  listCorrections: () => ({ query: { limit: 1 } }),
  removeCorrection: async (world) => ({ params: { correctionId: await rememberedCorrection(world) } }),
  uploadZip: async (world) => ({ file: { bytes: await ok(officerOf(world), 'exportSheetsZip'), fileName: 'sheets.zip' } }),
  exportSheetsZip: () => ({}),
  exportProductsCsv: () => ({}),
  previewImport: () => ({ file: { bytes: Buffer.from('name,supplier\r\nQuarrybond 41,"Northlode Resins, Inc."\r\n'), fileName: 'products.csv' } }),
  importProducts: () => ({ body: { products: [{ name: `Quarrybond ${newId()}`, supplier: 'Northlode Resins, Inc.' }] } }),
  readSiteCode: ({ ids }) => ({ params: pick(ids, 'jobId') }),
  makeSiteCode: ({ ids }) => ({ params: pick(ids, 'jobId') }),
  revokeSiteCode: async ({ organisation }) => ({ params: { jobId: (await organisation.job()).id } }),
  openSite: async (world) => ({ body: { token: await siteToken(world) } }),
  readSiteSheet: async (world) => ({ headers: { 'X-Kneeboard-Link': await siteToken(world) }, params: pick(world.ids, 'revisionId') }),
  readKitLabel: ({ ids }) => ({ params: pick(ids, 'kitId'), query: { state: 'wet' } }),
  readProductLabel: ({ ids }) => ({ params: pick(ids, 'productId') }),
  listProducts: () => ({ query: { limit: 1 } }),
  readProduct: ({ ids }) => ({ params: pick(ids, 'productId') }),
  addProduct: () => ({ body: { name: `Quarrybond ${newId()}`, supplier: 'Northlode Resins, Inc.' } }),
  listKits: () => ({ query: { limit: 1 } }),
  addKit: ({ ids }) => ({ body: kitEdit(ids['productId'] ?? '') }),
  readKit: ({ ids }) => ({ params: pick(ids, 'kitId') }),
  editKit: async (world) => {
    const edit = kitEdit(world.ids['productId'] ?? '');
    const { id, version } = await ok(officerOf(world), 'addKit', { body: edit });
    return { params: { kitId: id }, version, body: { ...edit, name: 'Quarrybond 40, half' } };
  },
  listJobs: () => ({ query: { limit: 1, isOpen: 'true' } }),
  addJob: () => ({ body: jobEdit() }),
  readJob: ({ ids }) => ({ params: pick(ids, 'jobId') }),
  editJob: async ({ organisation }) => {
    const { id, version } = await organisation.job();
    return { params: { jobId: id }, version, body: jobEdit({ name: 'Process hall floor, east' }) };
  },
  addShift: async ({ organisation, ids }) => ({ params: { jobId: (await organisation.job()).id }, body: { date: '2026-12-04', copyFromShiftId: ids['shiftId'] } }),
  readShift: ({ ids }) => ({ params: pick(ids, 'shiftId') }),
  editShiftPlan: async (world) => {
    const job = await world.organisation.job();
    const { id, version } = await ok(officerOf(world), 'addShift', { params: { jobId: job.id }, body: { date: '2026-12-05', copyFromShiftId: world.ids['shiftId'] } });
    return { params: { shiftId: id }, version, body: world.day.shift.plan };
  },
  signBasis: ({ organisation, ids }) => ({
    params: pick(ids, 'shiftId'),
    body: { taskKind: 'shot-blasting', kind: 'air-samples', exposureMicrogramsPerM3: 38, conditions: 'Closed blaster with its collector, doors closed.', endsOn: '2099-01-31', interimApf: 10, typedName: organisation.officer.name },
  }),
  publishShift: async ({ organisation, ids }) => {
    const { shift } = await organisation.plannedDay({ crew: [ids['personId'] ?? ''] });
    return { params: { shiftId: shift.id }, version: shift.version };
  },
  readText: ({ ids }) => ({ params: pick(ids, 'versionId', 'language') }),
  listActions: ({ ids }) => ({ query: { limit: 1, shiftId: ids['shiftId'] ?? '' } }),
  assignAction: async (world) => {
    const action = await openAction(world);
    return { params: { actionId: action.id }, version: action.version, body: { ownerPersonId: world.ids['personId'] } };
  },
  resolveAction: async (world) => {
    const action = await openAction(world);
    return { params: { actionId: action.id }, version: action.version, body: { evidence: 'Gloves brought from the van; looked at by Dov.' } };
  },
  listKeptAside: () => ({ query: { limit: 1 } }),
  listHistory: ({ ids }) => ({ query: { limit: 1, jobId: ids['jobId'] ?? '' } }),
  exportHistory: ({ ids }) => ({ query: { jobId: ids['jobId'] ?? '' } }),
  readAcknowledgement: ({ ids }) => ({ params: pick(ids, 'acknowledgementId') }),
  checkRecord: () => ({}),
  exportRecord: () => ({}),
  exportEntry: ({ ids }) => ({ params: pick(ids, 'acknowledgementId') }),
  pairTablet: async ({ organisation }) => ({ body: { code: (await ok(organisation.owner.agent, 'addTablet', { body: { name: 'Tablet 6' } })).code } }),
  readTabletDay: ({ tablet }) => ({ agent: tablet.agent }),
  checkPin: async ({ organisation, tablet, day }) => {
    const person = await organisation.person('Tomasz Reyes');
    await tablet.deliver(await tablet.pinSet(person.id, '8642'));
    const textSha256 = day.version.texts[0]?.sha256 ?? '';
    return { agent: tablet.agent, body: { personId: person.id, textSha256, ...(await tablet.seal('8642', textSha256)) } };
  },
  deliver: ({ tablet, day, ids }) => ({ agent: tablet.agent, body: { sentAt: new Date().toISOString(), envelopes: [tablet.couldNotSign(day.version, ids['personId'] ?? '')] } }),
  readTabletSheet: ({ tablet, ids }) => ({ agent: tablet.agent, params: pick(ids, 'revisionId') }),
};

/** A request with the link that its mail would carry. */
async function openRequest(world: World): Promise<{ id: string; token: string }> {
  const { id, expiresAt } = await ok(officerOf(world), 'askSupplier', { body: { productId: world.ids['productId'], email: 'sheets@northlode.example', message: 'Please send the current sheet.', language: 'en' } });
  const { database } = world.organisation.service.deps;
  return { id, token: await database.inOrganisation(world.organisation.id, (tx) => makeLink(tx, 'sheet-request', id, new Date(expiresAt))) };
}
async function siteToken(world: World): Promise<string> {
  const { address } = await ok(officerOf(world), 'makeSiteCode', { params: { jobId: world.ids['jobId'] ?? '' } });
  return address?.split('#')[1] ?? '';
}

/** Learned from a sheet whose supplier the reader took otherwise. */
async function rememberedCorrection({ organisation }: World): Promise<string> {
  const { service, id: organisationId, officer } = organisation;
  const { revision } = await ok(officer.agent, 'uploadSheet', { file: { bytes: Buffer.from(`%PDF-1.4 corrected ${newId()}`), fileName: 'sheet.pdf' } });
  const supplier = { value: 'Northlode Resins Inc Tel', page: 1, box: { x: 0, y: 0, width: 1, height: 1 }, quote: 'Northlode Resins Inc Tel', confidence: 0.6 };
  await readSheetWork(service.deps, { read: () => Promise.resolve({ ...emptyReading('read', 1), supplier, text: 'Northlode Resins Inc Tel' }), close: () => Promise.resolve() })({ organisationId, revisionId: revision.id });
  const params = { revisionId: revision.id };
  const { version } = await ok(officer.agent, 'readRevision', { params });
  await ok(officer.agent, 'saveRevision', { params, version, body: sheetEdit({ supplier: `Northlode Resins ${newId()}` }) });
  return (await ok(officer.agent, 'listCorrections', { query: { limit: 1 } })).items[0]?.id ?? '';
}

async function openAction(world: World) {
  await world.tablet.deliver(world.tablet.couldNotSign(world.day.version, world.ids['personId'] ?? ''));
  const { items } = await ok(officerOf(world), 'listActions', { query: { state: 'open' } });
  const action = items[0];
  if (!action) throw new Error('no action was opened');
  return action;
}

const pick = (ids: Readonly<Record<string, string>>, ...names: readonly string[]): Record<string, string> => Object.fromEntries(names.map((name) => [name, ids[name] ?? '']));
