import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { PDFParse, VerbosityLevel } from 'pdf-parse';
import { readSheet } from '#server/sds/reader/read-sheet';
import * as demoSheets from '#test/support/demo-sheets';
import { alternate, processorSecondsOf, type Bench } from './bench';

const BAR = 1.35;
const samples = fileURLToPath(new URL('../../../shared/samples/sds', import.meta.url));

/** Generated demo sheets, and the real samples where they lie beside the project; only those with a text layer. */
async function sheets(): Promise<Uint8Array[]> {
  const found = await Promise.all(Object.values(demoSheets).filter(isSpec).map((spec) => demoSheets.buildDemoSheet(spec)));
  if (existsSync(samples)) found.push(...readdirSync(samples).filter((name) => name.endsWith('.pdf')).map((name) => new Uint8Array(readFileSync(join(samples, name)))));
  else console.error('read-sheet: ../shared/samples is absent, generated sheets only');
  const withText: Uint8Array[] = [];
  for (const bytes of found) if ((await readSheet(bytes)).state === 'read') withText.push(bytes);
  return withText;
}
const isSpec = (value: unknown): value is demoSheets.DemoSheetSpec => typeof value === 'object' && value !== null && 'productName' in value;

/** Processor time for all fields of each sheet, against pdf-parse taking nothing but the text from the same bytes in the same process. */
export const readSheetBench: Bench = {
  name: 'read-sheet',
  async run(rounds) {
    const files = await sheets();
    let pages = 0;
    const readAll = async () => {
      pages = 0;
      for (const bytes of files) pages += (await readSheet(bytes)).pages;
    };
    await extractAll(files);
    const figures = await alternate(rounds, () => processorSecondsOf(readAll), () => processorSecondsOf(() => extractAll(files)));
    return { name: 'read-sheet', ...figures, unit: 'processor s', bar: BAR, also: { files: files.length, pages, pagesPerProcessorSecond: pages / figures.ours, referencePagesPerProcessorSecond: pages / figures.reference }, ok: figures.ratio <= BAR };
  },
};

async function extractAll(files: readonly Uint8Array[]): Promise<void> {
  for (const bytes of files) {
    // It takes the buffer over.
    const parser = new PDFParse({ data: new Uint8Array(bytes), verbosity: VerbosityLevel.ERRORS });
    try {
      await parser.getText();
    } finally {
      await parser.destroy();
    }
  }
}
