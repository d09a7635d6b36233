import { readFile } from 'node:fs/promises';
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
}

export type ChildMessage = { kind: 'ready' } | { kind: 'answer'; id: number; reading: SheetReading };

const say = (message: ChildMessage): void => void process.send?.(message);

process.on('message', (request: ReadRequest) => {
  void answer(request);
});
process.on('disconnect', () => process.exit(0));

async function answer({ id, source, maxBytes, maxPages }: ReadRequest): Promise<void> {
  const reading = await read(source, { ...(maxBytes === undefined ? {} : { maxBytes }), ...(maxPages === undefined ? {} : { maxPages }) });
  say({ kind: 'answer', id, reading });
}

/** A reader that stumbles over a file says "damaged" and lives on. */
async function read(source: Uint8Array | string, limits: { maxBytes?: number; maxPages?: number }): Promise<SheetReading> {
  try {
    return await readSheet(typeof source === 'string' ? await readFile(source) : source, limits);
  } catch {
    return emptyReading('damaged');
  }
}

say({ kind: 'ready' });
