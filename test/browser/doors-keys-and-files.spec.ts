import { afterAll, beforeAll, describe, expect, it, jest } from '@jest/globals';
import PDFDocument from 'pdfkit';
import { type Browser, type Locator, type Page } from 'playwright-core';
import { roleNames, roles, type Role } from '#shared/common';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, sizes, withChromium, type Seat } from '#test/support/browser';
import { planDay, type Day } from '#test/support/browser-day';
import { addOrganisation, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartA } from '#test/support/demo-sheets';
import { blockOf, confirmAsNewProduct, dropFiles, hasValue, navigationOf, openSubject, signIn } from '#test/support/office-steps';
import { startRunningService, type RunningService } from '#test/support/running-service';

jest.setTimeout(120_000);

/** What each role sees in the rail, and the one thing it may begin on each page. */
const offered: Readonly<Record<Role, { readonly rail: readonly string[]; readonly begins: Readonly<Record<string, readonly string[]>> }>> = {
  owner: { rail: ['Today', 'Jobs', 'SDS library', 'Products and kits', 'People', 'Equipment', 'Tablets', 'Rules and sources', 'History'], begins: { Jobs: [], People: ['New person'], Equipment: [], Tablets: ['New tablet'] } },
  'safety-officer': { rail: ['Today', 'Jobs', 'SDS library', 'Products and kits', 'People', 'Equipment', 'Tablets', 'Rules and sources', 'History'], begins: { Jobs: ['New job'], 'Products and kits': ['New product', 'New kit'], People: ['New person'], Equipment: ['New machine'], Tablets: ['New tablet'] } },
  'crew-lead': { rail: ['Today', 'Jobs', 'SDS library', 'Products and kits', 'People', 'Equipment', 'Tablets', 'Rules and sources'], begins: { Jobs: ['New job'], 'Products and kits': [], People: [], Equipment: ['New machine'], Tablets: [] } },
  auditor: { rail: ['Jobs', 'SDS library', 'Products and kits', 'People', 'Rules and sources', 'History'], begins: { Jobs: [], 'Products and kits': [], People: [] } },
};

withChromium('Doors, keys and files', () => {
  describe('Doors, keys and files', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    let officer: Seat;
    let day: Day;
    const opened: Seat[] = [];
    const step = journey(() => ({ officer }));
    const seat = async (): Promise<Seat> => {
      const made = await openSeat(browser, service.url, sizes.desk);
      opened.push(made);
      return made;
    };
    const enter = async (role: Role, from = organisation): Promise<Seat> => {
      const made = await seat();
      await signIn(made.page, from.emails[role], names[role]);
      return made;
    };

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service);
      browser = await launchChromium();
      officer = await enter('safety-officer');
      day = await planDay(officer, [organisation.personIds[names['crew-lead']] ?? '']);
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });

    it.each(roles)('the rail and the pages offer %s what the work needs', async (role) => {
      const { page } = await enter(role);
      expect(await page.locator('.me').textContent()).toContain(roleNames[role]);
      expect(await navigationOf(page)).toEqual(offered[role].rail);
      for (const [label, begins] of Object.entries(offered[role].begins)) {
        await openSubject(page, label, label);
        const buttons = page.locator('kb-page-header').locator('a, button').filter({ hasText: /^\s*New / });
        expect([label, (await buttons.allTextContents()).map((text) => text.trim())]).toEqual([label, begins]);
      }
      for (const [label, path] of [['Today', '/today'], ['History', '/history'], ['Equipment', '/equipment'], ['Tablets', '/tablets']] as const) {
        if (offered[role].rail.includes(label)) continue;
        await page.goto(path);
        await page.getByRole('heading', { level: 1, name: 'There is no such page' }).waitFor();
      }
    });

    it('a wrong password says what to do; the way back leads to where one wanted to go; signing out closes it', async () => {
      const { page, complaints } = await seat();
      await page.goto('/people');
      await page.getByRole('heading', { name: 'Sign in' }).waitFor();
      await page.getByLabel('E-mail address').fill(organisation.emails.owner);
      await page.getByLabel('Password').fill('not the password');
      await page.getByRole('button', { name: 'Sign in' }).click();
      await page.getByText('E-mail address or password is wrong. Try again, or ask the owner to set a new password.').waitFor();
      await expectAccessible(page, 'Sign in refused');
      await page.getByLabel('Password').fill('plaster brass terrazzo');
      await page.getByRole('button', { name: 'Sign in' }).click();
      await page.getByRole('heading', { level: 1, name: 'People' }).waitFor();
      await page.getByRole('link', { name: 'Account' }).click();
      await page.getByRole('heading', { level: 1, name: 'Your account' }).waitFor();
      await expectAccessible(page, 'Account');
      await page.getByRole('button', { name: 'Sign out' }).last().click();
      await page.getByRole('heading', { name: 'Sign in' }).waitFor();
      complaints.expect(/401 /);
      await page.goto('/people');
      await page.getByRole('heading', { name: 'Sign in' }).waitFor();
      expect(await page.getByText(names.owner).count()).toBe(0);
    });

    it("another organisation's owner does not find the job, by list or by address", async () => {
      const other = await addOrganisation(service, [], 'Harbor Terrazzo Guild');
      const { page, complaints } = await enter('owner', other);
      await openSubject(page, 'Jobs', 'Jobs');
      await page.getByText('No jobs yet').waitFor();
      complaints.expect(/404 .*\/api\//);
      for (const path of [`/jobs/${day.job.id}`, day.path]) {
        await page.goto(path);
        await page.locator('kb-empty').waitFor();
        await page.getByText('Loading').waitFor({ state: 'detached' });
        expect(await page.locator('main').textContent()).not.toContain(day.job.siteName);
      }
      await expectAccessible(page, 'Not found');
    });

    step('plans and publishes by keyboard alone', async () => {
      const { page } = officer;
      await page.goto(day.path);
      const block = blockOf(page, 'Floor grinding', names['crew-lead']);
      await block.waitFor();
      await page.keyboard.press('Tab');
      expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Skip to the page');
      await page.keyboard.press('Enter');
      await tabTo(page, block);
      for (const end of ['09:15', '09:20', '09:25', '09:30', '09:35', '09:40']) {
        await page.keyboard.press('Shift+ArrowRight');
        await hasValue(block, `07:00 to ${end}`);
      }
      const lane = page.getByRole('group', { name: names['crew-lead'], exact: true });
      await lane.getByText('2 h 40').waitFor();
      await page.locator('.cdk-live-announcer-element').getByText(/Floor grinding, Dov Lindqvist, 07:00 to 09:40/).waitFor({ state: 'attached' });
      await page.keyboard.press('ArrowRight');
      await hasValue(block, '07:05 to 09:45');

      await page.keyboard.press('Enter');
      await expectAccessible(page, 'Shift with times open');
      await tabTo(page, page.getByRole('textbox', { name: 'to', exact: true }));
      await page.keyboard.press('Control+A');
      await page.keyboard.type('11:30');
      await page.keyboard.press('Enter');
      await lane.getByText('4 h 25').waitFor();
      await lane.getByText('over 4 h').waitFor();
      await page.getByText(/^saved \d\d:\d\d$/).waitFor();

      await tabTo(page, page.getByRole('button', { name: 'Publish', exact: true }), 'Shift+Tab');
      await page.keyboard.press('Enter');
      const dialog = page.getByRole('dialog');
      await dialog.getByText('1 person will be asked to sign.').waitFor();
      await tabTo(page, dialog.getByRole('button', { name: 'Publish', exact: true }));
      await page.keyboard.press('Enter');
      await page.getByText('Version 1 is published').waitFor();
      await dialog.waitFor({ state: 'detached' });
    });

    step('a plan that somebody else saved first shows both and loses neither', async () => {
      const lead = await enter('crew-lead');
      await lead.page.goto(day.path);
      const [mine, theirs] = [officer.page, lead.page].map((page) => blockOf(page, 'Floor grinding', names['crew-lead'])) as [Locator, Locator];
      await theirs.focus();
      await lead.page.keyboard.press('PageUp');
      await lead.page.getByText(/^saved \d\d:\d\d$/).waitFor();
      officer.complaints.expect(/412 .*\/plan$/);
      await mine.focus();
      await officer.page.keyboard.press('PageDown');
      await officer.page.getByText('Somebody changed this shift after you opened it.').waitFor();
      await officer.page.getByText('Dov Lindqvist 06:35 to 11:00').first().waitFor();
      await officer.page.getByText('Dov Lindqvist 07:35 to 12:00').first().waitFor();
      await expectAccessible(officer.page, 'Two saved at once');
      await officer.page.getByRole('button', { name: 'Take what is stored' }).click();
      await hasValue(mine, '07:35 to 12:00');
    });

    step('what is not a PDF, a picture without text, a locked and a damaged file each say so; a person enters one by hand', async () => {
      const { page } = officer;
      const whole = await buildDemoSheet(quarrybondPartA);
      await openSubject(page, 'SDS library', 'SDS library');
      await dropFiles(page, [
        { name: 'letter.txt', type: 'text/plain', bytes: Buffer.from('Dear customer, the sheet follows by post.') },
        { name: 'scan.pdf', type: 'application/pdf', bytes: await drawnPdf({}) },
        { name: 'locked.pdf', type: 'application/pdf', bytes: await drawnPdf({ userPassword: 'terrazzo', pdfVersion: '1.7' }) },
        { name: 'damaged.pdf', type: 'application/pdf', bytes: whole.subarray(0, Math.round(whole.length / 3)) },
      ]);
      const toEnter = page.getByRole('list', { name: 'To enter by hand' });
      const words = { 'letter.txt': 'not a PDF', 'scan.pdf': 'a scan without text', 'locked.pdf': 'locked with a password', 'damaged.pdf': 'damaged' };
      for (const [file, state] of Object.entries(words)) await toEnter.getByRole('listitem').filter({ hasText: file }).getByText(state, { exact: true }).waitFor();
      await expectAccessible(page, 'Files to enter by hand');

      await toEnter.getByRole('link', { name: 'letter.txt', exact: true }).click();
      await page.getByText('This file is not a PDF. It is kept as it came.').waitFor();
      await page.getByText('This file cannot be shown as a page.').waitFor();
      await expectAccessible(page, 'Not a PDF');
      await openSubject(page, 'SDS library', 'SDS library');

      await toEnter.getByRole('link', { name: 'scan.pdf', exact: true }).click();
      await page.getByRole('heading', { level: 1, name: 'Enter what the sheet says' }).waitFor();
      await page.getByText('This file is a picture of a sheet, without text to read. Enter what it says by hand, beside the page.').waitFor();
      await page.locator('kb-page-viewer .paper').waitFor();
      // No value is invented: what nobody typed is empty, and cannot be confirmed.
      expect(await page.getByLabel('Product name').inputValue()).toBe('');
      await page.getByRole('button', { name: 'Confirm sheet' }).click();
      await page.getByText('Some values need another look. They are marked.').waitFor();
      await expectAccessible(page, 'Entry by hand');
      await page.getByLabel('Product name').fill('Northlode Scan Primer');
      await page.getByRole('textbox', { name: 'Supplier' }).fill('Northlode Resins, Inc.');
      await page.getByLabel('Language of the sheet').selectOption({ label: 'English' });
      await page.getByLabel('Revision date').fill('2025-02-11');
      await page.getByRole('combobox', { name: 'Signal word' }).selectOption({ label: 'Danger' });
      await page.getByLabel('Hazard codes').fill('H314, H317');
      await page.getByLabel('Precautionary codes').fill('P280');
      await confirmAsNewProduct(page, 'Northlode Scan Primer', 'Northlode Resins, Inc.');
    });

    it('no page and no server complained', () => {
      expect(opened.flatMap(({ complaints }) => complaints.all)).toEqual([]);
      expect(service.faults).toEqual([]);
    });
  });
});

/** Presses Tab (or Shift+Tab) until it stands there, as a person without a mouse does. */
async function tabTo(page: Page, target: Locator, key: 'Tab' | 'Shift+Tab' = 'Tab'): Promise<void> {
  for (let press = 0; press < 80; press += 1) {
    if (await target.evaluate((element) => element === document.activeElement)) return;
    await page.keyboard.press(key);
  }
  throw new Error('Eighty presses did not lead there.');
}

/** A page with lines drawn on it and no text, as a scanner makes it. */
function drawnPdf(options: PDFKit.PDFDocumentOptions): Promise<Uint8Array> {
  const document = new PDFDocument({ size: 'LETTER', ...options });
  const chunks: Buffer[] = [];
  document.rect(72, 72, 460, 90).stroke().moveTo(72, 220).lineTo(500, 260).stroke();
  return new Promise((resolve, reject) => {
    document.on('data', (chunk: Buffer) => chunks.push(chunk));
    document.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
    document.on('error', reject);
    document.end();
  });
}
