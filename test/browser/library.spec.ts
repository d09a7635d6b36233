import { afterAll, beforeAll, describe, expect, jest } from '@jest/globals';
import { type Browser, type Page } from 'playwright-core';
import { type Shift } from '#shared/jobs';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, sizes, withChromium, type Seat } from '#test/support/browser';
import { addOrganisation, answerOf, callFrom, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartA, quarrybondPartC } from '#test/support/demo-sheets';
import { confirmedSheet, linkMailedTo, powderKit, publishedJob, type JobWithKit } from '#test/support/library-steps';
import { dropFiles, lookThrough, openSubject, signIn } from '#test/support/office-steps';
import { startRunningService, type RunningService } from '#test/support/running-service';

jest.setTimeout(120_000);

const phone = { width: 390, height: 844 };
const [lead, crew] = [names['crew-lead'], 'Marisol Tena'];
const { productName } = quarrybondPartC;
const supplier = quarrybondPartC.supplier.name;
// Mail of earlier runs lies in the same folder.
const supplierMail = `sheets-${Date.now()}@northlode.example`;
/** A dead link is answered 404: the browser says so by itself. */
const deadLink = /404 .*\/api\/(?:open-requests|site)/;

/** Keeping the library: a revision that reaches two jobs, a supplier's link, a queue of files, a printed code. */
withChromium('Keeping the library', () => {
  describe('Keeping the library', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    const seats = {} as Record<'officer' | 'outside', Seat>;
    let jobs: readonly JobWithKit[] = [];
    let [requestLink, siteLink] = ['', ''];
    const step = journey(() => seats);

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service, [crew]);
      browser = await launchChromium();
      seats.officer = await openSeat(browser, service.url, sizes.desk);
      seats.outside = await openSeat(browser, service.url, phone);
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });

    const pdf = async (spec = quarrybondPartC) => ({ name: spec.fileName, type: 'application/pdf', bytes: await buildDemoSheet(spec) });
    const outside = (link: string): Promise<unknown> => seats.outside.page.goto('about:blank').then(() => seats.outside.page.goto(link));
    const read = (jobWithKit: JobWithKit): Promise<Shift> => answerOf<Shift>(callFrom(seats.officer, 'readShift', { params: { shiftId: jobWithKit.shift.id } }));

    step('two open jobs have published a checklist with the product', async () => {
      const { page } = seats.officer;
      await signIn(page, organisation.emails['safety-officer'], names['safety-officer']);
      const sheet = await confirmedSheet(seats.officer, { productName, supplier, revisedOn: '2021-01-11', signalWord: 'danger', hazardCodes: ['H315', 'H317', 'H335', 'H372'] });
      const kit = await powderKit(seats.officer, sheet.productId ?? '');
      const people = [lead, crew].map((name) => organisation.personIds[name] ?? '');
      jobs = [await publishedJob(seats.officer, 'Process hall floor', kit.id, people), await publishedJob(seats.officer, 'Freight shed, bay 7', kit.id, people)];
    });

    step('a newer sheet says before confirming what it adds and whom it reaches', async () => {
      const { page } = seats.officer;
      await openSubject(page, 'SDS library', 'SDS library');
      await dropFiles(page, [await pdf()]);
      await page.getByRole('list', { name: 'To check' }).getByRole('link', { name: productName }).click();
      await page.getByRole('heading', { level: 1, name: 'Check what was read' }).waitFor();
      await page.getByText('The new sheet adds H318 and H350.').waitFor();
      expect(await page.locator('kb-reach-panel kb-note').textContent()).toContain('Two open jobs use it; nobody has signed there yet. Once it is confirmed and applied, both crews are asked to be briefed and sign again.');
      expect(await page.getByRole('list', { name: 'Open shifts with this product' }).getByRole('listitem').count()).toBe(2);
      await page.getByText('new hazard').waitFor();
      await expectAccessible(page, 'What a sheet reaches');
    });

    step('confirmed, Today says that two jobs must sign again, and leads to what changed', async () => {
      const { page } = seats.officer;
      await lookThrough(page);
      await page.getByRole('button', { name: 'Confirm sheet' }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByRole('radio', { name: new RegExp(productName) }).check();
      await dialog.getByRole('button', { name: 'Confirm sheet' }).click();
      await dialog.waitFor({ state: 'detached' });
      await openSubject(page, 'Today', 'What needs you, worst first');
      const item = page.getByRole('list', { name: 'What needs you' }).getByRole('listitem').filter({ hasText: `${productName}: the new sheet adds H318, H350` });
      expect(await item.textContent()).toContain('2 open jobs, 0 signatures on the older sheet.');
      await item.getByRole('link', { name: /See what changed/ }).click();
      await page.getByText('Applying it asks both crews to be briefed and sign again.').waitFor();
    });

    step('one action publishes both checklists again and asks both crews', async () => {
      const { page } = seats.officer;
      await page.getByRole('button', { name: 'Apply to open jobs' }).click();
      await page.getByRole('dialog').getByRole('button', { name: 'Apply this sheet' }).click();
      const outcome = page.getByRole('list', { name: 'Outcome' }).getByRole('listitem');
      await outcome.nth(1).waitFor();
      for (const { job } of jobs) expect(await outcome.filter({ hasText: job.name }).textContent()).toContain('version 2, 2 asked to sign');
      for (const each of jobs) {
        const { versions, hasUnpublishedChanges } = await read(each);
        expect([versions[0]?.number, versions[0]?.asked.map(({ state }) => state === 'signed'), hasUnpublishedChanges]).toEqual([2, [false, false], false]);
      }
      await page.getByRole('button', { name: 'Apply to open jobs' }).waitFor({ state: 'detached' });
    });

    step('the product shows the older revision, the sheet in use, and the Spanish one as missing', async () => {
      const { page } = seats.officer;
      await page.getByRole('link', { name: 'The product' }).click();
      await page.getByRole('heading', { level: 1, name: productName }).waitFor();
      await page.getByRole('list', { name: 'Older revisions' }).getByRole('link', { name: 'sheet of 11 Jan 2021' }).waitFor();
      expect(await page.getByRole('list', { name: 'Sheets in use' }).getByRole('listitem').nth(1).textContent()).toContain('no Spanish sheet');
      await page.getByRole('region', { name: 'Register of use' }).getByText('Process hall floor').first().waitFor();
      await expectAccessible(page, 'Product');
    });

    step('asks the supplier for the Spanish sheet; the mail holds a link', async () => {
      const { page } = seats.officer;
      await page.getByRole('button', { name: 'Ask for it in Spanish' }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByLabel("Supplier's e-mail address").fill(supplierMail);
      expect(await dialog.getByLabel('Message').inputValue()).toContain('in Spanish');
      await dialog.getByRole('button', { name: 'Send the request' }).click();
      await page.getByText(`${supplierMail} is asked for the sheet.`).waitFor();
      requestLink = await linkMailedTo(supplierMail);
    });

    step('with the link alone the supplier sees who asks for what, and nothing else', async () => {
      const { page } = seats.outside;
      await outside(requestLink);
      await page.getByText(productName).waitFor();
      expect(new URL(page.url()).hash).toBe('');
      expect(await page.getByRole('navigation').count()).toBe(0);
      expect(await page.getByRole('link').count()).toBe(0);
      await expectAccessible(page, "The supplier's page");
      await page.getByRole('button', { name: 'Español' }).click();
      await page.getByRole('heading', { name: 'Enviar una hoja de datos de seguridad' }).waitFor();
      await page.getByRole('button', { name: 'English' }).click();
      // The link is no session: what the office reads stays shut.
      for (const path of ['/api/session', '/api/products', '/api/sheets']) expect((await page.request.get(path)).status()).toBe(401);
    });

    step('a sheet that is sent arrives in the library, and the link is dead', async () => {
      const { page, complaints } = seats.outside;
      await dropFiles(page, [await pdf(quarrybondPartA)]);
      await page.getByText('The sheet has arrived.').waitFor();
      complaints.expect(deadLink);
      await outside(requestLink);
      await page.getByText('This link does not open any more.').waitFor();
      expect(await page.locator('body').textContent()).not.toContain(productName);
      const officer = seats.officer.page;
      await officer.goto('/sheets/keeping');
      const rows = officer.getByRole('list', { name: 'Requests to suppliers' }).getByRole('listitem');
      await rows.filter({ hasText: 'answered' }).waitFor();
      await expectAccessible(officer, 'Keeping current');
    });

    step('a withdrawn request leaves a dead link', async () => {
      const officer = seats.officer.page;
      await officer.getByRole('list', { name: 'Requests to suppliers' }).getByRole('link', { name: productName, exact: true }).click();
      await officer.getByRole('button', { name: 'Ask the supplier' }).click();
      const dialog = officer.getByRole('dialog');
      await dialog.getByLabel("Supplier's e-mail address").fill(`second.${supplierMail}`);
      await dialog.getByRole('button', { name: 'Send the request' }).click();
      const link = await linkMailedTo(`second.${supplierMail}`);
      await outside(link);
      await seats.outside.page.getByText(productName).waitFor();
      await officer.getByRole('button', { name: /^Withdraw/ }).click();
      await officer.getByRole('dialog').getByRole('button', { name: 'Withdraw the request' }).click();
      await officer.getByText('withdrawn', { exact: true }).waitFor();
      await outside(link);
      await seats.outside.page.getByText('This link does not open any more.').waitFor();
    });

    step('files in the queue are not lost by leaving and loading again: it goes on by itself on whatever page', async () => {
      const { page } = seats.officer;
      await openSubject(page, 'SDS library', 'SDS library');
      // What the first sheet left in the list outlived every page since.
      await page.getByRole('button', { name: 'Clear what is stored' }).click();
      // Nothing gets through until the page has been loaded again.
      await page.route('**/api/sheets', (route) => (route.request().method() === 'POST' ? new Promise<void>(() => undefined) : route.continue()));
      const files = Array.from({ length: 24 }, (_, at) => ({ name: `typed-${at + 1}.txt`, type: 'text/plain', bytes: Buffer.from(`Typed sheet ${at + 1} of ${organisation.emails.owner}`) }));
      await dropFiles(page, files);
      await page.getByText('0 of 24 stored.').waitFor();
      await page.unrouteAll({ behavior: 'ignoreErrors' });
      // Stopped on purpose, it does not start by itself; then it is told to, from a page that knows nothing of sheets.
      await page.getByRole('region', { name: 'Sheets on their way' }).getByRole('button', { name: 'Pause' }).click();
      await page.goto('/jobs');
      const status = page.getByRole('region', { name: 'Sheets on their way' });
      await status.getByText(/^Paused: \d+ of 24 stored/).waitFor();
      await expectAccessible(page, 'The frame with sheets on their way');
      await status.getByRole('button', { name: 'Go on' }).click();
      await page.reload();
      await status.waitFor({ state: 'detached', timeout: 60_000 });
      await openSubject(page, 'SDS library', 'SDS library');
      await page.getByText('24 of 24 stored.').waitFor();
      await page.getByRole('button', { name: 'Clear what is stored' }).click();
      await page.getByRole('list', { name: 'Uploads' }).waitFor({ state: 'detached' });
      const { items } = await answerOf<{ items: { fileName: string }[] }>(page.request.get('/api/sheets?state=needs-entry&limit=100'));
      expect(items.filter(({ fileName }) => fileName.startsWith('typed-')).length).toBeGreaterThanOrEqual(24);
    });

    step('a paused queue starts nothing and goes on when told', async () => {
      const { page } = seats.officer;
      await page.route('**/api/sheets', async (route) => {
        if (route.request().method() === 'POST') await new Promise((resolve) => setTimeout(resolve, 300));
        await route.continue();
      });
      await dropFiles(page, Array.from({ length: 8 }, (_, at) => ({ name: `later-${at + 1}.txt`, type: 'text/plain', bytes: Buffer.from(`Later sheet ${at + 1}`) })));
      await page.getByRole('main').getByRole('button', { name: 'Pause' }).click();
      await page.getByText('Paused: what is on its way ends').waitFor();
      await page.getByRole('list', { name: 'Uploads' }).getByText('waiting', { exact: true }).first().waitFor();
      await page.getByRole('main').getByRole('button', { name: 'Go on' }).click();
      await page.getByText('8 of 8 stored.').waitFor();
      await page.unrouteAll({ behavior: 'ignoreErrors' });
    });

    step('a printed code opens the sheets of its job on a phone, also after a reload', async () => {
      const officer = seats.officer.page;
      await openSubject(officer, 'Jobs', 'Jobs');
      await officer.getByRole('link', { name: 'Process hall floor' }).click();
      await officer.getByRole('link', { name: /site code/ }).click();
      const made = officer.waitForResponse((response) => response.request().method() === 'POST' && response.url().endsWith('/site-code'));
      await officer.getByRole('button', { name: 'Make a code' }).click();
      const { address } = (await (await made).json()) as { address: string };
      siteLink = new URL(address).pathname + new URL(address).hash;
      await officer.getByRole('img', { name: /^Code that opens/ }).waitFor();
      await expectAccessible(officer, 'Site code');

      const { page } = seats.outside;
      await outside(siteLink);
      await page.getByRole('heading', { level: 1, name: 'Process hall floor' }).waitFor();
      expect(new URL(page.url()).hash).toBe('');
      await page.getByText('Emergency: 911.').waitFor();
      await expectAccessible(page, 'The page of the code');
      await page.getByRole('button', { name: 'Plan of the day' }).click();
      await page.getByRole('region', { name: /^Plan of / }).getByText('HEPA vacuum or wet.').first().waitFor();
      await page.getByRole('button', { name: `Open the sheet of ${productName}, English` }).click();
      await page.getByRole('img', { name: `${productName}, page 1` }).waitFor();
      await page.goBack();
      await page.getByRole('heading', { level: 1, name: 'Process hall floor' }).waitFor();
      await page.reload();
      await page.getByRole('heading', { level: 1, name: 'Process hall floor' }).waitFor();
    });

    step('revoked, the code opens nothing', async () => {
      const officer: Page = seats.officer.page;
      await officer.getByRole('button', { name: 'Revoke' }).click();
      await officer.getByRole('dialog').getByRole('button', { name: 'Revoke the code' }).click();
      await officer.getByText('Revoked', { exact: true }).waitFor();
      const { page } = seats.outside;
      await outside(siteLink);
      await page.getByText('This code is not in use any more.').waitFor();
      expect(await page.locator('body').textContent()).not.toContain(productName);
    });

    step('nobody heard a complaint from a page', async () => {
      expect(Object.entries(seats).flatMap(([seat, { complaints }]) => complaints.all.map((words) => `${seat}: ${words}`))).toEqual([]);
      expect(service.faults.filter((line) => line.includes('"level":50'))).toEqual([]);
    });
  });
});
