import { afterAll, afterEach, beforeAll, describe, expect, it } from '@jest/globals';
import { makeLink } from '#server/platform/links';
import { call, expectProblem, ok } from '#test/support/call';
import { sheetEdit } from '#test/support/edits';
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

  describe('that sends a sheet back', () => {
    const body = { productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.', email: 'sheets@northlode.example', message: 'Section 14 is missing.\nPlease send a corrected sheet.', language: 'en' as const, isSetAside: true };
    const linkOf = (organisation: Organisation, { id, expiresAt }: { id: string; expiresAt: string }) => service.deps.database.inOrganisation(organisation.id, (tx) => makeLink(tx, 'sheet-request', id, new Date(expiresAt)));

    it('needs no product: the sheet is set aside, the answer is linked to it, and both learn the product when the answer is confirmed', async () => {
      const organisation = await makeOrganisation(service);
      const { agent } = organisation.officer;
      const sheet = await organisation.sheetToEnter();
      const request = await ok(agent, 'returnSheet', { params: { revisionId: sheet.id }, version: sheet.version, body });
      expect(request).toMatchObject({ productId: null, productName: body.productName, aboutRevisionId: sheet.id, state: 'open', revisionId: null });
      expect(await ok(agent, 'readRevision', { params: { revisionId: sheet.id } })).toMatchObject({ state: 'set-aside' });
      const token = await linkOf(organisation, request);
      expect((await look(token)).body).toMatchObject({ productName: body.productName, supplier: body.supplier, message: body.message });
      const typed = { bytes: Buffer.from('A corrected sheet, as plain text'), fileName: 'corrected.txt' };
      expect((await call(pageAgent(service), 'answerRequest', { headers: { 'X-Kneeboard-Link': token }, file: typed })).status).toBe(204);
      const [answered] = (await ok(agent, 'listRequests', { query: { revisionId: sheet.id } })).items;
      expect(answered).toMatchObject({ id: request.id, state: 'answered' });
      const newId = answered?.revisionId ?? '';
      expect(newId).not.toBe(sheet.id);
      expect((await ok(agent, 'listRequests', { query: { revisionId: newId } })).items.map(({ id }) => id)).toEqual([request.id]);
      const { version } = await ok(agent, 'readRevision', { params: { revisionId: newId } });
      const confirmed = await ok(agent, 'confirmRevision', { params: { revisionId: newId }, version, body: { fields: sheetEdit({ productName: body.productName, supplier: body.supplier }), product: { name: body.productName, supplier: body.supplier } } });
      expect((await ok(agent, 'listRequests', { query: { productId: confirmed.productId ?? '' } })).items.map(({ id }) => id)).toEqual([request.id]);
    });

    it('goes once, also when two officers send it at the same moment; after it was withdrawn it goes again', async () => {
      const organisation = await makeOrganisation(service);
      const { agent } = organisation.officer;
      const { revision } = await ok(agent, 'uploadSheet', { file: pdf });
      const back = () => call(agent, 'returnSheet', { params: { revisionId: revision.id }, version: revision.version, body: { ...body, isSetAside: false } });
      const answers = await Promise.all([back(), back(), back()]);
      expect(answers.map(({ status }) => status).sort()).toEqual([200, 422, 422]);
      const [request, ...others] = (await ok(agent, 'listRequests', {})).items;
      expect(others).toEqual([]);
      expectProblem(await back(), 422);
      await ok(agent, 'withdrawRequest', { params: { requestId: request?.id ?? '' } });
      expect((await back()).status).toBe(200);
    });

    it('says so when the supplier sends the very same file again', async () => {
      const organisation = await makeOrganisation(service);
      const { agent } = organisation.officer;
      const { revision } = await ok(agent, 'uploadSheet', { file: pdf });
      const request = await ok(agent, 'returnSheet', { params: { revisionId: revision.id }, version: revision.version, body: { ...body, isSetAside: false } });
      expect((await send(await linkOf(organisation, request))).status).toBe(204);
      expect((await ok(agent, 'listRequests', {})).items[0]).toMatchObject({ state: 'answered', aboutRevisionId: revision.id, revisionId: revision.id });
    });

    it('drafts the mail from the audit, and remembers where this supplier was asked', async () => {
      const organisation = await makeOrganisation(service);
      const { agent } = organisation.officer;
      const sheet = await organisation.confirmedSheet({ productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.', ingredients: [{ name: 'quartz', cas: '14808-60-8', concentration: null }] });
      const params = { revisionId: sheet.id };
      const draft = await ok(agent, 'draftReturn', { params });
      expect(draft).toMatchObject({ productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.', email: '' });
      // The check digit of 14808-60-7 is 7: Chemical Abstracts Service, check digit verification.
      expect(draft.messages.en).toContain('14808-60-8');
      expect(draft.messages.es).toContain('14808-60-8');
      await ok(agent, 'returnSheet', { params, version: sheet.version, body: { ...body, isSetAside: false } });
      expect((await ok(agent, 'draftReturn', { params })).email).toBe('sheets@northlode.example');
    });

    it('leaves a confirmed sheet in use, and asks for the version that was seen', async () => {
      const organisation = await makeOrganisation(service);
      const { agent } = organisation.officer;
      const sheet = await organisation.confirmedSheet();
      const params = { revisionId: sheet.id };
      expectProblem(await call(agent, 'returnSheet', { params, version: sheet.version, body }), 422);
      expectProblem(await call(agent, 'returnSheet', { params, version: sheet.version - 1, body: { ...body, isSetAside: false } }), 412);
      expect((await ok(agent, 'listRequests', {})).items).toEqual([]);
      await ok(agent, 'returnSheet', { params, version: sheet.version, body: { ...body, isSetAside: false } });
      expect(await ok(agent, 'readRevision', { params })).toMatchObject({ state: 'confirmed', isCurrent: true, version: sheet.version });
    });
  });
});
