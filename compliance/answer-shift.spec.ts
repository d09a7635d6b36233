import { describe, expect, it } from '@jest/globals';
import { airflowCfm, basisFacts, equipmentFacts, kitFacts, personFacts, sheetFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { type PersonAnswer, type ShiftAnswer, type TaskAnswer } from './answer';
import { answerShift } from './answer-shift';
import { type Assignment, type EquipmentFacts, type ExposureBasis, type ShiftFacts, type TaskFacts, type TaskKind } from './facts';
import { topics } from './outcome';
import { LISTED_SHIFT_RULES } from './shift-rules';

const ask = (facts: ShiftFacts): ShiftAnswer => answerShift(facts, '2026-12-03T12:00:00Z');
const taskIn = (answer: ShiftAnswer, taskId: string): TaskAnswer => {
  const task = answer.tasks.find((each) => each.taskId === taskId);
  if (task === undefined) throw new Error(`no task ${taskId}`);
  return task;
};
const personIn = (answer: ShiftAnswer, personId: string): PersonAnswer => {
  const person = answer.people.find((each) => each.personId === personId);
  if (person === undefined) throw new Error(`no person ${personId}`);
  return person;
};
const holdsOf = (task: TaskAnswer): readonly string[] => task.findings.filter(({ isHolding }) => isHolding).map(({ ruleId }) => ruleId);
const withEquipment = (id: string, overrides: Partial<EquipmentFacts>): Partial<ShiftFacts> => ({ equipment: shiftFacts().equipment.map((each) => (each.id === id ? { ...each, ...overrides } : each)) });
const withTask = (id: string, overrides: Partial<TaskFacts>): Partial<ShiftFacts> => ({ tasks: shiftFacts().tasks.map((each) => (each.id === id ? { ...each, ...overrides } : each)) });
const withBases = (...bases: readonly Partial<ExposureBasis>[]): Partial<ShiftFacts> => ({ bases: bases.map((basis, index) => basisFacts({ id: `basis-${index}`, ...basis })) });

describe('the demo shift', () => {
  const answer = ask(shiftFacts());

  it('shows each row as drawn: state, figures, mask', () => {
    expect(answer.tasks.map(({ taskId, state, label, silicaBasis, table1Row }) => [taskId, state, label.en, silicaBasis, table1Row])).toEqual([
      ['inspection', 'ready', 'Ready', 'outside', null],
      ['floor-grinding', 'ready', 'Table 1, xiii', 'table-1', 'xiii'],
      ['edge-grinding', 'ready', 'Table 1, xii', 'table-1', 'xii'],
      ['collector-emptying', 'ready', 'Ready', 'outside', null],
      ['shot-blasting', 'may-not-start', 'May not start', 'held', null],
      ['powder-mixing', 'not-decided', 'Not decided', 'held', null],
      ['spreading', 'ready', 'Ready', 'outside', null],
      ['shot-pick-up', 'may-not-start', 'May not start', 'held', null],
      ['clean-up', 'ready', 'Ready', 'outside', null],
    ]);
    expect(taskIn(answer, 'floor-grinding').summary.en).toContain('Collector 412 cfm. Maker asks 353. HEPA vacuum between passes.');
    expect(taskIn(answer, 'edge-grinding').summary.en).toContain('Collector 176 cfm. 125 asked.');
    expect(taskIn(answer, 'shot-blasting').summary.en).toBe('No air sample or objective data for this setting. Not a Table 1 task.');
    expect(taskIn(answer, 'powder-mixing').summary.en).toBe('24 dumps. Extraction at the bucket. Bags cut low and folded in. Does the silica rule apply? Part B vapor decided apart.');
    expect(taskIn(answer, 'edge-grinding').respirator).toMatchObject({ outcome: 'none-required', apf: null, label: { en: 'none until 4 h' } });
    expect(taskIn(answer, 'spreading').respirator.label.en).toBe('none named on the sheets');
    expect(answer.people.map(({ personId, table1Minutes, table1MinutesElsewhere }) => [personId, table1Minutes, table1MinutesElsewhere])).toEqual([['dov', 130, 0], ['marisol', 45, 0], ['abe', 0, 0], ['tomasz', 0, 0], ['per', 205, 205]]);
    expect(answer.kits[0]).toMatchObject({ kits: 24, mixingMinutes: 48, powderDumps: 24, pictograms: ['GHS05', 'GHS07', 'GHS08'] });
  });

  it('puts controls before protection in every task (rule of conduct 1)', () => {
    for (const { findings } of answer.tasks) {
      const order = findings.map(({ topic }) => topics.indexOf(topic));
      expect(order).toEqual([...order].sort((a, b) => a - b));
      expect(findings.at(-1)?.topic === 'gate').toBe(false);
    }
  });

  it('speaks only by listed rules, each with a source, a title in both languages and its pack version', () => {
    const ids = LISTED_SHIFT_RULES.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const { title, source } of LISTED_SHIFT_RULES) expect([title.en, title.es, source.citation].every((text) => text !== '')).toBe(true);
    const findings = [...answer.gates, ...answer.tasks.flatMap((task) => task.findings), ...answer.people.flatMap((person) => person.findings), ...answer.kits.flatMap((kit) => kit.findings)];
    for (const finding of findings) {
      expect(ids).toContain(finding.ruleId);
      expect(finding.packVersion).toBe(answer.pack.version);
    }
    const perTask = answer.tasks.flatMap((task) => task.findings.map(({ id }) => id));
    expect(new Set(perTask).size).toBe(perTask.length);
  });

  it('[LOC-01] carries the notice word for word (rule of conduct 10)', () => {
    expect(answer.notice.en).toBe('Law, label, safety data sheet, plan and site rules: follow the strictest. Local codes and licensed practice govern. If unsure, stop and ask the competent person.');
  });
});

describe('[SIL-02] [SIL-03] [SIL-04] Table 1 in a shift (worked examples B1, derived)', () => {
  const vacuumTools: readonly EquipmentFacts[] = [
    ...shiftFacts().equipment,
    equipmentFacts({ id: 'tuck', name: 'Mortar grinder', kind: 'edge-grinder', wheelDiameterMm: 101.6, hasShroud: true }),
    equipmentFacts({ id: 'hammer', name: 'Hammer', kind: 'chipping-hammer', hasWaterFeed: true }),
    equipmentFacts({ id: 'saw', name: 'Cut-off saw', kind: 'handheld-saw', hasWaterFeed: true }),
  ];
  const FLOOR = { equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' } as const;
  const EDGE = { equipmentId: 'edger', collectorId: 'edge-vacuum', dustMethod: 'vacuum' } as const;
  const TUCK = { equipmentId: 'tuck', collectorId: 'edge-vacuum', dustMethod: 'vacuum' } as const;
  const HAMMER = { equipmentId: 'hammer', dustMethod: 'water' } as const;
  const SAW = { equipmentId: 'saw', dustMethod: 'water' } as const;
  type Work = readonly [TaskKind, Partial<TaskFacts>, number];

  function day(setting: ShiftFacts['setting'], ...work: readonly Work[]): ShiftAnswer {
    let start = 360;
    const tasks = work.map(([kind, tool, hours]) => {
      const assignment: Assignment = { personId: 'dov', startMinute: start, endMinute: start + hours * 60 };
      start = assignment.endMinute;
      return taskFacts({ kind, ...tool, assignments: [assignment] });
    });
    const strong = personFacts({ respirators: [{ type: 'papr-half-mask', label: 'powered half mask', clearedOn: '2026-01-05', fitTestedOn: '2026-01-06' }] });
    return ask(shiftFacts({ setting, tasks, equipment: vacuumTools, people: [strong] }));
  }

  it.each<[string, ShiftFacts['setting'], readonly Work[], readonly (readonly [TaskKind, number | null])[], number]>([
    ['floor grinder 7 h indoors: none', 'indoors', [['floor-grinding', FLOOR, 7]], [['floor-grinding', null]], 420],
    ['handheld grinder 4.0 h indoors: none', 'indoors', [['edge-grinding', EDGE, 4]], [['edge-grinding', null]], 240],
    ['handheld grinder 4.25 h indoors: 10', 'indoors', [['edge-grinding', EDGE, 4.25]], [['edge-grinding', 10]], 255],
    ['handheld grinder 7 h outdoors: none', 'outdoors', [['edge-grinding', EDGE, 7]], [['edge-grinding', null]], 420],
    ['floor grinder 3 h and handheld 1.5 h indoors: 10 for the handheld only', 'indoors', [['floor-grinding', FLOOR, 3], ['edge-grinding', EDGE, 1.5]], [['floor-grinding', null], ['edge-grinding', 10]], 270],
    ['mortar removal 1 h and floor grinder 3.5 h: 25 for the mortar', 'indoors', [['mortar-removal', TUCK, 1], ['floor-grinding', FLOOR, 3.5]], [['mortar-removal', 25], ['floor-grinding', null]], 270],
    ['hammer 2 h and handheld saw 2 h outdoors: none for both', 'outdoors', [['chipping', HAMMER, 2], ['handheld-sawing', SAW, 2]], [['chipping', null], ['handheld-sawing', null]], 240],
    ['hammer 2 h and handheld saw 2.1 h outdoors: 10 for both', 'outdoors', [['chipping', HAMMER, 2], ['handheld-sawing', SAW, 2.1]], [['chipping', 10], ['handheld-sawing', 10]], 246],
  ])('%s', (_name, setting, work, expected, minutes) => {
    const answer = day(setting, ...work);
    expect(personIn(answer, 'dov').table1Minutes).toBeCloseTo(minutes, 6);
    for (const [kind, apf] of expected) {
      expect(taskIn(answer, kind)).toMatchObject({ silicaBasis: 'table-1', state: 'ready', respirator: { apf, outcome: apf === null ? 'none-required' : 'required' } });
    }
  });

  it('leaves shot blasting out of the Table 1 sum (B1: floor grinder 3 h + shot blasting 2 h → 3 h)', () => {
    expect(personIn(day('indoors', ['floor-grinding', FLOOR, 3], ['shot-blasting', {}, 2]), 'dov').table1Minutes).toBe(180);
  });

  it.each<[string, ShiftFacts['setting'], Work]>([
    ['handheld grinder with water indoors (trap 2)', 'indoors', ['edge-grinding', { equipmentId: 'edger', dustMethod: 'water' }, 1]],
    ['handheld grinder with water in an enclosed area', 'enclosed', ['edge-grinding', { equipmentId: 'edger', dustMethod: 'water' }, 1]],
    ['any grinder without dust control', 'outdoors', ['floor-grinding', { ...FLOOR, dustMethod: 'none' }, 1]],
  ])('%s is not in Table 1: held', (_name, setting, work) => {
    const task = taskIn(day(setting, work), work[0]);
    expect(task).toMatchObject({ silicaBasis: 'held', state: 'may-not-start', table1Row: null, respirator: { outcome: 'undecided', apf: null } });
    expect(holdsOf(task)).toContain('silica-table-1-row');
  });

  it('[SIL-05] asks exhaust and the HEPA vacuum between passes indoors only', () => {
    const inside = taskIn(day('indoors', ['floor-grinding', FLOOR, 7]), 'floor-grinding').findings.map(({ id }) => id);
    const outside = taskIn(day('outdoors', ['floor-grinding', FLOOR, 7]), 'floor-grinding').findings.map(({ id }) => id);
    const between = 'silica-table-1-control/floor-grinding/hepa-vacuum-between-passes-indoors';
    expect(inside).toEqual(expect.arrayContaining(['silica-exhaust-indoors/floor-grinding', between]));
    expect(outside).not.toContain('silica-exhaust-indoors/floor-grinding');
    expect(outside).not.toContain(between);
  });

  it('a ride-on grinder is held until the competent person or a basis says otherwise', () => {
    const task = taskIn(ask(shiftFacts(withEquipment('grinder', { isRideOn: true }))), 'floor-grinding');
    expect(task).toMatchObject({ silicaBasis: 'held', state: 'may-not-start' });
  });

  it('the person, not the job, carries the minutes, and the change has its minute (rule of conduct 3)', () => {
    const facts = shiftFacts(withTask('edge-grinding', { assignments: [{ personId: 'per', startMinute: 700, endMinute: 760 }] }));
    const answer = ask(facts);
    // 205 minutes at the other job, so the four hours are reached 35 minutes into the edges.
    expect(personIn(answer, 'per')).toMatchObject({ table1Minutes: 265, table1MinutesElsewhere: 205, maskRuleChangesAtMinute: 735 });
    expect(taskIn(answer, 'edge-grinding').respirator).toMatchObject({ outcome: 'required', apf: 10, label: { en: 'Over 4 h: half mask, P100' } });
  });

  it('counts a double booking once and says it', () => {
    const answer = ask(shiftFacts(withTask('edge-grinding', { assignments: [{ personId: 'dov', startMinute: 420, endMinute: 465 }] })));
    const dov = personIn(answer, 'dov');
    expect(dov.table1Minutes).toBe(130);
    expect(dov.doubleBookings).toEqual([{ startMinute: 420, endMinute: 465, with: 'floor-grinding' }]);
    expect(dov.findings.map(({ ruleId }) => ruleId)).toContain('double-booking');
  });
});

describe('[SIL-06] [AIR-03] Table 1 is all or nothing (trap 1)', () => {
  it.each<[string, Partial<ShiftFacts>, string]>([
    ['collector under the maker\'s airflow', withEquipment('collector', { airflow: airflowCfm(352) }), 'floor-grinding'],
    ['edge vacuum under 25 cfm an inch', withEquipment('edge-vacuum', { airflow: airflowCfm(124.9) }), 'edge-grinding'],
    ['filter under 99 percent', withEquipment('collector', { filterEfficiencyPercent: 98.9 }), 'floor-grinding'],
    ['no filter cleaning', withEquipment('collector', { hasFilterCleaning: false }), 'floor-grinding'],
    ['no shroud', withEquipment('edger', { hasShroud: false }), 'edge-grinding'],
    ['no cyclone and no filter cleaning', withEquipment('edge-vacuum', { hasFilterCleaning: false, hasCyclone: false }), 'edge-grinding'],
    ['no collector', withTask('floor-grinding', { collectorId: null }), 'floor-grinding'],
  ])('%s loses it and holds the task', (_name, overrides, taskId) => {
    const task = taskIn(ask(shiftFacts(overrides)), taskId);
    expect(task).toMatchObject({ silicaBasis: 'held', state: 'may-not-start', respirator: { outcome: 'undecided' } });
    expect(task.findings.find(({ isHolding }) => isHolding)?.whatWouldChange?.en).toBe('Fix it and check it, or re-assess.');
  });

  it.each<[string, Partial<ShiftFacts>]>([
    ['exactly the maker\'s airflow', withEquipment('collector', { airflow: airflowCfm(353) })],
    ['exactly 99 percent', withEquipment('collector', { filterEfficiencyPercent: 99 })],
  ])('%s keeps it', (_name, overrides) => {
    expect(taskIn(ask(shiftFacts(overrides)), 'floor-grinding').silicaBasis).toBe('table-1');
  });

  it('a 5-inch wheel asks 125 cfm, met exactly (worked example A14)', () => {
    const task = taskIn(ask(shiftFacts(withEquipment('edge-vacuum', { airflow: airflowCfm(125) }))), 'edge-grinding');
    expect(task.silicaBasis).toBe('table-1');
    expect(task.findings.find(({ id }) => id.endsWith('airflow-25-cfm-per-inch'))?.inputs).toMatchObject({ 'airflow asked, cfm': 125, 'airflow read, cfm': 125, 'read with': 'vane anemometer' });
  });

  it.each<[string, Partial<ShiftFacts>]>([
    ['no airflow reading', withEquipment('collector', { airflow: null })],
    ['a bare number without who and when (rule of conduct 8)', withEquipment('collector', { airflow: { airflowM3PerH: 900, instrument: '', place: '', filterState: '', takenBy: '', takenOn: '' } })],
    ['no maker\'s figure', withEquipment('grinder', { requiredAirflowM3PerH: null })],
    ['an unknown filter', withEquipment('collector', { filterEfficiencyPercent: null, isHepa: null })],
  ])('%s is unknown: held, and the competent person decides', (_name, overrides) => {
    const task = taskIn(ask(shiftFacts(overrides)), 'floor-grinding');
    expect(task).toMatchObject({ silicaBasis: 'held', state: 'may-not-start' });
    expect(task.findings.find(({ ruleId }) => ruleId === 'silica-table-1-whole')).toMatchObject({ outcome: 'undecided', isHolding: true, whoDecides: { en: 'the competent person' } });
  });

  it('a "No" on the day stops the task, basis or not, and says what restores it', () => {
    const facts = shiftFacts({ ...withTask('floor-grinding', { failedControl: 'gauge under its mark' }), ...withBases({ taskKind: 'floor-grinding' }) });
    const task = taskIn(ask(facts), 'floor-grinding');
    expect(task).toMatchObject({ silicaBasis: 'held', state: 'may-not-start' });
    expect(task.summary.en).toContain('gauge under its mark');
  });

  it('a signed basis of its own carries a task that left Table 1', () => {
    const facts = shiftFacts({ ...withEquipment('collector', { airflow: airflowCfm(300) }), ...withBases({ taskKind: 'floor-grinding', exposureMicrogramsPerM3: 67.5 }) });
    expect(taskIn(ask(facts), 'floor-grinding')).toMatchObject({ silicaBasis: 'alternative', state: 'ready', table1Row: null, respirator: { apf: 10 } });
  });
});

describe('[SIL-01] [SIL-07] [RES-04] undecided means held, not guessed (rule of conduct 2)', () => {
  const blasting = (...bases: readonly Partial<ExposureBasis>[]): TaskAnswer => taskIn(ask(shiftFacts(withBases(...bases))), 'shot-blasting');

  it.each<[string, Partial<ExposureBasis>, number | null]>([
    // Worked example B3: 67.5 → ratio 1.35 → any APF 10; 600 → 12 → 25; 500 → exactly 10 → 10.
    ['67.5', { exposureMicrogramsPerM3: 67.5 }, 10],
    ['600', { exposureMicrogramsPerM3: 600 }, 25],
    ['500', { exposureMicrogramsPerM3: 500 }, 10],
    // Trap 13: exactly the limit is not above it.
    ['50', { exposureMicrogramsPerM3: 50 }, null],
    ['50.1', { exposureMicrogramsPerM3: 50.1 }, 10],
    ['2500', { exposureMicrogramsPerM3: 2500 }, 50],
    ['2501', { exposureMicrogramsPerM3: 2501 }, 1000],
  ])('[SIL-14] air samples of %s µg/m³ as 8-hour average open it with the factor of the ratio', (_name, basis, apf) => {
    const task = blasting(basis);
    expect(task.silicaBasis).toBe('alternative');
    expect(task.respirator).toMatchObject({ outcome: apf === null ? 'none-required' : 'required', apf });
  });

  it('below the action level it is outside the silica rule', () => {
    expect(blasting({ kind: 'below-action-level', exposureMicrogramsPerM3: 24.9 })).toMatchObject({ silicaBasis: 'outside', state: 'ready', respirator: { outcome: 'none-required' } });
  });

  it('a sampling day takes the respirator its signer wrote, that one day', () => {
    expect(blasting({ kind: 'sampling-day', exposureMicrogramsPerM3: null, interimApf: 50, endsOn: '2026-12-03' })).toMatchObject({ silicaBasis: 'alternative', respirator: { outcome: 'required', apf: 50, label: { en: 'full face mask, P100, as Ines Halloran wrote' } } });
  });

  it.each<[string, Partial<ExposureBasis>]>([
    ['ended the day before', { endsOn: '2026-12-02' }],
    ['signed the day after', { signedOn: '2026-12-04' }],
    ['signed by nobody', { signedBy: ' ' }],
    ['without conditions', { conditions: '' }],
    ['without a figure', { exposureMicrogramsPerM3: null }],
    ['for other work', { taskKind: 'powder-mixing' }],
    ['"below the action level" at the action level', { kind: 'below-action-level', exposureMicrogramsPerM3: 25 }],
    ['a sampling day without a respirator: never filled in', { kind: 'sampling-day', exposureMicrogramsPerM3: null, endsOn: '2026-12-03' }],
    ['a sampling day of another day', { kind: 'sampling-day', exposureMicrogramsPerM3: null, interimApf: 50, endsOn: '2026-12-04' }],
    ['beyond every respirator', { exposureMicrogramsPerM3: 600_000 }],
  ])('a basis %s leaves it held', (_name, basis) => {
    const task = blasting(basis);
    expect(task).toMatchObject({ silicaBasis: 'held', state: 'may-not-start', respirator: { outcome: 'undecided', apf: null } });
    expect(task.findings.find(({ ruleId }) => ruleId === 'silica-signed-basis')).toMatchObject({ outcome: 'undecided', isHolding: true });
  });

  it('holds on its last day and says who ended when', () => {
    expect(blasting({ endsOn: '2026-12-03' }).silicaBasis).toBe('alternative');
    expect(blasting({ endsOn: '2026-12-02' }).summary.en).toContain('The basis of Ines Halloran ended on 2026-12-02.');
  });

  it('of two in force takes the stricter', () => {
    expect(blasting({ exposureMicrogramsPerM3: 600 }, { kind: 'below-action-level', exposureMicrogramsPerM3: 10, signedOn: '2026-12-01' }).respirator.apf).toBe(25);
  });

  it('powder mixing asks the scope question and holds while it is open', () => {
    const task = taskIn(ask(shiftFacts()), 'powder-mixing');
    expect(task.findings.find(({ ruleId }) => ruleId === 'silica-signed-basis')).toMatchObject({ isHolding: true, outcome: 'undecided', text: { en: 'Not decided: does the silica rule apply?' } });
    const opened = taskIn(ask(shiftFacts(withBases({ taskKind: 'powder-mixing', kind: 'below-action-level', exposureMicrogramsPerM3: 12 }))), 'powder-mixing');
    expect(opened).toMatchObject({ state: 'ready', silicaBasis: 'outside', respirator: { outcome: 'by-policy', apf: null, label: { en: 'half mask, P100, by policy' } } });
  });

  it('shot pick-up is decided with the blasting it belongs to', () => {
    expect(taskIn(ask(shiftFacts(withBases({ exposureMicrogramsPerM3: 38 }))), 'shot-pick-up').state).toBe('ready');
  });

  it('collector emptying stands alone once no Table 1 task carries it (rule of conduct 5)', () => {
    const facts = shiftFacts({ tasks: shiftFacts().tasks.filter(({ kind }) => kind === 'collector-emptying') });
    expect(taskIn(ask(facts), 'collector-emptying')).toMatchObject({ silicaBasis: 'held', state: 'may-not-start' });
  });

  it('[AIR-01] does not add a signed figure and the same person\'s Table 1 minutes by guess', () => {
    const basis = { taskKind: 'powder-mixing' as const, exposureMicrogramsPerM3: 40 };
    const open = taskIn(ask(shiftFacts(withBases(basis))), 'powder-mixing');
    expect(holdsOf(open)).toEqual(['silica-combined-exposure']);
    expect(taskIn(ask(shiftFacts(withBases({ ...basis, includesTable1Work: true }))), 'powder-mixing').state).toBe('ready');
  });

  it('[SIL-12] says controls first above the limit', () => {
    expect(blasting({ exposureMicrogramsPerM3: 67.5 }).findings.find(({ ruleId }) => ruleId === 'silica-over-limit')).toMatchObject({ topic: 'control', inputs: { 'exposure over limit': 1.35, 'protection factor, at least': 10 } });
  });
});

describe('[LOC-02] the law of the place (rule of conduct 9)', () => {
  it.each(['us-washington', 'nowhere'])('%s has no pack: silica work undecided, no US figure', (jurisdictionId) => {
    const answer = ask(shiftFacts({ jurisdictionId, ...withBases({ exposureMicrogramsPerM3: 38 }) }));
    expect(answer.pack).toMatchObject({ id: jurisdictionId, isComplete: false });
    for (const id of ['floor-grinding', 'edge-grinding', 'shot-blasting', 'powder-mixing']) {
      expect(taskIn(answer, id)).toMatchObject({ silicaBasis: 'held', table1Row: null, respirator: { outcome: 'undecided' } });
    }
    expect(JSON.stringify(taskIn(answer, 'shot-blasting').findings.map(({ inputs }) => inputs))).not.toContain('50');
  });

  it('California: rows compared serve, row xiii was not compared and is held', () => {
    const answer = ask(shiftFacts({ jurisdictionId: 'us-california' }));
    expect(taskIn(answer, 'floor-grinding').findings.find(({ ruleId }) => ruleId === 'silica-table-1-row')).toMatchObject({ outcome: 'undecided', isHolding: true });
    expect(answer.pack.gap).not.toBeNull();
  });

  it('Great Britain: no Table 1, its own limit of 100 and its own factors, above the ratio', () => {
    const answer = ask(shiftFacts({ jurisdictionId: 'great-britain', ...withBases({ exposureMicrogramsPerM3: 90 }, { taskKind: 'floor-grinding', exposureMicrogramsPerM3: 1000 }) }));
    expect(taskIn(answer, 'shot-blasting').respirator).toMatchObject({ outcome: 'none-required' });
    expect(taskIn(answer, 'edge-grinding').silicaBasis).toBe('held');
    // Ratio exactly 10: a factor of 10 is not above it; the next class there is 20.
    expect(taskIn(answer, 'floor-grinding').respirator).toMatchObject({ apf: 20, label: { en: 'mask with factor 20 or more' } });
  });
});

describe('kits and their sheets', () => {
  it('[HAZ-04] names a product without a confirmed sheet and holds its tasks', () => {
    const [first, ...rest] = kitFacts().parts;
    const answer = ask(shiftFacts({ kits: [kitFacts({ parts: [{ ...first!, sheet: null }, ...rest] })] }));
    expect(answer.kits[0]!.partsWithoutSheet).toEqual(['Quarrybond 40 part A']);
    const task = taskIn(answer, 'spreading');
    expect(task).toMatchObject({ state: 'may-not-start', respirator: { outcome: 'undecided' } });
    expect(task.findings.find(({ ruleId }) => ruleId === 'sheet-for-every-product')?.reason.en).toContain('Quarrybond 40 part A');
  });

  it('[PPE-01] cites a code only if a confirmed sheet of this job carries it (rule of conduct 7)', () => {
    const answer = ask(shiftFacts());
    const carried = new Set(shiftFacts().kits.flatMap(({ parts }) => parts.flatMap(({ sheet }) => sheet?.hazardCodes ?? [])));
    const said = JSON.stringify(answer.tasks).match(/\bE?U?H\d{3}[A-Za-z]*/g) ?? [];
    expect(said.length).toBeGreaterThan(0);
    for (const code of said) expect(carried).toContain(code);
  });

  it('[ISO-01] says that dust filters stop no vapor wherever isocyanate is near (rule of conduct 13)', () => {
    const answer = ask(shiftFacts());
    for (const id of ['powder-mixing', 'spreading']) expect(taskIn(answer, id).findings.find(({ ruleId }) => ruleId === 'vapor-apart-from-dust')?.text.en).toContain('P100 and N95 stop dust, not vapor.');
  });

  it.each([
    ['P284 alone asks it', { precautionaryCodes: ['P284'] }, 'required'],
    ['P284 with a stated condition asks it only then', { precautionaryCodes: ['P284'], protectionWords: [{ topic: 'respiratory' as const, text: 'In case of inadequate ventilation wear a mask.' }] }, 'none-required'],
    ['P285 is always conditional', { precautionaryCodes: ['P285'] }, 'none-required'],
    ['P280 alone names nothing', { precautionaryCodes: ['P280'] }, 'none-required'],
    ['"none with good ventilation, otherwise wear it" asks it only then', { protectionWords: [{ topic: 'respiratory' as const, text: 'With good ventilation none is needed. Otherwise wear a half mask with organic vapor cartridges.' }] }, 'none-required'],
    ['words of section 8 ask it', { protectionWords: [{ topic: 'respiratory' as const, text: 'Wear a combination filter A-P2.' }] }, 'required'],
    ['"not required" asks nothing', { protectionWords: [{ topic: 'respiratory' as const, text: 'Not normally required.' }] }, 'none-required'],
  ])('a respirator by the sheet: %s (precautionary statements table)', (_name, sheet, outcome) => {
    const kit = kitFacts({ parts: [{ productId: 'b', productName: 'Part B', part: 'B', form: 'liquid', sheet: sheetFacts({ casNumbers: ['101-68-8'], ...sheet }) }] });
    expect(taskIn(ask(shiftFacts({ kits: [kit] })), 'spreading').respirator.outcome).toBe(outcome);
  });
});
