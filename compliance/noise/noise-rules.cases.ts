import { casesOf, type RuleCases } from '../rules/case';
import { sourced, usFederal } from '../source';
import { hearingProtection, noiseInShift } from './noise-rules';

const DAY = '2026-12-01';
const at = (...pairs: [levelDba: number | null, hours: number][]) => ({ periods: pairs.map(([levelDba, hours]) => ({ levelDba, minutes: hours * 60 })) });
const MIXED = usFederal('1926.52', 'partly', { paragraph: '(d)(2)(iii)' });
const WASHINGTON = sourced('WAC 296-307-63215', 'read');

export const NOISE_CASES: readonly RuleCases[] = [
  casesOf(noiseInShift, [
    { name: 'A4: 0.9375', facts: at([110, 0.25], [100, 0.5], [90, 1.5]), asOf: DAY, expected: 'met', source: MIXED },
    { name: 'B4: 1.58', facts: at([97, 4], [90, 2], [85, 2]), asOf: DAY, expected: 'unmet', source: usFederal('1926.52', 'derived', { paragraph: '(d)(2)(ii)' }) },
    { name: 'exactly 8 h at 90', facts: at([90, 8]), asOf: DAY, expected: 'met', source: usFederal('1926.52', 'read', { paragraph: 'Table D-2' }) },
    { name: 'a minute above 115', facts: at([116, 1 / 60]), asOf: DAY, expected: 'unmet', source: usFederal('1926.52', 'derived', { paragraph: 'Table D-2' }) },
    { name: 'a level nobody knows', facts: at([85, 4], [null, 4]), asOf: DAY, expected: 'undecided', source: sourced('walk-behind machines have no published level', 'derived') },
    { name: 'too loud already, whatever the unknown', facts: at([105, 2], [null, 4]), asOf: DAY, expected: 'unmet', source: usFederal('1926.52', 'derived', { paragraph: '(d)(2)(ii)' }) },
  ]),
  casesOf(hearingProtection, [
    { name: 'A7: 95 dBA, plug 20, 82 remain', facts: { twaDba: 95, plugNrrDb: 20, muffNrrDb: null, arePlugsFitted: true }, asOf: DAY, expected: 'met', source: WASHINGTON },
    { name: 'A8: 100 dBA, plug 20 and muff 12, 82 remain', facts: { twaDba: 100, plugNrrDb: 20, muffNrrDb: 12, arePlugsFitted: true }, asOf: DAY, expected: 'met', source: WASHINGTON },
    { name: 'too weak', facts: { twaDba: 105, plugNrrDb: null, muffNrrDb: 20, arePlugsFitted: null }, asOf: DAY, expected: 'unmet', source: usFederal('1910.95', 'derived', { paragraph: 'App. B' }) },
    { name: 'none', facts: { twaDba: 95, plugNrrDb: null, muffNrrDb: null, arePlugsFitted: null }, asOf: DAY, expected: 'unmet', source: usFederal('1926.101', 'parallel-text', { paragraph: '(a)' }) },
    { name: 'plugs nobody fitted', facts: { twaDba: 95, plugNrrDb: 20, muffNrrDb: null, arePlugsFitted: null }, asOf: DAY, expected: 'undecided', source: usFederal('1926.101', 'parallel-text', { paragraph: '(b)' }) },
    { name: 'muffs need no fitting', facts: { twaDba: 95, plugNrrDb: null, muffNrrDb: 20, arePlugsFitted: null }, asOf: DAY, expected: 'met', source: usFederal('1926.101', 'parallel-text', { paragraph: '(b)' }) },
  ]),
];
