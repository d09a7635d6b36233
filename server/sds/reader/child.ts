import { readFile } from 'node:fs/promises';
import { readSheetOrPictures } from './ocr';
import { readSheet } from './read-sheet';
import { emptyReading, type SheetReading } from './reading';

/**
 * The process that reads sheets for its parent, one after the other, over IPC. It holds no secret and can be killed at
 * any moment: the parent watches its time and its memory. It ends when the parent does.
 */
export interface ReadRequest {
  id: number;
  source: Uint8Array | string;
  maxBytes?: number;
  maxPages?: number;
  /** Reads a sheet without a text layer from pictures of its pages. */
  withPictures?: boolean;
}

export type ChildMessage = { kind: 'ready' } | { kind: 'page'; id: number; page: number; pages: number } | { kind: 'answer'; id: number; reading: SheetReading };

const say = (message: ChildMessage): void => void process.send?.(message);

process.on('message', (request: ReadRequest) => {
  void answer(request);
});
process.on('disconnect', () => process.exit(0));

async function answer({ id, source, withPictures, ...limits }: ReadRequest): Promise<void> {
  say({ kind: 'answer', id, reading: await read(source, (bytes) => (withPictures ? readSheetOrPictures(bytes, { ...limits, onPage: (page, pages) => say({ kind: 'page', id, page, pages }) }) : readSheet(bytes, limits))) });
}

/** A reader that stumbles over a file says "damaged" and lives on. */
async function read(source: Uint8Array | string, readBytes: (bytes: Uint8Array) => Promise<SheetReading>): Promise<SheetReading> {
  try {
    return await readBytes(typeof source === 'string' ? await readFile(source) : source);
  } catch {
    return emptyReading('damaged');
  }
}

say({ kind: 'ready' });
