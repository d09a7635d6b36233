import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { type AxeResults, type RunOptions } from 'axe-core';
import { type Page } from 'playwright-core';
import { expect } from '@jest/globals';
import { sizes } from './browser';

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
/** A scheme changes colours only: the rest is asked once for each size. */
const looks: readonly { readonly scheme: 'light' | 'dark'; readonly options: RunOptions }[] = [
  { scheme: 'light', options: { resultTypes: ['violations'] } },
  { scheme: 'dark', options: { resultTypes: ['violations'], runOnly: { type: 'rule', values: ['color-contrast', 'link-in-text-block'] } } },
];

/** Asks axe about the page as it stands, at desk and tablet size, light and dark; serious and critical findings fail. */
export async function expectAccessible(page: Page, name: string): Promise<void> {
  const before = page.viewportSize();
  // Run by the debugger, because the pages' own policy lets no foreign script in.
  if (!(await page.evaluate('typeof axe === "object"'))) await page.evaluate(axeSource);
  const bad: string[] = [];
  for (const { scheme, options } of looks) {
    await page.emulateMedia({ colorScheme: scheme, reducedMotion: 'reduce' });
    for (const [sizeName, size] of Object.entries(sizes)) {
      await page.setViewportSize(size);
      await settled(page);
      const { violations } = await page.evaluate((wanted) => (globalThis as unknown as { axe: { run(context: Document, options: RunOptions): Promise<AxeResults> } }).axe.run(document, wanted), options);
      for (const { id, impact, help, nodes } of violations)
        if (impact === 'serious' || impact === 'critical') bad.push(...nodes.map((node) => `${name}, ${sizeName}, ${scheme}: ${id} (${help}): ${node.html.slice(0, 200)} ${node.any.map(({ message }) => message).join(' ').slice(0, 200)}`));
    }
  }
  await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
  if (before) await page.setViewportSize(before);
  expect(bad).toEqual([]);
}

/** Colours fade from one scheme to the other, each element after the one it inherits from: contrast is measured when all have arrived. */
function settled(page: Page): Promise<void> {
  return page.evaluate(async () => {
    const frame = () => new Promise((resolve) => requestAnimationFrame(resolve));
    for (let quietFrames = 0; quietFrames < 4; quietFrames = document.getAnimations().length === 0 ? quietFrames + 1 : 0) await frame();
  });
}
