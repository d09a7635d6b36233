import { describe, expect, it } from '@jest/globals';
import { equipmentFacts, kitFacts, personFacts, sheetFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { type ShiftAnswer } from '../answer';
import { answerShift } from '../answer-shift';
import { type FloorFacts, type PersonFacts, type ShiftFacts } from '../facts';

const ask = (overrides: Partial<ShiftFacts> = {}): ShiftAnswer => answerShift(shiftFacts(overrides), '2026-12-03T12:00:00Z');
const gate = (answer: ShiftAnswer, ruleId: string) => answer.gates.find((each) => each.ruleId === ruleId);
const task = (answer: ShiftAnswer, taskId: string) => {
  const found = answer.tasks.find((each) => each.taskId === taskId);
  if (found === undefined) throw new Error(`no task ${taskId}`);
  return found;
};
const holds = (answer: ShiftAnswer, taskId: string): readonly string[] => task(answer, taskId).findings.filter(({ isHolding }) => isHolding).map(({ ruleId }) => ruleId);
const withPerson = (id: string, overrides: Partial<PersonFacts>): Partial<ShiftFacts> => ({ people: shiftFacts().people.map((person) => (person.id === id ? { ...person, ...overrides } : person)) });

describe('[GATE-01] asbestos and lead (1926.1101(g)(8)(i), (k); 1926.62(d)(2), partly read)', () => {
  const floor = (overrides: Partial<FloorFacts>): ShiftAnswer => ask({ floor: { ...shiftFacts().floor, ...overrides } });

  it.each<[string, Partial<FloorFacts>]>([
    ['asbestos unknown', { asbestos: 'unknown' }],
    ['asbestos present', { asbestos: 'present' }],
    ['lead unknown', { lead: 'unknown' }],
    ['lead present', { lead: 'present' }],
    ['covering unknown', { covering: 'unknown' }],
    ['"absent" that nobody answers for', { asbestos: 'absent', surveyReference: null }],
  ])('%s: no grinding and no blasting; the rest goes on', (_name, overrides) => {
    const answer = floor(overrides);
    for (const id of ['floor-grinding', 'edge-grinding', 'shot-blasting']) {
      expect(holds(answer, id)).toContain('floor-survey-of-task');
      expect(task(answer, id).state).toBe('may-not-start');
    }
    expect(task(answer, 'spreading').state).toBe('ready');
    expect(gate(answer, 'floor-survey')?.outcome).not.toBe('met');
  });

  it('a survey with its reference clears the floor', () => {
    const answer = floor({ covering: 'black-mastic', asbestos: 'absent', lead: 'absent', surveyReference: 'report 26-114' });
    expect(gate(answer, 'floor-survey')?.outcome).toBe('met');
    expect(task(answer, 'floor-grinding').state).toBe('ready');
  });
});

describe('[GATE-02] engines indoors', () => {
  const engines = (areUsedInside: boolean | null, isExhaustLedOutside: boolean | null, hasCarbonMonoxideAlarm: boolean | null, setting: ShiftFacts['setting'] = 'indoors') => ask({ setting, engines: { areUsedInside, isExhaustLedOutside, hasCarbonMonoxideAlarm } });

  it.each([
    [null, null, null, 'undecided', true],
    [false, null, null, 'met', false],
    [true, true, true, 'met', false],
    [true, false, true, 'unmet', true],
    [true, true, false, 'unmet', true],
    [true, true, null, 'undecided', true],
  ] as const)('used %s, exhaust out %s, alarm %s: %s', (used, exhaust, alarm, outcome, isHolding) => {
    expect(gate(engines(used, exhaust, alarm), 'engines-indoors')).toMatchObject({ outcome, isHolding });
  });

  it('says what to do with engines inside, or that there are none', () => {
    expect(gate(engines(true, true, true), 'engines-indoors')?.text.en).toBe('Exhaust led outside. CO alarm worn and on.');
    expect(gate(engines(false, null, null), 'engines-indoors')?.text.en).toBe('No engines and no fuel heaters inside.');
  });

  it('holds all work of the shift, and says nothing outdoors', () => {
    const held = engines(true, false, false);
    expect(held.tasks.filter(({ state }) => state === 'ready').map(({ taskId }) => taskId)).toEqual(['inspection']);
    expect(gate(engines(null, null, null, 'outdoors'), 'engines-indoors')).toBeUndefined();
  });
});

describe('[GATE-03] flammable vapor and sparks', () => {
  const solvent = kitFacts({ id: 'primer', name: 'Primer', parts: [{ productId: 'p', productName: 'Quarrybond primer', part: 'A', form: 'liquid', sheet: sheetFacts({ hazardCodes: ['H226', 'H336'] }) }] });
  const priming = (startMinute: number, extra: Partial<ShiftFacts> = {}) =>
    ask({ kits: [solvent], tasks: [...shiftFacts().tasks.filter(({ kind }) => kind === 'floor-grinding'), taskFacts({ kind: 'priming', kitId: 'primer', assignments: [{ personId: 'per', startMinute, endMinute: startMinute + 30 }] })], ...extra });

  it('a grinder at the same time holds the priming; a minute apart does not', () => {
    expect(holds(priming(549), 'priming')).toEqual(['flammable-vapor-and-sparks']);
    expect(holds(priming(550), 'priming')).toEqual([]);
    expect(task(priming(550), 'priming').findings.find(({ ruleId }) => ruleId === 'flammable-vapor-and-sparks')?.reason.en).toContain('H226');
  });

  it('engines inside hold it', () => {
    expect(holds(priming(600, { engines: { areUsedInside: true, isExhaustLedOutside: true, hasCarbonMonoxideAlarm: true } }), 'priming')).toEqual(['flammable-vapor-and-sparks']);
  });
});

describe('[GATE-05] [PPE-02] first aid and eyewash (1926.50(g), read)', () => {
  const firstAid = shiftFacts().firstAid;
  it.each([['firstAiderName'], ['emergencyNumber'], ['address']])('no %s holds the shift', (field) => {
    expect(gate(ask({ firstAid: { ...firstAid, [field]: null } }), 'first-aid-named')).toMatchObject({ outcome: 'undecided', isHolding: true });
  });

  it.each([[null, 'undecided'], [false, 'unmet']] as const)('eyewash %s holds work with what burns eyes', (hasEyewash, outcome) => {
    const answer = ask({ firstAid: { ...firstAid, hasEyewash } });
    expect(holds(answer, 'spreading')).toEqual(['eyewash-in-reach']);
    expect(task(answer, 'spreading').findings.find(({ ruleId }) => ruleId === 'eyewash-in-reach')?.outcome).toBe(outcome);
    expect(task(answer, 'floor-grinding').state).toBe('ready');
  });

  it('wet cement asks it though the sheet carries no such code', () => {
    const kit = kitFacts({ parts: [{ productId: 'c', productName: 'Powder', part: 'C', form: 'powder', sheet: sheetFacts({ hazardCodes: ['H335'], casNumbers: ['65997-15-1'] }) }] });
    expect(holds(ask({ kits: [kit], firstAid: { ...firstAid, hasEyewash: false } }), 'spreading')).toEqual(['eyewash-in-reach']);
  });
});

describe('[GATE-06] [GATE-08] [SIL-19] host and competent person', () => {
  it.each([[null], [''], [' ']])('host hazards %j: nobody asked, the shift is held', (hostHazards) => {
    expect(gate(ask({ hostHazards }), 'host-hazards-asked')).toMatchObject({ outcome: 'undecided', isHolding: true });
  });
  it('"none" is an answer', () => {
    expect(gate(ask({ hostHazards: 'none, says the plant manager' }), 'host-hazards-asked')).toMatchObject({ outcome: 'met' });
  });
  it.each([[null], ['someone-else']])('competent person %j is not on the crew: held', (competentPersonId) => {
    expect(gate(ask({ competentPersonId }), 'competent-person-named')).toMatchObject({ outcome: 'undecided', isHolding: true, whoDecides: { en: 'the safety officer' } });
  });
  it('asks who inspects while the competent person runs a machine', () => {
    expect(gate(ask(), 'inspection-cover')).toMatchObject({ outcome: 'undecided', isHolding: false });
    // Marisol grinds edges while Dov grinds.
    const people = [...shiftFacts().people, personFacts({ id: 'ines', name: 'Ines Halloran' })];
    expect(gate(ask({ people, inspectionCoverId: 'ines' }), 'inspection-cover')).toMatchObject({ outcome: 'met', reason: { en: 'Ines Halloran inspects while Dov Lindqvist runs a machine.' } });
    expect(gate(ask({ inspectionCoverId: 'marisol' }), 'inspection-cover')).toMatchObject({ outcome: 'undecided', reason: { en: 'Marisol Tena is at a machine or on another job while Dov Lindqvist runs one.' } });
    // Per is on the other job from 8:05 to 11:30.
    expect(gate(ask({ inspectionCoverId: 'per' }), 'inspection-cover')?.outcome).toBe('undecided');
    for (const nobody of [null, 'dov', 'somebody else']) expect(gate(ask({ inspectionCoverId: nobody }), 'inspection-cover')).toMatchObject({ outcome: 'undecided' });
    expect(gate(ask({ tasks: shiftFacts().tasks.filter(({ kind }) => kind !== 'floor-grinding' && kind !== 'clean-up') }), 'inspection-cover')).toMatchObject({ outcome: 'met' });
  });
});

describe('[GATE-04] machines', () => {
  it('no manual on file holds the machine\'s task', () => {
    const equipment = [...shiftFacts().equipment.filter(({ id }) => id !== 'edger'), equipmentFacts({ id: 'edger', name: 'Edge grinder', kind: 'edge-grinder', wheelDiameterMm: 127, hasShroud: true, hasManualOnFile: false })];
    expect(holds(ask({ equipment }), 'edge-grinding')).toEqual(['machine-manual-on-file']);
  });
});

describe('the floor profile (rule of conduct 4; ICRI 310.2R from memory: grinding gives CSP 1 to 3)', () => {
  const grindOnly = shiftFacts().tasks.filter(({ kind }) => kind === 'floor-grinding');
  it('grinding alone never meets CSP 5: the supplier\'s written exception', () => {
    const found = gate(ask({ tasks: grindOnly, targetProfile: 5 }), 'floor-profile');
    expect(found).toMatchObject({ outcome: 'undecided', whoDecides: { en: 'the supplier of the product' } });
    expect(found?.text.en).not.toContain('CSP 5');
  });
  it.each([[3, 'met'], [4, 'undecided']] as const)('CSP %d by grinding: %s', (targetProfile, outcome) => {
    expect(gate(ask({ tasks: grindOnly, targetProfile }), 'floor-profile')?.outcome).toBe(outcome);
  });
  it('the supplier\'s written exception stands as what it is, never as CSP 5; every kit on the floor needs its own, whole (conduct 4)', () => {
    const exception = { writtenBy: 'Northlode Resins', reference: 'letter of 3 November 2026', text: 'Coarse grind with metal diamonds and one coat of primer.' };
    const withExceptions = (...each: (typeof exception | null)[]) => gate(ask({ tasks: grindOnly, targetProfile: 5, kits: each.map((surfaceException, index) => kitFacts({ id: `kit-${index}`, surfaceException })) }), 'floor-profile');
    const found = withExceptions(exception);
    expect(found).toMatchObject({ outcome: 'met', text: { en: 'Not CSP 5: the supplier allows it in writing.' } });
    expect(found?.reason.en).toBe('The planned work gives CSP 3 at most, not 5. Allowed in writing by Northlode Resins (letter of 3 November 2026): Coarse grind with metal diamonds and one coat of primer.');
    expect(withExceptions(exception, null)?.outcome).toBe('undecided');
    expect(withExceptions()?.outcome).toBe('undecided');
    for (const blank of [{ writtenBy: ' ' }, { reference: '' }, { text: '' }]) expect(withExceptions({ ...exception, ...blank })?.outcome).toBe('undecided');
  });
  it('grinding after blasting takes the profile off again', () => {
    expect(gate(ask(), 'grind-then-blast')?.outcome).toBe('met');
    const tasks = shiftFacts().tasks.map((each) => (each.kind === 'floor-grinding' ? { ...each, assignments: [{ personId: 'dov', startMinute: 600, endMinute: 660 }] } : each));
    expect(gate(ask({ tasks }), 'grind-then-blast')).toMatchObject({ outcome: 'unmet' });
  });
});

describe('each person', () => {
  const over4h = (respirators: PersonFacts['respirators']): ShiftAnswer => {
    const facts = shiftFacts();
    return ask({
      tasks: facts.tasks.map((each) => (each.kind === 'edge-grinding' ? { ...each, assignments: [{ personId: 'marisol', startMinute: 420, endMinute: 661 }] } : each)).filter(({ kind }) => kind === 'edge-grinding'),
      ...withPerson('marisol', { respirators }),
    });
  };
  const mask = { type: 'half-mask', label: 'half mask, M', clearedOn: '2025-06-01', fitTestedOn: '2026-03-15' } as const;

  it.each<[string, PersonFacts['respirators'], readonly string[]]>([
    ['cleared and fitted', [mask], []],
    ['no mask', [], ['mask-cleared-and-fitted']],
    ['not cleared', [{ ...mask, clearedOn: null }], ['mask-cleared-and-fitted']],
    ['cleared after the shift', [{ ...mask, clearedOn: '2026-12-04' }], ['mask-cleared-and-fitted']],
    ['never fitted', [{ ...mask, fitTestedOn: null }], ['mask-cleared-and-fitted']],
    ['fitted a year ago to the day', [{ ...mask, fitTestedOn: '2025-12-03' }], []],
    ['fitted a year and a day ago', [{ ...mask, fitTestedOn: '2025-12-02' }], ['mask-cleared-and-fitted']],
    ['loose hood, cleared, no fit test needed', [{ ...mask, type: 'papr-hood', fitTestedOn: null }], []],
    ['the second of two serves', [{ ...mask, fitTestedOn: null }, { ...mask, type: 'full-facepiece' }], []],
  ])('[RES-05] [RES-06] mask required, %s', (_name, respirators, expected) => {
    const answer = over4h(respirators);
    expect(task(answer, 'edge-grinding').respirator).toMatchObject({ outcome: 'required', apf: 10 });
    expect(holds(answer, 'edge-grinding')).toEqual(expected);
  });

  it.each<[string, string, Partial<PersonFacts>, string]>([
    ['[SIL-22] no silica training', 'edge-grinding', { silicaTrainedOn: null }, 'silica-training-on-record'],
    ['[SIL-22] silica training after the shift', 'edge-grinding', { silicaTrainedOn: '2026-12-04' }, 'silica-training-on-record'],
    ['not confirmed over 18', 'edge-grinding', { isAdultConfirmed: false }, 'adult-confirmed'],
  ])('%s', (_name, taskId, overrides, ruleId) => {
    expect(holds(ask(withPerson('marisol', overrides)), taskId)).toEqual([ruleId]);
  });

  it('[HAZ-09] no chemical training keeps off the kit', () => {
    expect(holds(ask(withPerson('per', { hazcomTrainedOn: null })), 'spreading')).toEqual(['hazard-training-on-record']);
  });

  it('[ISO-01] a person kept from isocyanates is kept off that kit, and the reason tells no finding', () => {
    const answer = ask(withPerson('per', { isKeptFromIsocyanates: true }));
    expect(holds(answer, 'spreading')).toEqual(['kept-from-isocyanates']);
    const finding = task(answer, 'spreading').findings.find(({ ruleId }) => ruleId === 'kept-from-isocyanates');
    expect(`${finding?.text.en} ${finding?.reason.en}`).not.toMatch(/asthma|allerg|sensiti[sz]|doctor|clinic/i);
    const free = kitFacts({ parts: [{ productId: 'a', productName: 'Resin', part: 'A', form: 'liquid', sheet: sheetFacts({ hazardCodes: ['H317'] }) }] });
    expect(holds(ask({ ...withPerson('per', { isKeptFromIsocyanates: true }), kits: [free] }), 'spreading')).toEqual([]);
  });

  it.each([[null], [' ']])('employer %j is said, and holds nothing', (employer) => {
    const answer = ask(withPerson('abe', { employer }));
    expect(answer.people.find(({ personId }) => personId === 'abe')?.findings.find(({ ruleId }) => ruleId === 'employer-named')).toMatchObject({ outcome: 'undecided', isHolding: false });
  });
});

describe('facts that cannot be', () => {
  it.each<[string, Partial<ShiftFacts>]>([
    ['areaM2', { areaM2: -1 }],
    ['thicknessMm', { thicknessMm: 0 }],
    ['targetProfile', { targetProfile: 11 }],
    ['targetProfile', { targetProfile: 0 }],
    ['targetProfile', { targetProfile: 4.5 }],
    ['date', { date: '2026-02-30' }],
    ['people.id', { people: [personFacts(), personFacts()] }],
    ['tasks.break.assignments', { tasks: [taskFacts({ kind: 'break', assignments: [{ personId: 'dov', startMinute: 60, endMinute: 30 }] })] }],
    ['tasks.break.personId', { tasks: [taskFacts({ kind: 'break', assignments: [{ personId: 'nobody', startMinute: 30, endMinute: 60 }] })] }],
  ])('%s holds the shift and is named', (field, overrides) => {
    const found = gate(ask(overrides), 'facts-possible');
    expect(found).toMatchObject({ outcome: 'unmet', isHolding: true });
    expect(found?.reason.en).toContain(field);
  });
  it.each<[Partial<ShiftFacts>]>([[{}], [{ targetProfile: 10 }], [{ targetProfile: 1 }], [{ thicknessMm: 0.001 }], [{ areaM2: 0 }]])('possible facts %j say nothing', (overrides) => {
    expect(gate(ask(overrides), 'facts-possible')).toBeUndefined();
  });
});

it('keeps fixtures honest: the demo shift holds only shot blasting, its pick-up and powder mixing', () => {
  const answer = ask();
  expect(answer.gates.filter(({ isHolding }) => isHolding)).toEqual([]);
  expect(answer.tasks.filter(({ state }) => state !== 'ready').map(({ taskId }) => taskId)).toEqual(['shot-blasting', 'powder-mixing', 'shot-pick-up']);
  expect(new Set(answer.tasks.filter(({ state }) => state !== 'ready').flatMap(({ taskId }) => holds(answer, taskId)))).toEqual(new Set(['silica-signed-basis']));
});
