import { randomBytes } from 'node:crypto';
import { sql } from 'drizzle-orm';
import supertest from 'supertest';
import { v7 as newId } from 'uuid';
import { organisations } from '#drizzle/schema/organisations';
import { people } from '#drizzle/schema/people';
import { type Role } from '#shared/common';
import { type Equipment } from '#shared/equipment';
import { type Job, type PublishedVersion, type Shift, type ShiftPlan } from '#shared/jobs';
import { type Person, type PersonEdit } from '#shared/people';
import { type Kit } from '#shared/products';
import { type Revision, type SheetEdit } from '#shared/sheets';
import { localDate } from '#server/jobs/jobs-service';
import { hashPassword } from '#server/session/passwords';
import { ok, type Agent } from './call';
import { collectorEdit, equipmentEdit, jobEdit, kitEdit, personEdit, sheetEdit } from './edits';
import { ownOrigin, type Service } from './service';
import { pairTablet, type TestTablet } from './tablet';

export const testPassword = 'plaster brass terrazzo';
let passwordHash: Promise<string> | undefined;
let addresses = 0;
const network = `fd00:${randomBytes(6).toString('hex').replace(/(.{4})(?=.)/g, '$1:')}`;

export interface SignedIn {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly agent: Agent;
}
export interface PublishedDay {
  readonly job: Job;
  readonly shift: Shift;
  readonly version: PublishedVersion;
  readonly grinder: Equipment;
  readonly collector: Equipment;
  readonly grindingTaskId: string;
  readonly cleaningTaskId: string;
}

/** An agent that calls like a page of the service's own, from an address nobody else has. */
export function pageAgent(service: Service, address = freshAddress()): Agent {
  const agent = supertest.agent(service.server);
  void agent.set('Origin', ownOrigin).set('X-Forwarded-For', address);
  return agent;
}
/** Of a network that is this file's alone: the database counts guesses for longer than one file runs. */
export const freshAddress = (): string => `${network}::${(addresses += 1).toString(16)}`;

/** A fresh organisation with an owner, an officer, a lead and an auditor, each signed in; what it needs is built through the API. */
export class Organisation {
  readonly address = freshAddress();
  private madeSheets = 0;
  constructor(
    readonly service: Service,
    readonly id: string,
    readonly name: string,
    readonly owner: SignedIn,
    readonly officer: SignedIn,
    readonly lead: SignedIn,
    readonly auditor: SignedIn,
  ) {}

  get signedIn(): Readonly<Record<Role, SignedIn>> {
    return { owner: this.owner, 'safety-officer': this.officer, 'crew-lead': this.lead, auditor: this.auditor };
  }
  today(timeZone = 'America/Chicago'): string {
    return localDate(this.service.clock.now(), timeZone);
  }

  person(name: string, changes: Partial<PersonEdit> = {}): Promise<Person> {
    return ok(this.owner.agent, 'addPerson', { body: personEdit(name, changes) });
  }
  /** A further signed-in person of a role. */
  async signIn(name: string, role: Role): Promise<SignedIn> {
    const person = await this.person(name);
    const email = `${newId()}@marrowslate.example`;
    await ok(this.owner.agent, 'setLogin', { params: { personId: person.id }, body: { login: { email, role, password: testPassword } } });
    const agent = pageAgent(this.service, this.address);
    await ok(agent, 'signIn', { body: { email, password: testPassword } });
    return { personId: person.id, name, email, role, agent };
  }
  tablet(name = 'Tablet 1'): Promise<TestTablet> {
    return pairTablet(this, name);
  }

  /** A file nobody sent before; not a PDF, so it waits for entry by hand at once. */
  async sheetToEnter(): Promise<Revision> {
    const bytes = Buffer.from(`A sheet as plain text, number ${(this.madeSheets += 1)} of ${this.id}`);
    const { revision } = await ok(this.officer.agent, 'uploadSheet', { file: { bytes, fileName: 'typed-sheet.txt' } });
    return ok(this.officer.agent, 'readRevision', { params: { revisionId: revision.id } });
  }
  async confirmedSheet(changes: Partial<SheetEdit> = {}): Promise<Revision> {
    const { id, version } = await this.sheetToEnter();
    const fields = sheetEdit(changes);
    return ok(this.officer.agent, 'confirmRevision', { params: { revisionId: id }, version, body: { fields, product: { name: fields.productName, supplier: fields.supplier } } });
  }
  async kit(): Promise<Kit> {
    const sheet = await this.confirmedSheet();
    return ok(this.officer.agent, 'addKit', { body: kitEdit(sheet.productId ?? '') });
  }
  job(): Promise<Job> {
    return ok(this.officer.agent, 'addJob', { body: jobEdit() });
  }

  /** A job with today's shift of grinding (ready under Table 1) and cleaning up, by the lead and `crew`; not yet published. */
  async plannedDay({ crew = [], kits = [], date = this.today() }: { crew?: readonly string[]; kits?: readonly string[]; date?: string } = {}): Promise<Omit<PublishedDay, 'version'>> {
    const { agent } = this.officer;
    const [job, grinder, collector] = [await this.job(), await ok(agent, 'addEquipment', { body: equipmentEdit() }), await ok(agent, 'addEquipment', { body: collectorEdit() })];
    const made = await ok(agent, 'addShift', { params: { jobId: job.id }, body: { date, copyFromShiftId: null } });
    const [grindingTaskId, cleaningTaskId] = [newId(), newId()];
    const lead = this.lead.personId;
    const bare = { equipmentId: null, collectorId: null, dustMethod: null, kitId: null };
    const plan: ShiftPlan = {
      competentPersonId: lead,
      personIds: [lead, ...crew],
      kits: kits.map((kitId) => ({ kitId, count: null })),
      tasks: [
        { ...bare, id: grindingTaskId, kind: 'floor-grinding', assignments: [{ personId: lead, startMinute: 420, endMinute: 550 }], equipmentId: grinder.id, collectorId: collector.id, dustMethod: 'vacuum', kitId: kits[0] ?? null },
        { ...bare, id: cleaningTaskId, kind: 'clean-up', assignments: [lead, ...crew].map((personId) => ({ personId, startMinute: 600, endMinute: 660 })) },
      ],
    };
    const shift = await ok(agent, 'editShiftPlan', { params: { shiftId: made.id }, version: made.version, body: plan });
    return { job, shift, grinder, collector, grindingTaskId, cleaningTaskId };
  }
  async publishedDay(options: { crew?: readonly string[]; kits?: readonly string[]; date?: string } = {}): Promise<PublishedDay> {
    const planned = await this.plannedDay(options);
    return { ...planned, version: await this.publish(planned.shift) };
  }
  publish(shift: Pick<Shift, 'id' | 'version'>): Promise<PublishedVersion> {
    return ok(this.officer.agent, 'publishShift', { params: { shiftId: shift.id }, version: shift.version });
  }
  /** Changes a fact of the site and publishes again. */
  async publishAgain(day: PublishedDay, hostHazards: string): Promise<PublishedVersion> {
    const { agent } = this.officer;
    const { id: _, version, shifts: __, ...edit } = await ok(agent, 'readJob', { params: { jobId: day.job.id } });
    await ok(agent, 'editJob', { params: { jobId: day.job.id }, version, body: { ...edit, site: { ...edit.site, hostHazards } } });
    return this.publish(await ok(agent, 'readShift', { params: { shiftId: day.shift.id } }));
  }
}

export async function makeOrganisation(service: Service, name = 'Marrow & Slate Floors'): Promise<Organisation> {
  const id = newId();
  const hash = await (passwordHash ??= hashPassword(testPassword));
  const address = freshAddress();
  const names: readonly [string, Role][] = [['Hazel Marrow', 'owner'], ['Ines Halloran', 'safety-officer'], ['Dov Lindqvist', 'crew-lead'], ['Wilma Brandt-Osei', 'auditor']];
  const logins = names.map(([personName, role]) => ({ personId: newId(), name: personName, role, email: `${role}-${id}@marrowslate.example`, agent: pageAgent(service, address) }));
  await service.deps.database.inOrganisation(id, async (tx) => {
    await tx.insert(organisations).values({ organisationId: id, name, auditorEmails: [], phone: '555-0142' });
    await tx.insert(people).values(logins.map((login) => ({ organisationId: id, id: login.personId, ...personEdit(login.name) })));
    for (const { personId, email, role } of logins) await tx.execute(sql`SELECT door_set_login(${personId}, ${email}, ${role}, ${hash})`);
  });
  await Promise.all(logins.map(({ agent, email }) => ok(agent, 'signIn', { body: { email, password: testPassword } })));
  const [owner, officer, lead, auditor] = logins as [SignedIn, SignedIn, SignedIn, SignedIn];
  return new Organisation(service, id, name, owner, officer, lead, auditor);
}
