import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { until, type ServiceProcess } from '#test/support/processes';
import { residentBytes } from '#server/sds/reader/guarded-reader';
import { type Bench } from './bench';
import { whileUploading } from './uploads';

const BAR = 1.1;
const HALF = 100;
const MB = 1024 * 1024;

/** Resident memory of the service's process after 200 sheets were sent to it and read, against its own after the first 100; each after a gc. */
export const memoryBench: Bench = {
  name: 'memory',
  run: () =>
    whileUploading({ NODE_OPTIONS: `--expose-gc --import ${fileURLToPath(new URL('gc-on-signal.mjs', import.meta.url))}` }, async ({ process: service, upload, untilAllRead }) => {
      await upload(HALF);
      await untilAllRead();
      const half = await settledBytes(service);
      await upload(HALF);
      await untilAllRead();
      const end = await settledBytes(service);
      const ratio = end.service / half.service;
      // The reader is a process of its own that collects when it likes and is replaced when it grew: its figures are told, not judged.
      return { name: 'memory', ours: end.service / MB, reference: half.service / MB, ratio, unit: 'MB', bar: BAR, also: { readerAtHalfTimeMB: half.reader / MB, readerAtTheEndMB: end.reader / MB }, ok: ratio <= BAR };
    }),
};

async function settledBytes(service: ServiceProcess): Promise<{ service: number; reader: number }> {
  const before = collections(service);
  service.child.kill('SIGUSR2');
  await until('a collection of garbage', async () => Promise.resolve(collections(service) > before));
  const children = readFileSync(`/proc/${service.pid}/task/${service.pid}/children`, 'utf8').trim().split(' ').filter(Boolean).map(Number);
  const readers = await Promise.all(children.map((pid) => residentBytes(pid)));
  return { service: await residentBytes(service.pid), reader: readers.reduce((sum, bytes) => sum + bytes, 0) };
}
const collections = (service: ServiceProcess): number => service.output().split('garbage collected').length - 1;
