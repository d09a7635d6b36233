import { afterAll, afterEach, beforeAll, describe, expect, it } from '@jest/globals';
import { type SitePage } from '#shared/library';
import { call, expectProblem, ok } from '#test/support/call';
import { makeOrganisation, pageAgent, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

const dayMs = 24 * 3600 * 1000;

/** What the printed code of a job shows to whoever holds the paper. */
describe('the page behind a printed code', () => {
  let service: Service;
  let organisation: Organisation;
  beforeAll(async () => {
    service = await startService();
    organisation = await makeOrganisation(service);
  });
  afterEach(() => {
    service.clock.offsetMs = 0;
  });
  afterAll(() => service.stop());

  const codeOf = async (jobId: string) => ((await ok(organisation.officer.agent, 'makeSiteCode', { params: { jobId } })).address ?? '').split('#')[1] ?? '';
  const open = (token: string): Promise<SitePage> => ok(pageAgent(service), 'openSite', { body: { token } });

  it('carries the plan with its controls, and no name of anyone', async () => {
    const { agent } = organisation.officer;
    const crew = await organisation.person('Marisol Tena');
    const kit = await organisation.kit();
    const day = await organisation.publishedDay({ crew: [crew.id], kits: [kit.id] });
    const { id: _, version, shifts: __, ...edit } = await ok(agent, 'readJob', { params: { jobId: day.job.id } });
    await ok(agent, 'editJob', { params: { jobId: day.job.id }, version, body: { ...edit, site: { ...edit.site, firstAid: { ...edit.site.firstAid, firstAiderName: 'Oona Brask' } } } });
    await organisation.publish(await ok(agent, 'readShift', { params: { shiftId: day.shift.id } }));
    const page = await open(await codeOf(day.job.id));
    expect(page.plan).toMatchObject({ date: day.shift.date, isToday: true, number: 2 });
    const grinding = page.plan?.day?.tasks[0];
    expect(grinding?.controls.length).toBeGreaterThan(0);
    expect(grinding?.span).toBe('07:00–09:10');
    expect(page.hasFirstAider).toBe(true);
    expect(page.sheets).toHaveLength(1);
    const said = JSON.stringify(page);
    for (const name of ['Marisol', 'Tena', 'Oona', 'Brask', ...[organisation.officer, organisation.lead, organisation.owner].flatMap((each) => each.name.split(' ').slice(0, 1))]) expect(said).not.toContain(name);
    expect(said).not.toContain(crew.id);
  });

  it("shows the next published day's plan where today has none, then the last one's, and says so", async () => {
    const tomorrow = new Date(service.clock.now().getTime() + dayMs);
    const day = await organisation.publishedDay({ date: tomorrow.toISOString().slice(0, 10) });
    const token = await codeOf(day.job.id);
    expect((await open(token)).plan).toMatchObject({ date: day.shift.date, isToday: false });
    service.clock.offsetMs = 5 * dayMs;
    expect((await open(token)).plan).toMatchObject({ date: day.shift.date, isToday: false });
  });

  it('without anything published has no plan; the plan being made is nobody else’s business', async () => {
    const { job } = await organisation.plannedDay();
    expect((await open(await codeOf(job.id))).plan).toBeNull();
  });

  it('is dead once revoked or replaced, its sheets too', async () => {
    const kit = await organisation.kit();
    const { job } = await organisation.publishedDay({ kits: [kit.id] });
    const first = await codeOf(job.id);
    const revisionId = (await open(first)).sheets[0]?.revisionId ?? '';
    const sheet = (token: string) => call(pageAgent(service), 'readSiteSheet', { params: { revisionId }, headers: { 'X-Kneeboard-Link': token } });
    expect((await sheet(first)).status).toBe(200);
    const second = await codeOf(job.id);
    expectProblem(await sheet(first), 404);
    expect((await sheet(second)).status).toBe(200);
    await ok(organisation.officer.agent, 'revokeSiteCode', { params: { jobId: job.id } });
    expectProblem(await call(pageAgent(service), 'openSite', { body: { token: second } }), 404);
    expectProblem(await sheet(second), 404);
  });

  it('opens however many phones of the site still ask with an old code', async () => {
    const { job } = await organisation.publishedDay();
    const old = await codeOf(job.id);
    const token = await codeOf(job.id);
    const phone = pageAgent(service);
    const ask = (code: string) => call(phone, 'openSite', { body: { token: code } });
    for (let asked = 0; asked < 21; asked += 1) expectProblem(await ask(old), 404);
    expectProblem(await ask(old), 429);
    expect((await ask(token)).status).toBe(200);
  });
});
