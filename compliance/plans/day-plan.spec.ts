import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { anyShiftFacts } from '#test/support/shift-arbitrary';
import { personFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { answerShift } from '../answer-shift';
import { type ShiftFacts } from '../facts';
import { dayPlan } from './day-plan';

const asOf = '2026-12-03T12:00:00Z';
const planOf = (facts: ShiftFacts) => dayPlan(facts, answerShift(facts, asOf));

describe('the plan of a day', () => {
  it('[SIL-16] holds tasks, their controls, housekeeping and access limits', () => {
    // Source: 29 CFR 1926.1153(g)(1)(i) to (iv).
    const facts = shiftFacts();
    const grinding = planOf(facts).tasks.find(({ name }) => /grind/i.test(name.en));
    expect(grinding?.controls.length).toBeGreaterThan(0);
    expect(grinding?.housekeeping.map(({ text }) => text.en)).toContain('HEPA vacuum or wet. No dry sweeping. No blown air.');
    expect(grinding?.access.map(({ text }) => text.en)).toContain('Door closed, sign up, neighbors told.');
    expect(grinding?.span).toMatch(/^\d\d:\d\d–\d\d:\d\d$/);
    for (const { source } of grinding?.controls ?? []) expect(source).not.toBe('');
  });

  it('never carries the name of anyone, whatever the facts', () => {
    fc.assert(
      fc.property(anyShiftFacts, (facts) => {
        const named: ShiftFacts = { ...facts, people: facts.people.map((person, at) => ({ ...person, name: `Nameless Person${at}` })), firstAid: { ...facts.firstAid, firstAiderName: 'Nameless Aider' }, bases: facts.bases.map((basis) => ({ ...basis, signedBy: 'Nameless Signer' })) };
        expect(JSON.stringify(planOf(named))).not.toContain('Nameless');
      }),
      { numRuns: 200 },
    );
  });

  it('replaces a name that a sentence of a rule carries, the longer one whole', () => {
    const facts = shiftFacts({ people: [personFacts({ id: 'a', name: 'Ana Tena' }), personFacts({ id: 'b', name: 'Ana Tena Ruiz' })] });
    const answer = answerShift(facts, asOf);
    const [gate] = answer.gates.filter(({ ruleId }) => ruleId === 'floor-survey');
    if (!gate) throw new Error('no gate to say it');
    const said = dayPlan(facts, { ...answer, gates: [{ ...gate, text: { en: 'Ana Tena Ruiz looked at the floor.', es: 'Ana Tena Ruiz miró el piso.' } }] });
    expect(said.place.map(({ text }) => text)).toEqual([{ en: 'a named person looked at the floor.', es: 'una persona nombrada miró el piso.' }]);
  });

  it('says that people are not ready without saying what a person lacks', () => {
    const person = personFacts({ id: 'ana', name: 'Ana Veltran', silicaTrainedOn: null, respirators: [] });
    const facts = shiftFacts({ people: [person], competentPersonId: 'ana', tasks: [taskFacts({ id: 'grind', kind: 'floor-grinding', assignments: [{ personId: 'ana', startMinute: 420, endMinute: 550 }] })] });
    const [task] = planOf(facts).tasks;
    expect(task?.state).toBe('may-not-start');
    expect(task?.heldBecause?.en).toContain('The people for it are not ready. Ask the lead.');
    expect(JSON.stringify(planOf(facts))).not.toMatch(/Ana|training of|fit test/);
  });

  it('keeps the order of the day', () => {
    const at = (id: string, startMinute: number) => taskFacts({ id, kind: 'clean-up', assignments: [{ personId: 'dov', startMinute, endMinute: startMinute + 30 }] });
    expect(planOf(shiftFacts({ tasks: [at('b', 600), at('a', 420)] })).tasks.map(({ span }) => span)).toEqual(['07:00–07:30', '10:00–10:30']);
  });
});
