import { describe, expect, it } from '@jest/globals';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type Source } from '../source';
import { RULE_CASES } from './cases';
import { CONTENTS_RULES, DATA_TABLES, findRule, OFFICE_RULES, RULES } from './registry';

const room = fileURLToPath(new URL('..', import.meta.url));
const files = readdirSync(room, { recursive: true, encoding: 'utf8' });
const specs = files.filter((name) => name.endsWith('.spec.ts')).map((name) => readFileSync(join(room, name), 'utf8')).join('\n');

const isCited = (source: Source) => source.citation.trim().length > 3 && source.verified.length > 0;
/** A mark of doubt says what is doubtful: where only part was read, the note names the part. */
const isExplained = (source: Source) => (source.verified !== 'partly' && source.verified !== 'parallel-text') || (source.note ?? '').length > 3 || source.paragraph !== undefined;

describe('data check', () => {
  it('finds a citation on every rule', () => {
    expect(RULES.filter((rule) => !isCited(rule.source)).map((rule) => rule.id)).toEqual([]);
  });

  it('finds every rule id once, kebab-case, with a title in both languages', () => {
    const ids = RULES.map((rule) => rule.id);
    expect(ids.filter((id, i) => ids.indexOf(id) !== i)).toEqual([]);
    expect(ids.filter((id) => !/^[a-z0-9]+(-[a-z0-9]+)*$/.test(id))).toEqual([]);
    expect(RULES.filter((rule) => rule.title.en.length < 4 || rule.title.es.length < 4).map((rule) => rule.id)).toEqual([]);
    expect(findRule('silica-monitoring-due')?.id).toBe('silica-monitoring-due');
    expect(findRule('nothing')).toBeNull();
  });

  it('finds a test for every rule: cases of its own, or its id in a spec', () => {
    const covered = new Set([...RULE_CASES.map((each) => each.ruleId), ...CONTENTS_RULES.map((rule) => rule.id)]);
    expect(RULES.filter((rule) => !covered.has(rule.id) && !specs.includes(rule.id)).map((rule) => rule.id)).toEqual([]);
  });

  it('finds cases that can fail both ways, each with a source', () => {
    for (const rule of OFFICE_RULES.filter((each) => !CONTENTS_RULES.some((contents) => contents.id === each.id))) {
      const cases = RULE_CASES.find((each) => each.ruleId === rule.id)?.cases ?? [];
      expect(new Set(cases.map((each) => each.expected)).size).toBeGreaterThan(1);
      expect(cases.filter((each) => !isCited(each.source))).toEqual([]);
    }
  });

  it('finds above every rule what its paragraph demands, by letter where a federal paragraph is cited', () => {
    const sources = files.filter((name) => name.endsWith('.ts') && !/\.(spec|cases)\.ts$/.test(name)).map((name) => readFileSync(join(room, name), 'utf8'));
    // The comment that stands over the rule, with no blank line between them.
    const demandOf = (id: string) => {
      const above = sources.find((text) => text.includes(`\n  id: '${id}',\n  title:`))?.split(`\n  id: '${id}',\n  title:`)[0]!.split('\n\n').at(-1) ?? '';
      return /\/\*\*(.*)\*\//s.exec(above)?.[1]!.trim() ?? '';
    };
    expect(RULES.filter((rule) => demandOf(rule.id).length < 40).map((rule) => rule.id)).toEqual([]);
    const isByLetter = (source: Source) => source.citation.startsWith('29 CFR') && /^\([a-z]\)/.test(source.paragraph ?? '');
    expect(RULES.filter((rule) => isByLetter(rule.source) && !/\([a-z]\)/.test(demandOf(rule.id))).map((rule) => rule.id)).toEqual([]);
  });

  it('serves duties by the form of their ids', () => {
    const duties = RULES.flatMap((rule) => rule.duties);
    expect(duties.filter((duty) => !/^(SIL|HAZ|RES|GATE|ISO|REC|WST|NOI|AIR|PPE|LOC)-\d\d$/.test(duty))).toEqual([]);
  });

  it.each(DATA_TABLES.map((table) => [table.id, table] as const))('%s: every row cited, no id twice', (_id, table) => {
    const ids = table.rows.map((row) => row.id);
    expect(ids.length).toBeGreaterThan(0);
    expect(ids.filter((id, i) => ids.indexOf(id) !== i)).toEqual([]);
    expect(table.rows.filter((row) => !isCited(row.source)).map((row) => row.id)).toEqual([]);
    expect(table.rows.filter((row) => !isExplained(row.source)).map((row) => row.id)).toEqual([]);
  });

  it('lists every data file of the room', () => {
    const registry = readFileSync(join(room, 'rules/registry.ts'), 'utf8');
    // Sentences, traits and the list of duties rather than facts: their rules carry the sources.
    const words = ['table1-demands.data.ts', 'tasks.data.ts', 'duties.data.ts'];
    const unlisted = files.filter((name) => name.endsWith('.data.ts') && !words.some((each) => name.endsWith(each)) && !registry.includes(name.replace(/\.ts$/, '')));
    expect(unlisted).toEqual([]);
  });
});
