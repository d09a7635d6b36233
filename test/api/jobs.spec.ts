import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { createHash } from 'node:crypto';
import { v7 as newId } from 'uuid';
import { answerShift } from '#compliance';
import { assembleFacts } from '#shared/jobs';
import { call, expectProblem, ok } from '#test/support/call';
import { jobEdit, kitEdit } from '#test/support/edits';
import { makeOrganisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { entriesOf, verifyExport } from '#test/support/verify-log';

let service: Service;
beforeAll(async () => {
  service = await startService();
});
afterAll(() => service.stop());
const sha256 = (bytes: Uint8Array | string): string => createHash('sha256').update(bytes).digest('hex');

describe('a kit', () => {
  it('unites the hazards of its confirmed sheets and names the part that has none', async () => {
    const { officer, lead, confirmedSheet } = await withSheets();
    const [a, b] = [await confirmedSheet({ productName: 'Part A', hazardCodes: ['H315', 'H317'] }), await confirmedSheet({ productName: 'Part B', hazardCodes: ['H317', 'H334'] })];
    const bare = await ok(officer.agent, 'addProduct', { body: { name: 'Part C', supplier: 'Northlode Resins, Inc.' } });
    const kit = await ok(officer.agent, 'addKit', { body: kitEdit('', { parts: [{ productId: a.productId ?? '', part: 'A', form: 'liquid' }, { productId: b.productId ?? '', part: 'B', form: 'liquid' }, { productId: bare.id, part: 'C', form: 'powder' }] }) });
    expect([...kit.hazardCodes].sort()).toEqual(['H315', 'H317', 'H334']);
    expect(kit.parts.map(({ part, hasSheet }) => [part, hasSheet])).toEqual([['A', true], ['B', true], ['C', false]]);
    expect(await ok(lead.agent, 'readKit', { params: { kitId: kit.id } })).toEqual(kit);
  });

  it('[RES-03] keeps the cartridge schedule and the supplier’s exception as they were written', async () => {
    const organisation = await makeOrganisation(service);
    const kit = await organisation.kit();
    const said = { surfaceException: { writtenBy: 'Northlode Resins, Inc.', reference: 'letter of 3 November 2026', text: 'Coarse grind and one coat of primer.' }, cartridgeSchedule: { change: 'every two hours', basedOn: 'maker’s table' } };
    const saved = await ok(organisation.officer.agent, 'editKit', { params: { kitId: kit.id }, version: kit.version, body: { ...kitEdit(kit.parts[0]?.productId ?? ''), ...said } });
    expect(saved).toMatchObject(said);
    const { shift } = await organisation.plannedDay();
    expect(shift.context.kits.find(({ id }) => id === kit.id)).toMatchObject(said);
  });

  it('edited by two people: the second sees what the first saved, and nothing is lost (F15)', async () => {
    const organisation = await makeOrganisation(service);
    const kit = await organisation.kit();
    const edit = kitEdit(kit.parts[0]?.productId ?? '');
    const saved = await ok(organisation.officer.agent, 'editKit', { params: { kitId: kit.id }, version: kit.version, body: { ...edit, name: 'First' } });
    const refused = expectProblem(await call(organisation.officer.agent, 'editKit', { params: { kitId: kit.id }, version: kit.version, body: { ...edit, name: 'Second' } }), 412);
    expect(refused.current).toEqual(saved);
    expect((await ok(organisation.officer.agent, 'listKits')).items).toEqual([saved]);
  });

  async function withSheets() {
    const organisation = await makeOrganisation(service);
    return { ...organisation, officer: organisation.officer, lead: organisation.lead, confirmedSheet: organisation.confirmedSheet.bind(organisation) };
  }
});

describe('a job and its shifts', () => {
  it('edited by two people at once: one is saved, the other sees both versions (F15)', async () => {
    const { officer, lead, ...organisation } = await makeOrganisation(service).then((each) => ({ officer: each.officer, lead: each.lead, auditor: each.auditor, job: () => each.job() }));
    const job = await organisation.job();
    const answers = await Promise.all([officer, lead].map(({ agent, name }) => call(agent, 'editJob', { params: { jobId: job.id }, version: job.version, body: jobEdit({ name }) })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412]);
    const stored = await ok(organisation.auditor.agent, 'readJob', { params: { jobId: job.id } });
    expect(answers.find(({ status }) => status === 200)?.body).toEqual(stored);
    expect(answers.find(({ status }) => status === 412)?.body.current).toEqual(stored);
    expect(stored.version).toBe(job.version + 1);
  });

  it('has one shift a day; a copied shift has the plan with task ids of its own', async () => {
    const organisation = await makeOrganisation(service);
    const { job, shift } = await organisation.plannedDay();
    const { agent } = organisation.lead;
    expectProblem(await call(agent, 'addShift', { params: { jobId: job.id }, body: { date: shift.date, copyFromShiftId: null } }), 422);
    const copy = await ok(agent, 'addShift', { params: { jobId: job.id }, body: { date: '2027-02-28', copyFromShiftId: shift.id } });
    expect(copy.plan.tasks.map(({ kind, assignments }) => ({ kind, assignments }))).toEqual(shift.plan.tasks.map(({ kind, assignments }) => ({ kind, assignments })));
    expect(copy.plan.tasks.map(({ id }) => id).filter((id) => shift.plan.tasks.some((task) => task.id === id))).toEqual([]);
  });

  it('[SIL-04] keeps the time worked beside the plan, counts it on the other job of the day, and copies none of it (trap 4)', async () => {
    const organisation = await makeOrganisation(service);
    const { job, shift, grindingTaskId } = await organisation.plannedDay();
    const { agent, personId } = organisation.lead;
    const logged = [{ personId, startMinute: 550, endMinute: 790 }];
    const plan = { ...shift.plan, inspectionCoverId: organisation.officer.personId, consumableRates: [{ item: 'diamonds' as const, amount: 0.5, unit: 'pieces' as const, per: 'hour' as const, statedBy: 'the maker’s manual' }], tasks: shift.plan.tasks.map((task) => (task.id === grindingTaskId ? { ...task, logged } : task)) };
    const saved = await ok(agent, 'editShiftPlan', { params: { shiftId: shift.id }, version: shift.version, body: plan });
    expect(saved.plan).toEqual(plan);
    const answer = answerShift(assembleFacts(saved), service.clock.now().toISOString());
    expect(answer.people.find((person) => person.personId === personId)?.table1Minutes).toBe(370);
    expect(answer.consumables.find(({ id }) => id.endsWith('/diamonds'))).toMatchObject({ outcome: 'met', reason: { en: expect.stringContaining('the maker’s manual') } });
    const other = await organisation.plannedDay();
    expect(other.shift.context.people.find(({ id }) => id === personId)?.elsewhere).toContainEqual({ jobName: job.name, kind: 'floor-grinding', startMinute: 550, endMinute: 790 });
    const copy = await ok(agent, 'addShift', { params: { jobId: job.id }, body: { date: '2027-02-28', copyFromShiftId: shift.id } });
    expect(copy.plan.tasks.flatMap((task) => task.logged ?? [])).toEqual([]);
    expect(copy.plan.inspectionCoverId).toBe(organisation.officer.personId);
  });

  it('refuses a stand-in or a log that names another organisation’s person', async () => {
    const organisation = await makeOrganisation(service);
    const stranger = (await makeOrganisation(service)).lead.personId;
    const { shift } = await organisation.plannedDay();
    const [first, ...rest] = shift.plan.tasks;
    for (const wrong of [{ inspectionCoverId: stranger }, { tasks: [{ ...first!, logged: [{ personId: stranger, startMinute: 400, endMinute: 500 }] }, ...rest] }])
      expectProblem(await call(organisation.lead.agent, 'editShiftPlan', { params: { shiftId: shift.id }, version: shift.version, body: { ...shift.plan, ...wrong } }), 400);
  });

  it('answers on the server what the page computes from the same shift', async () => {
    const organisation = await makeOrganisation(service);
    const { shift, grindingTaskId } = await organisation.plannedDay();
    const answer = answerShift(assembleFacts(shift), service.clock.now().toISOString());
    expect(answer.tasks.find(({ taskId }) => taskId === grindingTaskId)).toMatchObject({ state: 'ready', silicaBasis: 'table-1' });
  });

  it("carries a person's minutes from one job of the day to the other", async () => {
    const organisation = await makeOrganisation(service);
    const { job } = await organisation.plannedDay();
    const { shift } = await organisation.plannedDay();
    expect(shift.context.people.find(({ id }) => id === organisation.lead.personId)?.elsewhere).toMatchObject([{ jobName: job.name, kind: 'floor-grinding', startMinute: 420, endMinute: 550 }, { kind: 'clean-up' }]);
  });
});

describe('a basis', () => {
  const basis = { taskKind: 'shot-blasting', kind: 'air-samples', exposureMicrogramsPerM3: 38, conditions: 'Closed blaster with its collector, doors closed.', endsOn: '2099-01-31', interimApf: null };

  it('is signed by a named person under their own name, is in the log, and opens only its kind of task on its job', async () => {
    const organisation = await makeOrganisation(service);
    const { shift, job } = await organisation.plannedDay();
    const params = { shiftId: shift.id };
    const { agent, name, personId } = organisation.officer;
    for (const [wrong, path] of [[{ typedName: 'Somebody Else' }, 'typedName'], [{ typedName: name, endsOn: '2020-01-01' }, 'endsOn'], [{ typedName: name, exposureMicrogramsPerM3: null }, 'exposureMicrogramsPerM3'], [{ typedName: name, kind: 'sampling-day', interimApf: null }, 'interimApf'], [{ typedName: name, kind: 'sampling-day', interimApf: 10, endsOn: '2099-01-31' }, 'endsOn']] as const)
      expect(expectProblem(await call(agent, 'signBasis', { params, body: { ...basis, ...wrong } }), 400).errors).toMatchObject([{ path }]);
    expect((await ok(agent, 'readShift', { params })).context.bases).toEqual([]);
    const signed = await ok(agent, 'signBasis', { params, body: { ...basis, typedName: ` ${name.toLowerCase()} ` } });
    expect(signed.context.bases).toMatchObject([{ taskKind: 'shot-blasting', signedBy: name, exposureMicrogramsPerM3: 38, endsOn: '2099-01-31' }]);
    expect((await organisation.plannedDay()).shift.context.bases).toEqual([]);
    const log = entriesOf(await ok(organisation.auditor.agent, 'exportRecord'));
    expect(log.map(({ leaf, record }) => [(JSON.parse(leaf) as { kind: string }).kind, record])).toMatchObject([['exposure-basis', { jobId: job.id, signedBy: personId, signedByName: name, taskKind: 'shot-blasting', conditions: basis.conditions }]]);
  });

  it('of later date replaces the older; both stay on record', async () => {
    const organisation = await makeOrganisation(service);
    const { shift } = await organisation.plannedDay();
    const { agent, name } = organisation.officer;
    for (const exposureMicrogramsPerM3 of [38, 21]) await ok(agent, 'signBasis', { params: { shiftId: shift.id }, body: { ...basis, exposureMicrogramsPerM3, typedName: name } });
    expect((await ok(agent, 'readShift', { params: { shiftId: shift.id } })).context.bases).toMatchObject([{ exposureMicrogramsPerM3: 21 }]);
    expect(entriesOf(await ok(organisation.auditor.agent, 'exportRecord'))).toHaveLength(2);
  });
});

describe('publishing', () => {
  it('stores the bytes once per language, under their hash and a manifest, asks everybody planned, and logs it', async () => {
    const organisation = await makeOrganisation(service);
    const crew = await organisation.person('Marisol Tena', { language: 'es' });
    const { shift, version } = await organisation.publishedDay({ crew: [crew.id] });
    expect(version).toMatchObject({ number: 1, publishedBy: 'Ines Halloran', texts: [{ language: 'en' }, { language: 'es' }] });
    expect(version.asked.map(({ name, language, state, at }) => [name, language, state, at])).toEqual([['Dov Lindqvist', 'en', 'not-yet', null], ['Marisol Tena', 'es', 'not-yet', null]]);
    for (const { language, sha256: hash } of version.texts) {
      const response = await call(organisation.auditor.agent, 'readText', { params: { versionId: version.id, language } });
      expect(sha256(response.body as Buffer)).toBe(hash);
      expect(response.headers['x-content-sha256']).toBe(hash);
      expect((response.body as Buffer).equals(await ok(organisation.lead.agent, 'readText', { params: { versionId: version.id, language } }))).toBe(true);
    }
    const bytes = await ok(organisation.auditor.agent, 'exportRecord');
    expect(await verifyExport(bytes)).toMatchObject({ code: 0 });
    const [entry] = entriesOf(bytes);
    const manifest = String(entry?.record?.['manifest']);
    expect(sha256(manifest)).toBe(version.manifestSha256);
    for (const { language, sha256: hash } of version.texts) expect(manifest).toContain(`${hash}  text.${language}.json\n`);
    expect(entry?.record).toMatchObject({ versionId: version.id, number: 1, shiftId: shift.id, replaces: null });
    // The tablet gets the very same text, to hash it before it shows it.
    const tablet = await organisation.tablet();
    for (const { sha256: hash, text } of (await ok(tablet.agent, 'readTabletDay')).jobs[0]?.version.texts ?? []) expect(sha256(text)).toBe(hash);
    const other = await makeOrganisation(service);
    expectProblem(await call(other.auditor.agent, 'readText', { params: { versionId: version.id, language: 'en' } }), 404);
    expect((await ok((await other.tablet()).agent, 'readTabletDay')).jobs).toEqual([]);
  });

  it('makes the next version only after a change, and asks everybody again', async () => {
    const organisation = await makeOrganisation(service);
    const day = await organisation.publishedDay();
    const { agent } = organisation.officer;
    const params = { shiftId: day.shift.id };
    const published = await ok(agent, 'readShift', { params });
    expect(published.hasUnpublishedChanges).toBe(false);
    expect(expectProblem(await call(agent, 'publishShift', { params, version: published.version }), 422).detail).toMatch(/changed since version 1/);
    const next = await organisation.publishAgain(day, 'Ammonia drill at noon.');
    expect(next).toMatchObject({ number: 2, asked: [{ state: 'not-yet' }] });
    expect(next.manifestSha256).not.toBe(day.version.manifestSha256);
    const shift = await ok(agent, 'readShift', { params });
    expect(shift.versions.map(({ number }) => number)).toEqual([2, 1]);
    const first = await ok(organisation.auditor.agent, 'readText', { params: { versionId: day.version.id, language: 'en' } });
    expect(first.toString()).not.toContain('Ammonia drill');
  });

  it('by two at once gives one version each in order, never two of one number (F16)', async () => {
    const organisation = await makeOrganisation(service);
    const { shift } = await organisation.plannedDay();
    const answers = await Promise.all([organisation.officer, organisation.lead, organisation.officer, organisation.lead].map(({ agent }) => call(agent, 'publishShift', { params: { shiftId: shift.id }, version: shift.version })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 422, 422, 422]);
    const { versions } = await ok(organisation.auditor.agent, 'readShift', { params: { shiftId: shift.id } });
    expect(versions.map(({ number }) => number)).toEqual([1]);
    expect(entriesOf(await ok(organisation.auditor.agent, 'exportRecord'))).toHaveLength(1);
  });

  it('under a plan that somebody changed meanwhile is refused with the plan as it is now', async () => {
    const organisation = await makeOrganisation(service);
    const { shift } = await organisation.plannedDay();
    const params = { shiftId: shift.id };
    const changed = await ok(organisation.lead.agent, 'editShiftPlan', { params, version: shift.version, body: { ...shift.plan, tasks: shift.plan.tasks.slice(0, 1) } });
    expect(expectProblem(await call(organisation.officer.agent, 'publishShift', { params, version: shift.version }), 412).current).toMatchObject({ version: changed.version, plan: { tasks: [{ kind: 'floor-grinding' }] } });
    expect((await ok(organisation.auditor.agent, 'readShift', { params })).versions).toEqual([]);
  });

  it('is refused while nobody is assigned, nobody is competent person, or a task is nobody\'s; a held task stays held in the text', async () => {
    const organisation = await makeOrganisation(service);
    const { shift } = await organisation.plannedDay();
    const { agent } = organisation.officer;
    const params = { shiftId: shift.id };
    let version = shift.version;
    const publishWith = async (plan: object) => {
      version = (await ok(agent, 'editShiftPlan', { params, version, body: { ...shift.plan, ...plan } })).version;
      return call(agent, 'publishShift', { params, version });
    };
    expectProblem(await publishWith({ tasks: [] }), 422);
    expectProblem(await publishWith({ competentPersonId: null }), 422);
    expectProblem(await publishWith({ tasks: [...shift.plan.tasks, { ...shift.plan.tasks[0], id: newId(), assignments: [] }] }), 422);
    expect(expectProblem(await call(agent, 'editShiftPlan', { params, version, body: { ...shift.plan, tasks: [shift.plan.tasks[0], shift.plan.tasks[0]] } }), 400).errors).toMatchObject([{ path: 'tasks.1.id' }]);
    const blasting = { ...shift.plan.tasks[0], id: newId(), kind: 'shot-blasting' };
    const published = await publishWith({ tasks: [...shift.plan.tasks, blasting] });
    expect(published.status).toBe(200);
    const text = JSON.parse((await ok(agent, 'readText', { params: { versionId: published.body.id, language: 'en' } })).toString()) as { tasks: { taskId: string; state: string; live: unknown[]; heldBecause: string | null }[] };
    expect(text.tasks.find(({ taskId }) => taskId === blasting.id)).toMatchObject({ state: expect.not.stringMatching('ready'), live: [], heldBecause: expect.any(String) });
  });
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
