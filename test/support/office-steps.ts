import { expect } from '@jest/globals';
import { type Locator, type Page } from 'playwright-core';
import { password } from './browser-organisation';

/** Signs in and waits for the frame of the office with this person's name in it. */
export async function signIn(page: Page, email: string, name: string): Promise<void> {
  await page.goto('/');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.locator('.me').getByText(name).waitFor();
}

export async function openSubject(page: Page, label: string, heading: string): Promise<void> {
  await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: label }).click();
  await page.getByRole('heading', { level: 1, name: heading }).waitFor();
}

/** What the rail offers, without the counts of what waits. */
export async function navigationOf(page: Page): Promise<string[]> {
  return page.getByRole('navigation', { name: 'Main' }).locator('a > span').allTextContents();
}

/** Lets files fall onto the page's drop zone, as from a folder window. */
export async function dropFiles(page: Page, files: readonly { readonly name: string; readonly bytes: Uint8Array; readonly type: string }[]): Promise<void> {
  const sent = files.map(({ name, bytes, type }) => ({ name, type, base64: Buffer.from(bytes).toString('base64') }));
  const dataTransfer = await page.evaluateHandle((given) => {
    const transfer = new DataTransfer();
    for (const { name, type, base64 } of given) transfer.items.add(new File([Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0))], name, { type }));
    return transfer;
  }, sent);
  for (const event of ['dragenter', 'dragover', 'drop']) await page.locator('kb-file-drop').dispatchEvent(event, { dataTransfer });
}

/** Says of each value that wants a look that it matches. Gives back how many there were. */
export async function lookThrough(page: Page): Promise<number> {
  const matches = page.getByRole('button', { name: 'Yes, matches' });
  let looked = 0;
  for (const status = page.getByRole('status').filter({ hasText: /a look\./ }); !/^Nothing more/.test((await status.textContent())?.trim() ?? ''); looked += 1) {
    if (looked > 11) throw new Error('More looks than lines.');
    const before = await status.textContent();
    await matches.click();
    await page.waitForFunction((words) => ![...document.querySelectorAll('[role=status]')].some((each) => each.textContent === words), before);
  }
  return looked;
}

/** Confirms the sheet that is open as a new product. */
export async function confirmAsNewProduct(page: Page, name: string, supplier: string): Promise<void> {
  await page.getByRole('button', { name: 'Confirm sheet' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('radio', { name: 'A new product' }).check();
  expect(await dialog.getByLabel('New product\'s name').inputValue()).toBe(name);
  expect(await dialog.getByLabel('New product\'s supplier').inputValue()).toBe(supplier);
  await dialog.getByRole('button', { name: 'Confirm sheet' }).click();
  await dialog.waitFor({ state: 'detached' });
  await page.getByText(`It is the sheet in use for ${name}.`).waitFor();
}

/** A block of the shift strip, by what it says and whose lane it is in. */
export const blockOf = (page: Page, task: string, person: string): Locator => page.getByRole('group', { name: person, exact: true }).getByRole('slider', { name: new RegExp(`^${task}`) });

/** The row of a task under the strip. */
export const taskRow = (page: Page, task: string): Locator => page.getByRole('list', { name: 'Tasks and what they need' }).getByRole('listitem').filter({ has: page.getByRole('button', { name: task, exact: true }) });

export interface PlannedTask {
  readonly kind: string;
  readonly tool?: string;
  readonly collector?: string;
  readonly people: readonly { readonly name: string; readonly from: string; readonly to: string }[];
}

/** Adds a task from the strip's menu and fills its editor. */
export async function addTask(page: Page, { kind, tool, collector, people }: PlannedTask): Promise<void> {
  await page.getByLabel('Add a task').selectOption({ label: kind });
  const editor = page.getByRole('region', { name: `Task: ${kind}` });
  if (tool) await editor.getByLabel('Machine or tool').selectOption({ label: tool });
  if (collector) {
    await editor.getByLabel('Dust control').selectOption({ label: 'collector or vacuum at the tool' });
    await editor.getByRole('combobox', { name: 'Collector or vacuum', exact: true }).selectOption({ label: collector });
  }
  for (const { name, from, to } of people) {
    await editor.getByRole('checkbox', { name }).check();
    for (const [label, time] of [[`${name} from`, from], [`${name} to`, to]] as const) {
      await editor.getByLabel(label).fill(time);
      // A time field tells of its change when it is left.
      await editor.getByLabel(label).blur();
    }
  }
  await editor.getByRole('button', { name: 'Done' }).click();
}

/** Pulls the end of a block to the right with the mouse, by minutes on the strip's own scale. */
export async function dragEnd(page: Page, block: Locator, byMinutes: number): Promise<void> {
  const [box, start, end] = [await boxOf(block), Number(await block.getAttribute('aria-valuenow')), await endMinute(block)];
  const pixels = (box.width / (end - start)) * byMinutes;
  const y = box.y + box.height / 2;
  await page.mouse.move(box.x + box.width - 2, y);
  await page.mouse.down();
  for (const share of [0.25, 0.5, 0.75, 1]) await page.mouse.move(box.x + box.width - 2 + pixels * share, y);
  await page.mouse.up();
}

/** Waits until a block says these times. */
export const hasValue = (block: Locator, times: string): Promise<void> => block.and(block.page().locator(`[aria-valuetext="${times}"]`)).waitFor();

async function endMinute(block: Locator): Promise<number> {
  const [, hours, minutes] = / to (\d\d):(\d\d)$/.exec((await block.getAttribute('aria-valuetext')) ?? '') ?? [];
  return Number(hours) * 60 + Number(minutes);
}

async function boxOf(locator: Locator): Promise<{ x: number; y: number; width: number; height: number }> {
  await locator.scrollIntoViewIfNeeded();
  const box = await locator.boundingBox();
  if (!box) throw new Error('It is not on the page.');
  return box;
}
