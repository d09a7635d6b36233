import { LIMIT_ROWS } from '#compliance/air/limits.data';
import { coverageOf } from '#compliance/jurisdictions/pack';
import { PACKS, type AreaCoverage } from '#compliance/jurisdictions/packs.data';
import { PLACES_WITHOUT_PACK } from '#compliance/jurisdictions/places.data';
import { dutyCoverage } from '#compliance/rules/coverage';
import { DATA_TABLES, RULES, type DataTable } from '#compliance/rules/registry';
import { type ListedRule } from '#compliance/rule';
import { VERIFIED_WORDS, type Verified } from '#compliance/source';

/** Marks that ask a reader to check the official text first. */
export const unsure: ReadonlySet<Verified> = new Set<Verified>(['from-memory', 'partly']);
export type RuleFilter = 'all' | 'unsure';

const normal = (text: string): string => text.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase();

/** Rules whose title, id, source or duties hold every word asked for. */
export function findRules(asked: string, filter: RuleFilter): readonly ListedRule[] {
  const wanted = normal(asked).split(/\s+/).filter(Boolean);
  return RULES.filter((rule) => filter === 'all' || unsure.has(rule.source.verified)).filter((rule) => {
    const text = normal([rule.title.en, rule.title.es, rule.id, rule.source.citation, rule.source.paragraph ?? '', ...rule.duties].join(' '));
    return wanted.every((word) => text.includes(word));
  });
}

/** "154 rows: 120 text read, 34 from memory" */
export function tableWords({ rows }: DataTable): string {
  const counts = new Map<Verified, number>();
  for (const { source } of rows) counts.set(source.verified, (counts.get(source.verified) ?? 0) + 1);
  const marks = [...counts].sort((a, b) => b[1] - a[1]).map(([mark, count]) => `${count} ${VERIFIED_WORDS[mark]}`);
  return `${rows.length} ${rows.length === 1 ? 'row' : 'rows'}: ${marks.join(', ')}`;
}

export interface PackView {
  readonly id: string;
  readonly name: string;
  readonly version: string;
  readonly limit: string;
  readonly areas: readonly AreaCoverage[];
  readonly isComplete: boolean;
}
export const packViews: readonly PackView[] = PACKS.map((pack) => {
  const areas = coverageOf(pack);
  const { limitMicrogramsPerM3: limit, actionLevelMicrogramsPerM3: action } = pack.silica;
  return { id: pack.id, name: pack.name.en, version: pack.version, limit: `${limit} µg/m³ as 8-hour average, ${action === null ? 'no action level' : `action level ${action}`}`, areas, isComplete: areas.every((area) => area.state === 'complete') };
});

/** A place without a pack: its own silica figure, where one was found, for orientation only. */
export const placeViews = PLACES_WITHOUT_PACK.map((place) => ({ place, limits: LIMIT_ROWS.filter((row) => row.substanceId === 'rcs' && row.jurisdictionId === place.id) }));

export const duties = dutyCoverage();
export const tables = DATA_TABLES;
export const ruleCount = RULES.length;
