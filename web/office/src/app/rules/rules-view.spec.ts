import { findRule, RULES } from '#compliance/rules/registry';
import { findRules, packViews, placeViews, tables, tableWords, unsure } from './rules-view';

describe('what the rules page shows', () => {
  it('lists every rule when nothing is asked', () => {
    expect(findRules('', 'all')).toHaveLength(RULES.length);
  });

  it('finds a rule by its paragraph, a duty and a Spanish word without its accent', () => {
    expect(findRules('1926.1153', 'all').length).toBeGreaterThan(3);
    expect(findRules('SIL-03', 'all').every((rule) => rule.duties.includes('SIL-03'))).toBe(true);
    expect(findRules('no such rule anywhere', 'all')).toEqual([]);
  });

  it('shows under "to check" only what was recalled or read in part', () => {
    const found = findRules('', 'unsure');
    expect(found.length).toBeGreaterThan(0);
    expect(found.every((rule) => unsure.has(findRule(rule.id)!.source.verified))).toBe(true);
  });

  it('counts the rows of Table 1 with how each was verified', () => {
    const table1 = tables.find((table) => table.id === 'table-1')!;
    expect(tableWords(table1)).toMatch(/^\d+ rows: \d+ /);
    const sum = [...tableWords(table1).matchAll(/(\d+) [a-z]/g)].slice(1).reduce((total, [, count]) => total + Number(count), 0);
    expect(sum).toBe(table1.rows.length);
  });

  it('says of each pack whether it is complete and shows places without one apart', () => {
    expect(packViews.find((pack) => pack.id === 'us-federal')?.isComplete).toBe(true);
    expect(packViews.filter((pack) => pack.id !== 'us-federal').every((pack) => !pack.isComplete)).toBe(true);
    expect(placeViews.some(({ place }) => packViews.some((pack) => pack.id === place.id))).toBe(false);
  });
});
