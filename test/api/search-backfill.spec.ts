import { afterAll, beforeAll, beforeEach, describe, expect, it } from '@jest/globals';
import { sql } from 'drizzle-orm';
import { type Deps } from '#server/deps';
import { emptyReading, type SheetReading } from '#server/sds/reader/reading';
import { searchBackfill } from '#server/search/backfill';
import { type Revision } from '#shared/sheets';
import { ok } from '#test/support/call';
import { buildDemoSheet, quarrybondPartB } from '#test/support/demo-sheets';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

/** Sheets from before their text was kept get one, once, and nothing else of them changes. */
describe('the search texts of older sheets', () => {
  let service: Service;
  let organisation: Organisation;
  let sheets: Revision[] = [];
  let reads = 0;
  beforeAll(async () => {
    service = await startService();
  });
  afterAll(() => service.stop());
  beforeEach(async () => {
    organisation = await makeOrganisation(service);
    reads = 0;
    sheets = [];
    for (const productName of ['Millrace one', 'Millrace two', 'Millrace three']) {
      const { revision } = await ok(organisation.officer.agent, 'uploadSheet', { file: { bytes: await buildDemoSheet({ ...quarrybondPartB, productName }), fileName: 'sheet.pdf' } });
      await service.readSheetNow(organisation.id, revision.id);
      sheets.push(await ok(organisation.officer.agent, 'readRevision', { params: { revisionId: revision.id } }));
    }
    // As they were before the text was kept.
    await inOwn(async (tx) => {
      await tx.execute(sql`UPDATE sheet_search SET full_text = NULL`);
      for (const { id } of sheets) await tx.execute(sql`SELECT index_sheet(${id})`);
    });
  });

  const inOwn = <T>(work: Parameters<Deps['database']['inOrganisation']>[1] extends (tx: infer X) => unknown ? (tx: X) => Promise<T> : never): Promise<T> => service.deps.database.inOrganisation(organisation.id, work);
  /** Only this organisation: the others in this database belong to other tests. */
  const backfill = (text = 'wollastonite clinker') => {
    const read = (): Promise<SheetReading> => ((reads += 1), Promise.resolve({ ...emptyReading('read', 1), text }));
    const database: Deps['database'] = { ...service.deps.database, atTheDoor: <R>() => Promise.resolve([{ door_organisations: organisation.id }] as R[]) };
    const reader = { read, close: () => Promise.resolve() };
    return searchBackfill({ ...service.deps, database }, { text: reader, pictures: reader });
  };
  const found = async (q: string) => (await ok(organisation.officer.agent, 'searchSheets', { query: { q } })).items.length;

  it('are read from the stored file, and what was read and confirmed stays as it was', async () => {
    expect(await found('wollastonite')).toBe(0);
    expect(await backfill()()).toBe(3);
    expect(await found('wollastonite clinker')).toBe(3);
    for (const sheet of sheets) expect(await ok(organisation.officer.agent, 'readRevision', { params: { revisionId: sheet.id } })).toEqual(sheet);
  });

  it('are made once: an ended process goes on where it was, and a whole run finds nothing more to do', async () => {
    const fill = backfill();
    expect(await fill(() => reads >= 1)).toBe(1);
    expect(await found('wollastonite')).toBe(1);
    expect(await fill()).toBe(2);
    expect(await fill()).toBe(0);
    expect(reads).toBe(3);
  });

  it('are given up where the stored file is gone, and waited for while the storage is out of reach', async () => {
    const gone = Object.assign(new Error('gone'), { name: 'NoSuchKey' });
    const away = new Error('connect ECONNREFUSED');
    const { storage } = service.deps;
    const real = storage.getVerified;
    try {
      storage.getVerified = () => Promise.reject(away);
      await expect(backfill()()).rejects.toThrow('ECONNREFUSED');
      storage.getVerified = () => Promise.reject(gone);
      expect(await backfill()()).toBe(3);
    } finally {
      storage.getVerified = real;
    }
    expect([await backfill()(), reads]).toEqual([0, 0]);
  });
});
