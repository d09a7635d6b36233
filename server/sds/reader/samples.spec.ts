import { describe, expect, it } from '@jest/globals';
import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { readSheet } from './read-sheet';
import { sheetLine } from './sheet-line';

/** Real sheets with values read by hand; they belong to their suppliers and are not part of the project. */
const samples = fileURLToPath(new URL('../../../../shared/samples/sds', import.meta.url));
const isPresent = existsSync(path.join(samples, 'truth.jsonl'));

interface Tally {
  ok: number;
  missing: number;
  wrong: number;
  acc: number;
}
type Group = Record<'product_name' | 'supplier' | 'revision_date' | 'signal_word' | 'section_count' | 'language', Tally> & Record<'h_codes' | 'cas_numbers', { microF1: number }> & { concentration: { acc: number } };

async function score(): Promise<{ all: Group; imageOnly: { files: number; flagged: number; invented: number } }> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'kneeboard-'));
  const files = (await readdir(samples)).filter((name) => name.endsWith('.pdf')).sort();
  const lines: string[] = [];
  for (const file of files) lines.push(JSON.stringify(sheetLine(file, await readSheet(await readFile(path.join(samples, file))))));
  const predictions = path.join(folder, 'predictions.jsonl');
  await writeFile(predictions, lines.join('\n'));
  const result: Record<string, unknown> = JSON.parse(execFileSync(process.execPath, [path.join(samples, 'score.mjs'), predictions, '--json'], { encoding: 'utf8' }));
  await rm(folder, { recursive: true });
  return { all: result['text layer (all)'] as Group, imageOnly: result['image_only'] as { files: number; flagged: number; invented: number } };
}

describe('real sheets', () => {
  // A floor a little under what the reader reaches: it may not sink, and it is not tuned to these files.
  it(isPresent ? 'score no worse than before' : 'score no worse than before (not run: ../shared/samples is absent)', async () => {
    if (!isPresent) return;
    const { all, imageOnly } = await score();
    for (const field of ['product_name', 'supplier', 'revision_date', 'section_count'] as const) expect({ field, enough: all[field].acc >= 0.91 }).toEqual({ field, enough: true });
    expect(all.signal_word.acc).toBe(1);
    expect(all.language.acc).toBe(1);
    expect(all.h_codes.microF1).toBeGreaterThanOrEqual(0.97);
    expect(all.cas_numbers.microF1).toBeGreaterThanOrEqual(0.99);
    expect(all.concentration.acc).toBeGreaterThanOrEqual(0.95);
    const wrong = (['product_name', 'supplier', 'revision_date', 'signal_word', 'section_count', 'language'] as const).reduce((sum, field) => sum + all[field].wrong, 0);
    expect(wrong).toBeLessThanOrEqual(1);
    expect(imageOnly).toMatchObject({ flagged: imageOnly.files, invented: 0 });
  }, 120_000);
});
