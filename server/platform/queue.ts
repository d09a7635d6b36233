import PgBoss from 'pg-boss';
import { type Tx } from './database';

/** Background work, by queue name. Payloads carry ids only. */
export interface Work {
  'read-sheet': { organisationId: string; revisionId: string };
  /** A sheet without text, read from pictures of its pages: minutes, so it holds up no other. */
  'ocr-sheet': { organisationId: string; revisionId: string };
  /** A sheet whose reading failed at every try: for a person. */
  'sheet-unread': { organisationId: string; revisionId: string };
  'mail-checkpoint': { organisationId: string; size: number };
  'mail-request': { organisationId: string; requestId: string };
  'mail-guessing': { organisationId: string; alarmId: string };
}
export const queueNames = ['sheet-unread', 'read-sheet', 'ocr-sheet', 'mail-checkpoint', 'mail-request', 'mail-guessing'] as const satisfies readonly (keyof Work)[];

/** Where work goes when its last try failed or its worker was gone for the last time. */
const afterLastTry: Partial<Record<keyof Work, keyof Work>> = { 'read-sheet': 'sheet-unread', 'ocr-sheet': 'sheet-unread' };

export interface Queue {
  /** Queued in the caller's transaction: with its rows or not at all. */
  add<N extends keyof Work>(tx: Tx, name: N, data: Work[N]): Promise<void>;
  /** Takes work of one kind, one at a time; a killed worker's work is taken again after `expireSeconds`. */
  serve<N extends keyof Work>(name: N, work: (data: Work[N]) => Promise<void>): Promise<void>;
  stop(): Promise<void>;
}

/** How long work may take before its worker counts as gone: half as long again as the reader may take for a sheet. */
export const patienceFor =
  (limits: { SHEET_READ_SECONDS: number; SHEET_OCR_SECONDS: number }) =>
  (name: keyof Work): number =>
    Math.ceil(1.5 * (name === 'ocr-sheet' ? limits.SHEET_OCR_SECONDS : limits.SHEET_READ_SECONDS));

/** A mail waits out a mail server that is away: tried again every so often for a week, then given up. */
const mailDays = 7;
const retriesOf = (name: keyof Work, mailSeconds: number) =>
  name.startsWith('mail-') ? { retryLimit: Math.ceil((mailDays * 24 * 3600) / mailSeconds), retryDelay: mailSeconds, retryBackoff: false } : { retryLimit: 5, retryDelay: 2, retryBackoff: true };

export async function createQueue(url: string, options: { isServing: boolean; expireSeconds: (name: keyof Work) => number; mailRetrySeconds?: number; onError: (error: Error) => void }): Promise<Queue> {
  // The owner made the schema; the application role only uses it.
  const boss = new PgBoss({ connectionString: url, schema: 'pgboss', migrate: false, supervise: options.isServing, schedule: false, max: 4, maintenanceIntervalSeconds: 5, application_name: 'kneeboard-queue' });
  boss.on('error', options.onError);
  await boss.start();
  return {
    async add(tx, name, data) {
      const next = afterLastTry[name];
      const id = await boss.send(name, data, {
        ...(next ? { deadLetter: next } : {}),
        ...retriesOf(name, options.mailRetrySeconds ?? 30),
        expireInSeconds: options.expireSeconds(name),
        db: { executeSql: (text: string, values: unknown[]) => tx.client.query(text, values) },
      });
      // pg-boss answers null for a queue that nobody made.
      if (!id) throw new Error(`The queue ${name} does not exist: run db:migrate.`);
    },
    async serve(name, work) {
      let worker = '';
      worker = await boss.work<Work[typeof name]>(name, { batchSize: 1, pollingIntervalSeconds: 0.5 }, async ([job]) => {
        if (!job) return;
        await work(job.data);
        // The next one at once: two sheets a second would be the queue's pace, not the reader's.
        boss.notifyWorker(worker);
      });
    },
    stop: () => boss.stop({ graceful: true, timeout: 10_000, wait: true }),
  };
}
