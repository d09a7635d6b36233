import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { createHash } from 'node:crypto';
import { readdirSync } from 'node:fs';
import { GetObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { v7 as newId } from 'uuid';
import { emptyReading, type SheetReading } from '#server/sds/reader/reading';
import { ocrSheetWork, readSheetWork, unreadSheetWork } from '#server/sds/sheets-work';
import { type Revision, type SheetEdit } from '#shared/sheets';
import { call, expectProblem, ok } from '#test/support/call';
import { buildDemoSheet, quarrybondPartB, type DemoSheetSpec } from '#test/support/demo-sheets';
import { sheetEdit } from '#test/support/edits';
import { testEnvironment } from '#test/support/environment';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';
import { entriesOf } from '#test/support/verify-log';

let service: Service;
const bucket = new S3Client({ endpoint: testEnvironment('TEST_S3_ENDPOINT'), region: 'us-east-1', forcePathStyle: true, requestChecksumCalculation: 'WHEN_REQUIRED', responseChecksumValidation: 'WHEN_REQUIRED', credentials: { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' } });
beforeAll(async () => {
  service = await startService();
});
afterAll(async () => {
  bucket.destroy();
  await service.stop();
});

const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');
const uploaded = (): string[] => readdirSync(service.environment['UPLOAD_FOLDER'] ?? '');
const pdf = (spec: Partial<DemoSheetSpec> = {}): Promise<Uint8Array> => buildDemoSheet({ ...quarrybondPartB, ...spec });
const upload = (organisation: Organisation, bytes: Uint8Array, fileName = 'sheet.pdf') => ok(organisation.officer.agent, 'uploadSheet', { file: { bytes, fileName } });
const read = (organisation: Organisation, revisionId: string) => ok(organisation.officer.agent, 'readRevision', { params: { revisionId } });
async function uploadAndRead(organisation: Organisation, spec: Partial<DemoSheetSpec> = {}): Promise<Revision> {
  const { revision } = await upload(organisation, await pdf(spec));
  await service.readSheetNow(organisation.id, revision.id);
  return read(organisation, revision.id);
}
const asRead = ({ fields }: Revision, changes: Partial<SheetEdit> = {}): SheetEdit => ({
  productName: fields.productName?.value ?? null,
  supplier: fields.supplier?.value ?? null,
  language: 'en',
  revisedOn: fields.revisedOn?.value ?? null,
  signalWord: fields.signalWord?.value ?? null,
  hazardCodes: fields.hazardCodes.map(({ value }) => value),
  precautionaryCodes: fields.precautionaryCodes.map(({ value }) => value),
  ingredients: fields.ingredients.map(({ value }) => value),
  limits: fields.limits.map(({ value }) => value),
  protectionWords: fields.protectionWords.map(({ value }) => value),
  ...changes,
});

describe('an upload', () => {
  it('is stored under its hash, byte for byte, and waits to be read; nothing stays in the upload folder', async () => {
    const organisation = await makeOrganisation(service);
    const bytes = await pdf();
    const response = await call(organisation.lead.agent, 'uploadSheet', { file: { bytes, fileName: '../../etc/Hoja de datos ñ.pdf' } });
    expect(response.status).toBe(202);
    expect(response.body).toMatchObject({ isKnown: false, revision: { state: 'waiting', sha256: sha256(bytes), byteLength: bytes.length, fileName: 'Hoja de datos ñ.pdf', uploadedBy: 'Dov Lindqvist', version: 1 } });
    const stored = await bucket.send(new GetObjectCommand({ Bucket: testEnvironment('TEST_S3_BUCKET'), Key: `${organisation.id}/${sha256(bytes)}` }));
    expect(Buffer.from((await stored.Body?.transformToByteArray()) ?? []).equals(bytes)).toBe(true);
    expect(uploaded()).toEqual([]);
    const file = await call(organisation.auditor.agent, 'readRevisionFile', { params: { revisionId: response.body.revision.id } });
    expect((file.body as Buffer).equals(bytes)).toBe(true);
    expect(file.headers).toMatchObject({ 'content-type': 'application/pdf', 'x-content-type-options': 'nosniff', 'content-security-policy': "sandbox; default-src 'none'", 'content-disposition': expect.stringContaining("filename*=UTF-8''Hoja%20de%20datos%20%C3%B1.pdf") });
  });

  it('of the same bytes is recognised within the organisation, and only there', async () => {
    const [organisation, other] = [await makeOrganisation(service), await makeOrganisation(service)];
    const bytes = await pdf();
    const first = await upload(organisation, bytes);
    const again = await Promise.all([upload(organisation, bytes, 'again.pdf'), upload(organisation, bytes, 'again.pdf')]);
    for (const { isKnown, revision } of again) expect([isKnown, revision.id, revision.fileName]).toEqual([true, first.revision.id, 'sheet.pdf']);
    expect(await upload(other, bytes)).toMatchObject({ isKnown: false });
    expect((await ok(other.officer.agent, 'listSheets')).items).toHaveLength(1);
    for (const name of ['readRevision', 'readRevisionFile'] as const) expectProblem(await call(other.officer.agent, name, { params: { revisionId: first.revision.id } }), 404);
  });

  it('that is no PDF is kept, named, and filled in by hand; it is never shown as a page (F18)', async () => {
    const organisation = await makeOrganisation(service);
    for (const bytes of [Buffer.from('<html><script>alert(1)</script>'), Buffer.concat([Buffer.from(' '), await pdf()]), Buffer.from('PK\u0003\u0004 zip')]) {
      const { revision } = await upload(organisation, bytes, 'page.html');
      expect(revision).toMatchObject({ state: 'needs-entry', readerState: 'not-a-pdf' });
      const file = await call(organisation.officer.agent, 'readRevisionFile', { params: { revisionId: revision.id } });
      expect(file.headers).toMatchObject({ 'content-type': 'application/octet-stream', 'content-disposition': expect.stringMatching(/^attachment/) });
      expectProblem(await call(organisation.officer.agent, 'readRevisionAgain', { params: { revisionId: revision.id } }), 422);
    }
  });

  it('that is empty, too large, twofold or no file at all is refused by name and leaves nothing (F19)', async () => {
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    expect(expectProblem(await call(agent, 'uploadSheet', { file: { bytes: Buffer.alloc(0), fileName: 'empty.pdf' } }), 400).errors).toMatchObject([{ path: 'file' }]);
    const large = Buffer.alloc(26 * 1024 * 1024, 'x');
    large.write('%PDF-1.7');
    expectProblem(await call(agent, 'uploadSheet', { file: { bytes: large, fileName: 'large.pdf' } }), 413);
    expectProblem(await agent.post('/api/sheets').attach('file', Buffer.from(await pdf()), 'a.pdf').attach('file', Buffer.from(await pdf()), 'b.pdf'), 400);
    expectProblem(await agent.post('/api/sheets').attach('other', Buffer.from(await pdf()), 'a.pdf'), 400);
    expectProblem(await agent.post('/api/sheets').field('file', 'text'), 400);
    expectProblem(await agent.post('/api/sheets').send({ file: 'text' }), 400);
    expectProblem(await agent.post('/api/sheets').type('multipart/form-data').send('no boundary'), 400);
    expectProblem(await agent.post('/api/sheets').type('multipart/form-data; boundary=x').send('--x\r\nContent-Disposition: form-data; name="file"; filename="a.pdf"\r\n\r\n%PDF-'), 400);
    expect((await ok(agent, 'listSheets')).items).toEqual([]);
    expect(uploaded()).toEqual([]);
  });
});

describe('reading and confirming', () => {
  it('goes from what was read, with its places, to the sheet that counts; only confirmed values reach a kit', async () => {
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    const revision = await uploadAndRead(organisation);
    expect(revision).toMatchObject({ state: 'read', readerState: 'read', isCurrent: false, productId: null });
    expect(revision.fields.productName).toMatchObject({ value: quarrybondPartB.productName, origin: 'read', place: { page: 1, quote: expect.any(String) } });
    expect(revision.fields.hazardCodes.map(({ value }) => value).sort()).toEqual([...quarrybondPartB.hazards].sort());
    const tablet = await organisation.tablet();
    expectProblem(await call(tablet.agent, 'readTabletSheet', { params: { revisionId: revision.id } }), 404);

    const product = { name: quarrybondPartB.productName, supplier: quarrybondPartB.supplier.name };
    const fields = asRead(revision, { hazardCodes: [...quarrybondPartB.hazards, 'H302'] });
    expect(expectProblem(await call(agent, 'confirmRevision', { params: { revisionId: revision.id }, version: revision.version, body: { fields: { ...fields, revisedOn: null }, product } }), 400).errors).toMatchObject([{ path: 'fields.revisedOn' }]);
    const confirmed = await ok(agent, 'confirmRevision', { params: { revisionId: revision.id }, version: revision.version, body: { fields, product } });
    expect(confirmed).toMatchObject({ state: 'confirmed', isCurrent: true, confirmedBy: 'Ines Halloran', productName: product.name });
    expect(confirmed.fields.hazardCodes.find(({ value }) => value === 'H302')).toMatchObject({ origin: 'entered', place: null });
    expect(confirmed.fields.hazardCodes.find(({ value }) => value === quarrybondPartB.hazards[0])).toMatchObject({ origin: 'read', place: { page: expect.any(Number) } });
    expect((await ok(agent, 'listProducts')).items).toMatchObject([{ id: confirmed.productId, sheet: { revisionId: revision.id, hazardCodes: fields.hazardCodes } }]);
    expect((await ok(tablet.agent, 'readTabletSheet', { params: { revisionId: revision.id } })).subarray(0, 5).toString()).toBe('%PDF-');
    const [entry] = entriesOf(await ok(organisation.auditor.agent, 'exportRecord'));
    expect(entry?.record).toMatchObject({ revisionId: revision.id, sha256: revision.sha256, productId: confirmed.productId, confirmedBy: { name: 'Ines Halloran' } });
    for (const name of ['saveRevision', 'setRevisionAside'] as const) expectProblem(await call(agent, name, { params: { revisionId: revision.id }, version: confirmed.version, ...(name === 'saveRevision' ? { body: fields } : {}) }), 422);
  });

  it('lets the newer sheet of a product and language count, whichever is confirmed last', async () => {
    const organisation = await makeOrganisation(service);
    const counting = async () => (await ok(organisation.officer.agent, 'listSheets')).items.filter(({ isCurrent }) => isCurrent).map(({ id }) => id);
    const newer = await organisation.confirmedSheet({ revisedOn: '2025-01-01' });
    const older = await organisation.confirmedSheet({ revisedOn: '2024-01-01' });
    expect(older).toMatchObject({ state: 'confirmed', isCurrent: false, productId: newer.productId });
    expect(await counting()).toEqual([newer.id]);
    const newest = await organisation.confirmedSheet({ revisedOn: '2026-01-01' });
    const spanish = await organisation.confirmedSheet({ revisedOn: '2020-01-01', language: 'es' });
    expect((await counting()).sort()).toEqual([newest.id, spanish.id].sort());
  });

  it('confirmed by two officers at once is confirmed once', async () => {
    const organisation = await makeOrganisation(service);
    const { id, version } = await organisation.sheetToEnter();
    const body = { fields: sheetEdit(), product: { name: 'Part A', supplier: 'Northlode Resins, Inc.' } };
    const answers = await Promise.all([1, 2, 3].map(() => call(organisation.officer.agent, 'confirmRevision', { params: { revisionId: id }, version, body })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    for (const { status } of answers) expect([200, 412, 422]).toContain(status);
    expect(entriesOf(await ok(organisation.auditor.agent, 'exportRecord'))).toHaveLength(1);
  });

  it('saved by two officers shows the second what the first saved (F15)', async () => {
    const organisation = await makeOrganisation(service);
    const { id, version } = await organisation.sheetToEnter();
    const saved = await ok(organisation.officer.agent, 'saveRevision', { params: { revisionId: id }, version, body: sheetEdit({ productName: 'First' }) });
    expect(expectProblem(await call(organisation.officer.agent, 'saveRevision', { params: { revisionId: id }, version, body: sheetEdit({ productName: 'Second' }) }), 412).current).toEqual(saved);
  });

  it.each([
    ['no text layer, after its pictures said nothing', '%PDF-1.4\n1 0 obj<</Type/Catalog/Pages 2 0 R>>endobj 2 0 obj<</Type/Pages/Kids[3 0 R]/Count 1>>endobj 3 0 obj<</Type/Page/Parent 2 0 R/MediaBox[0 0 99 99]>>endobj\ntrailer<</Root 1 0 R>>', 'no-text-layer'],
    ['nothing but its first bytes', '%PDF-1.7 cut off', 'damaged'],
  ])('a PDF with %s is named and waits for entry by hand', async (_, text, readerState) => {
    const organisation = await makeOrganisation(service);
    const { revision } = await upload(organisation, Buffer.from(`${text}\n%${newId()}`));
    await service.readSheetNow(organisation.id, revision.id);
    await ocrSheetWork(service.deps, { read: async () => emptyReading('no-text-layer', 1), close: async () => undefined })({ organisationId: organisation.id, revisionId: revision.id });
    const found = await read(organisation, revision.id);
    expect(found).toMatchObject({ state: 'needs-entry', readerState, pagesRead: null });
    expect(found.fields).toMatchObject({ productName: null, hazardCodes: [], ingredients: [] });
  });

  it('a scan goes to work of its own, shows the page under way, and comes back marked; running twice changes nothing', async () => {
    const organisation = await makeOrganisation(service);
    const { revision } = await upload(organisation, Buffer.from(`%PDF-1.4 ${newId()}`));
    const work = { organisationId: organisation.id, revisionId: revision.id };
    const answer = (reading: SheetReading) => ({ read: async () => reading, close: async () => undefined });
    const queued = async () => (await service.deps.database.inOrganisation(organisation.id, (tx) => tx.client.query(`SELECT 1 FROM pgboss.job WHERE name = 'ocr-sheet' AND data->>'revisionId' = $1`, [revision.id]))).rowCount;
    await readSheetWork(service.deps, answer(emptyReading('no-text-layer', 8)))(work);
    expect(await read(organisation, revision.id)).toMatchObject({ state: 'waiting', readerState: 'no-text-layer', pages: 8, pagesRead: 0 });
    expect(await queued()).toBe(1);
    const field = { value: 'Quarrybond 40', page: 3, box: { x: 0, y: 0, width: 1, height: 1 }, quote: 'Quarrybond 40', confidence: 0.7, because: 'Read by OCR from a picture of the page.' };
    const reading: SheetReading = { ...emptyReading('read-by-ocr', 8), productName: field, text: 'Quarrybond 40' };
    await ocrSheetWork(service.deps, {
      read: async (_, onPage) => {
        onPage?.(3, 8);
        // The count is written beside the reading, so it is looked for until it is there.
        for (let tries = 0; tries < 100 && (await read(organisation, revision.id)).pagesRead !== 3; tries += 1) await new Promise((resolve) => setTimeout(resolve, 50));
        expect(await read(organisation, revision.id)).toMatchObject({ state: 'waiting', pages: 8, pagesRead: 3 });
        return reading;
      },
      close: async () => undefined,
    })(work);
    const found = await read(organisation, revision.id);
    expect(found).toMatchObject({ state: 'read', readerState: 'read-by-ocr', pagesRead: null, productName: 'Quarrybond 40', fields: { productName: { confidence: 0.7, because: field.because } } });
    expect(found.remarks.length).toBeGreaterThan(0);
    await ocrSheetWork(service.deps, answer(emptyReading('damaged', 8)))(work);
    expect(await read(organisation, revision.id)).toEqual(found);
    const params = { revisionId: revision.id };
    const aside = await ok(organisation.officer.agent, 'setRevisionAside', { params, version: found.version });
    expect(await ok(organisation.officer.agent, 'takeRevisionBack', { params, version: aside.version })).toMatchObject({ state: 'read' });
  });

  it('a sheet whose reading fails at every try is left to a person, once, and can be read again', async () => {
    const organisation = await makeOrganisation(service);
    const { revision } = await upload(organisation, Buffer.from(`%PDF-1.4 ${newId()}`));
    const work = { organisationId: organisation.id, revisionId: revision.id };
    const next = await service.deps.database.inOrganisation(organisation.id, (tx) => tx.client.query<{ dead_letter: string | null }>(`SELECT dead_letter FROM pgboss.job WHERE name = 'read-sheet' AND data->>'revisionId' = $1`, [revision.id]));
    expect(next.rows).toEqual([{ dead_letter: 'sheet-unread' }]);
    await unreadSheetWork(service.deps)(work);
    const found = await read(organisation, revision.id);
    expect(found).toMatchObject({ state: 'needs-entry', readerState: 'unavailable', pagesRead: null, version: revision.version + 1 });
    await unreadSheetWork(service.deps)(work);
    expect((await read(organisation, revision.id)).version).toBe(found.version);
    expect(await ok(organisation.officer.agent, 'readRevisionAgain', { params: { revisionId: revision.id } })).toMatchObject({ state: 'waiting', readerState: null });
    expect(service.faults.splice(0).join('')).toContain('sheet not read at any try');
  });

  it('what the reader noticed about the whole file stands first among the remarks and counts as something to look at', async () => {
    const organisation = await makeOrganisation(service);
    const { revision } = await upload(organisation, Buffer.from(`%PDF-1.4 ${newId()}`));
    const reading: SheetReading = { ...emptyReading('read', 12), hasTextLayer: true, text: 'two sheets', notices: [{ kind: 'several-sheets', page: 7, quote: 'SECTION 1: Identification' }] };
    await readSheetWork(service.deps, { read: async () => reading, close: async () => undefined })({ organisationId: organisation.id, revisionId: revision.id });
    const found = await read(organisation, revision.id);
    expect(found.remarks[0]).toMatchObject({ outcome: 'unmet', text: expect.stringMatching(/more than one safety data sheet: the next begins on page 7/) });
    // Four single values are missing, and the notice.
    expect(found.toLookAt).toBe(5);
  });

  it('keeps text of a PDF as text: script, NUL and halves of characters do not stop it (F20)', async () => {
    const organisation = await makeOrganisation(service);
    const { revision } = await upload(organisation, Buffer.from(`%PDF-1.4 ${newId()}`));
    const field = (value: string) => ({ value, page: 1, box: { x: 0, y: 0, width: 1, height: 1 }, quote: value, confidence: 0.9 });
    const hostile = 'Quarry\u0000bond \ud800 <script>alert(1)</script> \u202e04';
    const reading = { ...emptyReading('read', 1), hasTextLayer: true, productName: field(hostile), supplier: field("'; DROP TABLE revisions; --"), text: hostile };
    await readSheetWork(service.deps, { read: async () => reading, close: async () => undefined })({ organisationId: organisation.id, revisionId: revision.id });
    const found = await read(organisation, revision.id);
    expect(found).toMatchObject({ state: 'read', supplier: "'; DROP TABLE revisions; --" });
    expect(found.productName).toBe('Quarry bond   <script>alert(1)</script>  04');
  });

  it('set aside and taken back goes on where it was', async () => {
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    const revision = await uploadAndRead(organisation);
    const params = { revisionId: revision.id };
    const aside = await ok(agent, 'setRevisionAside', { params, version: revision.version });
    expect(aside.state).toBe('set-aside');
    expectProblem(await call(agent, 'saveRevision', { params, version: aside.version, body: asRead(revision) }), 422);
    expect(await ok(agent, 'takeRevisionBack', { params, version: aside.version })).toMatchObject({ state: 'read' });
  });
});

describe('a damaged object (F06)', () => {
  it('is noticed by its hash, never served as good, named to the reader, and healed by sending the file again', async () => {
    const organisation = await makeOrganisation(service);
    const { agent } = organisation.officer;
    const bytes = await pdf();
    const { revision } = await upload(organisation, bytes);
    const params = { revisionId: revision.id };
    const Key = `${organisation.id}/${revision.sha256}`;
    const damaged = Buffer.from(bytes);
    damaged[damaged.length - 20] = (damaged[damaged.length - 20] ?? 0) ^ 1;
    await bucket.send(new PutObjectCommand({ Bucket: testEnvironment('TEST_S3_BUCKET'), Key, Body: damaged, ContentLength: damaged.length }));
    expect(expectProblem(await call(agent, 'readRevisionFile', { params }), 503).detail).toMatch(/damaged or missing/);
    await service.readSheetNow(organisation.id, revision.id);
    expect(await read(organisation, revision.id)).toMatchObject({ state: 'needs-entry', readerState: 'unavailable' });
    expect(await upload(organisation, bytes)).toMatchObject({ isKnown: true });
    expect((await ok(agent, 'readRevisionFile', { params })).equals(bytes)).toBe(true);
    await ok(agent, 'readRevisionAgain', { params });
    await service.readSheetNow(organisation.id, revision.id);
    expect(await read(organisation, revision.id)).toMatchObject({ state: 'read' });
    // That the file was damaged is logged, for whoever runs the service.
    expect(service.faults.splice(0).join('')).toContain('stored file damaged or missing');
  });
});

it('nothing here was a fault of the service', () => expect(service.faults).toEqual([]));
