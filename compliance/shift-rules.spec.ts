import { describe, expect, it } from '@jest/globals';
import { basisFacts, equipmentFacts, kitFacts, personFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { answerShift } from './answer-shift';
import { type KitFacts, type ShiftFacts, type TaskFacts } from './facts';
import { type Finding } from './outcome';

const at = (personId: string) => [{ personId, startMinute: 420, endMinute: 540 }];
const only = (task: TaskFacts, overrides: Partial<ShiftFacts> = {}): ShiftFacts => shiftFacts({ tasks: [task], ...overrides });
const findingsOf = (facts: ShiftFacts): readonly Finding[] => {
  const answer = answerShift(facts, '2026-12-03T12:00:00Z');
  return [...answer.gates, ...answer.tasks.flatMap((task) => task.findings), ...answer.people.flatMap((person) => person.findings), ...answer.kits.flatMap((kit) => kit.findings)];
};

const grinding = taskFacts({ kind: 'floor-grinding', assignments: at('dov'), equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' });
const wetGrinding = { ...grinding, dustMethod: 'water' as const };
const edges = (endMinute: number) => taskFacts({ kind: 'edge-grinding', assignments: [{ personId: 'dov', startMinute: 420, endMinute }], equipmentId: 'edger', collectorId: 'edge-vacuum', dustMethod: 'vacuum' });
const blasting = taskFacts({ kind: 'shot-blasting', assignments: at('dov'), equipmentId: 'blaster', collectorId: 'collector' });
const mixing = taskFacts({ kind: 'powder-mixing', assignments: at('dov'), equipmentId: 'mixer', kitId: 'quarrybond-40' });
const spreading = taskFacts({ kind: 'spreading', assignments: at('dov'), kitId: 'quarrybond-40' });
const inspection = taskFacts({ kind: 'inspection', assignments: at('dov') });
const withWater = [...shiftFacts().equipment.filter(({ id }) => id !== 'grinder'), equipmentFacts({ hasWaterFeed: true })];
const plainKit = kitFacts({ parts: kitFacts().parts.filter(({ part }) => part === 'A') });
const vaporKit = (cartridgeSchedule: KitFacts['cartridgeSchedule'] = null): KitFacts => kitFacts({ cartridgeSchedule, parts: kitFacts().parts.map((part) => (part.sheet && part.part === 'B' ? { ...part, sheet: { ...part.sheet, precautionaryCodes: ['P284'] } } : part)) });
const samplingDay = basisFacts({ kind: 'sampling-day', exposureMicrogramsPerM3: null, interimApf: 50, endsOn: '2026-12-03', signedOn: '2026-12-02' });

type Row = readonly [ruleId: string, situation: string, facts: ShiftFacts, outcome: Finding['outcome'] | 'silent', words?: RegExp];

/** Each rule where it speaks and where it stays silent or turns. Sources stand with the rules. */
const ROWS: Record<string, readonly Row[]> = {
  '[LOC-01] [LOC-02]': [
    ['rules-of-the-place', 'under federal rules', only(grinding), 'met'],
    ['rules-of-the-place', 'with an incomplete pack', only(grinding, { jurisdictionId: 'us-california' }), 'unmet', /California/],
    ['rules-of-the-place', 'without a pack', only(grinding, { jurisdictionId: 'new-zealand' }), 'undecided'],
  ],
  // Common practice, no source: extraction at the bucket, bags cut low.
  '[SIL-12]': [
    ['powder-dust-at-bucket', 'with extraction on the site', only(mixing), 'met', /Extraction at the bucket/],
    ['powder-dust-at-bucket', 'without it', only(mixing, { equipment: shiftFacts().equipment.filter(({ kind }) => kind !== 'bucket-extraction') }), 'unmet', /No extraction/],
    ['powder-dust-at-bucket', 'for spreading', only(spreading), 'silent'],
  ],
  // 1926.57(f) in parallel texts; trap 24: a wheel blaster is abrasive blasting.
  '[SIL-13]': [
    ['shot-blasting-safeguards', 'for shot blasting', only(blasting), 'met', /collector on before the wheel/],
    ['shot-blasting-safeguards', 'for its shot pick-up', only(taskFacts({ kind: 'shot-pick-up', assignments: at('dov') })), 'met', /magnet/],
    ['shot-blasting-safeguards', 'for grinding', only(grinding), 'silent'],
  ],
  // (c)(2)(ii) in parallel texts.
  '[SIL-05]': [
    ['silica-water-flow', 'grinding with water', only(wetGrinding, { equipment: withWater }), 'met', /Water on full/],
    ['silica-water-flow', 'grinding with vacuum', only(grinding), 'silent'],
  ],
  // Rule of conduct 2: a sampling day is planned and signed by a person, and takes samples.
  '[SIL-08]': [
    ['silica-sampling-day', 'on the planned day', only(blasting, { bases: [samplingDay] }), 'met', /pump/],
    ['silica-sampling-day', 'without one', only(blasting), 'silent'],
  ],
  '[GATE-07]': [
    ['silica-access', 'for dusty silica work', only(grinding), 'met', /neighbors told/],
    ['silica-access', 'for an inspection', only(inspection), 'silent'],
  ],
  // (f), full quotation read.
  '[SIL-15]': [
    ['silica-housekeeping', 'for silica work', only(grinding), 'met', /No dry sweeping. No blown air/],
    ['silica-housekeeping', 'for an inspection', only(inspection), 'silent'],
  ],
  '[ISO-01]': [
    ['sensitizer-symptoms', 'with a sensitizer on the sheets', only(spreading), 'met', /tight chest/],
    ['sensitizer-symptoms', 'without one', only(spreading, { kits: [plainKit] }), 'silent'],
  ],
  // 1910.134(d)(3)(iii)(B), read: supplied air, or a written change schedule based on data.
  '[RES-03] [ISO-01]': [
    ['cartridge-change-schedule', 'where the sheet asks a vapor mask and nobody wrote when cartridges change', only(spreading, { kits: [vaporKit()] }), 'undecided', /may not start/],
    ['cartridge-change-schedule', 'with a schedule that rests on data', only(spreading, { kits: [vaporKit({ change: 'every four hours', basedOn: 'maker’s table for this vapor, 20 °C' })] }), 'met', /New cartridges: every four hours/],
    ['cartridge-change-schedule', 'with a schedule that rests on nothing', only(spreading, { kits: [vaporKit({ change: 'when it smells', basedOn: ' ' })] }), 'unmet', /may not start/],
    ['cartridge-change-schedule', 'with everyone on supplied air', only(spreading, { kits: [vaporKit()], people: [personFacts({ respirators: [{ type: 'supplied-air-hood', label: 'air line', clearedOn: '2026-01-05', fitTestedOn: null }] })] }), 'met', /Air line/],
    ['cartridge-change-schedule', 'where no sheet asks a mask', only(spreading), 'silent'],
    ['cartridge-change-schedule', 'where the asked mask is for a kit without vapor', only(spreading, { kits: [{ ...plainKit, parts: plainKit.parts.map((part) => ({ ...part, sheet: part.sheet && { ...part.sheet, precautionaryCodes: ['P284'] } })) }] }), 'silent'],
  ],
  // (c)(3): exactly four hours, and a minute more.
  '[SIL-03] [SIL-04]': [
    ['silica-table-1-respirator', 'edge grinding 4 h', only(edges(660), { people: [personFacts()] }), 'met', /none until 4 h/],
    ['silica-table-1-respirator', 'edge grinding 4 h and a minute', only(edges(661), { people: [personFacts()] }), 'met', /Over 4 h: half mask/],
    ['silica-table-1-respirator', 'an inspection', only(inspection), 'silent'],
  ],
  // Common practice, no source: about 25 ft² a kit at 1/4 in, so 24 kits for 600 ft².
  'Kits:': [
    ['kit-count', '600 ft² at 1/4 in', only(mixing), 'met', /24/],
    ['kit-count', 'without an area', only(mixing, { areaM2: null }), 'undecided'],
    ['kit-bucket-time', 'with a time set', only(mixing), 'met', /within 5 minutes/],
    ['kit-bucket-time', 'without one', only(mixing, { kits: [kitFacts({ bucketMinutes: null })] }), 'silent'],
  ],
  '[HAZ-04]': [
    ['kit-sheets', 'with a part without sheet', only(mixing, { kits: [kitFacts({ parts: kitFacts().parts.map((part) => (part.part === 'B' ? { ...part, sheet: null } : part)) })] }), 'unmet', /Quarrybond 40 part B/],
    ['kit-sheets', 'with every sheet', only(mixing), 'silent'],
  ],
  '[PPE-01] [NOI-03]': [
    ['protection-for-task', 'for loud, dusty work', only(grinding), 'met', /hearing|ear/i],
    ['protection-for-task', 'for a break', only(taskFacts({ kind: 'break', assignments: at('dov') })), 'silent'],
  ],
};

describe.each(Object.entries(ROWS))('%s', (_duties, rows) => {
  it.each(rows.map((row) => [`${row[0]}: ${row[1]} → ${row[3]}`, row] as const))('%s', (_name, [ruleId, , facts, outcome, words]) => {
    const own = findingsOf(facts).filter((finding) => finding.ruleId === ruleId);
    expect([...new Set(own.map((finding) => finding.outcome))]).toEqual(outcome === 'silent' ? [] : [outcome]);
    if (words !== undefined) expect(own.map((finding) => finding.text.en).join(' ')).toMatch(words);
    for (const finding of own) {
      expect(finding.text.es.length).toBeGreaterThan(3);
      expect(finding.source.citation.length).toBeGreaterThan(3);
    }
  });
});
