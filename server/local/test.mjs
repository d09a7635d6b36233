// @ts-check
/** `npm test`: all specs on throwaway services. Further arguments go to jest: `npm test -- -t SIL-07`. `--faults-long`: the long fault rounds only. */
import { spawn } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureChromium, ensurePostgres } from './debian.mjs';
import { demandNode, ensurePackages } from './packages.mjs';
import { say, sayError } from './progress.mjs';
import { closingLine, countReport, sumTotals } from './totals.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
/** Generous: jest's five seconds fail honest tests on a machine that is busy with something else. */
const testTimeoutMs = 30_000;
const isLong = process.argv.includes('--faults-long');
const jestArguments = process.argv.slice(2).filter((argument) => argument !== '--faults-long');
const isFiltered = jestArguments.some((argument) => /^(-t|--testNamePattern)/.test(argument));
const hasOwnProjects = jestArguments.some((argument) => argument.startsWith('--selectProjects'));

/** @type {import('./totals.mjs').Totals[]} */
const totals = [];
try {
  demandNode();
  await ensurePackages(root);
  await ensurePostgres();
  const browserSpecs = specsUnder('test/browser');
  const chromium = browserSpecs > 0 && !isLong ? await ensureChromium() : undefined;
  // Only now: these need the packages.
  const { buildIfStale, migrate } = await import('./build.mjs');
  const { testEnvironment } = await import('./services.mjs');
  const { withThrowawayServices } = await import('./throwaway.mjs');
  await buildIfStale();
  await withThrowawayServices(async (services, folder, untilStopped) => {
    await migrate({ OWNER_DATABASE_URL: services.postgres.ownerUrl });
    const environment = {
      ...process.env,
      ...testEnvironment(services),
      ...(chromium ? { TEST_CHROMIUM: chromium } : {}),
      FAULT_ROUNDS: isLong ? '50' : (process.env['FAULT_ROUNDS'] ?? '5'),
      NODE_OPTIONS: `${process.env['NODE_OPTIONS'] ?? ''} --experimental-vm-modules --disable-warning=ExperimentalWarning`.trim(),
    };
    for (const { label, projects, extra = [], env = {} } of rounds(chromium !== undefined)) {
      say(`\n${label}`);
      const report = join(folder, `jest-${totals.length}.json`);
      const select = projects.length === 0 ? [] : ['--selectProjects', ...projects];
      const code = await jest([...jestArguments, ...extra, ...select, '--passWithNoTests', '--testTimeout', String(testTimeoutMs), '--json', '--outputFile', report], { ...environment, ...env }, untilStopped);
      if (existsSync(report)) totals.push(countReport(JSON.parse(readFileSync(report, 'utf8')), isFiltered));
      if (code !== 0) process.exitCode = 1;
      if (!existsSync(report)) break;
    }
    if (browserSpecs > 0 && !chromium && !isLong && !hasOwnProjects) {
      say(`\nThe ${browserSpecs} browser specs were not run: Chromium is not installed; type: sudo apt-get install -y chromium`);
      totals.push({ passed: 0, failed: 0, skipped: browserSpecs });
    }
  });
} catch (error) {
  sayError(error);
  process.exitCode = 1;
}
const sum = sumTotals(totals);
if (sum.failed > 0 || sum.passed === 0) process.exitCode = 1;
if (sum.passed + sum.failed === 0) say('No test ran.');
say(`\n${closingLine(sum)}`);

/**
 * What runs one after the other: faults apart and alone, because they stop and kill what others lean on.
 * @param {boolean} hasBrowser
 * @returns {{ label: string, projects: string[], extra?: string[], env?: Record<string, string> }[]}
 */
function rounds(hasBrowser) {
  if (hasOwnProjects) return [{ label: 'Tests of the projects asked for', projects: [] }];
  const faults = { label: 'Faults', projects: ['faults'], extra: ['--runInBand'] };
  if (isLong) return [faults];
  return [
    { label: `Units, web, API${hasBrowser ? ', browser' : ''}`, projects: ['unit', 'web', 'api', ...(hasBrowser ? ['browser'] : [])], extra: ['--maxWorkers=2'] },
    faults,
    { label: 'Units once more under TZ=Pacific/Auckland', projects: ['unit'], extra: ['--maxWorkers=2'], env: { TZ: 'Pacific/Auckland' } },
  ];
}

/** @param {string} folder */
function specsUnder(folder) {
  return existsSync(join(root, folder)) ? readdirSync(join(root, folder), { recursive: true }).filter((name) => String(name).endsWith('.spec.ts')).length : 0;
}

/**
 * @param {readonly string[]} commandArguments
 * @param {NodeJS.ProcessEnv} env
 * @param {Promise<void>} untilStopped
 * @returns {Promise<number>} the exit code
 */
function jest(commandArguments, env, untilStopped) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [join(root, 'node_modules/jest/bin/jest.js'), ...commandArguments], { cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'] });
    void untilStopped.then(() => child.kill('SIGTERM'));
    child.on('error', () => resolve(1));
    child.on('exit', (code) => resolve(code ?? 1));
  });
}
