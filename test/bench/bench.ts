/** One line of `npm run bench`. Figures are medians in `unit`; without a reference, `reference` and `ratio` are null. */
export interface BenchResult {
  name: string;
  ours: number;
  reference: number | null;
  ratio: number | null;
  unit: string;
  /** The bar of quality.md: for the ratio where there is a reference, else for `ours`. */
  bar: number;
  ok: boolean;
  /** Further figures worth seeing, each with its unit in its name. */
  also?: Readonly<Record<string, number>>;
}

export interface Bench {
  /** As in the first column of quality.md. */
  name: string;
  /** Runs `rounds` alternating rounds of ours and the reference. */
  run(rounds: number): Promise<BenchResult>;
}

export function median(figures: readonly number[]): number {
  const sorted = [...figures].sort((a, b) => a - b);
  const upper = sorted[Math.floor(sorted.length / 2)];
  const lower = sorted[Math.floor((sorted.length - 1) / 2)];
  if (upper === undefined || lower === undefined) throw new RangeError('There is no median of nothing.');
  return (lower + upper) / 2;
}

/** The figure that this share (0 to 1) of all does not exceed. */
export function percentile(figures: readonly number[], share: number): number {
  const sorted = [...figures].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(sorted.length * share) - 1)] ?? Number.NaN;
}

/** Seconds that `work` takes. */
export async function secondsOf(work: () => unknown): Promise<number> {
  const start = performance.now();
  await work();
  return (performance.now() - start) / 1000;
}

/** Processor seconds of this process that `work` takes: other programs of a busy machine do not count. */
export async function processorSecondsOf(work: () => unknown): Promise<number> {
  const before = process.cpuUsage();
  await work();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

/** Medians of both over alternating rounds, so that a busy minute hits both alike. */
export async function alternate(rounds: number, ours: () => Promise<number>, reference: () => Promise<number>): Promise<{ ours: number; reference: number; ratio: number }> {
  const [mine, theirs]: [number[], number[]] = [[], []];
  for (let round = 0; round < rounds; round += 1) {
    theirs.push(await reference());
    mine.push(await ours());
  }
  const medians = { ours: median(mine), reference: median(theirs) };
  return { ...medians, ratio: medians.ours / medians.reference };
}
