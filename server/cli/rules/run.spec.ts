import { describe, expect, it } from '@jest/globals';
import { CALCULATIONS, runRules } from './run';

const noStdin = () => Promise.resolve('');
const run = (...args: string[]) => runRules(args, noStdin);
const answer = async (name: string, input: unknown) => {
  const { exitCode, stdout, stderr } = await run(name, JSON.stringify(input));
  return exitCode === 0 ? JSON.parse(stdout) : { exitCode, ...JSON.parse(stderr) };
};

describe('the rules on the command line', () => {
  it('has the calculations that were promised', () => {
    const promised = ['table1', 'controls', 'respirator', 'twa', 'mixture', 'monitoring', 'notice-date', 'noise', 'hearing-protection', 'airflow', 'dilution', 'kits', 'cas', 'sds-audit', 'ppe', 'checklist'];
    expect(CALCULATIONS.map(({ name }) => name)).toEqual(expect.arrayContaining(promised));
  });

  it.each(CALCULATIONS.map((each) => [each.name, each] as const))('%s --help prints a shape and an example that runs', async (name, { example }) => {
    const { exitCode, stdout } = await run(name, '--help');
    expect(exitCode).toBe(0);
    expect(stdout).toContain('"additionalProperties": false');
    expect(stdout).toContain(`npm run -s rules -- ${name} '{`);
    expect(await answer(name, example)).not.toHaveProperty('refused');
  });

  it('takes the evaporation once: in grams for the metric form, or in pints for the printed example', async () => {
    const vapor = { form: 'vapor', hazardCodes: ['H336'], molarMassGPerMol: 133.4, targetPpm: 350, mixingFactor: 5 };
    // Industrial ventilation manual, dilution for health: 1.5 pints an hour, SG 1.32 → about 1,425 cfm (formula read, example from memory, tolerance 1 %).
    const { requiredCfm } = (await answer('dilution', { ...vapor, evaporationPintsPerMin: 0.025, specificGravity: 1.32 })) as { requiredCfm: number };
    expect(Math.abs(requiredCfm / 1425 - 1)).toBeLessThan(0.01);
    for (const wrong of [{}, { evaporationGPerH: 1, evaporationPintsPerMin: 1 }]) expect((await run('dilution', JSON.stringify({ ...vapor, ...wrong }))).stderr).toContain('"evaporationGPerH"');
    expect((await run('dilution', JSON.stringify({ ...vapor, evaporationPintsPerMin: 0.025 }))).stderr).toContain('"specificGravity"');
  });

  it.each(CALCULATIONS.map((each) => [each.name, each.example] as const))('%s refuses an unknown field by its name', async (name, example) => {
    expect(await answer(name, { ...(example as object), colour: 'red' })).toEqual({ exitCode: 2, refused: [{ field: 'colour', message: 'unknown field' }] });
  });

  it('reads JSON from standard input where none stands among the arguments', async () => {
    const { stdout } = await runRules(['cas'], () => Promise.resolve('{"casNumbers":["7732-18-5"]}'));
    expect(JSON.parse(stdout)).toEqual({ results: [{ isValid: true, casNumber: '7732-18-5' }] });
  });

  it.each([
    ['twa', { unit: 'ppm', shiftMinutes: 480, periods: [{ concentration: 1, minutes: -5 }] }, 'periods[0].minutes'],
    ['twa', { unit: 'ppm', shiftMinutes: 60, periods: [{ concentration: 1, minutes: 120 }] }, 'periods'],
    ['noise', { periods: [{ levelDba: 400, minutes: 5 }] }, 'periods[0].levelDba'],
    ['monitoring', { jurisdictionId: 'us-federal', asOf: '2026-02-30', results: [] }, 'asOf'],
    ['notice-date', { assessmentCompletedOn: '2026-12-04', scope: 'construction', country: 'ZZ' }, 'country'],
    ['limits', { substance: 'water' }, 'substance'],
    ['kits', { areaM2: 10, thicknessMm: 0, volumeL: 10, mixMinutesPerKit: 2, powderParts: 1 }, 'thicknessMm'],
  ])('%s refuses an impossible value by the name of its field', async (name, input, field) => {
    const result = await answer(name, input);
    expect(result.exitCode).toBe(2);
    expect(result.refused.map((each: { field: string }) => each.field)).toContain(field);
  });

  it('refuses what is not JSON, and names an unknown command', async () => {
    expect(await run('cas', '{')).toMatchObject({ exitCode: 2, stderr: '{"refused":[{"field":"input","message":"is not JSON"}]}' });
    expect(await run('astrology')).toMatchObject({ exitCode: 1, stderr: expect.stringContaining('no such calculation') });
    expect(await run()).toMatchObject({ exitCode: 1, stderr: expect.stringContaining('usage') });
    expect(await run('show', 'nothing')).toMatchObject({ exitCode: 1 });
  });

  it('lists and shows rules, tables and places', async () => {
    const { rules, tables, places } = JSON.parse((await run('list')).stdout);
    expect(rules.length).toBeGreaterThan(50);
    for (const { id } of [...rules, ...tables, ...places]) {
      const { exitCode, stdout } = await run('show', id);
      expect(exitCode).toBe(0);
      expect(stdout.length).toBeGreaterThan(20);
    }
  });
});

describe('answers on the command line', () => {
  // The same worked examples as in compliance/, by way of the command.
  it('[AIR-01] A1 and A2, 29 CFR 1910.1000(d), verified', async () => {
    const { example } = CALCULATIONS.find(({ name }) => name === 'twa')!;
    expect(await answer('twa', example)).toMatchObject({ isDecided: true, wholeShift: 81.25 });
    expect((await answer('mixture', CALCULATIONS.find(({ name }) => name === 'mixture')!.example)).index).toBeCloseTo(0.925, 9);
  });

  it('[SIL-11] B5, derived: due Friday 11 December 2026', async () => {
    expect(await answer('notice-date', { assessmentCompletedOn: '2026-12-04', scope: 'construction', country: 'US' })).toMatchObject({ dueOn: '2026-12-11', earlierDueOn: '2026-12-11' });
    expect(await answer('notice-date', { assessmentCompletedOn: '2026-12-18', scope: 'construction', country: 'US' })).toMatchObject({ dueOn: '2026-12-28', earlierDueOn: '2026-12-25' });
  });

  it.each<[string, [string, string, string, number][], (number | null | 'outside')[]]>([
    ['floor grinder, vacuum, indoors, 7 h', [['walk-behind-grinder-or-mill', 'vacuum', 'indoors', 420]], [null]],
    ['handheld grinder, vacuum, indoors, 4.0 h', [['handheld-grinder', 'vacuum', 'indoors', 240]], [null]],
    ['handheld grinder, vacuum, indoors, 4.25 h', [['handheld-grinder', 'vacuum', 'indoors', 255]], [10]],
    ['handheld grinder, vacuum, outdoors, 7 h', [['handheld-grinder', 'vacuum', 'outdoors', 420]], [null]],
    ['handheld grinder, water, indoors', [['handheld-grinder', 'water', 'indoors', 10]], ['outside']],
    ['floor grinder 3 h and handheld 1.5 h', [['walk-behind-grinder-or-mill', 'vacuum', 'indoors', 180], ['handheld-grinder', 'vacuum', 'indoors', 90]], [null, 10]],
    ['tuckpointing 1 h and floor grinder 3.5 h', [['mortar-removal-grinder', 'vacuum', 'indoors', 60], ['walk-behind-grinder-or-mill', 'vacuum', 'indoors', 210]], [25, null]],
    ['jackhammer 2 h and handheld saw 2 h, outdoors', [['chipping-tool', 'water', 'outdoors', 120], ['handheld-power-saw', 'water', 'outdoors', 120]], [null, null]],
    ['jackhammer 2 h and handheld saw 2.1 h, outdoors', [['chipping-tool', 'water', 'outdoors', 120], ['handheld-power-saw', 'water', 'outdoors', 126]], [10, 10]],
  ])('[SIL-03] [SIL-04] B1, derived: %s', async (_name, tasks, expected) => {
    const result = await answer('table1', { jurisdictionId: 'us-federal', tasks: tasks.map(([tool, method, setting, minutes]) => ({ tool, method, setting, minutes })) });
    expect(result.tasks.map((task: { isCovered: boolean; respiratorApf?: number | null }) => (task.isCovered ? task.respiratorApf : 'outside'))).toEqual(expected);
  });

  it('[LOC-02] never answers one place by another’s law', async () => {
    const grinder = { tool: 'handheld-grinder', method: 'vacuum', setting: 'indoors', minutes: 60 };
    expect((await answer('table1', { jurisdictionId: 'great-britain', tasks: [grinder] })).tasks[0]).toMatchObject({ isCovered: false, outcome: 'undecided' });
    expect((await answer('table1', { jurisdictionId: 'us-california', tasks: [grinder] })).tasks[0]).toMatchObject({ isCovered: false, outcome: 'undecided' });
    expect(await answer('monitoring', { jurisdictionId: 'great-britain', asOf: '2026-12-01', results: [] })).toMatchObject({ outcome: 'undecided' });
    expect(await answer('monitoring', { jurisdictionId: 'new-zealand', asOf: '2026-12-01', results: [] })).toMatchObject({ outcome: 'undecided' });
    expect(await answer('notice-date', { assessmentCompletedOn: '2026-12-04', scope: 'construction', country: 'NZ' })).toMatchObject({ outcome: 'undecided' });
    expect(await answer('respirator', { jurisdictionId: 'australia', exposureMgPerM3: 1, limitMgPerM3: 0.05, form: 'particles' })).toMatchObject({ outcome: 'undecided' });
  });

  it('[SIL-06] a collector below its airflow loses Table 1', async () => {
    const { example } = CALCULATIONS.find(({ name }) => name === 'controls')!;
    const input = example as { collector: { airflow: object } };
    const weak = { ...input, collector: { ...input.collector, airflow: { ...input.collector.airflow, airflowM3PerH: 200 } } };
    expect((await answer('controls', input)).rows[0].outcome).toBe('met');
    expect((await answer('controls', weak)).rows[0].outcome).toBe('unmet');
    expect((await answer('controls', { ...input, collector: null })).rows[0].outcome).toBe('unmet');
  });
});
