// @ts-check
import { startService, tied } from './processes.mjs';

const restartsAllowed = 3;
const withinMs = 60_000;
const pauseMs = 500;

/**
 * Keeps a server process going: when it ends unasked it is started again, until it has done so too often in a minute.
 * @param {string} folder the data folder
 * @param {string} name
 * @param {string} entry the script
 * @param {{ cwd: string, env: NodeJS.ProcessEnv }} options
 * @returns {{ stop: () => Promise<void>, gaveUp: Promise<string> }} gaveUp says how it ended when it was not started again
 */
export function keepRunning(folder, name, entry, { cwd, env }) {
  let isStopping = false;
  /** @type {number[]} */
  let endedAtMs = [];
  let service = begin();
  const gaveUp = (async () => {
    for (;;) {
      const how = await service.ended;
      if (isStopping) return how;
      endedAtMs = [...endedAtMs.filter((at) => at > Date.now() - withinMs), Date.now()];
      if (endedAtMs.length > restartsAllowed) return `${how}, for the ${endedAtMs.length}th time within a minute`;
      await new Promise((resolve) => setTimeout(resolve, pauseMs));
      if (isStopping) return how;
      service = begin();
    }
  })();
  return {
    gaveUp,
    stop: async () => {
      isStopping = true;
      await service.stop();
    },
  };

  function begin() {
    return startService(folder, name, tied('SIGTERM', [], process.execPath, ['--enable-source-maps', entry]), { cwd, env, mark: entry });
  }
}
