import { afterAll, beforeAll, describe, expect, jest } from '@jest/globals';
import { type Browser, type Page } from 'playwright-core';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, sizes, withChromium, type Seat } from '#test/support/browser';
import { addOrganisation, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartA, quarrybondPartB, quarrybondPartC } from '#test/support/demo-sheets';
import { linkMailedTo } from '#test/support/library-steps';
import { dropFiles, openSubject, signIn } from '#test/support/office-steps';
import { startRunningService, type RunningService } from '#test/support/running-service';

jest.setTimeout(180_000);

const supplierMail = `care-${Date.now()}@northlode.example`;
const asRight = 'Northlode Resins of Superior';

/** A sheet that is wrong goes back to its supplier, the answer comes, and what was corrected on it is offered on the next. */
withChromium('Care of the sheets', () => {
  describe('Care of the sheets', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    const seats = {} as Record<'officer' | 'outside', Seat>;
    const step = journey(() => seats);

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service, []);
      browser = await launchChromium();
      seats.officer = await openSeat(browser, service.url, sizes.desk);
      seats.outside = await openSeat(browser, service.url, { width: 390, height: 844 });
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });
    const pdf = async (spec: typeof quarrybondPartA) => ({ name: spec.fileName, type: 'application/pdf', bytes: await buildDemoSheet(spec) });
    const openFirst = async (page: Page, name: string) => {
      await page.getByRole('list', { name: 'To check' }).getByRole('link', { name }).click();
      await page.getByRole('heading', { level: 1, name: 'Check what was read' }).waitFor();
    };

    step('a sheet nobody confirmed, of no product yet, goes back with what was found', async () => {
      const { page } = seats.officer;
      await signIn(page, organisation.emails['safety-officer'], names['safety-officer']);
      await openSubject(page, 'SDS library', 'SDS library');
      await dropFiles(page, [await pdf(quarrybondPartA)]);
      await openFirst(page, quarrybondPartA.productName);
      await page.getByRole('button', { name: 'Send back' }).click();
      const dialog = page.getByRole('dialog');
      expect(await dialog.getByLabel('Product').inputValue()).toBe(quarrybondPartA.productName);
      const message = dialog.getByLabel('Message');
      expect(await message.inputValue()).toContain(`We cannot use your safety data sheet of ${quarrybondPartA.productName}`);
      await dialog.getByLabel('Language of the e-mail').selectOption({ label: 'Español' });
      expect(await message.inputValue()).toContain('No podemos usar su hoja');
      await dialog.getByLabel('Language of the e-mail').selectOption({ label: 'English' });
      await message.fill('Section 14 names no UN number.\nPlease send a corrected sheet.');
      await dialog.getByLabel("Supplier's e-mail address").fill(supplierMail);
      await expectAccessible(page, 'Sending a sheet back');
      await dialog.getByRole('button', { name: 'Send it back' }).click();
      await page.getByText(`Sent back to ${supplierMail}`).waitFor();
      await page.getByText('This sheet is set aside.').waitFor();
      await expectAccessible(page, 'A sheet that was sent back');
    });

    step('the supplier reads what was found and sends another', async () => {
      const { page } = seats.outside;
      await page.goto(await linkMailedTo(supplierMail));
      await page.getByText('Section 14 names no UN number.').waitFor();
      await dropFiles(page, [await pdf(quarrybondPartC)]);
      await page.getByText('The sheet has arrived.').waitFor();
    });

    step('the answer is linked to the sheet that was sent back, both ways', async () => {
      const { page } = seats.officer;
      await page.goto('/sheets/keeping');
      const row = page.getByRole('list', { name: 'Requests to suppliers' }).getByRole('listitem').filter({ hasText: 'answered' });
      await row.getByRole('link', { name: /^sent back/ }).click();
      await page.getByText(/Sent back to .* Answered/).waitFor();
      await page.getByRole('link', { name: 'The sheet that came' }).click();
      await page.getByText('as the answer to one that was sent back').waitFor();
      await page.getByRole('heading', { level: 1, name: 'Check what was read' }).waitFor();
    });

    step('what the officer corrects on it is offered on the next sheet of the supplier, with its reason', async () => {
      const { page } = seats.officer;
      const values = page.getByRole('list', { name: 'Values read from the sheet' });
      await values.getByRole('button', { name: quarrybondPartC.supplier.name }).click();
      await page.keyboard.press('e');
      await page.getByLabel('Supplier', { exact: true }).fill(asRight);
      await page.keyboard.press('Enter');
      const saved = page.waitForResponse((response) => response.request().method() === 'PUT' && /\/api\/sheets\//.test(response.url()));
      await page.getByRole('button', { name: 'Save for later' }).click();
      expect((await saved).ok()).toBe(true);
      await openSubject(page, 'SDS library', 'SDS library');
      await dropFiles(page, [await pdf(quarrybondPartB)]);
      await openFirst(page, quarrybondPartB.productName);
      await values.getByRole('button', { name: quarrybondPartB.supplier.name }).click();
      await page.getByText(`on ${quarrybondPartC.fileName}`).waitFor();
      await page.getByText(`What is read as “${quarrybondPartC.supplier.name}” is written “${asRight}”.`).waitFor();
      await expectAccessible(page, 'A remembered correction');
      // The reading stands until the officer says otherwise.
      expect(await values.getByRole('button', { name: quarrybondPartB.supplier.name, exact: true }).count()).toBe(1);
      await page.keyboard.press('u');
      await values.getByRole('button', { name: asRight, exact: true }).waitFor();
    });

    step('the list of what is remembered names the sheet, and forgets on request', async () => {
      const { page } = seats.officer;
      page.once('dialog', (dialog) => void dialog.accept());
      await page.goto('/sheets/corrections');
      const rows = page.getByRole('list', { name: 'Remembered corrections' }).getByRole('listitem');
      expect(await rows.first().textContent()).toContain(quarrybondPartC.fileName);
      await expectAccessible(page, 'Remembered corrections');
      await rows.first().getByRole('button', { name: /^Remove/ }).click();
      await page.getByText('Nothing is remembered yet').waitFor();
      expect([...seats.officer.complaints.all, ...seats.outside.complaints.all]).toEqual([]);
    });
  });
});
