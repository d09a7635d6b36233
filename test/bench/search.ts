import { performance } from 'node:perf_hooks';
import pg from 'pg';
import { createDatabase, type Database } from '#server/platform/database';
import { searchService } from '#server/search/search-service';
import { SearchQuery } from '#shared/library';
import { commonWord, figures, makeManySheets, rareWord, type ManySheets } from '#test/support/many-sheets';
import { median, percentile, type Bench } from './bench';
import { withServices } from './services';

const BAR = 12;
const COMMON_WORD_BAR_MS = 100;
/** 50,000 sheets; what is looked for belongs to the largest organisation. */
const SIZES = [25_000, 12_000, 8_000, 4_000, 1_000];
const SEARCHES_PER_ROUND = 200;
const COMMON_SEARCHES_PER_ROUND = 5;

/** p95 of searches through the service as the application role, against 20 rows by key on the same pool. */
export const searchBench: Bench = {
  name: 'search',
  run: (rounds) =>
    withServices(async ({ postgres }) => {
      const database = createDatabase(postgres.appUrl, { max: 4 });
      try {
        const [largest] = await fill(database, postgres.ownerUrl);
        if (!largest) throw new Error('No sheets were made.');
        const service = searchService({ database });
        const actor = { organisationId: largest.organisationId };
        const look = async (q: string, mustFind: boolean): Promise<number> => {
          const query = SearchQuery.parse({ q });
          const start = performance.now();
          const { items } = await service.search(actor, query);
          const took = performance.now() - start;
          if (mustFind && items.length === 0) throw new Error(`The search for ${q} found nothing.`);
          return took;
        };
        const next = figures(11);
        const byKey = () => timeOf(() => database.inOrganisation(largest.organisationId, ({ client }) => client.query('SELECT * FROM revisions WHERE organisation_id = $1 AND id = ANY($2)', [largest.organisationId, Array.from({ length: 20 }, () => largest.sheets[next(largest.sheets.length)]?.id)])));
        for (const q of mix(largest, next).slice(0, 40)) await look(q, false);
        for (let warm = 0; warm < 40; warm += 1) await byKey();
        const [ours, reference, common, medians, referenceMedians]: [number[], number[], number[], number[], number[]] = [[], [], [], [], []];
        for (let round = 0; round < rounds; round += 1) {
          const [mine, keys]: [number[], number[]] = [[], []];
          // One beside the other, so that a busy minute hits both alike.
          for (const q of mix(largest, next)) {
            keys.push(await byKey());
            mine.push(await look(q, true));
          }
          ours.push(percentile(mine, 0.95));
          reference.push(percentile(keys, 0.95));
          medians.push(median(mine));
          referenceMedians.push(median(keys));
          for (let time = 0; time < COMMON_SEARCHES_PER_ROUND; time += 1) common.push(await look(commonWord, true));
        }
        const [mine, theirs, commonWordMs] = [median(ours), median(reference), median(common)];
        const ratio = mine / theirs;
        return { name: 'search', ours: mine, reference: theirs, ratio, unit: 'ms', bar: BAR, also: { commonWordMs, commonWordBarMs: COMMON_WORD_BAR_MS, medianMs: median(medians), referenceMedianMs: median(referenceMedians) }, ok: ratio <= BAR && commonWordMs <= COMMON_WORD_BAR_MS };
      } finally {
        await database.close();
      }
    }),
};

/** 40 % names, 20 suppliers, 20 CAS numbers, 10 mistyped names, 10 texts, in turn. */
function mix({ sheets }: ManySheets, next: (below: number) => number): string[] {
  return Array.from({ length: SEARCHES_PER_ROUND }, (_, at) => {
    const sheet = sheets[next(sheets.length)] ?? sheets[0];
    if (!sheet) return '';
    const [word = '', ...others] = sheet.name.split(' ');
    switch (at % 10) {
      case 0: case 2: return sheet.name;
      case 4: return word;
      case 6: return `${word.slice(0, 6).toLowerCase()}`;
      case 1: return sheet.supplier;
      case 5: return sheet.supplier.split(' ')[0] ?? '';
      case 3: return sheet.cas[0] ?? '';
      case 7: return (sheet.cas.at(-1) ?? '').replaceAll('-', '');
      case 8: return [mistyped(word, next), ...others].join(' ');
      default: return next(2) ? rareWord(next(13_824)) : [...sheet.text.matchAll(/\w+ol\b/g)].slice(0, 2).join(' ');
    }
  });
}

/** Two neighbours swapped or one letter left out, never the first. */
function mistyped(word: string, next: (below: number) => number): string {
  const at = 1 + next(word.length - 2);
  return next(2) ? word.slice(0, at) + word.slice(at + 1) : `${word.slice(0, at)}${word[at + 1] ?? ''}${word[at] ?? ''}${word.slice(at + 2)}`;
}

/** Full text indexes are built after the rows, as a restore does: the same indexes, sooner. */
async function fill(database: Database, ownerUrl: string): Promise<ManySheets[]> {
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  try {
    const { rows } = await owner.query<{ name: string; definition: string }>(`SELECT indexname AS name, indexdef AS definition FROM pg_indexes WHERE tablename IN ('sheet_search', 'sheet_words') AND indexdef LIKE '% USING gin %'`);
    for (const { name } of rows) await owner.query(`DROP INDEX ${name}`);
    // Two at a time: the machine has two cores.
    const waiting = [...SIZES.entries()];
    const made: ManySheets[] = [];
    await Promise.all([0, 1].map(async () => {
      for (let job = waiting.shift(); job; job = waiting.shift()) made[job[0]] = await makeManySheets(database, job[1], job[0]);
    }));
    await owner.query(`SET maintenance_work_mem = '256MB'`);
    for (const { definition } of rows) await owner.query(definition);
    await owner.query('VACUUM ANALYZE sheet_search, sheet_words, revisions');
    return made;
  } finally {
    await owner.end();
  }
}

async function timeOf(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return performance.now() - start;
}
