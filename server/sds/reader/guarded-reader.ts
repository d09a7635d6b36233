import { fork, type ChildProcess } from 'node:child_process';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { type ChildMessage, type ReadRequest } from './child';
import { emptyReading, type ReadingState, type SheetReading } from './reading';

export interface GuardedReaderOptions {
  /** Longest time for one sheet, milliseconds. */
  wallClockMs: number;
  /** Largest resident memory of the child, bytes. */
  maxRssBytes: number;
  /** The child's program: child.ts, or the bundle built from it. */
  entry: string;
  maxBytes?: number;
  maxPages?: number;
  /** Reads sheets without a text layer from pictures of their pages; its child ends after each, for it is large. */
  withPictures?: boolean;
}

/** Told before each page read from a picture, from 1. */
export type PageHeard = (page: number, pages: number) => void;

export interface GuardedReader {
  /** Bytes, or the path of a file the child reads itself. Never rejects for a bad file; one sheet at a time. */
  read(source: Uint8Array | string, onPage?: PageHeard): Promise<SheetReading>;
  close(): Promise<void>;
}

const pollMs = 20;
const startUpMs = 30_000;
const pageBytes = 4096;
/** Above this share of the limit an idle child is replaced, so that a long day's growth never fells an honest sheet. */
const tiredShare = 0.6;

/**
 * Keeps one warm child that reads sheets and kills it when a sheet takes too long or too much memory. Only a process can
 * be stopped for certain: a worker thread's buffers are not counted against its limit. A killed or crashed child is
 * replaced at the next read and never takes the parent down.
 */
export function createGuardedReader(options: GuardedReaderOptions): GuardedReader {
  let warm: Promise<ChildProcess> | null = null;
  let queue: Promise<unknown> = Promise.resolve();
  let isClosed = false;
  let nextId = 1;

  const forget = (): void => {
    warm = null;
  };
  /** The warm child; another one when it ended while it was idle or did not start. */
  async function living(): Promise<ChildProcess> {
    const idle = await warm?.catch(() => null);
    if (idle && !hasEnded(idle)) return idle;
    warm = startChild(options);
    return warm;
  }

  async function readNow(source: Uint8Array | string, onPage?: PageHeard): Promise<SheetReading> {
    if (isClosed) throw new Error('The sheet reader is closed.');
    const process = await living();
    const outcome = await watchedRead(process, { id: nextId++, source, ...limitsOf(options) }, options, onPage);
    if (hasEnded(process)) forget();
    else if (options.withPictures || (await residentBytes(process.pid)) > options.maxRssBytes * tiredShare) {
      forget();
      process.kill('SIGKILL');
    }
    return outcome;
  }

  return {
    read(source, onPage) {
      const turn = queue.then(() => readNow(source, onPage));
      queue = turn.catch(() => undefined);
      return turn;
    },
    async close() {
      isClosed = true;
      const last = await warm?.catch(() => null);
      forget();
      last?.kill('SIGKILL');
    },
  };
}

const hasEnded = (child: ChildProcess): boolean => child.exitCode !== null || child.signalCode !== null || !child.connected;

const limitsOf = ({ maxBytes, maxPages, withPictures }: GuardedReaderOptions): Partial<ReadRequest> => ({
  ...(maxBytes === undefined ? {} : { maxBytes }),
  ...(maxPages === undefined ? {} : { maxPages }),
  ...(withPictures === undefined ? {} : { withPictures }),
});

/** Starts the child with nothing of the parent's environment but the search path: it handles strangers' files. */
async function startChild({ entry, maxRssBytes }: GuardedReaderOptions): Promise<ChildProcess> {
  const heapMb = Math.max(64, Math.floor(maxRssBytes / 1024 / 1024));
  const child = fork(path.resolve(entry), [], {
    // From here the loader for .ts entries is found, wherever the parent was started.
    cwd: path.dirname(path.resolve(entry)),
    execArgv: [`--max-old-space-size=${heapMb}`, ...(entry.endsWith('.ts') ? ['--import', 'tsx'] : [])],
    env: { PATH: process.env['PATH'] ?? '' },
    serialization: 'advanced',
    stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
  });
  child.on('error', () => undefined);
  // The child does not keep the parent alive; a read under way does, by its timers.
  child.unref();
  child.channel?.unref();
  await new Promise<void>((resolve, reject) => {
    const clock = setTimeout(() => finish(new Error(`The sheet reader did not start: ${entry}`)), startUpMs);
    const finish = (error?: Error): void => {
      clearTimeout(clock);
      child.off('message', ready);
      child.off('exit', gone);
      if (error) {
        child.kill('SIGKILL');
        reject(error);
      } else resolve();
    };
    const ready = (message: ChildMessage): void => (message.kind === 'ready' ? finish() : undefined);
    const gone = (code: number | null): void => finish(new Error(`The sheet reader ended while starting (code ${String(code)}): ${entry}`));
    child.on('message', ready);
    child.on('exit', gone);
  });
  return child;
}

async function watchedRead(child: ChildProcess, request: ReadRequest, { wallClockMs, maxRssBytes }: GuardedReaderOptions, onPage?: PageHeard): Promise<SheetReading> {
  return new Promise((resolve) => {
    const clock = setTimeout(() => stop('too-slow'), wallClockMs);
    const watch = setInterval(() => {
      void residentBytes(child.pid).then((bytes) => (bytes > maxRssBytes ? stop('too-much-memory') : undefined));
    }, pollMs);
    let isDone = false;
    const finish = (reading: SheetReading): void => {
      if (isDone) return;
      isDone = true;
      clearTimeout(clock);
      clearInterval(watch);
      child.off('message', heard);
      child.off('exit', gone);
      resolve(reading);
    };
    let verdict: ReadingState | null = null;
    // The answer waits for the child's end, so that its memory is free before the next one starts.
    const stop = (state: ReadingState): void => {
      verdict ??= state;
      child.kill('SIGKILL');
    };
    const heard = (message: ChildMessage): void => {
      if (message.kind === 'page' && message.id === request.id && !isDone) onPage?.(message.page, message.pages);
      if (message.kind === 'answer' && message.id === request.id) finish(message.reading);
    };
    // V8 aborts itself when its heap is full, the kernel kills when the machine is; any other end is the file's doing.
    const gone = (_code: number | null, signal: NodeJS.Signals | null): void => finish(emptyReading(verdict ?? (signal === 'SIGABRT' || signal === 'SIGKILL' ? 'too-much-memory' : 'damaged')));
    child.on('message', heard);
    child.on('exit', gone);
    // A child that ended before it was asked will not say so again.
    if (child.exitCode !== null || child.signalCode !== null) gone(null, child.signalCode);
    else child.send(request, (error) => (error ? stop('damaged') : undefined));
  });
}

/** Resident memory of a process from /proc, bytes; 0 where there is no /proc or no such process. */
export async function residentBytes(pid: number | undefined): Promise<number> {
  if (pid === undefined) return 0;
  const statm = await readFile(`/proc/${pid}/statm`, 'utf8').catch(() => '');
  return Number(statm.split(' ')[1] ?? 0) * pageBytes;
}
