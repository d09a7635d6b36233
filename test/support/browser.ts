import { appendFileSync, existsSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from '@jest/globals';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';

const found = [process.env['TEST_CHROMIUM'] ?? '', '/usr/bin/chromium', '/usr/bin/chromium-browser'].find((path) => path !== '' && existsSync(path));
/** As root in a container; nothing of its own on the network. */
const flags = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'];

/** The office's screen and the tablet on its side. */
export const sizes = { desk: { width: 1440, height: 900 }, tablet: { width: 1180, height: 820 } } as const;
export const siteTimeZone = 'America/Chicago';
const patienceMs = 30_000;

/** Runs the journey when there is a Chromium; otherwise one test says why it did not run, and counts as skipped. */
export function withChromium(journey: string, describeJourney: () => void): void {
  if (found) describeJourney();
  else
    it(`${journey} (not run: Chromium is not installed)`, () => {
      console.warn(`${journey}: not run, because Chromium is not installed; type: sudo apt-get install -y chromium`);
      expect(found).toBeUndefined();
    });
}

export const launchChromium = (): Promise<Browser> => chromium.launch({ executablePath: found ?? '', args: flags });

/** Everything the pages of one person complained about. What is expected is named before it happens. */
export class Complaints {
  private readonly heard: string[] = [];
  private expected: RegExp[] = [/401 .*\/api\/session$/];

  hear(words: string): void {
    if (!this.expected.some((pattern) => pattern.test(words))) this.heard.push(words);
  }
  /** From here on complaints of this kind are part of what is tried. */
  expect(pattern: RegExp): void {
    this.expected.push(pattern);
  }
  noLongerExpect(pattern: RegExp): void {
    this.expected = this.expected.filter(({ source }) => source !== pattern.source);
  }
  get all(): readonly string[] {
    return this.heard;
  }
}

export interface Seat {
  readonly context: BrowserContext;
  readonly page: Page;
  readonly complaints: Complaints;
}

/** A browser profile of its own: one person at a desk, or one tablet. Its page errors and console errors are collected. */
export async function openSeat(browser: Browser, baseURL: string, size: { width: number; height: number }): Promise<Seat> {
  const context = await browser.newContext({ baseURL, viewport: size, locale: 'en-US', timezoneId: siteTimeZone, reducedMotion: 'reduce', acceptDownloads: true });
  context.setDefaultTimeout(patienceMs);
  const complaints = new Complaints();
  context.on('weberror', (error) => complaints.hear(`page error: ${error.error().message}`));
  context.on('console', (message) => {
    if (message.type() === 'error') complaints.hear(`${/\b\d{3}\b/.exec(message.text())?.[0] ?? ''} ${message.text()} ${message.location().url}`.trim());
  });
  return { context, page: await context.newPage(), complaints };
}

/** Steps of one journey, each standing on the one before: after a failure the rest is not tried. `FAILURE_PICTURES` names a folder for what was on the screens. */
export function journey(seats: () => Readonly<Record<string, Seat>>): (name: string, work: () => Promise<void>) => void {
  let failed = '';
  return (name, work) =>
    it(name, async () => {
      if (failed) throw new Error(`Not tried, because an earlier step failed: ${failed}`);
      try {
        await work();
      } catch (error) {
        failed = name;
        await savePictures(process.env['FAILURE_PICTURES'], seats());
        throw error;
      }
    });
}

async function savePictures(folder: string | undefined, seats: Readonly<Record<string, Seat>>): Promise<void> {
  if (!folder) return;
  for (const [name, { page, complaints }] of Object.entries(seats)) {
    await page.screenshot({ path: join(folder, `${name}.png`), fullPage: true });
    appendFileSync(join(folder, 'pages.txt'), `${name} ${page.url()} ${complaints.all.join('\n')}\n`);
  }
}
