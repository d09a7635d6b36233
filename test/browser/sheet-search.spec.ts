import { afterAll, beforeAll, describe, expect, jest } from '@jest/globals';
import { join } from 'node:path';
import { type Browser } from 'playwright-core';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, sizes, withChromium, type Seat } from '#test/support/browser';
import { addOrganisation, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartB } from '#test/support/demo-sheets';
import { confirmedSheet } from '#test/support/library-steps';
import { dropFiles, openSubject, signIn } from '#test/support/office-steps';
import { startRunningService, type RunningService } from '#test/support/running-service';

jest.setTimeout(120_000);

/** `PICTURES` names a folder for screenshots, to be looked at. */
const pictures = process.env['PICTURES'];
const screens = { ...sizes, phone: { width: 390, height: 844 } };

/** The officer's search box: names, slips, text, filters, keys, the address. */
withChromium('Finding a sheet', () => {
  describe('Finding a sheet', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    const seats = {} as Record<'officer', Seat>;
    const step = journey(() => seats);
    const found = () => seats.officer.page.getByRole('list', { name: 'Sheets found' });
    const box = () => seats.officer.page.getByRole('searchbox', { name: /Name, supplier, CAS number/ });

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service);
      browser = await launchChromium();
      seats.officer = await openSeat(browser, service.url, sizes.desk);
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });
    async function lookAt(name: string): Promise<void> {
      const { page } = seats.officer;
      if (pictures)
        for (const [size, viewport] of Object.entries(screens)) {
          await page.setViewportSize(viewport);
          await page.screenshot({ path: join(pictures, `search-${name}-${size}.png`), fullPage: true });
        }
      await page.setViewportSize(sizes.desk);
      await expectAccessible(page, `Search: ${name}`);
    }

    step('typing finds by name, and the address says what was looked for', async () => {
      const { page } = seats.officer;
      await signIn(page, organisation.emails['safety-officer'], names['safety-officer']);
      for (const [productName, supplier, signalWord] of [['Tarnseal Epoxy Primer', 'Eastmere Coatings', 'warning'], ['Quarrybond 40 Part A', 'Northlode Resins, Inc.', 'warning'], ['Quarrybond 40 Topcoat', 'Northlode Resins, Inc.', 'danger']] as const) await confirmedSheet(seats.officer, { productName, supplier, signalWord });
      await openSubject(page, 'SDS library', 'SDS library');
      await dropFiles(page, [{ name: quarrybondPartB.fileName, type: 'application/pdf', bytes: await buildDemoSheet(quarrybondPartB) }]);
      await page.getByRole('list', { name: 'To check' }).getByRole('link', { name: quarrybondPartB.productName }).waitFor();
      await box().fill('quarry');
      await page.getByText('3 sheets match.').waitFor();
      expect(await found().getByRole('link').allTextContents()).toEqual(['Quarrybond 40 Part A', 'Quarrybond 40 Topcoat', 'Quarrybond 40 Part B']);
      expect(new URL(page.url()).search).toBe('?q=quarry');
    });

    step('a filter narrows it, stays in the address, and a reload shows the same', async () => {
      const { page } = seats.officer;
      await page.getByLabel('Signal word').selectOption('danger');
      await page.getByLabel('State', { exact: true }).selectOption('confirmed');
      await page.getByText('1 sheet matches.').waitFor();
      expect(new URL(page.url()).search).toBe('?q=quarry&signalWord=danger&state=confirmed');
      await page.reload();
      await page.getByText('1 sheet matches.').waitFor();
      expect([await box().inputValue(), await page.getByLabel('Signal word').inputValue()]).toEqual(['quarry', 'danger']);
      await page.getByRole('button', { name: 'Without filters' }).click();
      await page.getByText('3 sheets match.').waitFor();
    });

    step('arrows walk through what was found, Enter opens it, back is the search again', async () => {
      const { page } = seats.officer;
      await box().focus();
      await page.keyboard.press('ArrowDown');
      await page.keyboard.press('ArrowDown');
      expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Quarrybond 40 Topcoat');
      await page.keyboard.press('Escape');
      expect(await page.evaluate(() => document.activeElement?.getAttribute('type'))).toBe('search');
      await page.keyboard.press('ArrowDown');
      await page.keyboard.press('Enter');
      await page.waitForURL(/\/sheets\/[0-9a-f-]{36}/);
      await page.goBack();
      await page.getByText('3 sheets match.').waitFor();
      await lookAt('names');
    });

    step('words of the text show where they stand', async () => {
      const { page } = seats.officer;
      await box().fill('breathing apparatus');
      await page.getByText('1 sheet matches.').waitFor();
      expect(await page.locator('mark').allTextContents()).toContain('apparatus');
      await lookAt('text');
    });

    step('a slip of the keyboard is named, and what was meant is one press away', async () => {
      const { page } = seats.officer;
      await box().fill('tarnsael primre');
      await page.getByText('Nothing here is called “tarnsael primre”.').waitFor();
      await lookAt('similar');
      await page.getByRole('button', { name: 'tarnseal primer', exact: true }).click();
      await page.waitForURL(/q=tarnseal%20primer|q=tarnseal\+primer/);
      expect(await box().inputValue()).toBe('tarnseal primer');
      await found().getByText('Name', { exact: true }).waitFor();
    });

    step('nothing found offers the way back to all sheets', async () => {
      const { page } = seats.officer;
      await box().fill('9999-99-9');
      await page.getByText('No sheet matches', { exact: true }).waitFor();
      await lookAt('nothing');
      await page.getByRole('button', { name: 'Show all sheets' }).click();
      await page.getByRole('heading', { name: 'Confirmed' }).waitFor();
      expect([new URL(page.url()).search, await box().inputValue()]).toEqual(['', '']);
      expect(seats.officer.complaints.all).toEqual([]);
      expect(service.faults).toEqual([]);
    });
  });
});
