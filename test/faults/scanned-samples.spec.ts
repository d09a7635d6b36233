import { describe, expect, it } from '@jest/globals';
import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { readSheetOrPictures } from '#server/sds/reader/ocr';
import { sheetLine } from '#server/sds/reader/sheet-line';
import { fold } from '#server/sds/reader/words';

/** Real sheets with values read by hand; they belong to their suppliers and are not part of the project. */
const samples = fileURLToPath(new URL('../../../shared/samples/sds', import.meta.url));
const isPresent = existsSync(path.join(samples, 'truth.jsonl'));
const isLong = Number(process.env['FAULT_ROUNDS'] ?? '5') > 5;
const reason = !isPresent ? ' (not run: ../shared/samples is absent)' : !isLong ? ' (not run: takes minutes, runs with npm run test:faults)' : '';

interface Truth {
  file: string;
  has_text_layer: boolean;
  product_name: string;
  cas_numbers: string[];
}

describe('real sheets that are pictures', () => {
  it(`give product and CAS numbers${reason}`, async () => {
    if (reason) return;
    const truths = (await readFile(path.join(samples, 'truth.jsonl'), 'utf8')).split('\n').filter(Boolean).map((line) => JSON.parse(line) as Truth).filter((truth) => !truth.has_text_layer);
    expect(truths.length).toBeGreaterThan(0);
    let [right, found, wanted] = [0, 0, 0];
    for (const truth of truths) {
      const line = sheetLine(truth.file, await readSheetOrPictures(await readFile(path.join(samples, truth.file))));
      expect(fold(line.product_name ?? '')).toBe(fold(truth.product_name));
      right += line.cas_numbers.filter((cas) => truth.cas_numbers.includes(cas)).length;
      found += line.cas_numbers.length;
      wanted += truth.cas_numbers.length;
    }
    // F1, the harmonic mean of precision and recall.
    expect((2 * right) / (found + wanted)).toBeGreaterThanOrEqual(0.8);
  }, 1_200_000);
});
