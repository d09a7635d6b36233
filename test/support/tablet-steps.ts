import { type Locator, type Page } from 'playwright-core';

/** The words a signer meets, in the language of the text they sign. */
const words = {
  en: { yes: 'Yes, matches', box: 'Signature box', done: 'Done', keypad: 'PIN keypad', choose: (name: string) => `${name}, choose a PIN`, repeat: 'Type the same PIN again', enter: (name: string) => `${name}, type your PIN`, witness: (name: string) => `${name}, type your own PIN`, start: (name: string) => `${name}, type your start PIN` },
  es: { yes: 'Sí, coincide', box: 'Cuadro para firmar', done: 'Listo', keypad: 'Teclado para el PIN', choose: (name: string) => `${name}, elija un PIN`, repeat: 'Escriba el mismo PIN otra vez', enter: (name: string) => `${name}, escriba su PIN`, witness: (name: string) => `${name}, escriba su propio PIN`, start: (name: string) => `${name}, escriba su PIN de inicio` },
} as const;

export interface Signer {
  readonly name: string;
  readonly language: 'en' | 'es';
  readonly pin: string;
  /** Null: the PIN is there already. */
  readonly newPin: { readonly witness: { readonly name: string; readonly pin: string } } | { readonly startPin: string } | null;
}

/** On the page where the crew signs: answers the own line, draws and stops before the PIN. */
export async function drawSignature(page: Page, { name, language }: Pick<Signer, 'name' | 'language'>): Promise<void> {
  const say = words[language];
  await page.getByRole('list', { name: 'People' }).getByRole('button', { name }).click();
  await page.getByRole('button', { name: say.yes }).click();
  await scribble(page, page.getByRole('img', { name: say.box }));
}

/** Types the PIN, chosen and vouched for when it is new. */
export async function givePin(page: Page, signer: Signer): Promise<void> {
  await page.getByRole('button', { name: words[signer.language].done, exact: true }).click();
  await proveByPin(page, signer);
}

/** The PIN alone, where it was asked for. */
export async function proveByPin(page: Page, { name, language, pin, newPin }: Signer): Promise<void> {
  const say = words[language];
  if (newPin) {
    await typePin(page, say.choose(name), say.keypad, pin);
    await typePin(page, say.repeat, say.keypad, pin);
    if ('startPin' in newPin) await typePin(page, say.start(name), say.keypad, newPin.startPin);
    else await typePin(page, say.witness(newPin.witness.name), say.keypad, newPin.witness.pin);
  } else await typePin(page, say.enter(name), say.keypad, pin);
}

export async function sign(page: Page, signer: Signer): Promise<void> {
  await drawSignature(page, signer);
  await givePin(page, signer);
}

export async function typePin(page: Page, heading: string, keypad: string, pin: string): Promise<void> {
  await page.getByRole('heading', { name: heading }).waitFor();
  const keys = page.getByRole('group', { name: keypad });
  for (const digit of pin) await keys.getByRole('button', { name: digit, exact: true }).click();
  await keys.getByRole('button', { name: 'OK' }).click();
}

/** A stroke like a signature, with the mouse. */
async function scribble(page: Page, canvas: Locator): Promise<void> {
  const box = await canvas.boundingBox();
  if (!box) throw new Error('There is no signature box.');
  const at = (step: number): [number, number] => [box.x + 30 + step * 12, box.y + box.height / 2 + Math.sin(step / 1.7) * (box.height / 4)];
  await page.mouse.move(...at(0));
  await page.mouse.down();
  for (let step = 1; step <= 16; step += 1) await page.mouse.move(...at(step));
  await page.mouse.up();
}

/** The row of a person in the list of who signs. */
export const signerRow = (page: Page, name: string): Locator => page.getByRole('list', { name: 'People' }).getByRole('listitem').filter({ hasText: name });

/** Loads the page again once its program is kept for times without signal. */
export async function keepForOffline(page: Page): Promise<void> {
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await page.reload();
  await page.waitForFunction(() => navigator.serviceWorker.controller !== null);
}
