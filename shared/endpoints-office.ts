import { pageOf, type Role } from './common';
import { Equipment, EquipmentEdit } from './equipment';
import { AddShift, Job, JobEdit, JobSummary, JobsQuery, PublishedVersion, Shift, ShiftPlan, SignBasis } from './jobs';
import { PeopleQuery, Person, PersonEdit, PinEvent, PinEventsQuery, SetLogin, StartPin } from './people';
import { AddProduct, Kit, KitEdit, Product, ProductsQuery } from './products';
import { ChangePassword, KeepUnit, Session, SignIn } from './session';
import { ConfirmSheet, Revision, RevisionSummary, SheetEdit, SheetsQuery, UploadedSheet } from './sheets';
import { AddTablet, PairingCode, Tablet } from './tablets';
import { Today } from './today';
import { PageQuery } from './common';
import { type Endpoint } from './endpoints';

const everyone: readonly Role[] = ['owner', 'safety-officer', 'crew-lead', 'auditor'];
const office: readonly Role[] = ['owner', 'safety-officer', 'crew-lead'];
const officer: readonly Role[] = ['safety-officer'];
const officerOrLead: readonly Role[] = ['safety-officer', 'crew-lead'];
const administration: readonly Role[] = ['owner', 'safety-officer'];
const owner: readonly Role[] = ['owner'];

export const sessionEndpoints = {
  signIn: { method: 'POST', path: '/api/session', access: 'public', body: SignIn, answer: Session },
  readSession: { method: 'GET', path: '/api/session', access: everyone, answer: Session },
  signOut: { method: 'DELETE', path: '/api/session', access: everyone, answer: 'nothing' },
  changePassword: { method: 'PUT', path: '/api/session/password', access: everyone, body: ChangePassword, answer: 'nothing' },
  keepUnit: { method: 'PUT', path: '/api/session/unit', access: everyone, body: KeepUnit, answer: 'nothing' },
  readToday: { method: 'GET', path: '/api/today', access: office, answer: Today },
} as const satisfies Record<string, Endpoint>;

export const peopleEndpoints = {
  listPeople: { method: 'GET', path: '/api/people', access: everyone, query: PeopleQuery, answer: pageOf(Person) },
  addPerson: { method: 'POST', path: '/api/people', access: administration, body: PersonEdit, answer: Person },
  readPerson: { method: 'GET', path: '/api/people/:personId', access: everyone, answer: Person },
  editPerson: { method: 'PUT', path: '/api/people/:personId', access: administration, body: PersonEdit, answer: Person, needsVersion: true },
  setLogin: { method: 'PUT', path: '/api/people/:personId/login', access: owner, body: SetLogin, answer: Person },
  giveStartPin: { method: 'POST', path: '/api/people/:personId/start-pin', access: administration, answer: StartPin },
  listPinEvents: { method: 'GET', path: '/api/pin-events', access: ['owner', 'safety-officer', 'auditor'], query: PinEventsQuery, answer: pageOf(PinEvent) },
  resetPin: { method: 'DELETE', path: '/api/people/:personId/pin', access: administration, answer: Person },
  listTablets: { method: 'GET', path: '/api/tablets', access: office, query: PageQuery, answer: pageOf(Tablet) },
  addTablet: { method: 'POST', path: '/api/tablets', access: administration, body: AddTablet, answer: PairingCode },
  renewPairingCode: { method: 'POST', path: '/api/tablets/:tabletId/pairing-code', access: administration, answer: PairingCode },
  withdrawTablet: { method: 'DELETE', path: '/api/tablets/:tabletId', access: administration, answer: Tablet },
  listEquipment: { method: 'GET', path: '/api/equipment', access: office, query: PageQuery, answer: pageOf(Equipment) },
  addEquipment: { method: 'POST', path: '/api/equipment', access: officerOrLead, body: EquipmentEdit, answer: Equipment },
  editEquipment: { method: 'PUT', path: '/api/equipment/:equipmentId', access: officerOrLead, body: EquipmentEdit, answer: Equipment, needsVersion: true },
} as const satisfies Record<string, Endpoint>;

export const libraryEndpoints = {
  listSheets: { method: 'GET', path: '/api/sheets', access: everyone, query: SheetsQuery, answer: pageOf(RevisionSummary) },
  uploadSheet: { method: 'POST', path: '/api/sheets', access: office, body: 'file', answer: UploadedSheet },
  readRevision: { method: 'GET', path: '/api/sheets/:revisionId', access: everyone, answer: Revision },
  readRevisionFile: { method: 'GET', path: '/api/sheets/:revisionId/file', access: everyone, answer: 'bytes' },
  saveRevision: { method: 'PUT', path: '/api/sheets/:revisionId', access: officer, body: SheetEdit, answer: Revision, needsVersion: true },
  confirmRevision: { method: 'POST', path: '/api/sheets/:revisionId/confirmation', access: officer, body: ConfirmSheet, answer: Revision, needsVersion: true },
  setRevisionAside: { method: 'POST', path: '/api/sheets/:revisionId/set-aside', access: officer, answer: Revision, needsVersion: true },
  takeRevisionBack: { method: 'DELETE', path: '/api/sheets/:revisionId/set-aside', access: officer, answer: Revision, needsVersion: true },
  readRevisionAgain: { method: 'POST', path: '/api/sheets/:revisionId/reading', access: officer, answer: Revision },
  listProducts: { method: 'GET', path: '/api/products', access: everyone, query: ProductsQuery, answer: pageOf(Product) },
  readProduct: { method: 'GET', path: '/api/products/:productId', access: everyone, answer: Product },
  addProduct: { method: 'POST', path: '/api/products', access: officer, body: AddProduct, answer: Product },
  listKits: { method: 'GET', path: '/api/kits', access: everyone, query: PageQuery, answer: pageOf(Kit) },
  addKit: { method: 'POST', path: '/api/kits', access: officer, body: KitEdit, answer: Kit },
  readKit: { method: 'GET', path: '/api/kits/:kitId', access: everyone, answer: Kit },
  editKit: { method: 'PUT', path: '/api/kits/:kitId', access: officer, body: KitEdit, answer: Kit, needsVersion: true },
} as const satisfies Record<string, Endpoint>;

export const jobEndpoints = {
  listJobs: { method: 'GET', path: '/api/jobs', access: everyone, query: JobsQuery, answer: pageOf(JobSummary) },
  addJob: { method: 'POST', path: '/api/jobs', access: officerOrLead, body: JobEdit, answer: Job },
  readJob: { method: 'GET', path: '/api/jobs/:jobId', access: everyone, answer: Job },
  editJob: { method: 'PUT', path: '/api/jobs/:jobId', access: officerOrLead, body: JobEdit, answer: Job, needsVersion: true },
  addShift: { method: 'POST', path: '/api/jobs/:jobId/shifts', access: officerOrLead, body: AddShift, answer: Shift },
  readShift: { method: 'GET', path: '/api/shifts/:shiftId', access: everyone, answer: Shift },
  editShiftPlan: { method: 'PUT', path: '/api/shifts/:shiftId/plan', access: officerOrLead, body: ShiftPlan, answer: Shift, needsVersion: true },
  signBasis: { method: 'POST', path: '/api/shifts/:shiftId/bases', access: officer, body: SignBasis, answer: Shift },
  publishShift: { method: 'POST', path: '/api/shifts/:shiftId/publication', access: officerOrLead, answer: PublishedVersion, needsVersion: true },
  readText: { method: 'GET', path: '/api/checklist-versions/:versionId/texts/:language', access: everyone, answer: 'bytes' },
} as const satisfies Record<string, Endpoint>;
