import { describe, expect, it } from '@jest/globals';
import { englishSyllables, fernandezHuerta, fleschKincaidGrade, spanishSyllables } from '#test/support/readability';
import { airflowCfm, basisFacts, equipmentFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { type Checklist } from '../answer';
import { answerShift } from '../answer-shift';
import { taskKinds, type ShiftFacts } from '../facts';
import { type Language, type Words } from '../outcome';
import { DEMAND_WORDS } from '../silica/table1-demands.data';
import { TASKS } from '../silica/tasks.data';
import { LIVE_LINES } from './live-lines.data';
import { generateChecklist } from './generate';
import { checklistText, parseChecklistText, renderChecklistText } from './text';

const AS_OF = '2026-12-03T12:00:00Z';
const make = (facts: ShiftFacts): Checklist => generateChecklist(facts, answerShift(facts, AS_OF));
const decided = (): ShiftFacts =>
  shiftFacts({
    bases: [basisFacts({ id: 'b1', exposureMicrogramsPerM3: 67.5 }), basisFacts({ id: 'b2', taskKind: 'powder-mixing', kind: 'below-action-level', exposureMicrogramsPerM3: 12 })],
  });

/** Every kind of work once, all of it decided, so that every line the generator knows can be read. */
function everyKind(setting: ShiftFacts['setting'], dustMethod: 'vacuum' | 'water'): ShiftFacts {
  const tools: Partial<Record<string, string>> = { 'floor-grinding': 'grinder', 'edge-grinding': 'edger', 'crack-chasing': 'edger', 'mortar-removal': 'edger', scarifying: 'grinder', chipping: 'hammer', drilling: 'drill', 'joint-sawing': 'saw', 'handheld-sawing': 'cut-off' };
  const wet = { hasWaterFeed: true, requiredAirflowM3PerH: 100, hasShroud: true } as const;
  return shiftFacts({
    setting,
    equipment: [
      ...shiftFacts().equipment.map((each) => ({ ...each, hasWaterFeed: true })),
      equipmentFacts({ id: 'hammer', name: 'Hammer', kind: 'chipping-hammer', ...wet }),
      equipmentFacts({ id: 'drill', name: 'Drill', kind: 'drill', ...wet }),
      equipmentFacts({ id: 'saw', name: 'Saw', kind: 'walk-behind-saw', ...wet }),
      equipmentFacts({ id: 'cut-off', name: 'Cut-off saw', kind: 'handheld-saw', ...wet }),
      equipmentFacts({ id: 'big', name: 'Big vacuum', kind: 'vacuum', airflow: airflowCfm(400), filterEfficiencyPercent: 99.97, hasFilterCleaning: true, isHepa: true }),
    ],
    tasks: taskKinds.map((kind, index) => taskFacts({ kind, dustMethod: TASKS[kind].silica === 'table-1' ? dustMethod : null, equipmentId: tools[kind] ?? null, collectorId: 'big', kitId: TASKS[kind].touchesKit ? 'quarrybond-40' : null, assignments: [{ personId: 'marisol', startMinute: index * 15, endMinute: index * 15 + 15 }] })),
    bases: taskKinds.map((kind) => basisFacts({ id: kind, taskKind: kind, exposureMicrogramsPerM3: 67.5 })),
  });
}

const linesOf = ({ morning, tasks, people, sentence }: Checklist, language: Language): readonly string[] => [
  ...[...morning, ...tasks.flatMap(({ live }) => live)].flatMap(({ text, why }) => [text[language], why[language]]),
  ...tasks.flatMap(({ heldBecause }) => (heldBecause === null ? [] : [heldBecause[language]])),
  ...people.flatMap(({ lines }) => lines.map((line) => line[language])),
  sentence[language],
];

describe('the day\'s checklist', () => {
  const checklist = make(decided());

  it('stands in the order of the day', () => {
    expect(checklist.tasks.map(({ taskId }) => taskId)).toEqual(['inspection', 'edge-grinding', 'floor-grinding', 'collector-emptying', 'shot-blasting', 'powder-mixing', 'shot-pick-up', 'spreading', 'clean-up']);
  });

  it('asks two to four live lines for every kind of work that is ready, controls before protection', () => {
    for (const setting of ['indoors', 'outdoors'] as const) {
      for (const method of ['vacuum', 'water'] as const) {
        const tasks = make(everyKind(setting, method)).tasks;
        const ready = tasks.filter(({ state, taskId }) => state === 'ready' && taskId !== 'break' && taskId !== 'inspection');
        expect(ready.length).toBeGreaterThanOrEqual(20);
        for (const { taskId, live } of ready) {
          expect([taskId, live.length >= 2 && live.length <= 4]).toEqual([taskId, true]);
          const firstProtection = live.findIndex(({ id }) => /mask-on|gear-on/.test(id));
          expect(live.slice(firstProtection).every(({ id }) => /mask-on|gear-on/.test(id))).toBe(true);
          expect(firstProtection).toBeGreaterThan(0);
          expect(live.some(({ isCritical }) => isCritical)).toBe(true);
        }
      }
    }
  });

  it('gives a held task its reason and no live line that could unlock it', () => {
    const held = make(shiftFacts()).tasks.filter(({ state }) => state !== 'ready');
    expect(held.map(({ taskId }) => taskId)).toEqual(['shot-blasting', 'powder-mixing', 'shot-pick-up']);
    for (const { heldBecause, live } of held) {
      expect(heldBecause?.en).not.toBe('');
      expect(live).toEqual([]);
    }
  });

  it('asks in the morning what the morning can know, never what only the start can', () => {
    for (const { text } of checklist.morning) expect(text.en).not.toMatch(/seal checked|mask on\b|shroud down|gauge above/i);
    expect(checklist.morning.map(({ id }) => id)).toEqual(expect.arrayContaining(['morning/floor-survey', 'morning/host-hazards-asked', 'morning/first-aid-named', 'morning/eyewash', 'morning/masks', 'morning/machines', 'morning/collectors', 'morning/gear']));
  });

  it('[RES-07] asks the mask of those who wear it, by name', () => {
    const mixing = checklist.tasks.find(({ taskId }) => taskId === 'powder-mixing');
    expect(mixing?.live.find(({ mark }) => mark === 'respirator')).toMatchObject({ isCritical: true, text: { en: 'Mask on, seal checked: Marisol Tena and Tomasz Reyes.', es: 'Máscara puesta y sello revisado: Marisol Tena y Tomasz Reyes.' }, why: { en: 'It stops dust, not resin vapor.' } });
  });

  it('is signed by one sentence, word for word (rule of conduct 6)', () => {
    expect(checklist.sentence.en).toBe('I was briefed in a language I understand. I have what is listed for my tasks. The competent person today is Dov Lindqvist. I can stop any task; no one may punish me for it.');
    expect(checklist.sentence.es).toContain('Dov Lindqvist');
  });

  it('gives each person their own lines with times, mask and what to wear', () => {
    const per = checklist.people.find(({ personId }) => personId === 'per');
    expect(per?.lines.map(({ en }) => en)).toEqual([
      '08:05–11:30 Freight shed: floor grinding.',
      '12:42–14:12 Spreading. Mask: none named on the sheets. Wear goggles, alkali-proof gloves, coverall with long sleeves and safety boots.',
      'Your Table 1 time today, all jobs: 3 h 25 min.',
    ]);
  });

  it('every line has its own id, a rule, a why in both languages and a source', () => {
    const all = [...checklist.morning, ...checklist.tasks.flatMap(({ live }) => live)];
    expect(new Set(all.map(({ id }) => id)).size).toBe(all.length);
    for (const { ruleId, why, source } of all) expect([ruleId, why.en, why.es, source.citation].every((text) => text !== '')).toBe(true);
  });

  it('shows the gap of an incomplete pack beside the notice', () => {
    expect(make(shiftFacts({ jurisdictionId: 'us-california' })).notice.en).toMatch(/^The California pack is incomplete .*Law, label, safety data sheet/);
  });
});

describe('a checklist text', () => {
  const checklist = make(decided());

  it.each(['en', 'es'] as const)('%s: the same facts give the same bytes, which read back whole', (language) => {
    const bytes = renderChecklistText(checklist, language);
    expect(renderChecklistText(make(decided()), language)).toBe(bytes);
    expect(bytes.endsWith('}\n')).toBe(true);
    expect(parseChecklistText(bytes)).toEqual(checklistText(checklist, language));
    expect(bytes.startsWith(`{\n  "format": "kneeboard-checklist-text/1",\n  "language": "${language}",\n  "title": `)).toBe(true);
  });

  it('is in one language only', () => {
    const spanish = parseChecklistText(renderChecklistText(checklist, 'es'));
    expect(spanish.sentence).toBe(checklist.sentence.es);
    expect(JSON.stringify(spanish)).not.toContain(checklist.sentence.en);
    expect(spanish.tasks.map(({ name }) => name)).toContain('Pulir el piso');
  });

  it('does not depend on the order in which the objects were built', () => {
    const shuffled: Checklist = { ...Object.fromEntries(Object.entries(checklist).reverse()), format: checklist.format } as Checklist;
    expect(renderChecklistText(shuffled, 'en')).toBe(renderChecklistText(checklist, 'en'));
  });

  it.each(['', '{}', '[]', 'null', '{"format":"kneeboard-checklist-text/2"}', '{"format":"kneeboard-checklist-text/1","language":"en"}'])('refuses %j', (bytes) => {
    expect(() => parseChecklistText(bytes)).toThrow(SyntaxError);
  });
});

describe('a checklist text with one piece broken', () => {
  const whole = checklistText(make(decided()), 'en');
  it.each<[string, object]>([
    ['a line without its text', { morning: [{ ...whole.morning[0], text: 1 }] }],
    ['a line without its weight', { morning: [{ ...whole.morning[0], isCritical: 'yes' }] }],
    ['a task whose protection has no name', { tasks: [{ ...whole.tasks[1], protection: [{ mark: 'eyes' }] }] }],
    ['a task whose protection has no mark', { tasks: [{ ...whole.tasks[1], protection: [{ name: 'Goggles' }] }] }],
    ['a task with a broken live line', { tasks: [{ ...whole.tasks[1], live: [{}] }] }],
    ['a person without lines', { people: [{ ...whole.people[0], lines: null }] }],
    ['no sentence', { sentence: undefined }],
  ])('%s is refused', (_name, broken) => {
    expect(() => parseChecklistText(JSON.stringify({ ...whole, ...broken }))).toThrow(SyntaxError);
  });
  it('further keys of a later version are left in place', () => {
    expect(parseChecklistText(JSON.stringify({ ...whole, later: 1 }))).toMatchObject({ later: 1 });
  });
});

describe('words a tired crew understands', () => {
  const checklists = [make(shiftFacts()), make(decided()), make(shiftFacts({ jurisdictionId: 'new-zealand' })), make(shiftFacts({ jurisdictionId: 'us-michigan' })), ...(['indoors', 'outdoors'] as const).flatMap((setting) => (['vacuum', 'water'] as const).map((method) => make(everyKind(setting, method))))];
  const data: readonly Words[] = [...LIVE_LINES.flatMap(({ text, why }) => [text, why]), ...Object.values(DEMAND_WORDS)];
  const unique = (language: Language): readonly string[] => [...new Set([...checklists.flatMap((checklist) => linesOf(checklist, language)), ...data.map((each) => each[language])])];

  it('counts syllables as a reader does', () => {
    expect(['dust', 'table', 'collector', 'safety', 'respirator', 'closed', 'seal', 'powder', 'gloves'].map(englishSyllables)).toEqual([1, 2, 3, 3, 4, 1, 1, 2, 1]);
    expect(['polvo', 'máscara', 'guantes', 'día', 'aire', 'que', 'leer', 'granalla', 'hoy', 'colector'].map(spanishSyllables)).toEqual([2, 3, 2, 2, 2, 1, 2, 3, 1, 3]);
  });

  it('English: Flesch-Kincaid grade at most 6 over all lines', () => {
    const lines = unique('en');
    expect(lines.length).toBeGreaterThan(100);
    expect(fleschKincaidGrade(lines)).toBeLessThanOrEqual(6);
  });

  it('Spanish: Fernández Huerta at least 70 over all lines', () => {
    const lines = unique('es');
    expect(lines.length).toBeGreaterThan(100);
    expect(fernandezHuerta(lines)).toBeGreaterThanOrEqual(70);
  });

  it('hard text fails the same measure', () => {
    expect(fleschKincaidGrade(['Respiratory protection is mandatory whenever engineering controls demonstrably fail to maintain occupational exposure below the permissible limit.'])).toBeGreaterThan(12);
    expect(fernandezHuerta(['La utilización obligatoria de protección respiratoria corresponde cuando los controles de ingeniería resultan insuficientes para mantener la exposición ocupacional.'])).toBeLessThan(50);
  });
});
