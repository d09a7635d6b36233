import { describe, expect, it } from '@jest/globals';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { RULE_CASES } from './cases';
import { dutyCoverage, dutyTable } from './coverage';
import { DUTIES } from './duties.data';
import { CONTENTS_RULES, RULES } from './registry';

const project = fileURLToPath(new URL('../..', import.meta.url));
const specs = ['compliance', 'server', 'shared', 'test', 'web']
  .flatMap((room) => readdirSync(join(project, room), { recursive: true, encoding: 'utf8' }).map((name) => join(project, room, name)))
  .filter((name) => name.endsWith('.spec.ts') && !name.includes('node_modules'))
  .map((name) => readFileSync(name, 'utf8'))
  .join('\n');
/** Test names of the office rules are made from their duties (rules.spec.ts). */
const named = new Set([...RULE_CASES.flatMap((each) => each.duties), ...CONTENTS_RULES.flatMap((rule) => rule.duties)]);

describe('duties', () => {
  it('stand once each, and no rule serves one that is not listed', () => {
    const ids = DUTIES.map((row) => row.id);
    expect(ids.filter((id, i) => ids.indexOf(id) !== i)).toEqual([]);
    expect(RULES.flatMap((rule) => rule.duties).filter((id) => !ids.includes(id))).toEqual([]);
  });

  it('are each served by a rule, or by a flow that is named', () => {
    expect(dutyCoverage().filter((row) => row.ruleIds.length === 0 && row.flow === null).map((row) => row.id)).toEqual([]);
  });

  it('are each proved by a test that carries the id, where a rule serves them', () => {
    expect(dutyCoverage().filter((row) => row.ruleIds.length > 0 && !named.has(row.id) && !specs.includes(`[${row.id}]`)).map((row) => row.id)).toEqual([]);
  });

  it('stand in DEVELOPERS.md as the rules say (print with: npm run -s rules -- duties)', () => {
    expect(readFileSync(join(project, 'DEVELOPERS.md'), 'utf8')).toContain(dutyTable());
  });
});
