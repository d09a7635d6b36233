import { afterAll, afterEach, beforeAll, describe, expect, it } from '@jest/globals';
import { makeLink } from '#server/platform/links';
import { call, expectProblem, ok } from '#test/support/call';
import { makeOrganisation, pageAgent, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

const dayMs = 24 * 3600 * 1000;
const pdf = { bytes: Buffer.from('%PDF-1.7\ninvented for demonstration\n'), fileName: 'from-the-supplier.pdf' };

/** What a supplier with only the link can do, and when the link dies (issue: used, dated, withdrawn). */
describe('a request to a supplier', () => {
  let service: Service;
  beforeAll(async () => {
    service = await startService();
  });
  afterEach(() => {
    service.clock.offsetMs = 0;
  });
  afterAll(() => service.stop());

  /** A request and the link its mail would carry. */
  async function asked(): Promise<{ organisation: Organisation; id: string; token: string }> {
    const organisation = await makeOrganisation(service);
    const { officer } = organisation;
    const product = await ok(officer.agent, 'addProduct', { body: { name: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.' } });
    const { id, expiresAt } = await ok(officer.agent, 'askSupplier', { body: { productId: product.id, email: 'sheets@northlode.example', message: 'Please send the current sheet.', language: 'en' } });
    const token = await service.deps.database.inOrganisation(organisation.id, (tx) => makeLink(tx, 'sheet-request', id, new Date(expiresAt)));
    return { organisation, id, token };
  }
  const send = (token: string) => call(pageAgent(service), 'answerRequest', { headers: { 'X-Kneeboard-Link': token }, file: pdf });
  const look = (token: string) => call(pageAgent(service), 'openRequest', { body: { token } });

  it('shows its link who asks for which product and nothing else; one sheet, then the link is dead', async () => {
    const { organisation, id, token } = await asked();
    const opened = await look(token);
    expect(opened.status).toBe(200);
    expect(Object.keys(opened.body as object).sort()).toEqual(['expiresAt', 'message', 'organisationName', 'productName', 'supplier']);
    expect((await send(token)).status).toBe(204);
    expectProblem(await send(token), 404);
    expectProblem(await look(token), 404);
    const [request] = (await ok(organisation.officer.agent, 'listRequests', {})).items;
    expect(request).toMatchObject({ id, state: 'answered' });
    expect(await ok(organisation.officer.agent, 'readRevision', { params: { revisionId: request?.revisionId ?? '' } })).toMatchObject({ state: 'waiting', fileName: 'from-the-supplier.pdf' });
    // The link opened the door to nothing else.
    for (const name of ['readSession', 'listSheets', 'listProducts'] as const) expectProblem(await call(pageAgent(service), name, { headers: { 'X-Kneeboard-Link': token } }), 401);
  });

  it('dies on its date', async () => {
    const { organisation, token } = await asked();
    service.clock.offsetMs = 29 * dayMs;
    expect((await look(token)).status).toBe(200);
    service.clock.offsetMs = 31 * dayMs;
    expectProblem(await look(token), 404);
    expectProblem(await send(token), 404);
    expect((await ok(organisation.officer.agent, 'listSheets', {})).items).toEqual([]);
  });

  it('dies when it is withdrawn, and an answered one cannot be', async () => {
    const { organisation, id, token } = await asked();
    expect(await ok(organisation.officer.agent, 'withdrawRequest', { params: { requestId: id } })).toMatchObject({ state: 'withdrawn' });
    expectProblem(await look(token), 404);
    expectProblem(await send(token), 404);
    const second = await asked();
    await send(second.token);
    expectProblem(await call(second.organisation.officer.agent, 'withdrawRequest', { params: { requestId: second.id } }), 422);
  });

  it('sent twice at the same moment is answered once', async () => {
    const { organisation, token } = await asked();
    const statuses = (await Promise.all([send(token), send(token), send(token)])).map((response) => response.status).sort();
    expect(statuses).toEqual([204, 404, 404]);
    expect((await ok(organisation.officer.agent, 'listSheets', {})).items).toHaveLength(1);
  });
});
