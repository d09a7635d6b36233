import { median, percentile, type Bench } from './bench';
import { whileUploading } from './uploads';

const BAR = 3;
const SHEETS = 200;
const PAGE = 50;
const IDLE_REQUESTS = 200;
/** A person's page asks, waits and asks again. */
const PAUSE_MS = 25;

/** p95 of a page of the library while 200 sheets are sent and read, against the same page of the same length with nothing else going on. */
export const listUnderLoadBench: Bench = {
  name: 'list-under-load',
  run: () =>
    whileUploading({}, async ({ upload, untilAllRead, list }) => {
      await upload(PAGE);
      await untilAllRead();
      const idle: number[] = [];
      for (let request = 0; request < IDLE_REQUESTS; request += 1) {
        idle.push(await list());
        await new Promise((resolve) => setTimeout(resolve, PAUSE_MS));
      }
      const underLoad: number[] = [];
      const start = performance.now();
      let uploadSeconds = 0;
      let isDone = false;
      const load = (async () => {
        await upload(SHEETS);
        uploadSeconds = (performance.now() - start) / 1000;
        await untilAllRead();
      })().finally(() => (isDone = true));
      while (!isDone) {
        underLoad.push(await list());
        await new Promise((resolve) => setTimeout(resolve, PAUSE_MS));
      }
      await load;
      const readSeconds = (performance.now() - start) / 1000;
      const [ours, reference] = [percentile(underLoad, 0.95), percentile(idle, 0.95)];
      const ratio = ours / reference;
      return { name: 'list-under-load', ours, reference, ratio, unit: 'ms', bar: BAR, also: { requests: underLoad.length, medianMs: median(underLoad), idleMedianMs: median(idle), uploadSeconds, readSeconds }, ok: ratio <= BAR };
    }),
};
