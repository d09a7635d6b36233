// @ts-check
/** Installs from Debian what the tests need and this machine lacks. */
import { ensureChromium, ensurePostgres } from './debian.mjs';
import { sayError } from './progress.mjs';

try {
  await ensurePostgres();
  await ensureChromium();
} catch (error) {
  sayError(error);
  process.exitCode = 1;
}
