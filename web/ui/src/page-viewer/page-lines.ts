/** A run of text on a page: PDF points, y upwards from the bottom. */
export interface TextRun {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly height: number;
}

/** Runs as lines from top to bottom, each from left to right. Files give text in the order it was drawn, often headings last. */
export function linesOf(runs: readonly TextRun[]): readonly string[] {
  const lines: { y: number; height: number; runs: TextRun[] }[] = [];
  for (const run of [...runs].filter(({ text }) => text.trim() !== '').sort((a, b) => b.y - a.y)) {
    const line = lines.at(-1);
    // Half a letter's height: small and large type on one line share no exact baseline.
    if (line && line.y - run.y <= Math.max(line.height, run.height, 4) / 2) {
      line.runs.push(run);
      line.height = Math.max(line.height, run.height);
    } else {
      lines.push({ y: run.y, height: run.height, runs: [run] });
    }
  }
  return lines.map((line) =>
    line.runs
      .sort((a, b) => a.x - b.x)
      .map(({ text }) => text.trim())
      .join(' '),
  );
}
