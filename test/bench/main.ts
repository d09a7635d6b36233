import { parseArgs } from 'node:util';
import { benches } from './benches';

// npm run bench [-- --list | --only a,b] [--rounds 5]: one JSON line per bench; exit code 1 when one misses its bar.
const { values } = parseArgs({ options: { list: { type: 'boolean' }, only: { type: 'string' }, rounds: { type: 'string', default: '5' } } });
const wanted = values.only?.split(',').map((name) => name.trim());
const unknown = wanted?.filter((name) => !benches.some((bench) => bench.name === name)) ?? [];
const rounds = Number(values.rounds);

if (unknown.length > 0 || !Number.isInteger(rounds) || rounds < 1) {
  console.error(unknown.length > 0 ? `No bench is called ${unknown.join(', ')}.` : 'Rounds are counted from 1.');
  process.exitCode = 2;
} else if (values.list) {
  for (const { name } of benches) console.log(name);
} else {
  for (const bench of benches) {
    if (wanted && !wanted.includes(bench.name)) continue;
    const result = await bench.run(rounds);
    console.log(JSON.stringify(result));
    if (!result.ok) process.exitCode = 1;
  }
}
