import { DUTIES, type DutyRow } from './duties.data';
import { RULES } from './registry';

export interface DutyCoverage extends DutyRow {
  readonly ruleIds: readonly string[];
}

/** Each duty with the rules that serve it and the flow that does the rest. */
export function dutyCoverage(): readonly DutyCoverage[] {
  return DUTIES.map((row) => ({ ...row, ruleIds: RULES.filter((rule) => rule.duties.includes(row.id)).map((rule) => rule.id) }));
}

/** The table that stands in DEVELOPERS.md, word for word. */
export function dutyTable(): string {
  const lines = dutyCoverage().map(({ id, duty, ruleIds, flow }) => `| ${id} | ${duty} | ${ruleIds.map((rule) => `\`${rule}\``).join(', ') || '–'} | ${flow ?? ''} |`);
  return ['| id | duty | rules | flow beside or instead |', '| --- | --- | --- | --- |', ...lines].join('\n');
}
