import { afterAll, beforeAll, describe, expect, jest } from '@jest/globals';
import { type Browser } from 'playwright-core';
import { type SiteCode } from '#shared/library';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, sizes, withChromium, type Seat } from '#test/support/browser';
import { addOrganisation, answerOf, callFrom, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartC } from '#test/support/demo-sheets';
import { confirmedPdf, powderKit, publishedJob, type JobWithKit } from '#test/support/library-steps';
import { signIn } from '#test/support/office-steps';
import { startRunningService, type RunningService } from '#test/support/running-service';

jest.setTimeout(180_000);

const phone = { width: 390, height: 844 };
const [lead, crew] = [names['crew-lead'], 'Marisol Tena'];
const { productName } = quarrybondPartC;
const sheetName = `Open the sheet of ${productName}, English`;

/** The printed code on a phone: without anyone's name, without signal, and not after it was revoked. */
withChromium('The printed code', () => {
  describe('The printed code', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    let job: JobWithKit;
    let link = '';
    const seats = {} as Record<'officer' | 'crew', Seat>;
    const step = journey(() => seats);

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service, [crew]);
      browser = await launchChromium();
      seats.officer = await openSeat(browser, service.url, sizes.desk);
      seats.crew = await openSeat(browser, service.url, phone);
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });
    const makeCode = async (): Promise<string> => {
      const { address } = await answerOf<SiteCode>(callFrom(seats.officer, 'makeSiteCode', { params: { jobId: job.job.id } }));
      const { pathname, hash } = new URL(address ?? '');
      return pathname + hash;
    };
    const heading = () => seats.crew.page.getByRole('heading', { level: 1, name: 'Process hall floor' });

    step('a job has a published day and a sheet', async () => {
      await signIn(seats.officer.page, organisation.emails['safety-officer'], names['safety-officer']);
      const sheet = await confirmedPdf(seats.officer, { name: quarrybondPartC.fileName, bytes: await buildDemoSheet(quarrybondPartC) }, { productName, supplier: quarrybondPartC.supplier.name, signalWord: 'danger', hazardCodes: ['H317', 'H318'] });
      const kit = await powderKit(seats.officer, sheet.productId ?? '');
      job = await publishedJob(seats.officer, 'Process hall floor', kit.id, [lead, crew].map((name) => organisation.personIds[name] ?? ''));
      link = await makeCode();
    });

    step('the phone reads sheets and plan, and no name of the crew', async () => {
      const { page } = seats.crew;
      await page.goto(link);
      await heading().waitFor();
      await page.getByRole('button', { name: 'Plan of the day' }).click();
      await page.getByRole('region', { name: /^Plan of / }).getByText('HEPA vacuum or wet.').first().waitFor();
      const said = (await page.locator('body').textContent()) ?? '';
      for (const name of [lead, crew]) for (const part of name.split(' ')) expect(said).not.toContain(part);
      await expectAccessible(page, 'The plan behind the code');
      await page.getByText('Kept on this phone: it opens again without signal.').waitFor({ timeout: 120_000 });
    });

    step('without signal it opens again, in a new tab too, with its time; sheets and plan are there', async () => {
      const { context, page, complaints } = seats.crew;
      complaints.expect(/ERR_INTERNET_DISCONNECTED|Failed to load resource|504/);
      await context.setOffline(true);
      await page.goto('about:blank');
      await page.goto(link);
      await heading().waitFor();
      await page.getByText(/^As of .*No signal/).waitFor();
      await page.getByRole('button', { name: sheetName }).click();
      await page.getByRole('img', { name: `${productName}, page 1` }).waitFor();
      const second = await context.newPage();
      await second.goto('/site/job');
      await second.getByText(/^As of .*No signal/).waitFor();
      await second.getByRole('button', { name: 'Plan of the day' }).click();
      await second.getByText('HEPA vacuum or wet.').first().waitFor();
      await expectAccessible(second, 'The page of the code without signal');
      await second.close();
    });

    step('revoked meanwhile, the next contact takes it from the screen and from the phone', async () => {
      const { context, page, complaints } = seats.crew;
      await answerOf(callFrom(seats.officer, 'revokeSiteCode', { params: { jobId: job.job.id } }));
      // Still without contact: what is kept stays, with its time.
      await page.goto('/site/job');
      await page.getByText(/^As of .*No signal/).waitFor();
      complaints.expect(/404 .*\/api\/site/);
      await context.setOffline(false);
      await page.getByText('This code is not in use any more.').waitFor();
      await context.setOffline(true);
      await page.goto('about:blank');
      await page.goto(link);
      await page.getByText('There is no signal, so this code cannot open now.').waitFor();
      expect(await page.locator('body').textContent()).not.toContain(productName);
      await page.goto('/site/job');
      expect(await page.locator('body').textContent()).not.toContain(productName);
      await context.setOffline(false);
    });

    step('a new code opens as the first did', async () => {
      const { page } = seats.crew;
      await page.goto('about:blank');
      await page.goto(await makeCode());
      await heading().waitFor();
    });

    step("the office's own pages are never served from what a phone keeps", async () => {
      const { context, page } = seats.crew;
      await page.getByText('Kept on this phone: it opens again without signal.').waitFor({ timeout: 120_000 });
      await context.setOffline(true);
      await expect(page.goto('/sign-in')).rejects.toThrow('ERR_INTERNET_DISCONNECTED');
      await context.setOffline(false);
      expect(seats.crew.complaints.all).toEqual([]);
    });
  });
});
