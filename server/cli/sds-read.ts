import fs from 'node:fs/promises';
import path from 'node:path';
import { readSheetOrPictures } from '../sds/reader/ocr';
import { readSheet } from '../sds/reader/read-sheet';
import { sheetLine } from '../sds/reader/sheet-line';

/**
 * `npm run -s sds:read -- [--ocr] FILE…`: one JSON line a file; with --ocr a sheet of pictures is recognised, some seconds
 * a page. Exit code 1 when a file could not be opened.
 */
async function main(words: string[]): Promise<number> {
  const read = words.includes('--ocr') ? readSheetOrPictures : readSheet;
  const files = words.filter((word) => word !== '--ocr');
  if (files.length === 0) {
    console.error('usage: npm run -s sds:read -- [--ocr] FILE…');
    return 1;
  }
  let exitCode = 0;
  for (const file of files) {
    const bytes = await fs.readFile(file).catch((error: NodeJS.ErrnoException) => {
      console.error(`${file}: ${error.code === 'ENOENT' ? 'no such file' : error.message}`);
      exitCode = 1;
      return null;
    });
    if (bytes) console.log(JSON.stringify(sheetLine(path.basename(file), await read(bytes))));
  }
  return exitCode;
}

process.exitCode = await main(process.argv.slice(2));
