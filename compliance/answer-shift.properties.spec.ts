import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { anyShiftFacts } from '#test/support/shift-arbitrary';
import { kitFacts, personFacts, sheetFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { type ShiftAnswer } from './answer';
import { answerShift } from './answer-shift';
import { generateChecklist } from './checklists/generate';
import { renderChecklistText } from './checklists/text';
import { taskKinds, type ShiftFacts } from './facts';
import { impossibleFields } from './gates/possible';
import { HAZARD_ROWS } from './hazcom/ghs-hazards.data';
import { respiratorRank } from './ppe/task-respirator';

const AS_OF = '2026-12-03T12:00:00Z';

const taskOf = (answer: ShiftAnswer, taskId: string) => {
  const found = answer.tasks.find((task) => task.taskId === taskId);
  if (found === undefined) throw new Error(`no task ${taskId}`);
  return found;
};
const sortedById = (answer: ShiftAnswer) => [...answer.tasks].sort((a, b) => (a.taskId < b.taskId ? -1 : 1));

describe('any shift', () => {
  it('gets an answer, a checklist and both texts, or is held with its impossible fields named, and never throws', () => {
    fc.assert(
      fc.property(anyShiftFacts, (facts) => {
        const answer = answerShift(facts, AS_OF);
        const checklist = generateChecklist(facts, answer);
        for (const language of ['en', 'es'] as const) expect(renderChecklistText(checklist, language).endsWith('\n')).toBe(true);
        const refusal = answer.gates.find(({ ruleId }) => ruleId === 'facts-possible');
        expect(refusal !== undefined).toBe(impossibleFields(facts).length > 0);
        if (refusal !== undefined) expect(refusal.isHolding).toBe(true);
      }),
      { numRuns: 400 },
    );
  });

  it('is answered without silence: what is undecided names who decides, what holds says what would change it, all in both languages', () => {
    fc.assert(
      fc.property(anyShiftFacts, (facts) => {
        const answer = answerShift(facts, AS_OF);
        const findings = [...answer.gates, ...answer.tasks.flatMap((task) => task.findings), ...answer.people.flatMap((person) => person.findings), ...answer.kits.flatMap((kit) => kit.findings), ...answer.consumables];
        for (const finding of findings) {
          if (finding.outcome === 'undecided') expect(finding.whoDecides).not.toBeNull();
          if (finding.isHolding) expect(finding.whatWouldChange).not.toBeNull();
          if (finding.outcome === 'met') expect(finding.isHolding).toBe(false);
          for (const said of [finding.text, finding.reason]) expect([said.en, said.es].every((sentence) => sentence.trim() !== '' && !/undefined|\bNaN\b|Infinity/.test(sentence))).toBe(true);
          expect(finding.source.citation).not.toBe('');
        }
      }),
    );
  });

  it('keeps a task ready only when nothing about it or the shift holds', () => {
    fc.assert(
      fc.property(anyShiftFacts, (facts) => {
        const answer = answerShift(facts, AS_OF);
        const isShiftHeld = answer.gates.some(({ isHolding }) => isHolding);
        answer.tasks.forEach((task, index) => {
          const kind = facts.tasks[index]!.kind;
          if (kind === 'break' || kind === 'inspection') return;
          expect(task.state === 'ready').toBe(!isShiftHeld && !task.findings.some(({ isHolding }) => isHolding));
          if (task.silicaBasis === 'held') expect(task.state).not.toBe('ready');
        });
      }),
    );
  });
});

describe('[SIL-03] [SIL-04] more minutes', () => {
  it('never weaken anyone\'s protection', () => {
    const kinds = ['floor-grinding', 'edge-grinding'] as const;
    fc.assert(
      fc.property(fc.constantFrom(...kinds), fc.integer({ min: 0, max: 400 }), fc.integer({ min: 0, max: 300 }), fc.integer({ min: 0, max: 300 }), (kind, minutes, more, elsewhere) => {
        const shift = (length: number): ShiftFacts => {
          const base = shiftFacts();
          const tasks = base.tasks.filter((task) => task.kind === kind).map((task) => ({ ...task, assignments: [{ personId: 'marisol', startMinute: 400, endMinute: 400 + length }] }));
          return { ...base, tasks, people: base.people.map((person) => (person.id === 'marisol' ? { ...person, elsewhere: [{ jobName: 'Freight shed', kind: 'floor-grinding' as const, startMinute: 50, endMinute: 50 + elsewhere }] } : person)) };
        };
        const before = answerShift(shift(minutes), AS_OF);
        const after = answerShift(shift(minutes + more), AS_OF);
        expect(respiratorRank(taskOf(after, kind).respirator)).toBeGreaterThanOrEqual(respiratorRank(taskOf(before, kind).respirator));
        expect(after.people[1]!.table1Minutes).toBeGreaterThanOrEqual(before.people[1]!.table1Minutes);
      }),
    );
  });
});

describe('the order of the facts', () => {
  it('changes nothing: tasks in any order give the same answers and the same checklist', () => {
    const base = shiftFacts();
    const reference = answerShift(base, AS_OF);
    const text = renderChecklistText(generateChecklist(base, reference), 'en');
    fc.assert(
      fc.property(fc.shuffledSubarray([...base.tasks], { minLength: base.tasks.length }), (tasks) => {
        const facts = { ...base, tasks };
        const answer = answerShift(facts, AS_OF);
        expect(sortedById(answer)).toEqual(sortedById(reference));
        expect(renderChecklistText(generateChecklist(facts, answer), 'en')).toBe(text);
      }),
      { numRuns: 30 },
    );
  });
});

describe('[PPE-01] adding a hazard', () => {
  const codes = [...new Set(HAZARD_ROWS.map(({ code }) => code))];
  it('never removes a mark of protection, in any kind of work', () => {
    fc.assert(
      fc.property(fc.constantFrom(...taskKinds), fc.subarray(codes, { maxLength: 5 }), fc.constantFrom(...codes), (kind, some, added) => {
        const marksWith = (hazardCodes: readonly string[]): readonly string[] => {
          const kit = kitFacts({ parts: [{ productId: 'x', productName: 'X', part: 'A', form: 'liquid', sheet: sheetFacts({ hazardCodes }) }] });
          const facts = shiftFacts({ kits: [kit], people: [personFacts()], tasks: [taskFacts({ kind, kitId: kit.id, assignments: [{ personId: 'dov', startMinute: 400, endMinute: 500 }] })] });
          return taskOf(answerShift(facts, AS_OF), kind).protection.map(({ mark }) => mark);
        };
        const after = marksWith([...some, added]);
        for (const mark of marksWith(some)) expect(after).toContain(mark);
      }),
    );
  });
});

describe('[SIL-14] a higher measured exposure', () => {
  it('never lowers the respirator', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 60_000, noNaN: true }), fc.double({ min: 0, max: 60_000, noNaN: true }), (a, b) => {
        const rank = (exposure: number): number => {
          const facts = shiftFacts({ bases: [{ id: 'b', taskKind: 'shot-blasting', kind: 'air-samples', exposureMicrogramsPerM3: exposure, conditions: 'as sampled', signedBy: 'Ines Halloran', signedOn: '2026-11-02', endsOn: '2027-05-02', interimApf: null }] });
          return respiratorRank(taskOf(answerShift(facts, AS_OF), 'shot-blasting').respirator);
        };
        expect(rank(Math.max(a, b))).toBeGreaterThanOrEqual(rank(Math.min(a, b)));
      }),
    );
  });
});
