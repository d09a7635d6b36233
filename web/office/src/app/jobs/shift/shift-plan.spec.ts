import { describe, expect, it } from '@jest/globals';
import { type ShiftPlan } from '#shared/jobs';
import { planDifferences } from './plan-differences';
import { addPerson, minuteFrom, moveAssignment, newTask, putTask, removeKit, removePerson, timeText } from './shift-plan';

const empty: ShiftPlan = { competentPersonId: null, personIds: [], tasks: [], kits: [] };
const withTask = (): ShiftPlan => {
  const plan = addPerson(addPerson(empty, 'dov'), 'marisol');
  return putTask(plan, { ...newTask(plan, 't1', 'powder-mixing'), kitId: 'kit', assignments: [{ personId: 'dov', startMinute: 420, endMinute: 480 }] });
};

describe('edits of a day', () => {
  it('names the first person competent person and keeps it so', () => {
    expect(withTask().competentPersonId).toBe('dov');
  });

  it('brings a kit onto the shift with the task that uses it, and takes it out of the task when it leaves', () => {
    expect(withTask().kits).toEqual([{ kitId: 'kit', count: null }]);
    expect(removeKit(withTask(), 'kit').tasks[0]?.kitId).toBeNull();
  });

  it('takes a person off with everything they were to do, lead included', () => {
    const plan = removePerson(withTask(), 'dov');
    expect(plan).toMatchObject({ personIds: ['marisol'], competentPersonId: null });
    expect(plan.tasks[0]?.assignments).toEqual([]);
  });

  it('never lets an end come before its start, as the contract refuses it', () => {
    expect(moveAssignment(withTask(), 't1', 0, 500, 400).tasks[0]?.assignments[0]).toEqual({ personId: 'dov', startMinute: 500, endMinute: 505 });
  });

  it('does not change the plan it was given', () => {
    const plan = withTask();
    const before = JSON.stringify(plan);
    moveAssignment(plan, 't1', 0, 0, 60);
    removePerson(plan, 'dov');
    expect(JSON.stringify(plan)).toBe(before);
  });

  it('reads clock times; an end at or before the start is the next day', () => {
    expect(minuteFrom('07:05')).toBe(425);
    expect(minuteFrom('02:00', 1320)).toBe(1560);
    expect(minuteFrom('noon')).toBeNull();
    expect(timeText(1500)).toBe('01:00');
  });
});

describe('two plans of one day', () => {
  const nameOf = (id: string) => ({ dov: 'Dov', marisol: 'Marisol', kit: 'Quarrybond 40' })[id] ?? id;

  it('are told apart in words: who, when, with what', () => {
    const mine = moveAssignment(withTask(), 't1', 0, 420, 540);
    const theirs = removePerson(withTask(), 'marisol');
    expect(planDifferences(mine, theirs, nameOf)).toEqual([
      { path: 'People', mine: 'Dov, Marisol', theirs: 'Dov' },
      { path: 'Powder mixing', mine: 'Dov 07:00 to 09:00, Quarrybond 40', theirs: 'Dov 07:00 to 08:00, Quarrybond 40' },
    ]);
  });

  it('that are the same say nothing', () => {
    expect(planDifferences(withTask(), withTask(), nameOf)).toEqual([]);
  });
});
