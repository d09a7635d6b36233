import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, jest } from '@jest/globals';
import { type Browser, type Page } from 'playwright-core';
import { demoEquipment } from '#server/local/demo/demo.data';
import { type Role, roles } from '#shared/common';
import { endpoints, type EndpointName } from '#shared/endpoints';
import { type Job } from '#shared/jobs';
import { expectAccessible } from '#test/support/axe';
import { journey, launchChromium, openSeat, siteTimeZone, sizes, withChromium, type Seat } from '#test/support/browser';
import { addOrganisation, answerOf, callFrom, names, type SignIns } from '#test/support/browser-organisation';
import { buildDemoSheet, quarrybondPartA, quarrybondPartB, quarrybondPartC } from '#test/support/demo-sheets';
import { addTask, blockOf, confirmAsNewProduct, dragEnd, dropFiles, hasValue, lookThrough, navigationOf, openSubject, signIn, taskRow } from '#test/support/office-steps';
import { projectRoot, startRunningService, type RunningService } from '#test/support/running-service';
import { drawSignature, givePin, keepForOffline, proveByPin, sign, signerRow } from '#test/support/tablet-steps';

jest.setTimeout(120_000);

const [dov, marisol, abe] = ['Dov Lindqvist', 'Marisol Tena', 'Abe Kowalczyk'];
const pins = { [dov]: '2468', [marisol]: '1357', [abe]: '9753' };
const lost = /ERR_INTERNET_DISCONNECTED/;
const daysAgo = (days: number): string => new Date(Date.now() - days * 24 * 3600 * 1000).toISOString().slice(0, 10);
const supplier = quarrybondPartA.supplier.name;

/** The main job, clicked as four people and a crew on one tablet; each step stands on the one before. */
withChromium('The main job', () => {
  describe('The main job', () => {
    let service: RunningService;
    let browser: Browser;
    let organisation: SignIns;
    const seats = {} as Record<Role | 'tablet', Seat>;
    let code = '';
    let shiftAddress = '';
    let sentenceSigned = '';
    const step = journey(() => seats);

    beforeAll(async () => {
      service = await startRunningService();
      organisation = await addOrganisation(service, [abe]);
      browser = await launchChromium();
      for (const role of roles) seats[role] = await openSeat(browser, service.url, sizes.desk);
      seats.tablet = await openSeat(browser, service.url, sizes.tablet);
    });
    afterAll(async () => {
      await browser?.close();
      await service?.stop();
    });

    const enter = async (role: Role): Promise<Page> => {
      const { page } = seats[role];
      await signIn(page, organisation.emails[role], names[role]);
      return page;
    };

    step('the owner adds a person and a tablet, and sees its pairing code', async () => {
      const { page } = seats.owner;
      await page.goto('/');
      await page.getByRole('heading', { name: 'Sign in' }).waitFor();
      await expectAccessible(page, 'Sign in');
      await enter('owner');
      await page.getByRole('heading', { level: 1, name: 'What needs you, worst first' }).waitFor();
      await expectAccessible(page, 'Today');

      await openSubject(page, 'People', 'People');
      await page.getByRole('link', { name: 'New person' }).click();
      await page.getByLabel('Name', { exact: true }).fill(marisol);
      await page.getByLabel('Reads').selectOption({ label: 'Español' });
      await page.getByLabel('Employer').fill(organisation.organisationName);
      await page.getByLabel('Silica training').fill(daysAgo(100));
      await page.getByLabel('Hazard communication training').fill(daysAgo(100));
      await page.getByLabel('Over 18, confirmed').check();
      await page.getByRole('button', { name: 'Add a respirator' }).click();
      await page.getByLabel('Maker, model, style, size').fill('Tern H2 half mask, size M');
      await page.getByLabel('Cleared on').fill(daysAgo(200));
      await page.getByLabel('Fit tested on').fill(daysAgo(60));
      await expectAccessible(page, 'New person');
      await page.getByRole('button', { name: 'Add person' }).click();
      await page.getByRole('region', { name: 'Person' }).getByRole('heading', { name: marisol }).waitFor();
      expect(await page.getByRole('list', { name: 'People' }).getByRole('listitem').filter({ hasText: marisol }).textContent()).toContain('trained, mask fitted');

      await openSubject(page, 'Tablets', 'Tablets');
      await page.getByRole('button', { name: 'New tablet' }).click();
      await page.getByLabel('Tablet name').fill('Tablet 1');
      await page.getByRole('button', { name: 'Make a pairing code' }).click();
      code = (await page.getByLabel('Pairing code', { exact: true }).textContent()) ?? '';
      expect(code).toMatch(/^[A-Z2-9]{4} [A-Z2-9]{4}$/);
      expect(await page.getByRole('list', { name: 'Tablets' }).textContent()).toContain('waits to be paired');
      await expectAccessible(page, 'Tablets');
    });

    step('the safety officer drops three sheets, waits until they are read and confirms each beside its page', async () => {
      const page = await enter('safety-officer');
      await openSubject(page, 'SDS library', 'SDS library');
      await expectAccessible(page, 'SDS library, empty');
      const specs = [quarrybondPartA, quarrybondPartB, quarrybondPartC];
      await dropFiles(page, await Promise.all(specs.map(async (spec) => ({ name: spec.fileName, type: 'application/pdf', bytes: await buildDemoSheet(spec) }))));
      await page.getByText('3 stored.').waitFor();
      const toCheck = page.getByRole('list', { name: 'To check' });
      await toCheck.getByRole('listitem').nth(2).waitFor();
      expect(await toCheck.getByRole('link').allTextContents()).toEqual(expect.arrayContaining(specs.map(({ productName }) => productName)));
      await expectAccessible(page, 'SDS library');

      // The hardener in full: a value, where it stands on the page, and a correction.
      await toCheck.getByRole('link', { name: quarrybondPartB.productName }).click();
      await page.getByRole('heading', { level: 1, name: 'Check what was read' }).waitFor();
      const values = page.getByRole('list', { name: 'Values read from the sheet' });
      expect(await values.getByRole('group', { name: /^Signal word/ }).getAttribute('aria-label')).toMatch(/^Signal word: Danger,/);
      await values.getByRole('group', { name: /^Hazards/ }).getByRole('button').first().click();
      for (const hazard of quarrybondPartB.hazards) expect(await values.getByRole('group', { name: /^Hazards/ }).textContent()).toContain(hazard);
      await page.getByRole('img', { name: new RegExp(quarrybondPartB.productName) }).waitFor();
      const marked = page.locator('kb-page-viewer .mark');
      await marked.waitFor();
      const [mark, paper] = [await marked.boundingBox(), await page.locator('kb-page-viewer .paper').boundingBox()];
      expect(mark && paper && mark.width > 20 && mark.height > 4 && mark.y > paper.y && mark.y + mark.height < paper.y + paper.height).toBe(true);
      await expectAccessible(page, 'Sheet beside its page');
      await lookThrough(page);
      await confirmAsNewProduct(page, quarrybondPartB.productName, supplier);
      await page.getByText(`by ${names['safety-officer']}.`).waitFor();

      for (const spec of [quarrybondPartA, quarrybondPartC]) {
        await openSubject(page, 'SDS library', 'SDS library');
        await toCheck.getByRole('link', { name: spec.productName }).click();
        await page.getByRole('heading', { level: 1, name: 'Check what was read' }).waitFor();
        await lookThrough(page);
        await confirmAsNewProduct(page, spec.productName, supplier);
      }
      await openSubject(page, 'SDS library', 'SDS library');
      await page.getByRole('list', { name: 'Confirmed' }).getByRole('listitem').nth(2).waitFor();
      expect(await page.getByRole('list', { name: 'Confirmed' }).getByRole('listitem').filter({ hasText: 'in use' }).count()).toBe(3);
    });

    step('the same file again is recognised', async () => {
      const { page } = seats['safety-officer'];
      await dropFiles(page, [{ name: 'again.pdf', type: 'application/pdf', bytes: await buildDemoSheet(quarrybondPartA) }]);
      const uploads = page.getByRole('list', { name: 'Uploads' }).getByRole('listitem').filter({ hasText: 'recognised' });
      await uploads.waitFor();
      expect(await uploads.textContent()).toContain(`The same file was here already: ${quarrybondPartA.productName}`);
    });

    step('makes a kit of the three parts', async () => {
      const { page } = seats['safety-officer'];
      await openSubject(page, 'Products and kits', 'Products and kits');
      await expectAccessible(page, 'Products and kits');
      await page.getByRole('link', { name: 'New kit' }).click();
      await page.getByLabel('Kit name').fill('Quarrybond 40');
      // 25 ft² at 1/4 in: 0.5208 ft³ (common practice, no source).
      await page.getByLabel('Volume of one kit, mixed', { exact: true }).fill('0.520833');
      await page.getByLabel('Volume of one kit, mixed, unit').selectOption({ label: 'ft³' });
      await page.getByLabel('Mixing').fill('2');
      await page.getByLabel('In the bucket at most').fill('5');
      for (const [index, spec] of [quarrybondPartA, quarrybondPartB, quarrybondPartC].entries()) {
        await page.getByLabel('Add a part: find its product').fill(spec.productName);
        await page.getByRole('option', { name: `${spec.productName}, ${supplier}` }).click();
        await page.getByRole('list', { name: 'Parts' }).getByRole('listitem').nth(index).getByText(spec.productName).waitFor();
      }
      const powder = page.getByRole('list', { name: 'Parts' }).getByRole('listitem').nth(2);
      await powder.getByLabel('Form').selectOption({ label: 'powder' });
      await expectAccessible(page, 'New kit');
      await page.getByRole('button', { name: 'Add kit' }).click();
      await page.getByRole('heading', { level: 1, name: 'Quarrybond 40' }).waitFor();
      // Union of the parts' sheets; each code stands in one of them.
      const union = [...new Set([quarrybondPartA, quarrybondPartB, quarrybondPartC].flatMap(({ hazards }) => hazards))];
      for (const hazard of union) expect(await page.locator('.hazards').textContent()).toContain(hazard);
    });

    step('makes a job of 600 ft² at 1/4 in: 24 kits and 48 minutes of mixing', async () => {
      const { page } = seats['safety-officer'];
      const machines = demoEquipment(daysAgo);
      for (const body of Object.values(machines)) await answerOf(callFrom(seats['safety-officer'], 'addEquipment', { body }));
      await openSubject(page, 'Jobs', 'Jobs');
      await page.getByRole('link', { name: 'New job' }).click();
      await page.getByLabel('Job name').fill('Process hall floor');
      await page.getByLabel('Site', { exact: true }).fill('Tollgate Creamery, process hall');
      await page.getByLabel('Who controls the site').fill('Tollgate Creamery Cooperative');
      await page.getByLabel('Time zone').selectOption({ label: siteTimeZone });
      await page.getByLabel('Setting').selectOption({ label: 'indoors, enclosed' });
      await page.getByLabel('Room volume', { exact: true }).fill('38,000');
      await page.getByLabel('Area', { exact: true }).fill('600');
      await page.getByLabel('Thickness', { exact: true }).fill('1/4');
      await page.getByLabel('Target profile (CSP)').fill('5');
      await page.getByLabel('Floor covering').selectOption({ label: 'bare concrete' });
      await page.getByLabel('Year built').fill('2011');
      for (const survey of ['Asbestos', 'Lead']) await page.getByLabel(survey).selectOption({ label: 'no survey needed' });
      await page.getByLabel('Survey', { exact: true }).fill('Bare concrete of 2011; looked at by Dov Lindqvist');
      await page.getByLabel('Engines or fuel heaters used inside').selectOption({ label: 'no' });
      await page.getByLabel('First-aider').fill(dov);
      await page.getByLabel('Eyewash at hand').selectOption({ label: 'yes' });
      await page.getByLabel('Emergency number').fill('911');
      await page.getByLabel('Address for the ambulance').fill('14 Tollgate Road, Superior, WI, north dock');
      await page.getByLabel('Host hazards').fill('Ammonia cooling: leave by the north door when the horn sounds.');
      await expectAccessible(page, 'New job');
      await page.getByRole('button', { name: 'Add job' }).click();
      await page.getByRole('heading', { level: 1, name: 'Process hall floor' }).waitFor();
      expect(await page.getByLabel('Date of the new shift').inputValue()).toBe(new Intl.DateTimeFormat('en-CA', { timeZone: siteTimeZone }).format(new Date()));
      await expectAccessible(page, 'Job');

      await page.getByRole('button', { name: 'Add shift' }).click();
      await page.getByRole('button', { name: 'Choose people' }).click();
      for (const name of [dov, marisol, abe]) await page.getByRole('checkbox', { name }).check();
      await page.getByLabel('Competent person').selectOption({ label: dov });
      await page.getByRole('checkbox', { name: 'Quarrybond 40' }).check();
      await page.getByRole('region', { name: 'Kits' }).getByText('24 kits, 48 min of mixing, 24 powder dumps').waitFor();
      await expectAccessible(page, 'Shift, people and kits open');
      await page.getByRole('button', { name: 'Done with people and kits' }).click();
      shiftAddress = new URL(page.url()).pathname;
    });

    step('plans the day; a dragged edge is answered at once', async () => {
      const { page } = seats['safety-officer'];
      await addTask(page, { kind: 'Floor grinding', tool: 'Floor grinder G1, 25 in', collector: 'Collector C1', people: [{ name: dov, from: '07:00', to: '08:30' }] });
      await addTask(page, { kind: 'Edge grinding', tool: 'Edge grinder E1, 5 in', collector: 'Vacuum V2', people: [{ name: marisol, from: '07:00', to: '10:00' }] });
      await addTask(page, { kind: 'Shot blasting', tool: 'Shot blaster S1, 15 in', collector: 'Collector C2', people: [{ name: abe, from: '09:30', to: '12:00' }] });
      await addTask(page, { kind: 'Powder mixing', tool: 'Paddle mixer M1', collector: 'Bucket extraction B1', people: [{ name: marisol, from: '12:30', to: '14:00' }] });

      // Table 1, rows (xii) and (xiii): 29 CFR 1926.1153(c)(1).
      expect(await taskRow(page, 'Floor grinding').textContent()).toMatch(/Table 1, xiii.*Collector 412 cfm\. Maker asks 353\..*none under Table 1/s);
      expect(await taskRow(page, 'Edge grinding').textContent()).toMatch(/Table 1, xii.*125 asked\./s);
      const lane = page.getByRole('group', { name: marisol, exact: true });
      await lane.getByText(/Table 1 time, all jobs: 3 h\s*$/).waitFor();
      expect(await lane.getByText('over 4 h').count()).toBe(0);

      const edge = blockOf(page, 'Edge grinding', marisol);
      await dragEnd(page, edge, 90);
      await hasValue(edge, '07:00 to 11:30');
      await lane.getByText('4 h 30').waitFor();
      await lane.getByText('over 4 h').waitFor();
      await lane.getByText('mask rule changes 11:00').waitFor();
      // Row (xii), indoors, more than four hours: APF 10, a half mask.
      expect(await taskRow(page, 'Edge grinding').textContent()).toMatch(/half mask, P100/);
      await page.getByText(/^saved \d\d:\d\d$/).waitFor();

      // And back: the mask goes with it.
      await dragEnd(page, edge, -120);
      await lane.getByText('2 h 30').waitFor();
      expect(await lane.getByText('over 4 h').count()).toBe(0);
      await page.getByText(/^saved \d\d:\d\d$/).waitFor();
      await page.reload();
      await lane.getByText('2 h 30').waitFor();
      await expectAccessible(page, 'Shift');
    });

    step('[SIL-04] time logged past the plan counts beside it; what wears is computed from a stated rate only (trap 4)', async () => {
      const { page } = seats['safety-officer'];
      const lane = page.getByRole('group', { name: marisol, exact: true });
      await taskRow(page, 'Edge grinding').getByRole('button', { name: 'Edge grinding', exact: true }).click();
      await page.getByRole('button', { name: `Log time worked: ${marisol}` }).click();
      await page.getByLabel(`${marisol} worked to`).fill('13:30');
      await lane.getByText('6 h 30').waitFor();
      expect(await taskRow(page, 'Edge grinding').textContent()).toMatch(/half mask/);
      await expectAccessible(page, 'Shift with a log');
      await page.getByRole('button', { name: `Remove logged time: ${marisol}` }).click();
      await lane.getByText('2 h 30').waitFor();
      await page.getByRole('button', { name: 'Done', exact: true }).click();

      const uses = page.getByRole('region', { name: 'What it uses up' });
      await uses.getByText('Steel shot: amount not known.').waitFor();
      await uses.getByRole('button', { name: 'State a rate: Steel shot' }).click();
      await uses.getByRole('textbox', { name: 'Amount' }).fill('0.4');
      await uses.getByLabel('Unit').selectOption('kg');
      await uses.getByLabel('Counted by').selectOption('m2');
      await uses.getByLabel('Stated by').fill('our own count of November');
      await expectAccessible(page, 'Stating a rate');
      await uses.getByRole('button', { name: 'Use this rate' }).click();
      // Derived: 600 ft² are 55.74 m², times 0.4 kg.
      await uses.getByText('Steel shot: 22.3 kg.').waitFor();
      await page.getByText(/^saved \d\d:\d\d$/).waitFor();
    });

    step('sees blasting and mixing held, and opens blasting by a basis signed with a typed name', async () => {
      const { page } = seats['safety-officer'];
      expect(await blockOf(page, 'Shot blasting', abe).getAttribute('aria-label')).toContain('may not start');
      expect(await taskRow(page, 'Shot blasting').textContent()).toMatch(/May not start.*Not a Table 1 task\./s);
      expect(await taskRow(page, 'Powder mixing').textContent()).toMatch(/Not decided.*24 dumps\..*Does the silica rule apply\?/s);
      await page.getByRole('button', { name: 'Publish with 2 tasks held' }).waitFor();

      await page.getByRole('button', { name: 'why: Shot blasting' }).click();
      await page.locator('kb-why-panel').getByText(/1926\.1153/).first().waitFor();
      await expectAccessible(page, 'Shift with a reason open');
      await page.getByRole('button', { name: 'why: Shot blasting' }).click();

      await page.getByRole('button', { name: 'Choose a basis: Shot blasting' }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByLabel('8-hour average').fill('18');
      await dialog.getByLabel('Conditions').fill('Enclosed hall, blaster S1 with collector C2, up to three hours.');
      await dialog.getByLabel('Your name, as your signature').fill('Somebody Else');
      await expectAccessible(page, 'Sign a basis');
      seats['safety-officer'].complaints.expect(/400 .*\/bases$/);
      await dialog.getByRole('button', { name: 'Sign this basis' }).click();
      await dialog.getByText(`Type your own name as it stands here: ${names['safety-officer']}.`).waitFor();
      await dialog.getByLabel('Your name, as your signature').fill(names['safety-officer']);
      await dialog.getByRole('button', { name: 'Sign this basis' }).click();
      await dialog.waitFor({ state: 'detached' });
      await page.getByRole('button', { name: 'Publish with 1 task held' }).waitFor();
      expect(await taskRow(page, 'Shot blasting').textContent()).not.toMatch(/May not start/);
    });

    step('publishes version 1, which asks three people', async () => {
      const { page } = seats['safety-officer'];
      await page.getByRole('button', { name: 'Publish with 1 task held' }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByText('3 people will be asked to sign.').waitFor();
      await dialog.getByRole('listitem').filter({ hasText: 'Powder mixing' }).waitFor();
      await expectAccessible(page, 'Publish');
      await dialog.getByRole('button', { name: 'Publish with 1 task held' }).click();
      await page.getByText('Version 1 is published').waitFor();
      const asked = page.getByRole('list', { name: 'Signatures on version 1' }).getByRole('listitem');
      expect((await asked.allTextContents()).map((text) => text.replace(/\s+/g, ' ').trim())).toEqual(expect.arrayContaining([expect.stringMatching(/Dov Lindqvist.*English.*not yet/), expect.stringMatching(/Marisol Tena.*Español.*not yet/), expect.stringMatching(/Abe Kowalczyk.*English.*not yet/)]));
      await expectAccessible(page, 'Shift, published');
    });

    step('the crew lead pairs the tablet, picks the job and answers the morning lines', async () => {
      const { page } = seats.tablet;
      seats.tablet.complaints.expect(/401 .*\/api\/tablet\//);
      await page.goto('/tablet/');
      await page.getByRole('link', { name: 'Pair this tablet' }).last().click();
      await page.getByLabel('Code from the office').fill(code);
      await expectAccessible(page, 'Pair this tablet');
      await page.getByRole('button', { name: 'Pair', exact: true }).click();
      await page.getByText(`Paired. This is "Tablet 1" of ${organisation.organisationName}.`).waitFor();
      seats.tablet.complaints.noLongerExpect(/401 .*\/api\/tablet\//);
      await page.getByRole('link', { name: 'Back to today' }).last().click();
      const job = page.getByRole('link', { name: /Process hall floor/ });
      await job.waitFor();
      expect(await job.textContent()).toMatch(/0 of 3 signed.*version 1/s);
      await keepForOffline(page);
      await expectAccessible(page, 'Which job');
      await job.click();

      await page.getByRole('region', { name: 'Tasks' }).getByRole('heading', { name: 'Floor grinding' }).waitFor();
      expect(await page.getByRole('region', { name: 'Tasks' }).getByRole('listitem').filter({ hasText: 'Powder mixing' }).textContent()).toContain('Not decided');
      await expectAccessible(page, 'Job on the tablet');

      await page.getByRole('link', { name: /Morning briefing/ }).click();
      await page.getByRole('button', { name: new RegExp(`${dov}, lead`) }).click();
      const yes = page.getByRole('button', { name: 'Yes', exact: true });
      const lines = await yes.count();
      expect(lines).toBeGreaterThan(3);
      for (let line = 0; line < lines; line += 1) await yes.nth(line).click();
      await page.getByText('All lines are answered.').waitFor();
      await expectAccessible(page, 'Morning briefing');
      await page.getByRole('button', { name: 'Done', exact: true }).click();
      // Who briefs proves it: the first PIN of the first day, with the start PIN that the office gave.
      const office = seats['safety-officer'].page;
      await openSubject(office, 'People', 'People');
      await office.getByRole('list', { name: 'People' }).getByRole('link', { name: dov }).click();
      await office.getByRole('button', { name: 'Give a start PIN' }).click();
      await office.getByText('It is not shown again.').waitFor();
      await expectAccessible(office, 'A start PIN');
      const startPin = ((await office.locator('.digits').textContent()) ?? '').replace(/\D/g, '');
      await proveByPin(page, { name: dov, language: 'en', pin: pins[dov] ?? '', newPin: { startPin } });
      await page.getByRole('link', { name: /Morning briefing.*Done \d\d:\d\d by Dov Lindqvist.*sent/s }).waitFor();
    });

    step('each sets a PIN and signs in their own language, the second witnessed by the lead', async () => {
      const { page } = seats.tablet;
      await page.getByRole('link', { name: /Sign the day’s checklist/ }).click();
      await page.getByRole('heading', { name: 'Tap your name.' }).waitFor();
      await sign(page, { name: dov, language: 'en', pin: pins[dov] ?? '', newPin: null });
      await page.getByText(/^Dov Lindqvist signed at \d\d:\d\d\. Sent\.$/).waitFor();

      await drawSignature(page, { name: marisol, language: 'es' });
      const pane = page.locator('kb-sign-pane');
      expect(await pane.getAttribute('lang')).toBe('es');
      expect(await pane.textContent()).toMatch(/sus tareas: pulir las orillas/);
      sentenceSigned = ((await pane.locator('.sentence').textContent()) ?? '').trim();
      expect(sentenceSigned).toMatch(/en un idioma que entiendo\./);
      await savePicture(page, 'tablet-sign');
      await expectAccessible(page, 'Signing in Spanish');
      await givePin(page, { name: marisol, language: 'es', pin: pins[marisol] ?? '', newPin: { witness: { name: dov, pin: pins[dov] ?? '' } } });
      await page.getByText(/^Marisol Tena firmó a las \d\d:\d\d\. Enviado\.$/).waitFor();
      expect(await signerRow(page, marisol).textContent()).toMatch(/signed.*sent/s);
    });

    step('without signal a signature is kept on the tablet, also over a reload, and sent when the signal is back', async () => {
      const { page, context, complaints } = seats.tablet;
      complaints.expect(lost);
      await context.setOffline(true);
      await sign(page, { name: abe, language: 'en', pin: pins[abe] ?? '', newPin: { witness: { name: dov, pin: pins[dov] ?? '' } } });
      await page.getByText(/^Abe Kowalczyk signed at \d\d:\d\d\. Kept on this tablet, waiting to send\.$/).waitFor();
      // A new PIN and the signature.
      await page.getByText('2 waiting to send.').waitFor();
      expect(await signerRow(page, abe).textContent()).toMatch(/signed.*waiting to send/s);
      await expectAccessible(page, 'Signed without signal');

      await page.reload();
      await page.getByText('No signal. Kept on this tablet,').waitFor();
      await page.getByText('2 waiting to send.').waitFor();
      expect(await signerRow(page, abe).textContent()).toMatch(/signed.*waiting to send/s);
      const office = seats['safety-officer'].page;
      await office.goto(shiftAddress);
      await office.getByRole('list', { name: 'Signatures on version 1' }).getByRole('listitem').filter({ hasText: abe }).getByText('not yet').waitFor();

      await context.setOffline(false);
      await page.getByText('Everything is sent.').waitFor();
      complaints.noLongerExpect(lost);
      await page.getByRole('link', { name: 'Back to the job' }).click();
      await page.getByText('3 of 3 signed').waitFor();
      await office.reload();
      await office.getByRole('region', { name: 'Crew and signatures' }).getByText('3 of 3 signed version 1').waitFor();
    });

    step('"No" on a critical line stops the task; the office sees the corrective action and resolves it with evidence', async () => {
      const { page } = seats.tablet;
      await page.getByRole('link', { name: 'Before it starts: Floor grinding' }).click();
      await page.getByRole('heading', { level: 1, name: 'Before floor grinding starts' }).waitFor();
      const asked = (await page.locator('#live-line').textContent()) ?? '';
      await expectAccessible(page, 'Start check');
      await page.getByRole('button', { name: 'Add a number or a note' }).click();
      await page.getByLabel('Gauge number, filter serial, what you see').fill('gauge 5 under the mark');
      await page.getByRole('button', { name: 'No, not yet' }).click();
      await page.getByText('Floor grinding is stopped.').waitFor();
      await page.getByText('Sent.', { exact: true }).last().waitFor();
      await expectAccessible(page, 'Stopped');
      await page.getByRole('link', { name: 'Back to the job' }).last().click();
      const task = page.getByRole('region', { name: 'Tasks' }).getByRole('listitem').filter({ hasText: 'Floor grinding' });
      await task.getByText(/Stopped by Dov Lindqvist, .*The office knows\./).waitFor();

      const office = seats['safety-officer'].page;
      await openSubject(office, 'Today', 'What needs you, worst first');
      const waiting = office.getByRole('list', { name: 'What needs you' }).getByRole('listitem').filter({ hasText: asked });
      await waiting.waitFor();
      await expectAccessible(office, 'Today with a stop');
      await waiting.getByRole('link').click();
      const action = office.getByRole('list', { name: 'Corrective actions' }).getByRole('listitem').filter({ hasText: asked });
      await action.getByText('Stopped').waitFor();
      expect(await action.textContent()).toContain(`Floor grinding: "No" to: ${asked} gauge 5 under the mark ${dov},`);
      await action.getByRole('button', { name: /^Resolve/ }).click();
      const dialog = office.getByRole('dialog');
      await dialog.getByLabel('What was done, and how it was checked').fill('Filter changed; 415 cfm with the vane anemometer at the hose end, Dov Lindqvist.');
      await expectAccessible(office, 'Resolve');
      await dialog.getByRole('button', { name: 'Resolve with this evidence' }).click();
      await action.getByText('Resolved').waitFor();

      await page.reload();
      await task.getByText(/Opened again .* by Ines Halloran: Filter changed; 415 cfm/).waitFor();
      await task.getByRole('link', { name: 'Before it starts: Floor grinding' }).click();
      for (const yes = page.getByRole('button', { name: 'Yes', exact: true }); ; ) {
        const line = await page.locator('#live-line').textContent();
        await yes.click();
        await page.waitForFunction((before) => document.querySelector('#live-line')?.textContent !== before, line);
        if (await page.getByRole('heading', { name: `${dov}, type your PIN` }).isVisible()) break;
      }
      await expectAccessible(page, 'A PIN for the start check');
      await proveByPin(page, { name: dov, language: 'en', pin: pins[dov] ?? '', newPin: null });
      await page.getByText('Floor grinding may start.').waitFor();
    });

    step('a changed fact makes version 2, and the tablet asks to sign again', async () => {
      const office = seats['safety-officer'].page;
      await office.goto(shiftAddress);
      await office.getByRole('button', { name: 'Change facts' }).click();
      const facts = office.getByRole('dialog');
      await facts.getByLabel('Host hazards').fill('Ammonia cooling: leave by the SOUTH door when the horn sounds; the north door is blocked today.');
      await expectAccessible(office, 'Change facts');
      await facts.getByRole('button', { name: 'Save facts' }).click();
      await office.getByText('The plan differs from version 1, which the crew signs. Publishing asks for new signatures.').waitFor();
      await office.getByRole('button', { name: 'Publish version 2 with 1 task held' }).click();
      const dialog = office.getByRole('dialog');
      await dialog.getByText('3 people will be asked to sign again; 3 had signed version 1.').waitFor();
      await dialog.getByRole('button', { name: 'Publish version 2 with 1 task held' }).click();
      await office.getByText('Version 2 is published').waitFor();
      await office.getByRole('region', { name: 'Version 1' }).getByText('3 of 3 signed it. Their signatures stay on record with this text.').waitFor();
      await savePicture(office, 'office-shift');

      const { page } = seats.tablet;
      await page.goto(`/tablet/jobs/${shiftAddress.split('/').at(-1)}`);
      await page.getByText(/^Version 2 was published \d\d:\d\d\. A newer list: sign again\.$/).waitFor();
      await page.getByRole('link', { name: /Sign the day’s checklist/ }).click();
      for (const name of [dov, marisol, abe]) await signerRow(page, name).getByText('sign again').waitFor();
      await sign(page, { name: dov, language: 'en', pin: pins[dov] ?? '', newPin: null });
      await page.getByText(/^Dov Lindqvist signed at \d\d:\d\d\. Sent\.$/).waitFor();
      await expectAccessible(page, 'Signed again');
    });

    step('the auditor finds a signature by person, with the exact text, and has the history as CSV', async () => {
      const page = await enter('auditor');
      await openSubject(page, 'History', 'Acknowledgement history');
      const rows = page.getByRole('region', { name: 'Acknowledgements' }).getByRole('row');
      await rows.nth(4).waitFor();
      expect(await rows.count()).toBe(1 + 4);
      await expectAccessible(page, 'History');
      await page.getByLabel('Person').selectOption({ label: marisol });
      await page.getByText('1 of 4', { exact: true }).waitFor();
      await page.getByRole('button', { name: new RegExp(`^${marisol}, entry`) }).click();
      await page.getByRole('img', { name: `Signature of ${marisol}` }).waitFor();
      expect(((await page.locator('kb-entry-detail dd[lang=es]').textContent()) ?? '').trim()).toBe(sentenceSigned);
      await expectAccessible(page, 'History, an entry open');
      await page.getByRole('button', { name: 'read the exact text signed' }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByText('These are the bytes on record.').waitFor();
      expect(((await dialog.locator('.sentence').textContent()) ?? '').trim()).toBe(sentenceSigned);
      await expectAccessible(page, 'The exact text');
      await dialog.getByRole('button', { name: 'Close' }).click();

      const csv = await downloaded(page, () => page.getByRole('link', { name: 'Export' }).click());
      expect(csv.split('\r\n').filter(Boolean)).toHaveLength(2);
      expect(csv).toContain(marisol);
      expect(csv).not.toContain(abe);
    });

    step('the auditor checks the record here and, with the file alone, without us', async () => {
      const { page } = seats.auditor;
      await page.getByRole('button', { name: 'Check the record' }).click();
      await page.getByText(/^All \d+ entries of the record are in order\.$/).waitFor();
      await expectAccessible(page, 'History, record checked');
      const download = page.waitForEvent('download');
      await page.getByRole('link', { name: 'Save the record' }).click();
      const file = await (await download).path();
      const { stdout } = await promisify(execFile)(process.execPath, [join(projectRoot, 'server/recordlog/verify.mjs'), file]);
      expect(stdout).toMatch(/^Good: \d+ entries/);
    });

    step('the auditor changes nothing: no such button, and the service answers 403', async () => {
      const { page } = seats.auditor;
      expect(await navigationOf(page)).toEqual(['Jobs', 'SDS library', 'Products and kits', 'People', 'Rules and sources', 'History']);
      const changing = /^(?:New|Add|Edit|Change|Save|Publish|Resolve|Decide|Choose|Confirm|Set|Withdraw|Remove|Reset)/;
      for (const [label, heading] of [['Jobs', 'Jobs'], ['SDS library', 'SDS library'], ['Products and kits', 'Products and kits'], ['People', 'People']] as const) {
        await openSubject(page, label, heading);
        await page.getByRole('list').nth(1).waitFor();
        expect(await page.locator('main').getByRole('button', { name: changing }).count()).toBe(0);
      }
      await page.goto(shiftAddress);
      await page.getByRole('list', { name: 'Signatures on version 2' }).waitFor();
      expect(await page.locator('main').getByRole('button', { name: changing }).count()).toBe(0);
      expect(await page.getByRole('slider').count()).toBe(0);
      await expectAccessible(page, 'Shift, for an auditor');

      const closed = (Object.keys(endpoints) as EndpointName[]).filter((name) => {
        const { access, method } = endpoints[name];
        return method !== 'GET' && Array.isArray(access) && !(access as readonly Role[]).includes('auditor');
      });
      expect(closed.length).toBeGreaterThan(15);
      const jobId = shiftAddress.split('/')[2] ?? '';
      const before = await answerOf<Job>(callFrom(seats.auditor, 'readJob', { params: { jobId } }));
      for (const name of closed) {
        const params = Object.fromEntries([...endpoints[name].path.matchAll(/:(\w+)/g)].map(([, param = '']) => [param, jobId]));
        expect([name, (await callFrom(seats.auditor, name, { params, body: {}, version: before.version })).status()]).toEqual([name, 403]);
      }
      expect(await answerOf<Job>(callFrom(seats.auditor, 'readJob', { params: { jobId } }))).toEqual(before);
    });

    step('no page and no server complained', async () => {
      expect(Object.fromEntries(Object.entries(seats).map(([name, { complaints }]) => [name, complaints.all]))).toEqual(Object.fromEntries(Object.keys(seats).map((name) => [name, []])));
      expect(service.faults).toEqual([]);
    });
  });
});

async function downloaded(page: Page, click: () => Promise<void>): Promise<string> {
  const download = page.waitForEvent('download');
  await click();
  const chunks: Buffer[] = [];
  for await (const chunk of await (await download).createReadStream()) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString('utf8');
}

/** A picture for the README, when a folder for it is named. */
async function savePicture(page: Page, name: string): Promise<void> {
  const folder = process.env['README_SHOTS'];
  if (folder) await page.screenshot({ path: join(folder, `${name}.png`) });
}
