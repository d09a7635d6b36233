import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { createGuardedReader, type GuardedReader } from '#server/sds/reader/guarded-reader';
import { readSheetWork } from '#server/sds/sheets-work';
import { readerStates } from '#shared/sheets';
import { call, ok } from '#test/support/call';
import { buildDemoSheet, quarrybondPartC } from '#test/support/demo-sheets';
import { circularPdfs, manyPages, polyglot } from '#test/support/odd-pdfs';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { startService, type Service } from '#test/support/service';

const megabyte = 1024 * 1024;
/** Our own memory may breathe, but not take in what a file swells to. */
const breathBytes = 400 * megabyte;

/** F18: whatever a file is, it gets a named state, and the next sheet is read. The way of the worker: its reader, its work. */
describe('files that are not what they seem', () => {
  let service: Service;
  let organisation: Organisation;
  let reader: GuardedReader;
  beforeAll(async () => {
    service = await startService();
    organisation = await makeOrganisation(service);
    // Time enough on a slow machine for what ends; what never ends is stopped.
    reader = createGuardedReader({ wallClockMs: 45_000, maxRssBytes: 1500 * megabyte, entry: fileURLToPath(new URL('../../server/sds/reader/child.ts', import.meta.url)) });
  });
  afterAll(async () => {
    await reader.close();
    await service.stop();
  });

  async function readAs(bytes: Uint8Array, fileName = 'sheet.pdf') {
    const { revision } = await ok(organisation.officer.agent, 'uploadSheet', { file: { bytes, fileName } });
    await readSheetWork(service.deps, reader)({ organisationId: organisation.id, revisionId: revision.id });
    return ok(organisation.officer.agent, 'readRevision', { params: { revisionId: revision.id } });
  }
  let honest = 0;
  const expectNextIsRead = async () => expect(await readAs(await buildDemoSheet({ ...quarrybondPartC, productName: `Quarrybond ${(honest += 1)}` }))).toMatchObject({ state: 'read', productName: `Quarrybond ${honest}` });

  it.each(Object.entries(circularPdfs))('%s is named, and the next sheet is read', async (_, bytes) => {
    const { state, readerState } = await readAs(bytes);
    expect(readerStates).toContain(readerState);
    // Without a text layer it goes on to be read from pictures; everything else is for a person.
    expect([readerState, state]).toEqual([readerState, readerState === 'no-text-layer' ? 'waiting' : 'needs-entry']);
    await expectNextIsRead();
  }, 180_000);

  it('one of 10,000 pages is named without taking our memory, and the next sheet is read', async () => {
    const bytes = manyPages(10_000);
    expect(bytes.length).toBeLessThan(3 * megabyte);
    const before = process.memoryUsage.rss();
    expect(await readAs(bytes)).toMatchObject({ state: 'needs-entry', readerState: 'too-large' });
    expect(process.memoryUsage.rss() - before).toBeLessThan(breathBytes);
    await expectNextIsRead();
  }, 240_000);

  it('a sheet that is also a web page and an archive is read as a sheet, and only ever handed out as one', async () => {
    const bytes = polyglot(await buildDemoSheet({ ...quarrybondPartC, productName: 'Quarrybond threefold' }));
    const revision = await readAs(bytes, 'sheet.html');
    expect(revision).toMatchObject({ state: 'read', readerState: 'read', productName: 'Quarrybond threefold' });
    const file = await call(organisation.auditor.agent, 'readRevisionFile', { params: { revisionId: revision.id } });
    expect(Buffer.compare(file.body as Buffer, Buffer.from(bytes))).toBe(0);
    expect(file.headers).toMatchObject({ 'content-type': 'application/pdf', 'x-content-type-options': 'nosniff', 'content-security-policy': "sandbox; default-src 'none'", 'content-disposition': expect.stringContaining('filename="sheet.pdf"') });
    await expectNextIsRead();
  }, 120_000);

  it('the same file sent as an archive gives what is inside, and nothing runs', async () => {
    const outcome = await ok(organisation.officer.agent, 'uploadZip', { file: { bytes: polyglot(await buildDemoSheet(quarrybondPartC)), fileName: 'sheets.zip' } });
    expect(outcome.files.map(({ fileName }) => fileName)).toEqual(['inside.txt']);
  });

  it('a web page that carries a sheet further on is no sheet', async () => {
    const bytes = Buffer.concat([Buffer.from('<html><script>1</script><!--'), await buildDemoSheet(quarrybondPartC)]);
    const { revision } = await ok(organisation.officer.agent, 'uploadSheet', { file: { bytes, fileName: 'sheet.pdf' } });
    expect(revision).toMatchObject({ state: 'needs-entry', readerState: 'not-a-pdf' });
    const file = await call(organisation.auditor.agent, 'readRevisionFile', { params: { revisionId: revision.id } });
    expect(file.headers).toMatchObject({ 'content-type': 'application/octet-stream', 'content-disposition': expect.stringMatching(/^attachment/), 'x-content-type-options': 'nosniff' });
  });
});
