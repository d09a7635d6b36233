import { deliveriesService } from './acknowledgements/deliveries-service';
import { type Deps } from './deps';
import { requestsService } from './library/requests-service';
import { recordlogService } from './recordlog/recordlog-service';
import { createGuardedReader } from './sds/reader/guarded-reader';
import { searchBackfill } from './search/backfill';
import { sheetsService } from './sds/sheets-service';
import { ocrSheetWork, readSheetWork, unreadSheetWork } from './sds/sheets-work';
import { guessAlarmsService } from './session/guess-alarms';

const maxReaderRssBytes = 1_500 * 1024 * 1024;
const sweepSeconds = 15;

/** Background work: reading sheets, mailing checkpoints, signing checkpoints, interpreting what an ended process left. */
export async function startWorker(deps: Deps): Promise<() => Promise<void>> {
  const { config, queue, log } = deps;
  // The reader's limit is shorter than the queue's patience, so that a stuck sheet is named and not tried for ever.
  const reader = createGuardedReader({ wallClockMs: config.SHEET_READ_SECONDS * 1000, maxRssBytes: maxReaderRssBytes, entry: config.SHEET_READER_ENTRY });
  const pictureReader = createGuardedReader({ wallClockMs: config.SHEET_OCR_SECONDS * 1000, maxRssBytes: maxReaderRssBytes, entry: config.SHEET_READER_ENTRY, withPictures: true });
  const recordlog = recordlogService(deps);
  const deliveries = deliveriesService(deps);
  await queue.serve('read-sheet', readSheetWork(deps, reader));
  await queue.serve('ocr-sheet', ocrSheetWork(deps, pictureReader));
  await queue.serve('sheet-unread', unreadSheetWork(deps));
  await queue.serve('mail-checkpoint', (data) => recordlog.mailCheckpoint(data));
  const requests = requestsService(deps, sheetsService(deps));
  await queue.serve('mail-request', (data) => requests.mailRequest(data));
  const alarms = guessAlarmsService(deps);
  await queue.serve('mail-guessing', (data) => alarms.mailAlarm(data));
  const stopCheckpoints = every(config.CHECKPOINT_SECONDS, 'checkpoints', () => recordlog.makeCheckpoints());
  const stopSweep = every(sweepSeconds, 'left-over deliveries', () => deliveries.interpretLeftOver());
  const stopBackfill = once('search texts of older sheets', searchBackfill(deps, { text: reader, pictures: pictureReader }));
  return async () => {
    stopBackfill();
    stopCheckpoints();
    stopSweep();
    await Promise.all([reader.close(), pictureReader.close()]);
  };

  /** Runs until it succeeds, then never again in this process; a fault is logged and tried a little later. */
  function once(what: string, work: (isStopped: () => boolean) => Promise<unknown>): () => void {
    let isStopped = false;
    let timer: NodeJS.Timeout;
    const turn = (seconds: number): void => {
      timer = setTimeout(() => {
        work(() => isStopped).catch((error: unknown) => {
          if (isStopped) return;
          log.error({ err: error }, `${what} failed`);
          turn(sweepSeconds * 4);
        });
      }, seconds * 1000);
    };
    turn(sweepSeconds);
    return () => {
      isStopped = true;
      clearTimeout(timer);
    };
  }

  /** Runs again and again, never twice at once; a fault is logged and tried at the next turn. */
  function every(seconds: number, what: string, work: () => Promise<void>): () => void {
    let timer: NodeJS.Timeout;
    const turn = () => {
      timer = setTimeout(() => {
        work()
          .catch((error: unknown) => log.error({ err: error }, `${what} failed`))
          .finally(turn);
      }, seconds * 1000);
    };
    turn();
    return () => clearTimeout(timer);
  }
}
