import { text } from 'node:stream/consumers';
import { runRules } from './rules/run';

/** `npm run -s rules -- list | show ID | NAME '<json>' | NAME --help`: the knowledge on the command line, as JSON. */
const { exitCode, stdout, stderr } = await runRules(process.argv.slice(2), () => text(process.stdin));
if (stdout !== '') console.log(stdout);
if (stderr !== '') console.error(stderr);
process.exitCode = exitCode;
