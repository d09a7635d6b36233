import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { v7 as newId } from 'uuid';
import { emptyReading, type Field, type SheetReading } from '#server/sds/reader/reading';
import { readSheetWork } from '#server/sds/sheets-work';
import { type Revision, type SheetEdit } from '#shared/sheets';
import { call, expectProblem, ok } from '#test/support/call';
import { sheetEdit } from '#test/support/edits';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

/** What an officer corrects on one sheet is offered on the next of the same supplier and layout, and never applied by itself. */
describe('corrections remembered', () => {
  let service: Service;
  beforeAll(async () => {
    service = await startService();
  });
  afterAll(() => service.stop());

  const read = <T>(value: T, confidence = 0.6): Field<T> => ({ value, page: 1, box: { x: 0, y: 0, width: 1, height: 1 }, quote: String(value), confidence });
  const textOf = (name: string) => `SICHERHEITSDATENBLATT\n1. Bezeichnung\nHandelsname: ${name}\nNorthlode Resins Inc Tel 555-0142\n`;
  /** A sheet in a layout whose title the reader takes for the product's name. */
  async function sheet(organisation: Organisation, name: string, change: Partial<SheetReading> = {}): Promise<Revision> {
    const { revision } = await ok(organisation.officer.agent, 'uploadSheet', { file: { bytes: Buffer.from(`%PDF-1.4 ${newId()}`), fileName: `${name}.pdf` } });
    const reading: SheetReading = { ...emptyReading('read', 1), language: read('de', 0.9), productName: read('SICHERHEITSDATENBLATT'), supplier: read('Northlode Resins Inc Tel', 0.9), sections: [{ number: 1, heading: '1. Bezeichnung', page: 1 }], text: textOf(name), ...change };
    await readSheetWork(service.deps, { read: () => Promise.resolve(reading), close: () => Promise.resolve() })({ organisationId: organisation.id, revisionId: revision.id });
    return ok(organisation.officer.agent, 'readRevision', { params: { revisionId: revision.id } });
  }
  const save = ({ officer }: Organisation, { id, version }: Pick<Revision, 'id' | 'version'>, changes: Partial<SheetEdit>) => ok(officer.agent, 'saveRevision', { params: { revisionId: id }, version, body: sheetEdit({ language: 'de', ...changes }) });
  const suggestions = async ({ officer }: Organisation, { id }: Pick<Revision, 'id'>) => (await ok(officer.agent, 'listSuggestions', { params: { revisionId: id } })).items;
  const taught = async ({ officer }: Organisation) => (await ok(officer.agent, 'listCorrections')).items;
  const right = { productName: 'Quarrybond 40 Part C', supplier: 'Northlode Resins, Inc.' };

  it('are offered with where they come from; what was read stays as it was', async () => {
    const organisation = await makeOrganisation(service);
    await save(organisation, await sheet(organisation, 'Quarrybond 40 Part C'), right);
    const next = await sheet(organisation, 'Millrace cleaner');
    const offered = await suggestions(organisation, next);
    expect(offered.map(({ field, value }) => [field, value])).toEqual([['productName', 'Millrace cleaner'], ['supplier', 'Northlode Resins, Inc.']]);
    expect(offered[0]?.from).toMatchObject({ fileName: 'Quarrybond 40 Part C.pdf', rule: { kind: 'label', label: 'Handelsname' }, isYours: true, readValue: 'SICHERHEITSDATENBLATT' });
    expect(offered[1]?.from.rule).toEqual({ kind: 'spelling', readValue: 'Northlode Resins Inc Tel', value: 'Northlode Resins, Inc.' });
    expect((await ok(organisation.officer.agent, 'readRevision', { params: { revisionId: next.id } })).fields).toEqual(next.fields);
  });

  it('by two officers at the same moment are one officer’s; the other is shown what is stored', async () => {
    const organisation = await makeOrganisation(service);
    const { id, version } = await sheet(organisation, 'Quarrybond 40 Part C');
    const edits = ['Northlode Resins, Inc.', 'Northlode Resins', 'Northlode'].map((supplier) => sheetEdit({ language: 'de', ...right, supplier }));
    const answers = await Promise.all(edits.map((body) => call(organisation.officer.agent, 'saveRevision', { params: { revisionId: id }, version, body })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412, 412]);
    const { fields } = await ok(organisation.officer.agent, 'readRevision', { params: { revisionId: id } });
    expect((await taught(organisation)).find(({ field }) => field === 'supplier')?.value).toBe(fields.supplier?.value);
    expect(service.faults).toEqual([]);
  });

  it('say nothing where the reader agrees, or a person has entered the value already', async () => {
    const organisation = await makeOrganisation(service);
    await save(organisation, await sheet(organisation, 'Quarrybond 40 Part C'), right);
    const agreed = await sheet(organisation, 'Millrace cleaner', { productName: read('Millrace Cleaner', 0.95) });
    expect((await suggestions(organisation, agreed)).map(({ field }) => field)).toEqual(['supplier']);
    const entered = await save(organisation, await sheet(organisation, 'Tollgate primer'), { productName: 'Tollgate primer, grey', supplier: right.supplier });
    expect(await suggestions(organisation, entered)).toEqual([]);
  });

  it('stay with their supplier, layout and organisation', async () => {
    const [organisation, other] = [await makeOrganisation(service), await makeOrganisation(service)];
    await save(organisation, await sheet(organisation, 'Quarrybond 40 Part C'), right);
    expect(await suggestions(organisation, await sheet(organisation, 'Another', { supplier: read('Harbor Coatings', 0.9), text: 'Handelsname: Another\nHarbor Coatings' }))).toEqual([]);
    expect(await suggestions(organisation, await sheet(organisation, 'Another', { sections: [{ number: 1, heading: '1. Identification', page: 1 }] }))).toEqual([]);
    expect(await suggestions(other, await sheet(other, 'Millrace cleaner'))).toEqual([]);
    expect(await taught(other)).toEqual([]);
  });

  it('are learned again when corrected again, forgotten when the reading is put back, and not learned from their own suggestions', async () => {
    const organisation = await makeOrganisation(service);
    const first = await sheet(organisation, 'Quarrybond 40 Part C');
    const saved = await save(organisation, first, { ...right, supplier: 'Northlode Resin' });
    const again = await save(organisation, saved, right);
    expect((await taught(organisation)).map(({ value }) => value).sort()).toEqual(['Northlode Resins, Inc.', 'Quarrybond 40 Part C']);
    await save(organisation, await sheet(organisation, 'Millrace cleaner'), { productName: 'Millrace cleaner', supplier: right.supplier });
    expect(await taught(organisation)).toHaveLength(2);
    await save(organisation, again, { productName: 'SICHERHEITSDATENBLATT', supplier: right.supplier });
    expect((await taught(organisation)).map(({ field }) => field)).toEqual(['supplier']);
  });

  it('can be removed by an officer, and then offer nothing', async () => {
    const organisation = await makeOrganisation(service);
    await save(organisation, await sheet(organisation, 'Quarrybond 40 Part C'), right);
    const next = await sheet(organisation, 'Millrace cleaner');
    for (const { id } of await taught(organisation)) {
      expectProblem(await call(organisation.lead.agent, 'removeCorrection', { params: { correctionId: id } }), 403);
      await ok(organisation.officer.agent, 'removeCorrection', { params: { correctionId: id } });
      expectProblem(await call(organisation.officer.agent, 'removeCorrection', { params: { correctionId: id } }), 404);
    }
    expect(await suggestions(organisation, next)).toEqual([]);
  });
});
