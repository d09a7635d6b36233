import { describe, expect, it } from '@jest/globals';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { basisFacts, personFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { answerShift } from './answer-shift';
import { type ShiftFacts } from './facts';
import { sheetsAccessible } from './hazcom/program-rules';
import { silicaTraining } from './plans/silica-plan';
import { APF_ROWS } from './respirators/apf.data';
import { CONTENTS_RULES } from './rules/registry';

/**
 * Where a rules engine goes wrong: each trap by its number, as tests name it. `npx jest -t "trap 9\b"` runs one.
 * The numbers are permanent.
 */
const TRAPS: readonly string[] = [
  'Table 1 is all or nothing',
  'a handheld grinder with water indoors is not in Table 1',
  'four hours means exactly four too, over all Table 1 tasks',
  'planned and logged time together, to the stricter side',
  'the floor grinder needs no mask, but vacuuming and exhaust',
  '"none" is none under Table 1: site and owner may ask more',
  'Table 1 reproduced with shifted rows',
  'a hood is 25 without the maker’s evidence; tight powered masks need a fit test',
  'the pocket guide’s factors are not the standard’s',
  'use concentration by the strictest contaminant',
  'what is yearly and what is not',
  'five working days in construction, fifteen elsewhere',
  'monitoring exactly at the level and at the limit',
  'thirty days of required use, looked ahead',
  'no Social Security number, no medical finding',
  'a sheet leaves only with its record of use',
  'the sheet opens with no network',
  'odd codes are read, unknown ones asked',
  'the trainer certifies; no signature of the employee is the law’s',
  'construction noise has its own table',
  'ventilation constants of pounds and of pints',
  'the average divides by eight hours',
  'units are converted explicitly',
  'a wheel blaster is abrasive blasting',
  'mixing powder needs a recorded basis',
];
/** The rules of conduct of a safety officer, as tests name them: "conduct 9" or "rule of conduct 9". */
const CONDUCT_RULES = 14;

const project = join(import.meta.dirname, '..');
const specs = ['compliance', 'shared', 'server', 'web', 'test', 'drizzle']
  .flatMap((room) => readdirSync(join(project, room), { recursive: true, encoding: 'utf8' }).map((name) => join(project, room, name)))
  .filter((name) => /\.(spec|cases)\.ts$/.test(name) && !name.includes('node_modules') && !name.endsWith('traps.spec.ts'))
  .concat(import.meta.filename)
  .flatMap((name) => readFileSync(name, 'utf8').split('\n'))
  // Only what can be a test's or a group's name: comments do not count.
  .filter((line) => !/^\s*(\/\/|\*|\/\*)/.test(line));

describe('every trap and every rule of conduct', () => {
  it.each(TRAPS.map((name, index) => [index + 1, name] as const))('%d (%s) has a test of its name', (number) => {
    expect(specs.some((line) => new RegExp(`\\(.*\\btrap ${number}\\b`).test(line))).toBe(true);
  });
  it.each(Array.from({ length: CONDUCT_RULES }, (_, index) => index + 1))('conduct %d has a test of its name', (number) => {
    expect(specs.some((line) => new RegExp(`\\bconduct ${number}\\b`).test(line))).toBe(true);
  });
});

const ask = (facts: ShiftFacts) => answerShift(facts, '2026-12-03T12:00:00Z');
const alone = (kind: 'floor-grinding' | 'powder-mixing' | 'spreading', hours: number, overrides: Partial<ShiftFacts> = {}) => {
  const tools = kind === 'floor-grinding' ? ({ equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' } as const) : { kitId: 'quarrybond-40' };
  return ask(shiftFacts({ setting: 'indoors', tasks: [taskFacts({ kind, ...tools, assignments: [{ personId: 'dov', startMinute: 400, endMinute: 400 + hours * 60 }] })], ...overrides })).tasks[0]!;
};

describe('[SIL-03] [SIL-05] the floor grinder indoors (worked example B1, derived from Table 1 row xiii, read)', () => {
  it('needs no mask at seven hours, and asks the HEPA vacuum between passes and exhaust (trap 5)', () => {
    const task = alone('floor-grinding', 7);
    expect(task).toMatchObject({ state: 'ready', table1Row: 'xiii', respirator: { outcome: 'none-required', apf: null } });
    expect(task.findings.map(({ id }) => id)).toEqual(expect.arrayContaining(['silica-exhaust-indoors/floor-grinding', 'silica-table-1-control/floor-grinding/hepa-vacuum-between-passes-indoors']));
  });

  it('says "none under Table 1", not "none" (trap 6)', () => {
    expect(alone('floor-grinding', 7).respirator.label).toEqual({ en: 'none under Table 1', es: 'ninguna en la Tabla 1' });
  });

  it('takes a mask that the site or its owner asks beside the law, in their words; silence asks none (trap 6)', () => {
    const task = alone('floor-grinding', 7, { siteMaskRule: 'half mask in every dusty room' });
    expect(task.respirator).toMatchObject({ outcome: 'by-policy', label: { en: 'site rule: half mask in every dusty room' }, source: { citation: 'Rule of the site or its owner' } });
    expect(task.protection.find(({ mark }) => mark === 'respirator')?.name.en).toBe('Site rule: half mask in every dusty room');
    for (const siteMaskRule of [null, '', '  ']) expect(alone('floor-grinding', 7, { siteMaskRule }).respirator.outcome).toBe('none-required');
  });

  it('never lets the site’s rule weaken the law’s mask (trap 6)', () => {
    const facts = (siteMaskRule: string | null) => shiftFacts({ siteMaskRule, bases: [basisFacts({ exposureMicrogramsPerM3: 600 })] });
    const mask = (siteMaskRule: string | null) => ask(facts(siteMaskRule)).tasks.find(({ taskId }) => taskId === 'shot-blasting')!.respirator;
    expect(mask('paper mask')).toEqual(mask(null));
    expect(mask('paper mask')).toMatchObject({ outcome: 'required', apf: 25 });
  });
});

describe('[RES-01] the standard’s own factors, 29 CFR 1910.134(d)(3)(i)(A) (read), never those of the NIOSH pocket guide', () => {
  const apfOf = (device: string, facePiece: string) => APF_ROWS.filter((row) => row.jurisdictionId === 'us-federal' && row.device === device && row.facePiece === facePiece).map((row) => row.apf);

  it.each([
    // The guide: powered tight 50 whatever the face piece; pressure-demand full face 2,000 (reference section 12, read).
    ['powered-air-purifying', 'half-mask', 50],
    ['powered-air-purifying', 'full-facepiece', 1000],
    ['supplied-air-pressure-demand', 'full-facepiece', 1000],
  ])('%s, %s: %d (trap 9)', (device, facePiece, apf) => {
    expect(apfOf(device, facePiece)).toEqual([apf]);
  });

  it('knows no US factor of 2,000 (trap 9)', () => {
    expect(APF_ROWS.filter((row) => row.jurisdictionId === 'us-federal').map((row) => row.apf)).not.toContain(2000);
  });

  it('says that any particle filter of 95 or more serves by law where it names the stricter one, (d)(3)(iv), read (trap 9)', () => {
    const person = personFacts();
    const facts = shiftFacts({ people: [person], tasks: [taskFacts({ kind: 'edge-grinding', equipmentId: 'edger', collectorId: 'edge-vacuum', dustMethod: 'vacuum', assignments: [{ personId: person.id, startMinute: 400, endMinute: 700 }] })] });
    const line = ask(facts).tasks[0]!.findings.find(({ ruleId }) => ruleId === 'silica-table-1-respirator');
    expect(line?.inputs).toMatchObject({ 'protection factor, at least': 10, 'particle filter by law': 'N, R or P, 95 or more' });
  });
});

describe('[SIL-21] [SIL-23] what is never stored', () => {
  it('is asked by no rule: no Social Security number, birth date or medical finding (84 FR 21416; 1926.1153(h)(6), sample opinion read) (trap 15)', () => {
    const facts = readFileSync(join(import.meta.dirname, 'facts.ts'), 'utf8').replaceAll(/\/\*\*[\s\S]*?\*\//g, '');
    const asked = `${facts} ${JSON.stringify(CONTENTS_RULES.map(({ items }) => items))}`;
    expect(asked).not.toMatch(/social.?security|\bssn\b|seguro social|birth|diagnos|\bfinding|x-?ray|spirometr|medicalResult/i);
  });
});

describe('[HAZ-05] the sheet opens with no network (29 CFR 1910.1200(g)(8), read; letters of 1998 and 1999)', () => {
  it('is unmet by a link alone: it must open offline, with no one to ask, and with a back-up (trap 17)', () => {
    const all = { 'opens-offline': true, 'no-permission': true, backup: true };
    expect(sheetsAccessible.evaluate({ present: all }, '2026-12-01').outcome).toBe('met');
    expect(sheetsAccessible.evaluate({ present: { ...all, 'opens-offline': false } }, '2026-12-01')).toMatchObject({ outcome: 'unmet', reason: { en: 'Missing: every sheet of the job opens without a network.' } });
  });
});

describe('[SIL-22] [REC-03] who certifies', () => {
  it('asks for the trainer by name on the record of training, and for no employee’s signature (letters of 14 Aug 1997 and 10 Apr 2000, read) (trap 19)', () => {
    expect(silicaTraining.items.find(({ id }) => id === 'certified')?.name.en).toMatch(/trainer or employer/);
    const asked = CONTENTS_RULES.flatMap(({ items }) => items.map(({ name }) => name.en)).join(' ');
    expect(asked).not.toMatch(/signature of the (employee|worker|person)|employee’s signature|signed by the (employee|worker)/i);
  });
});

describe('[SIL-01] mixing powder is not exempt by rule (OSHA letter of 25 Jul 2019, read: likely below for some work, no automatic exemption)', () => {
  it('stays undecided and held until a basis is signed; a signed one opens it and is named (trap 25)', () => {
    expect(alone('powder-mixing', 1)).toMatchObject({ state: 'not-decided', silicaBasis: 'held', respirator: { outcome: 'undecided' } });
    const signed = alone('powder-mixing', 1, { bases: [basisFacts({ taskKind: 'powder-mixing', kind: 'below-action-level', exposureMicrogramsPerM3: 12 })] });
    expect(signed).toMatchObject({ state: 'ready', silicaBasis: 'outside' });
    expect(signed.findings.find(({ ruleId }) => ruleId === 'silica-signed-basis')).toMatchObject({ outcome: 'met', text: { en: 'Below the action level: signed by Ines Halloran.' } });
  });

  it('is opened by no basis of other work, none without conditions and none that has ended (trap 25)', () => {
    for (const wrong of [{ taskKind: 'shot-blasting' as const }, { conditions: ' ' }, { endsOn: '2026-12-02' }, { signedBy: '' }]) {
      const basis = basisFacts({ taskKind: 'powder-mixing', kind: 'below-action-level', exposureMicrogramsPerM3: 12, ...wrong });
      expect(alone('powder-mixing', 1, { bases: [basis] }).silicaBasis).toBe('held');
    }
  });
});
