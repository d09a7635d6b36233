import { describe, expect, it } from '@jest/globals';
import { InputError } from '../input-error';
import { TABLE_1, table1Demands, table1Tools, type Table1Apf } from './table1.data';
import { selectTable1, table1Apf, table1Place } from './table1';

type Cell = Table1Apf | 'n/a';

/** [id, outdoors ≤ 4 h, outdoors > 4 h, indoors ≤ 4 h, indoors > 4 h]. Source: 29 CFR 1926.1153(c)(1) Table 1 as restated, and marked, in the reference digest section 1.3. */
const CELLS: readonly (readonly [string, Cell, Cell, Cell, Cell])[] = [
  ['i', null, null, null, null],
  ['ii', null, 10, 10, 10],
  ['iii', null, null, 'n/a', 'n/a'],
  ['iv', null, null, 10, 10],
  ['v', null, null, 'n/a', 'n/a'],
  ['vi', null, null, null, null],
  ['vii', null, null, null, null],
  ['viii', 10, 10, 'n/a', 'n/a'],
  ['ix-a', null, null, null, null],
  ['ix-b', null, null, null, null],
  ['x-a', null, 10, 10, 10],
  ['x-b', null, 10, 10, 10],
  ['xi', 10, 25, 10, 25],
  ['xii-a', null, null, 'n/a', 'n/a'],
  ['xii-b', null, null, null, 10],
  ['xiii-a', null, null, null, null],
  ['xiii-b', null, null, null, null],
  ['xiv', null, null, null, null],
  ['xv-a', null, null, null, null],
  ['xv-b', null, null, null, null],
  ['xv-c', null, null, null, null],
  ['xvi', null, null, null, null],
  ['xvii', null, null, null, null],
  ['xviii-a', null, null, null, null],
  ['xviii-b', null, null, null, null],
];

const optionOf = (id: string) => {
  const option = TABLE_1.find((each) => each.id === id);
  if (option === undefined) throw new Error(`no option ${id}`);
  return option;
};

describe('Table 1 of 29 CFR 1926.1153(c)(1)', () => {
  it('[SIL-02] has all 18 rows, each option once, each with words in both languages, a source and known demands', () => {
    const roman = ['i', 'ii', 'iii', 'iv', 'v', 'vi', 'vii', 'viii', 'ix', 'x', 'xi', 'xii', 'xiii', 'xiv', 'xv', 'xvi', 'xvii', 'xviii'];
    expect([...new Set(TABLE_1.map((option) => option.row))]).toEqual(roman);
    expect(TABLE_1.map((option) => option.id)).toEqual(CELLS.map(([id]) => id));
    expect([...new Set(TABLE_1.map((option) => option.tool))]).toEqual([...table1Tools]);
    for (const option of TABLE_1) {
      expect(option.heading.en).not.toBe('');
      expect(option.heading.es).not.toBe('');
      expect(option.source.paragraph).toBe(`(c)(1) Table 1 row (${option.row})`);
      expect(option.source.note).not.toBeUndefined();
      expect(option.demands.length).toBeGreaterThan(0);
      for (const demand of option.demands) expect(table1Demands).toContain(demand);
    }
  });

  // The boundary: "4 hours or less" holds exactly 240 minutes, "more than 4 hours" starts above (reference digest, trap 3).
  describe.each(CELLS)('[SIL-03] option %s', (id, outdoors4, outdoorsOver, indoors4, indoorsOver) => {
    const { tool, method } = optionOf(id);
    it.each([
      ['outdoors', 0, outdoors4],
      ['outdoors', 240, outdoors4],
      ['outdoors', 241, outdoorsOver],
      ['outdoors', 600, outdoorsOver],
      ['indoors', 0, indoors4],
      ['indoors', 240, indoors4],
      ['indoors', 241, indoorsOver],
      ['indoors', 600, indoorsOver],
    ] as const)('%s, %d minutes', (place, minutes, expected) => {
      const selection = selectTable1({ tool, method, place });
      const found = selection.isCovered ? table1Apf(selection.respirator, minutes) : 'n/a';
      expect(found).toBe(expected);
      if (!selection.isCovered) expect(selection).toMatchObject({ because: 'place', row: optionOf(id).row });
    });
  });

  // Reference digest section 1.3, column "control option".
  it.each([
    ['xi', 'airflow-25-cfm-per-inch'],
    ['xi', 'cyclone-or-filter-cleaning'],
    ['xii-b', 'airflow-25-cfm-per-inch'],
    ['xii-b', 'shroud'],
    ['xii-b', 'filter-99-percent'],
    ['xiii-b', 'airflow-makers-figure'],
    ['xiii-b', 'filter-cleaning'],
    ['xiii-b', 'hepa-vacuum-between-passes-indoors'],
    ['vii', 'hepa-vacuum-for-holes'],
    ['xvi', 'booth-or-remote-control'],
  ] as const)('[SIL-02] option %s demands %s', (id, demand) => {
    expect(optionOf(id).demands).toContain(demand);
  });

  it('asks the walk-behind grinder for the maker\'s airflow, never 25 cfm an inch (reference digest section 7)', () => {
    expect(optionOf('xiii-b').demands).not.toContain('airflow-25-cfm-per-inch');
  });

  it('gives 10 and 25 to mortar removal only (reference digest, trap 7: shifted reproductions)', () => {
    expect(TABLE_1.filter((option) => option.outdoors.over4Hours === 25).map((option) => option.id)).toEqual(['xi']);
  });

  it('has no row for a handheld grinder without dust control', () => {
    expect(selectTable1({ tool: 'handheld-grinder', method: 'cab', place: 'outdoors' })).toEqual({ isCovered: false, because: 'method', row: null });
  });

  it('treats an enclosed area as indoors', () => {
    expect([table1Place('enclosed'), table1Place('indoors'), table1Place('outdoors')]).toEqual(['indoors', 'indoors', 'outdoors']);
  });

  it.each([-1, Number.NaN, Number.POSITIVE_INFINITY])('refuses %d minutes by name', (minutes) => {
    expect(() => table1Apf({ upTo4Hours: null, over4Hours: 10 }, minutes)).toThrow(InputError);
  });
});
