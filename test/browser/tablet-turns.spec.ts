import { afterAll, beforeAll, describe, expect, jest } from '@jest/globals';
import { type Browser } from 'playwright-core';
import { type PairingCode } from '#shared/tablets';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, sizes, withChromium, type Seat } from '#test/support/browser';
import { kitOf, planDay, publishDay, type Day } from '#test/support/browser-day';
import { addOrganisation, answerOf, callFrom, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartA } from '#test/support/demo-sheets';
import { signIn } from '#test/support/office-steps';
import { startRunningService, type RunningService } from '#test/support/running-service';
import { drawSignature, givePin, keepForOffline, sign, signerRow, typePin } from '#test/support/tablet-steps';

jest.setTimeout(120_000);

const dov = names['crew-lead'];
const abe = 'Abe Kowalczyk';
const lost = /ERR_INTERNET_DISCONNECTED/;

/** What goes another way than planned on the tablet: doubt, a wrong PIN, no signal on a stop, a withdrawn tablet. */
withChromium('The tablet, when things go another way', () => {
  describe('The tablet, when things go another way', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    let office: Seat;
    let tablet: Seat;
    let day: Day;
    let pairing: PairingCode;
    const step = journey(() => ({ office, tablet }));

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service, [abe]);
      browser = await launchChromium();
      office = await openSeat(browser, service.url, sizes.desk);
      tablet = await openSeat(browser, service.url, sizes.tablet);
      await signIn(office.page, organisation.emails['safety-officer'], names['safety-officer']);
      const kit = await kitOf(office, quarrybondPartA.fileName, await buildDemoSheet(quarrybondPartA));
      day = await planDay(office, [dov, abe].map((name) => organisation.personIds[name] ?? ''), kit);
      await publishDay(office, day);
      pairing = await answerOf<PairingCode>(callFrom(office, 'addTablet', { body: { name: 'Tablet 2' } }));
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });

    step('a wrong code is refused in words, the right one pairs; lower case and no space will do', async () => {
      const { page, complaints } = tablet;
      complaints.expect(/4\d\d .*\/api\/tablet\//);
      await page.goto('/tablet/pair');
      const code = page.getByLabel('Code from the office');
      await code.fill('WRNG CDE2');
      await page.getByRole('button', { name: 'Pair', exact: true }).click();
      await page.locator('#pairing-trouble').getByText(/\w+/).waitFor();
      await expectAccessible(page, 'Pairing refused');
      await code.fill(pairing.code.toLowerCase().replace(' ', ''));
      await page.getByRole('button', { name: 'Pair', exact: true }).click();
      await page.getByText(/^Paired\. This is "Tablet 2" of/).waitFor();
      complaints.noLongerExpect(/4\d\d .*\/api\/tablet\//);
    });

    step('for a day without a tablet the office prints the list: the published text, to tick and sign by hand', async () => {
      const { page } = office;
      await page.goto(day.path);
      await page.getByRole('link', { name: 'List on paper' }).click();
      await page.getByRole('columnheader', { name: 'Signature' }).waitFor();
      for (const name of [dov, abe]) await page.getByRole('cell', { name, exact: true }).waitFor();
      await page.getByText('no one may punish me for it').waitFor();
      await expectAccessible(page, 'List on paper');
      await page.getByRole('link', { name: 'Español' }).click();
      await page.getByRole('columnheader', { name: 'Firma' }).waitFor();
    });

    step('the whole list and the safety data sheets can be read, in both languages', async () => {
      const { page } = tablet;
      await page.getByRole('link', { name: 'Back to today' }).last().click();
      await page.getByRole('link', { name: /Process hall floor/ }).waitFor();
      await keepForOffline(page);
      await page.getByRole('button', { name: 'Español' }).click();
      await page.getByRole('heading', { level: 1, name: '¿En qué trabajo están?' }).waitFor();
      expect(await page.locator('html').getAttribute('lang')).toBe('es');
      await page.getByRole('link', { name: /Process hall floor/ }).click();
      await page.getByRole('heading', { name: 'Pulir el piso' }).waitFor();
      await expectAccessible(page, 'Job in Spanish');
      await page.getByRole('link', { name: 'Leer toda la lista' }).click();
      await page.getByRole('heading', { level: 2, name: 'Por la mañana' }).waitFor();
      await expectAccessible(page, 'The whole list in Spanish');
      await page.getByRole('button', { name: 'English' }).click();
      await page.getByRole('heading', { level: 2, name: 'In the morning' }).waitFor();
      await page.getByRole('link', { name: 'Back to the job' }).click();
      await page.getByRole('link', { name: 'Safety data sheets' }).first().click();
      await page.getByRole('link', { name: quarrybondPartA.productName }).waitFor();
      await expectAccessible(page, 'Sheets on the tablet');
      await page.getByRole('link', { name: quarrybondPartA.productName }).click();
      await page.locator('kb-page-viewer .paper').waitFor();
      await page.getByRole('button', { name: /text/i }).click();
      await page.getByText('SAFETY DATA SHEET').first().waitFor();
      await expectAccessible(page, 'A sheet on the tablet');
    });

    step('[HAZ-05] the sheet opens from the tablet with no signal, also after a restart (trap 17, conduct 11)', async () => {
      const { page, context, complaints } = tablet;
      await page.getByRole('link', { name: 'All sheets' }).click();
      await page.getByText('Kept on this tablet: opens with no signal.').waitFor();
      complaints.expect(lost);
      await context.setOffline(true);
      await page.reload();
      await page.getByRole('link', { name: quarrybondPartA.productName }).click();
      await page.locator('kb-page-viewer .paper').waitFor();
      await page.getByRole('button', { name: /text/i }).click();
      await page.getByText('SAFETY DATA SHEET').first().waitFor();
      await expectAccessible(page, 'A sheet without signal');
      await context.setOffline(false);
      complaints.noLongerExpect(lost);
    });

    step('signing wants the own line, ink, and a PIN that is not too plain and the same twice', async () => {
      const { page } = tablet;
      await page.goto(`/tablet/jobs/${day.shift.id}/sign`);
      await signerRow(page, dov).getByRole('button').click();
      await page.getByText('No briefing was done on this tablet yet. Sign only after you were briefed.').waitFor();
      await page.getByRole('button', { name: 'Done' }).click();
      await page.getByText('Answer the question above, then sign here.').waitFor();
      await page.getByRole('button', { name: 'Yes, matches' }).click();
      await page.getByRole('button', { name: 'Done' }).click();
      await page.getByText('Sign in the box first.').waitFor();
      await page.getByRole('button', { name: 'Not me' }).click();

      await drawSignature(page, { name: dov, language: 'en' });
      for (const scheme of ['light', 'dark', 'light'] as const) {
        await page.emulateMedia({ colorScheme: scheme, reducedMotion: 'reduce' });
        await page.waitForFunction(inkStandsOut, scheme);
      }
      await page.getByRole('button', { name: 'Done' }).click();
      await typePin(page, `${dov}, choose a PIN`, 'PIN keypad', '123');
      await page.getByText('A PIN has 4 to 6 digits.').waitFor();
      await page.getByRole('button', { name: 'Erase' }).click({ clickCount: 3 });
      await typePin(page, `${dov}, choose a PIN`, 'PIN keypad', '1234');
      await page.getByText('Too easy to guess. Choose another.').waitFor();
      await typePin(page, `${dov}, choose a PIN`, 'PIN keypad', '2468');
      await typePin(page, 'Type the same PIN again', 'PIN keypad', '2469');
      await page.getByText('The two PINs differ. Choose again.').waitFor();
      await expectAccessible(page, 'Choosing a PIN');
      await page.getByRole('button', { name: 'Back', exact: true }).click();
      // The office hands the first lead a start PIN: nobody has a PIN yet who could witness.
      await office.page.goto('/people');
      await office.page.getByRole('list', { name: 'People' }).getByRole('link', { name: dov }).click();
      await office.page.getByRole('button', { name: 'Give a start PIN' }).click();
      await office.page.getByText('It is not shown again.').waitFor();
      await expectAccessible(office.page, 'A start PIN');
      const startPin = ((await office.page.locator('.digits').textContent()) ?? '').replace(/\D/g, '');
      await givePin(page, { name: dov, language: 'en', pin: '2468', newPin: { startPin } });
      await page.getByText(/^Dov Lindqvist signed at \d\d:\d\d\. Sent\.$/).waitFor();
      await signerRow(page, dov).getByRole('button').click();
      await page.getByText(/^Signed at \d\d:\d\d\. Nothing more to do\.$/).waitFor();
    });

    step('the lead witnesses with the right PIN only', async () => {
      const { page, complaints } = tablet;
      complaints.expect(/422 .*\/api\/tablet\//);
      await drawSignature(page, { name: abe, language: 'en' });
      await page.getByRole('button', { name: 'Done' }).click();
      await typePin(page, `${abe}, choose a PIN`, 'PIN keypad', '9753');
      await typePin(page, 'Type the same PIN again', 'PIN keypad', '9753');
      await typePin(page, `${dov}, type your own PIN`, 'PIN keypad', '8642');
      await page.locator('kb-pin-entry kb-note').getByText(/PIN/).waitFor();
      expect(await signerRow(page, abe).textContent()).toContain('signing now');
      await page.getByRole('button', { name: 'Back', exact: true }).click();
      await page.getByRole('button', { name: 'Not me' }).click();
      await signerRow(page, abe).getByText('not yet').waitFor();
      complaints.noLongerExpect(/422 .*\/api\/tablet\//);
    });

    step('"I can’t sign yet" goes to the officer with its reason, and off the shared screen', async () => {
      const { page } = tablet;
      await signerRow(page, abe).getByRole('button').click();
      await page.getByRole('button', { name: 'I can’t sign yet' }).click();
      await page.getByText('That is all right. Nobody may punish you for it. Say why:').waitFor();
      await page.getByLabel('No fit test for my mask').check();
      await page.getByLabel('In your own words (you can leave this empty)').fill('New beard since March.');
      await expectAccessible(page, 'I can’t sign yet');
      await page.getByRole('button', { name: 'Tell them' }).click();
      await page.getByText(/^Abe Kowalczyk, thank you\. Talk to your lead now; do not start work\. Sent\.$/).waitFor();
      await signerRow(page, abe).getByText('talk to the lead').waitFor();
      expect(await page.locator('body').textContent()).not.toMatch(/fit test|beard/i);

      await office.page.goto(day.path);
      await office.page.getByRole('list', { name: 'Signatures on version 1' }).getByRole('listitem').filter({ hasText: abe }).getByText(/could not sign yet/).waitFor();
      const action = office.page.getByRole('list', { name: 'Corrective actions' }).getByRole('listitem');
      await action.first().waitFor();
      expect(await action.allTextContents()).toEqual([expect.stringMatching(/Abe Kowalczyk/)]);
    });

    step('a "No" without signal says that nobody was told, and whom to call', async () => {
      const { page, context, complaints } = tablet;
      await page.getByRole('link', { name: 'Back to the job' }).click();
      await page.getByRole('link', { name: 'Before it starts: Floor grinding' }).waitFor();
      complaints.expect(lost);
      await context.setOffline(true);
      await page.getByRole('link', { name: 'Before it starts: Floor grinding' }).click();
      await page.getByRole('button', { name: 'No, not yet' }).click();
      await page.getByText('Floor grinding is stopped.').waitFor();
      await page.getByText(/No signal: nobody has been told\. Call /).waitFor();
      await expectAccessible(page, 'Stopped without signal');
      await page.getByRole('link', { name: 'Back to the job' }).last().click();
      await page.getByText('Not sent yet: the office does not know.').waitFor();
      await page.getByRole('link', { name: 'All jobs' }).click();
      await page.getByRole('link', { name: 'Waiting list' }).click();
      await page.getByRole('listitem').filter({ hasText: 'Start check' }).getByText('waiting to send').waitFor();
      await expectAccessible(page, 'Waiting list');
      await context.setOffline(false);
      await page.getByRole('listitem').filter({ hasText: 'Start check' }).getByText('sent, on record').waitFor();
      complaints.noLongerExpect(lost);
    });

    step('a withdrawn tablet says so and keeps what it has', async () => {
      const { page, complaints } = tablet;
      await office.page.goto('/tablets');
      await office.page.getByRole('button', { name: 'Withdraw Tablet 2' }).click();
      await expectAccessible(office.page, 'Withdraw a tablet');
      await office.page.getByRole('dialog').getByRole('button', { name: /^Withdraw/ }).click();
      await office.page.getByRole('list', { name: 'Tablets' }).getByText('withdrawn', { exact: true }).waitFor();
      complaints.expect(/401 .*\/api\/tablet\//);
      await page.goto(`/tablet/jobs/${day.shift.id}/sign`);
      await page.getByText('This tablet is not paired with the office. Nothing can be sent.').waitFor();
      await sign(page, { name: abe, language: 'en', pin: '9753', newPin: { witness: { name: dov, pin: '2468' } } });
      await page.getByText(/^Abe Kowalczyk signed at \d\d:\d\d\. Kept on this tablet, waiting to send\.$/).waitFor();
      await page.getByText('2 waiting to send.').waitFor();
      await expectAccessible(page, 'Withdrawn');
    });

    step('no page and no server complained', async () => {
      expect([...office.complaints.all, ...tablet.complaints.all]).toEqual([]);
      expect(service.faults).toEqual([]);
    });
  });
});

/** Whether the ink in the signature box is dark on the light ground, light on the dark one. */
function inkStandsOut(scheme: 'light' | 'dark'): boolean {
  const canvas = document.querySelector('canvas');
  const pixels = canvas?.getContext('2d')?.getImageData(0, 0, canvas.width, canvas.height).data ?? [];
  const greens = Array.from({ length: pixels.length / 4 }, (_, at) => at * 4).filter((at) => (pixels[at + 3] ?? 0) > 200).map((at) => pixels[at + 1] ?? 0);
  return greens.length > 50 && greens.every((green) => (scheme === 'light' ? green < 110 : green > 140));
}
