import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { call, expectProblem, ok } from '#test/support/call';
import { editOf, equipmentEdit, personEdit } from '#test/support/edits';
import { makeOrganisation, pageAgent } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

let service: Service;
beforeAll(async () => {
  service = await startService();
});
afterAll(() => service.stop());

describe('people', () => {
  it('are added, found, read and edited; another organisation sees none of them', async () => {
    const { owner, officer, lead } = await makeOrganisation(service);
    const added = await ok(officer.agent, 'addPerson', { body: personEdit('Abe Kowalczyk') });
    expect(added).toMatchObject({ ...personEdit('Abe Kowalczyk'), version: 1, hasPin: false, login: null });
    expect((await ok(lead.agent, 'listPeople', { query: { q: 'kowal' } })).items).toEqual([added]);
    const edited = await ok(owner.agent, 'editPerson', { params: { personId: added.id }, version: 1, body: personEdit('Abe Kowalczyk', { employer: 'Harbor Street Crew' }) });
    expect(edited).toEqual({ ...added, employer: 'Harbor Street Crew', version: 2 });
    expect(expectProblem(await call(officer.agent, 'editPerson', { params: { personId: added.id }, version: 1, body: personEdit('Abe K') }), 412).current).toEqual(edited);
    const other = await makeOrganisation(service);
    expect((await ok(other.owner.agent, 'listPeople', { query: { q: 'kowal' } })).items).toEqual([]);
    expectProblem(await call(other.owner.agent, 'readPerson', { params: { personId: added.id } }), 404);
    expectProblem(await call(other.owner.agent, 'editPerson', { params: { personId: added.id }, version: 2, body: personEdit('Ours') }), 404);
    expectProblem(await call(other.owner.agent, 'setLogin', { params: { personId: added.id }, body: { login: null } }), 404);
    expect(await ok(owner.agent, 'readPerson', { params: { personId: added.id } })).toEqual(edited);
  });

  it('keep an owner: an officer cannot make one inactive, and nobody the last one', async () => {
    const { owner, officer } = await makeOrganisation(service);
    const person = await ok(owner.agent, 'readPerson', { params: { personId: owner.personId } });
    const { id, version } = person;
    const inactive = { params: { personId: id }, version, body: { ...editOf(person), isActive: false } };
    expectProblem(await call(officer.agent, 'editPerson', inactive), 403);
    expectProblem(await call(owner.agent, 'editPerson', inactive), 422);
    expect(await ok(owner.agent, 'readPerson', { params: { personId: id } })).toMatchObject({ isActive: true, login: { role: 'owner' } });
  });

  it('with script, SQL and wild cards in their names are stored and shown as text (F20)', async () => {
    const { owner, lead } = await makeOrganisation(service);
    const names = ['<script>alert(1)</script>', "Robert'); DROP TABLE people; --", '100 % _ \\ "quoted"', 'Ñandú Šárka 李 🧱', '{{constructor}}', '=1+1'];
    for (const name of names) expect((await ok(owner.agent, 'addPerson', { body: personEdit(name) })).name).toBe(name);
    for (const name of names) expect((await ok(lead.agent, 'listPeople', { query: { q: name } })).items.map((person) => person.name)).toEqual([name]);
    expect((await ok(lead.agent, 'listPeople', { query: { q: '%' } })).items.map((person) => person.name)).toEqual(['100 % _ \\ "quoted"']);
  });

  it('come in pages by name without gap or double, also where names are long, alike or not Latin', async () => {
    const { owner } = await makeOrganisation(service);
    const names = ['李'.repeat(120), '李'.repeat(120), 'x'.repeat(120), 'Zoë', 'zoe', 'Émile', 'Emil', '"Q"', 'a', 'a'];
    for (const name of names) await ok(owner.agent, 'addPerson', { body: personEdit(name) });
    const seen: string[] = [];
    for (let after: string | undefined; ; ) {
      const page = await ok(owner.agent, 'listPeople', { query: { limit: 3, ...(after ? { after } : {}) } });
      seen.push(...page.items.map(({ id }) => id));
      if (!page.next) break;
      after = page.next;
    }
    const whole = (await ok(owner.agent, 'listPeople', { query: { limit: 100 } })).items.map(({ id }) => id);
    expect(whole).toHaveLength(names.length + 4);
    expect(seen).toEqual(whole);
  });
});

describe('a machine', () => {
  it('edited by two people shows the second what is stored; another organisation does not find it', async () => {
    const { officer, lead } = await makeOrganisation(service);
    const machine = await ok(lead.agent, 'addEquipment', { body: equipmentEdit() });
    const params = { equipmentId: machine.id };
    const saved = await ok(officer.agent, 'editEquipment', { params, version: 1, body: equipmentEdit({ name: 'Grinder G2' }) });
    expect(expectProblem(await call(lead.agent, 'editEquipment', { params, version: 1, body: equipmentEdit({ name: 'Grinder G3' }) }), 412).current).toEqual(saved);
    const other = await makeOrganisation(service);
    expectProblem(await call(other.officer.agent, 'editEquipment', { params, version: 2, body: equipmentEdit() }), 404);
    expect((await ok(other.officer.agent, 'listEquipment')).items).toEqual([]);
    expect((await ok(officer.agent, 'listEquipment')).items).toEqual([saved]);
  });
});

describe('a tablet', () => {
  it('is paired once by its code, however it is typed; the code opens no second one', async () => {
    const { owner, officer } = await makeOrganisation(service);
    const { code, tablet } = await ok(owner.agent, 'addTablet', { body: { name: 'Tablet 1' } });
    expect(tablet).toMatchObject({ isPaired: false, pairedAt: null, lastHeardAt: null });
    const agent = pageAgent(service);
    const response = await call(agent, 'pairTablet', { body: { code: ` ${code.toLowerCase().replace(' ', '-')} ` } });
    expect(response.body).toEqual({ tabletId: tablet.id, name: 'Tablet 1', organisationName: 'Marrow & Slate Floors' });
    expect(String(response.headers['set-cookie'])).toMatch(/^kneeboard_tablet=[\w-]{43};.*Path=\/api\/tablet;.*HttpOnly; SameSite=Strict/);
    expect(await ok(agent, 'readTabletDay')).toMatchObject({ tablet: { id: tablet.id }, organisationName: 'Marrow & Slate Floors', officerName: 'Ines Halloran', officerPhone: '555-0142', jobs: [] });
    const second = pageAgent(service);
    expectProblem(await call(second, 'pairTablet', { body: { code } }), 422);
    expectProblem(await call(second, 'readTabletDay'), 401);
    expect((await ok(officer.agent, 'listTablets')).items).toMatchObject([{ id: tablet.id, isPaired: true, lastHeardAt: expect.any(String), withdrawnAt: null }]);
  });

  it('is not paired by a code of eleven minutes ago', async () => {
    const { owner } = await makeOrganisation(service);
    const { code, expiresAt } = await ok(owner.agent, 'addTablet', { body: { name: 'Tablet 1' } });
    expect(Date.parse(expiresAt) - service.clock.now().getTime()).toBeLessThanOrEqual(10 * 60_000);
    service.clock.offsetMs = 11 * 60_000;
    try {
      expectProblem(await call(pageAgent(service), 'pairTablet', { body: { code } }), 422);
    } finally {
      service.clock.offsetMs = 0;
    }
  });

  it('paired anew makes the old device worthless; withdrawn, it opens nothing and cannot be paired again', async () => {
    const organisation = await makeOrganisation(service);
    const { owner } = organisation;
    const old = await organisation.tablet();
    const params = { tabletId: old.id };
    const { code } = await ok(owner.agent, 'renewPairingCode', { params });
    await ok(old.agent, 'readTabletDay');
    const next = pageAgent(service);
    await ok(next, 'pairTablet', { body: { code } });
    expectProblem(await call(old.agent, 'readTabletDay'), 401);
    const { code: unused } = await ok(owner.agent, 'renewPairingCode', { params });
    expect(await ok(owner.agent, 'withdrawTablet', { params })).toMatchObject({ isPaired: false, withdrawnAt: expect.any(String) });
    expectProblem(await call(next, 'readTabletDay'), 401);
    expectProblem(await call(pageAgent(service), 'pairTablet', { body: { code: unused } }), 422);
    expectProblem(await call(owner.agent, 'renewPairingCode', { params }), 422);
    const other = await makeOrganisation(service);
    expectProblem(await call(other.owner.agent, 'withdrawTablet', { params }), 404);
    expectProblem(await call(other.owner.agent, 'renewPairingCode', { params }), 404);
  });

  it('is not found by guessing codes: after five wrong ones the address waits (F27)', async () => {
    const { owner } = await makeOrganisation(service);
    const { code } = await ok(owner.agent, 'addTablet', { body: { name: 'Tablet 1' } });
    const guesser = pageAgent(service);
    for (let tries = 0; tries < 6; tries += 1) expectProblem(await call(guesser, 'pairTablet', { body: { code: `AAAA AAA${tries + 2}` } }), 422);
    expectProblem(await call(guesser, 'pairTablet', { body: { code } }), 429);
    await ok(pageAgent(service), 'pairTablet', { body: { code } });
  });

  it('shows the day by the local date at the job, and a night shift until its end (F31)', async () => {
    const organisation = await makeOrganisation(service);
    const tablet = await organisation.tablet();
    const chicago = organisation.today();
    await organisation.publishedDay({ date: chicago });
    const midnight = Date.parse(`${chicago}T00:00:00Z`) + 24 * 3600_000;
    // Superior, Wisconsin is five or six hours behind UTC: at 00:30 UTC it is still the day before there.
    const at = async (instant: number) => {
      service.clock.offsetMs = instant - Date.now();
      try {
        return (await ok(tablet.agent, 'readTabletDay')).jobs.map(({ date }) => date);
      } finally {
        service.clock.offsetMs = 0;
      }
    };
    expect(await at(midnight + 30 * 60_000)).toEqual([chicago]);
    expect(await at(midnight + 12 * 3600_000)).toEqual([]);
  });
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
