import * as z from 'zod';
import { InputError } from '#compliance/input-error';
import { findPack, listPlaces } from '#compliance/jurisdictions/pack';
import { RULE_CASES } from '#compliance/rules/cases';
import { dutyCoverage, dutyTable } from '#compliance/rules/coverage';
import { CONTENTS_RULES, DATA_TABLES, findRule, RULES } from '#compliance/rules/registry';
import { type Source } from '#compliance/source';
import { AIR_CALCULATIONS } from './air';
import { parseInput, RefusedInput, type Calculation, type RefusedField } from './calculation';
import { FLOOR_CALCULATIONS } from './floor';
import { PEOPLE_CALCULATIONS } from './people';
import { SHEET_CALCULATIONS } from './sheets';
import { SHIFT_CALCULATIONS } from './shift';

export const CALCULATIONS: readonly Calculation[] = [...FLOOR_CALCULATIONS, ...AIR_CALCULATIONS, ...PEOPLE_CALCULATIONS, ...SHEET_CALCULATIONS, ...SHIFT_CALCULATIONS];

/** What the command prints; errors are one JSON line that names the fields. Exit codes: 0 done, 1 unknown command, 2 refused input. */
export interface CommandResult {
  readonly exitCode: 0 | 1 | 2;
  readonly stdout: string;
  readonly stderr: string;
}

const done = (value: unknown): CommandResult => ({ exitCode: 0, stdout: typeof value === 'string' ? value : JSON.stringify(value, null, 2), stderr: '' });
const refused = (fields: readonly RefusedField[]): CommandResult => ({ exitCode: 2, stdout: '', stderr: JSON.stringify({ refused: fields }) });

const USAGE = `usage:
  npm run -s rules -- list                    every rule, table, place and calculation
  npm run -s rules -- show ID                 one rule, table or place with its sources
  npm run -s rules -- duties                  the table of duties and the rules that serve them, as Markdown
  npm run -s rules -- NAME '<json>'           a calculation; or JSON on standard input
  npm run -s rules -- NAME --help             what it takes, with units, and an example that runs
calculations: ${CALCULATIONS.map(({ name }) => name).join(', ')}`;

/** Runs one command. `readStdin` is asked only where no JSON stands among the arguments. */
export async function runRules(args: readonly string[], readStdin: () => Promise<string>): Promise<CommandResult> {
  const [name, argument] = args;
  if (name === undefined || name === '--help' || name === 'help') return name === undefined ? { exitCode: 1, stdout: '', stderr: USAGE } : done(USAGE);
  if (name === 'list') return done(list());
  if (name === 'duties') return done(dutyTable());
  if (name === 'show') return show(argument);
  const calculation = CALCULATIONS.find((each) => each.name === name);
  if (calculation === undefined) return { exitCode: 1, stdout: '', stderr: `${name}: no such calculation\n${USAGE}` };
  if (argument === '--help') return done(help(calculation));
  return calculate(calculation, argument ?? (await readStdin()));
}

function calculate(calculation: Calculation, text: string): CommandResult {
  try {
    return done(calculation.run(parseInput(calculation.schema, parseJson(text))));
  } catch (error) {
    if (error instanceof RefusedInput) return refused(error.fields);
    if (error instanceof InputError) return refused([{ field: error.field, message: error.message.slice(error.field.length + 2) }]);
    throw error;
  }
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    throw new RefusedInput([{ field: 'input', message: 'is not JSON' }]);
  }
}

function help({ name, summary, schema, example }: Calculation): string {
  const shape = JSON.stringify(z.toJSONSchema(schema, { io: 'input' }), null, 2);
  return `${name}: ${summary}\n\nInput (JSON Schema; units in the descriptions):\n${shape}\n\nExample:\nnpm run -s rules -- ${name} '${JSON.stringify(example).replaceAll("'", "'\\''")}'`;
}

const brief = (source: Source) => ({ citation: source.citation, paragraph: source.paragraph ?? null, verified: source.verified });

function list() {
  return {
    rules: RULES.map(({ id, title, source, duties }) => ({ id, title: title.en, ...brief(source), duties })),
    tables: DATA_TABLES.map(({ id, title, rows }) => ({ id, title: title.en, rows: rows.length, fromMemory: rows.filter(({ source }) => source.verified === 'from-memory').length })),
    duties: dutyCoverage().map(({ id, ruleIds, flow }) => ({ id, ruleIds, flow })),
    places: listPlaces().map(({ id, name, hasPack, isComplete }) => ({ id, name: name.en, hasPack, isComplete })),
    calculations: CALCULATIONS.map(({ name, summary }) => ({ name, summary })),
  };
}

function show(id: string | undefined): CommandResult {
  if (id === undefined) return { exitCode: 1, stdout: '', stderr: 'show: name a rule, table or place' };
  const rule = findRule(id);
  if (rule !== null) {
    const cases = RULE_CASES.find(({ ruleId }) => ruleId === id)?.cases ?? [];
    const items = CONTENTS_RULES.find((each) => each.id === id)?.items;
    return done({ id, title: rule.title, source: rule.source, duties: rule.duties, ...(items === undefined ? {} : { items }), cases: cases.map(({ name, expected, source, facts }) => ({ name, expected, source, facts })) });
  }
  const table = DATA_TABLES.find((each) => each.id === id);
  if (table !== undefined) return done(table);
  if (listPlaces().some((place) => place.id === id)) return done(findPack(id));
  return { exitCode: 1, stdout: '', stderr: `${id}: no such rule, table or place` };
}
