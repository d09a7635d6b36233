// @ts-check

/** A sentence for whoever sits at the terminal: printed alone, without a stack, and the command ends with 1. */
export class Refusal extends Error {}

/** A step given up because the whole command is being stopped: no failure. */
export class Stopped extends Error {}

const quietMs = 2000;

/**
 * Runs one step under a label: prints the label at once, a dot for every two seconds it takes, and how long it took
 * when that was more than two seconds.
 * @template T
 * @param {string} label
 * @param {() => T | Promise<T>} work
 * @param {(text: string) => void} [write]
 * @returns {Promise<T>}
 */
export async function step(label, work, write = (text) => void process.stdout.write(text)) {
  const startedAtMs = Date.now();
  write(label);
  const dots = setInterval(() => write('.'), quietMs);
  try {
    const answer = await work();
    write(`${tookText(Date.now() - startedAtMs)}\n`);
    return answer;
  } catch (error) {
    write(error instanceof Stopped ? '\n' : ' failed\n');
    throw error;
  } finally {
    clearInterval(dots);
  }
}

/**
 * How long something took, as " 2 min 5 s"; empty when it was too short to mention.
 * @param {number} elapsedMs
 */
export function tookText(elapsedMs) {
  if (elapsedMs < quietMs) return '';
  const seconds = Math.round(elapsedMs / 1000);
  return seconds < 60 ? ` ${seconds} s` : ` ${Math.floor(seconds / 60)} min ${seconds % 60} s`;
}

/** @param {string} line */
export function say(line) {
  process.stdout.write(`${line}\n`);
}

/**
 * Prints what went wrong: a refusal as its sentence, a failed command with the end of its output, anything else with its stack.
 * @param {unknown} error
 */
export function sayError(error) {
  const text = error instanceof Refusal ? error.message : error instanceof Error ? (error.stack ?? error.message) : String(error);
  process.stderr.write(`${text}\n`);
}
