import { describe, expect, it } from '@jest/globals';
import { basisFacts, equipmentFacts, personFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { LIMIT_ROWS } from '../air/limits.data';
import { monitoringDue } from '../air/monitoring-rules';
import { averageWithinLimit, dilutionEnough, mixtureWithinLimits } from '../air/air-rules';
import { answerShift } from '../answer-shift';
import { type FloorFacts, type PersonRespirator, type ShiftFacts, type TaskFacts } from '../facts';
import { protectedLevelDual } from '../noise/hearing-protection';
import { hearingProtection, noiseInShift } from '../noise/noise-rules';
import { type Finding } from '../outcome';
import { checkWearer, type Wearer } from '../respirators/fit-test';
import { medicalSurveillance } from '../respirators/respirator-rules';
import { addDays } from '../iso-date';
import { type Rule } from '../rule';
import { TABLE_1_CONDITIONS } from '../silica/table1-conditions.data';
import { TABLE_1 } from '../silica/table1.data';
import { DEMAND_WORDS } from '../silica/table1-demands.data';
import { RULE_CASES } from './cases';
import { findRule } from './registry';

/** Faults found by reading rules line by line against the paragraph they cite. The text that was read stands beside each. */
const DAY = '2026-12-01';
const at = [{ personId: 'dov', startMinute: 420, endMinute: 540 }];

function shiftOf(task: TaskFacts, overrides: Partial<ShiftFacts> = {}) {
  const answer = answerShift(shiftFacts({ tasks: [task], people: [personFacts()], ...overrides }), '2026-12-03T12:00:00Z');
  const findings: readonly Finding[] = [...answer.gates, ...answer.tasks.flatMap((each) => each.findings), ...answer.people.flatMap((each) => each.findings)];
  return { task: answer.tasks[0]!, find: (ruleId: string) => findings.find((finding) => finding.ruleId === ruleId), all: findings };
}

describe('dates', () => {
  it('a day on which something is due is still in time, in Spanish too: "by" is never "antes del"', () => {
    const pairs = RULE_CASES.flatMap(({ ruleId, cases }) => cases.map((each) => ({ ruleId, ...each.run().reason })));
    const dated = pairs.filter(({ en }) => /\bby \d{4}-/.test(en));
    expect(dated.length).toBeGreaterThan(5);
    for (const { ruleId, es } of dated) expect([ruleId, es]).toEqual([ruleId, expect.stringMatching(/a más tardar el \d{4}-/)]);
  });
});

describe('Spanish says what English says', () => {
  // "para" is both "stops" and "for": "el filtro para el 99 por ciento" reads as a filter for 99 percent.
  it('stops are "detiene"', () => {
    expect(DEMAND_WORDS['filter-99-percent'].es).toBe('El filtro detiene el 99 por ciento o más.');
  });

  // 1926.1153(h)(1)(i), parallel texts: surveillance is made available, nobody is made to take it.
  it('[SIL-20] the exam is offered', () => {
    expect([medicalSurveillance.title.en, medicalSurveillance.title.es]).toEqual([expect.stringContaining('offered'), expect.stringContaining('ofrecido')]);
  });

  // The fact on file is the manual; guard and plug are for the crew to check (1926.404(b)(1) names the ground fault).
  it('[GATE-04] a manual on file does not say that guard and plug were checked', () => {
    const grinding = taskFacts({ kind: 'floor-grinding', assignments: at, equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' });
    expect(shiftOf(grinding).find('machine-manual-on-file')?.text).toEqual({ en: 'Check guard, cord and ground-fault plug. Unplug before touching the tool.', es: 'Revise guarda, cable y enchufe GFCI. Desconecte antes de tocar.' });
  });
});

describe('1926.1153(c)(1) Table 1', () => {
  const saw = equipmentFacts({ id: 'saw', name: 'Saw 1', kind: 'walk-behind-saw', isRideOn: true, hasWaterFeed: true });
  const sawing = taskFacts({ kind: 'joint-sawing', assignments: at, equipmentId: 'saw', dustMethod: 'water' });

  // Row (v), "for tasks performed outdoors only", read in 8 CCR 1532.3 Table 1: the row has no vacuum option to offer.
  it('[SIL-06] sends an outdoors-only saw outdoors, not to a vacuum that its row does not have; and the table leaves out, it does not forbid', () => {
    const finding = shiftOf(sawing, { equipment: [saw] }).find('silica-table-1-row');
    expect(finding).toMatchObject({ outcome: 'unmet', whatWouldChange: { en: 'Do it outdoors, or a signed basis.', es: 'Hágalo afuera, o una base firmada.' } });
    expect(finding?.reason.en).toBe('Table 1 does not cover this indoors or in closed places.');
  });

  // Row (xii): the vacuum option covers indoors, read in a sheet quoting the row.
  it('[SIL-06] offers the row\'s vacuum where it has one for indoors', () => {
    const wet = taskFacts({ kind: 'edge-grinding', assignments: at, equipmentId: 'edger', dustMethod: 'water' });
    expect(shiftOf(wet).find('silica-table-1-row')?.whatWouldChange?.en).toBe('Use the row\'s vacuum indoors, or a signed basis.');
  });

  // Row (xiii) has "None" in both columns (trade reproduction, read): no minutes turn it. Row (xii) indoors has none and 10.
  it.each([['floor-grinding', 'grinder', 'collector', null], ['edge-grinding', 'edger', 'edge-vacuum', 'More than 4 h in all.']] as const)('[SIL-03] %s: what more minutes would change', (kind, equipmentId, collectorId, expected) => {
    const finding = shiftOf(taskFacts({ kind, assignments: at, equipmentId, collectorId, dustMethod: 'vacuum' })).find('silica-table-1-respirator');
    expect(finding?.whatWouldChange?.en ?? null).toBe(expected);
  });

  // Row (xiii), second option, read: "dust collection system recommended by the manufacturer".
  it('[SIL-02] does not call any collector the maker\'s: without the maker\'s figure on file it is open', () => {
    const grinding = taskFacts({ kind: 'floor-grinding', assignments: at, equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' });
    const line = (found: ReturnType<typeof shiftOf>) => found.all.find(({ id }) => id.endsWith('dust-collection-makers-system'));
    expect(line(shiftOf(grinding))?.outcome).toBe('met');
    expect(line(shiftOf(grinding))?.reason.en).toContain('The manual names the ones that fit');
    const equipment = shiftFacts().equipment.map((each) => (each.id === 'grinder' ? { ...each, requiredAirflowM3PerH: null } : each));
    expect(line(shiftOf(grinding, { equipment }))).toMatchObject({ outcome: 'undecided' });
  });

  // Rows (vii), (x), (xi), (xii), read in reproductions: "commercially available shroud".
  it('[SIL-02] asks a factory-made shroud, not any shroud', () => {
    expect(DEMAND_WORDS.shroud.en).toContain('Factory-made');
    expect(DEMAND_WORDS.shroud.es).toContain('de fábrica');
  });

  // Row (xiv), read in a trade reproduction: "Operate and maintain machine to minimize dust emissions", no manufacturer's instructions.
  it('[SIL-02] names the maker\'s manual only in rows whose text names it', () => {
    const withManual = TABLE_1.filter(({ demands }) => demands.includes('makers-manual')).map(({ row }) => row);
    for (const row of ['xiv', 'xv', 'xvii', 'xviii']) expect(withManual).not.toContain(row);
    for (const option of TABLE_1.filter(({ row }) => row === 'xiv' || row === 'xv')) expect(option.demands).toContain('run-to-keep-dust-low');
  });
});

describe('1926.1153(a), (d), (f), (i)', () => {
  const blasting = taskFacts({ kind: 'shot-blasting', assignments: at, equipmentId: 'blaster', collectorId: 'collector' });

  // (d)(1), read: "in excess of 50"; exactly 50 is neither above nor below.
  it('[SIL-14] exactly at the limit is "not above" it, never "below"', () => {
    expect(shiftOf(blasting, { bases: [basisFacts({ exposureMicrogramsPerM3: 50 })] }).task.respirator.label).toEqual({ en: 'none: not above the limit', es: 'ninguna: no pasa el límite' });
  });

  // (a), read: the section does not apply where exposure stays below the action level under any foreseeable conditions.
  it('[SIL-22] holds nobody for silica training where a signed basis takes the work out of the rule', () => {
    const people = [personFacts({ silicaTrainedOn: null })];
    expect(shiftOf(blasting, { people, bases: [basisFacts({ kind: 'below-action-level', exposureMicrogramsPerM3: 12 })] }).find('silica-training-on-record')).toBeUndefined();
    expect(shiftOf(blasting, { people, bases: [basisFacts()] }).find('silica-training-on-record')).toMatchObject({ outcome: 'unmet', isHolding: true });
  });

  // (f)(1) and (f)(2)(i)-(ii), quoted in full on silica-safe.org, read.
  it('[SIL-15] shows under "why" that both bans have an exception', () => {
    const finding = shiftOf(taskFacts({ kind: 'clean-up', assignments: at })).find('silica-housekeeping');
    expect(finding?.whatWouldChange?.en).toMatch(/no wet or vacuum way can work.*hood takes the blown dust/);
  });

  // (d)(2)(iii)(C)-(E), read: "the most recent exposure monitoring".
  it('[SIL-08] shows the most recent result that decided, not the highest ever', () => {
    const results = [{ sampledOn: '2026-03-01', twaMicrogramsPerM3: 70 }, { sampledOn: '2026-06-01', twaMicrogramsPerM3: 30 }];
    const verdict = monitoringDue.evaluate({ results, limits: { actionLevelMicrogramsPerM3: 25, limitMicrogramsPerM3: 50 } }, '2026-07-01');
    expect(verdict).toMatchObject({ outcome: 'met', dueOn: '2026-12-01', inputs: { 'most recent sample on': '2026-06-01', 'most recent, µg/m³ as 8-hour average': 30 } });
  });
});

describe('1926.1153(h)(2), parallel texts: an exam within 30 days of assignment', () => {
  it('[SIL-20] is not met while no exam is on file, only not yet late', () => {
    const days = Array.from({ length: 30 }, (_, i) => ({ on: addDays('2026-12-01', i), basis: 'silica-table-1' as const }));
    const facts = { days, assignedOn: '2026-12-01', lastExamOn: null, clinicianWantsBy: null };
    expect(medicalSurveillance.evaluate(facts, '2026-12-31')).toMatchObject({ outcome: 'undecided', dueOn: '2026-12-31' });
    expect(medicalSurveillance.evaluate(facts, '2027-01-01')).toMatchObject({ outcome: 'unmet' });
  });
});

describe('1910.134(f)(6), read: a qualitative test only where a fit factor of 100 or less is enough', () => {
  const model = { maker: 'Harrow', model: 'F1', style: 'full', size: 'M' };
  const wearer = (changes: Partial<Wearer>): Wearer => ({ facePiece: 'full-facepiece', isNegativePressure: true, wears: model, clearedOn: '2026-03-01', fitTests: [{ ...model, testedOn: '2026-03-02', kind: 'qualitative', isPassed: true, fitFactor: null }], faceChangedOn: null, hasHairAtSeal: false, trainedOn: '2026-04-01', hazardRatio: null, ...changes });
  const outcome = (changes: Partial<Wearer>) => checkWearer(wearer(changes), DAY).find(({ id }) => id === 'fit-factor')?.outcome;

  it('[RES-06] leaves a full facepiece under Table 1 open: the row may ask 10 or 25', () => {
    expect(outcome({})).toBe('undecided');
    expect(outcome({ hazardRatio: 10 })).toBe('met');
    expect(outcome({ hazardRatio: 10.1 })).toBe('unmet');
    expect(outcome({ facePiece: 'half-mask' })).toBe('met');
    expect(outcome({ isNegativePressure: false })).toBe('met');
  });
});

describe('1910.134(f)(6) on the morning of the task', () => {
  const full = { type: 'full-facepiece' as const, label: 'Harrow F1, M', clearedOn: '2026-03-01', fitTestedOn: '2026-03-02' };
  const blasting = taskFacts({ kind: 'shot-blasting', assignments: at, equipmentId: 'blaster', collectorId: 'collector' });
  // 600 µg/m³ is 12 times the limit: factor 25 or more. 400 is 8 times: factor 10.
  const ask = (exposureMicrogramsPerM3: number, mask: PersonRespirator) => shiftOf(blasting, { people: [personFacts({ respirators: [mask] })], bases: [basisFacts({ exposureMicrogramsPerM3 })] }).find('mask-cleared-and-fitted');

  it.each<[number, PersonRespirator, string]>([
    [600, { ...full, fitTestKind: 'quantitative' }, 'met'],
    [600, { ...full, fitTestKind: 'qualitative' }, 'unmet'],
    [600, { ...full, fitTestKind: null }, 'undecided'],
    [600, full, 'undecided'],
    [400, { ...full, fitTestKind: 'qualitative' }, 'met'],
    // (f)(8): a powered mask may be tested either way.
    [600, { ...full, type: 'papr-full-facepiece', fitTestKind: 'qualitative' }, 'met'],
  ])('[RES-06] %d µg/m³ with %j: %s', (exposure, mask, outcome) => {
    expect(ask(exposure, mask)?.outcome).toBe(outcome);
  });
});

describe('1926.52(b) and 1926.101(a): protectors where noise stays above Table D-2 (Cornell LII copy, read)', () => {
  const ask = (twaDba: number) => hearingProtection.evaluate({ twaDba, plugNrrDb: null, muffNrrDb: null, arePlugsFitted: null }, DAY).outcome;
  it.each([[84, 'not-applicable'], [90, 'not-applicable'], [90.1, 'unmet']] as const)('[NOI-03] nothing worn at %d dBA: %s', (twaDba, outcome) => {
    expect(ask(twaDba)).toBe(outcome);
  });
});

describe('1926.1101(k)(1), (k)(5): flooring to 1980 is presumed to hold asbestos (OSHA letter, 1 August 1997, read)', () => {
  const floor = (changes: Partial<FloorFacts>) => ({ floor: { ...shiftFacts().floor, surveyReference: 'looked at by Dov Lindqvist, 2026-12-01', ...changes } });
  const outcome = (changes: Partial<FloorFacts>) => shiftOf(taskFacts({ kind: 'inspection', assignments: at }), floor(changes)).find('floor-survey')?.outcome;

  it.each<[Partial<FloorFacts>, string]>([
    [{ covering: 'tile', builtYear: 1980 }, 'undecided'],
    [{ covering: 'black-mastic', builtYear: 1965 }, 'undecided'],
    [{ covering: 'tile', builtYear: null }, 'undecided'],
    [{ covering: 'tile', builtYear: 1981 }, 'met'],
    [{ covering: 'tile', builtYear: 1965, asbestos: 'absent' }, 'met'],
    [{ covering: 'bare-concrete', builtYear: 1965 }, 'met'],
  ])('[GATE-01] "no survey needed" with %j: %s', (changes, expected) => {
    expect(outcome(changes)).toBe(expected);
  });

  it('[GATE-01] says present first, and holds the grinding', () => {
    expect(outcome({ covering: 'tile', builtYear: 1965, lead: 'present' })).toBe('unmet');
    const grinding = taskFacts({ kind: 'floor-grinding', assignments: at, equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' });
    expect(shiftOf(grinding, floor({ covering: 'tile', builtYear: 1965 })).find('floor-survey-of-task')).toMatchObject({ isHolding: true, source: { citation: '29 CFR 1926.1101' } });
  });
});

describe('1926.152(f)(3), same words in 8 CCR 1935(c), read', () => {
  it('[GATE-03] gives the distance: 50 feet', () => {
    const kit = shiftFacts().kits[0]!;
    const kits = [{ ...kit, parts: kit.parts.map((part) => (part.part === 'A' ? { ...part, sheet: { ...part.sheet!, hazardCodes: ['H225'] } } : part)) }];
    const finding = shiftOf(taskFacts({ kind: 'priming', assignments: at, kitId: 'quarrybond-40' }), { kits }).find('flammable-vapor-and-sparks');
    expect(finding?.outcome).toBe('met');
    expect(finding?.text.en).toContain('50 feet');
    expect(finding?.text.es).toContain('50 pies');
  });
});

describe('1926.57, read', () => {
  it('[AIR-04] fresh air is cited to the limits and the duration, not to local exhaust, (b)', () => {
    expect(dilutionEnough.source.paragraph).toBe('(a), (d)');
  });
});

describe('what lies ahead is not done', () => {
  // 1926.1153(h)(2) "has received a medical examination"; (d)(2)(vi) and 1910.1020(e), (g): told, given, held. Plain reading.
  it.each(['silica-medical-surveillance', 'silica-notice-of-assessment', 'record-access-in-time', 'record-rights-notice', 'safety-meeting-cadence', 'silica-plan-review'])('%s refuses a date after today by name', (ruleId) => {
    const doneOn = { lastExamOn: '2027-01-15', toldOn: '2027-01-15', givenOn: '2027-01-15', lastToldOn: '2027-01-15', lastHeldOn: '2027-01-15', lastDoneOn: '2027-01-15' };
    const days = Array.from({ length: 30 }, (_, i) => ({ on: addDays('2026-06-01', i), basis: 'silica-table-1' as const }));
    const facts = { days, assignedOn: '2026-12-01', clinicianWantsBy: null, assessmentCompletedOn: DAY, scope: 'construction', holidays: [], isAboveLimit: false, namesCorrectiveAction: null, requestedOn: DAY, isDelayExplained: false, employedOn: '2026-01-02', everyWorkingDays: 10, ...doneOn };
    const rule = findRule(ruleId) as Rule<typeof facts>;
    expect(() => rule.evaluate(facts, DAY)).toThrow(/^(lastExamOn|toldOn|givenOn|lastToldOn|lastHeldOn|lastDoneOn): is later than/);
  });
});

describe('1926.1153(c)(2), read in WAC 296-840-110(2), same words', () => {
  it('[SIL-05] holds all eight conditions: exhaust, water, and six for a cab or booth', () => {
    expect(TABLE_1_CONDITIONS.map(({ source }) => source.paragraph)).toEqual(['(c)(2)(i)', '(c)(2)(ii)', ...['A', 'B', 'C', 'D', 'E', 'F'].map((letter) => `(c)(2)(iii)(${letter})`)]);
    expect(TABLE_1_CONDITIONS[6]?.text.en).toBe('intake filter 95 % efficient from 0.3 to 10.0 µm, for example MERV-16');
  });
});

describe('WAC 296-307-63215: the higher rating less 2 in all for A-weighted sound', () => {
  it.each([[20, 18], [7, 5], [5, 3], [1, 0]])('[NOI-03] plug and muff of %d take off %d dB', (nrr, taken) => {
    expect(95 - protectedLevelDual(95, 'A', nrr, nrr).levelDba).toBe(taken);
  });
});

describe('1926.50(c), read: where no clinic is near, a person with a valid first-aid certificate', () => {
  it('[GATE-05] asks the card, not only a name', () => {
    expect(shiftOf(taskFacts({ kind: 'inspection', assignments: at })).find('first-aid-named')?.text.en).toBe('First aid today, card valid: Tomasz Reyes. Call 911.');
  });
});

describe('marks that say more than was read', () => {
  const maskSource = (task: TaskFacts, others: readonly TaskFacts[] = []) => answerShift(shiftFacts({ tasks: [task, ...others] }), '2026-12-03T12:00:00Z').tasks[0]!.respirator;

  // (f) speaks of sweeping and blowing, (c)(1) of rows: neither says that emptying a collector or clean-up needs no mask.
  it('[SIL-15] "no mask" for clean-up is marked as a judgement', () => {
    expect(maskSource(taskFacts({ kind: 'clean-up', assignments: at }))).toMatchObject({ outcome: 'none-required', source: { verified: 'partly' } });
  });

  // 1926.57(f) is the abrasive-blasting paragraph: a grinder's collector is not under it.
  it('a mask by policy at the grinder\'s collector leans on no law', () => {
    const grinding = taskFacts({ kind: 'floor-grinding', assignments: at, equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' });
    expect(maskSource(taskFacts({ kind: 'collector-emptying', assignments: at, collectorId: 'collector' }), [grinding])).toMatchObject({ outcome: 'by-policy', source: { verified: 'common-practice' } });
  });

  // (k): obligations from 23 June 2017; the memorandum of 25 June 2018 speaks of enforcement from 23 September.
  it('the silica limit holds from the day of the rule, not of its enforcement', () => {
    expect(LIMIT_ROWS.find(({ id }) => id.startsWith('limit/rcs/us-federal/construction/twa-8h'))?.source.inForceFrom).toBe('2017-06-23');
  });
});

describe('exactly at the limit is not above it, whatever the binary fractions do', () => {
  // OAR 437-002-1055, read, same words as 1926.1153(d)(1): "in excess of 50". 5 µg/m³ for 2 h and 65 for 6 h are 50 by hand.
  it.each([[5, 120, 65, 360], [2, 300, 130, 180], [3, 420, 379, 60]])('[AIR-01] %d µg/m³ for %d min and %d for %d min', (a, aMinutes, b, bMinutes) => {
    const facts = { substanceId: 'rcs', jurisdictionId: 'us-federal', shiftMinutes: 480, periods: [{ concentrationMgPerM3: a / 1000, minutes: aMinutes }, { concentrationMgPerM3: b / 1000, minutes: bMinutes }] };
    expect(a * aMinutes + b * bMinutes).toBe(24_000);
    expect(averageWithinLimit.evaluate(facts, DAY).outcome).toBe('met');
  });

  // 1910.1000(d)(2)(i), read: exceeded when the sum is above 1. 33, 56 and 11 hundredths are one.
  it('[AIR-01] shares that make one', () => {
    const members = [33, 56, 11].map((share, i) => ({ name: String(i), concentration: share / 100, limit: 1 }));
    expect(mixtureWithinLimits.evaluate({ members }, DAY).outcome).toBe('met');
  });
});

describe('1926.57(f)(5)(ii), read in WAC 296-818-20010: the hood where nothing stands between operator and blast', () => {
  it('[SIL-13] says under "why" what takes the closed machine\'s exemption away', () => {
    const finding = shiftOf(taskFacts({ kind: 'shot-blasting', assignments: at, equipmentId: 'blaster', collectorId: 'collector' })).find('shot-blasting-safeguards');
    expect(finding?.whatWouldChange?.en).toMatch(/open nozzle.*blasting hood with supplied air/);
    expect(shiftOf(taskFacts({ kind: 'shot-pick-up', assignments: at })).find('shot-blasting-safeguards')?.whatWouldChange).toBeNull();
  });
});

describe('1926.52(d)(1), read in the Cornell LII copy: above the table a hearing conservation program is due', () => {
  it('[NOI-01] names it', () => {
    expect(noiseInShift.evaluate({ periods: [{ levelDba: 97, minutes: 240 }] }, DAY)).toMatchObject({ outcome: 'unmet' });
    expect(noiseInShift.evaluate({ periods: [{ levelDba: 97, minutes: 240 }] }, DAY).whatWouldChange?.en).toContain('hearing conservation program');
  });
});
