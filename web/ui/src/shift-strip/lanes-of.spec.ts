import { describe, expect, it } from '@jest/globals';
import { type ShiftAnswer, type TaskAnswer } from '#compliance/answer';
import { type PersonFacts, type TaskFacts } from '#compliance/facts';
import { lanesOf } from './lanes-of';

const person: PersonFacts = {
  id: 'marisol',
  name: 'Marisol Tena',
  language: 'es',
  isLead: false,
  employer: null,
  isAdultConfirmed: true,
  isKeptFromIsocyanates: false,
  silicaTrainedOn: null,
  hazcomTrainedOn: null,
  respirators: [],
  elsewhere: [{ jobName: 'Freight shed', kind: 'floor-grinding', startMinute: 420, endMinute: 480 }],
};
const task: TaskFacts = {
  id: 'mix',
  kind: 'powder-mixing',
  assignments: [
    { personId: 'somebody else', startMinute: 500, endMinute: 520 },
    { personId: 'marisol', startMinute: 756, endMinute: 846 },
  ],
  equipmentId: null,
  collectorId: null,
  dustMethod: null,
  kitId: null,
  failedControl: null,
};
const answer: Pick<ShiftAnswer, 'tasks' | 'people'> = {
  tasks: [{ taskId: 'mix', name: { en: 'Powder mixing', es: 'Mezclar polvo' }, state: 'may-not-start' } as TaskAnswer],
  people: [{ personId: 'marisol', table1Minutes: 105, table1MinutesElsewhere: 60, maskRuleChangesAtMinute: null, doubleBookings: [{ startMinute: 760, endMinute: 800, with: 'Spreading' }], respirators: [], findings: [] }],
};

describe('lanes from facts and answer', () => {
  it('give each person the own assignments and the work at other jobs, with the state in words', () => {
    const [lane] = lanesOf({ people: [person], tasks: [task] }, answer);
    expect(lane?.blocks).toEqual([
      { id: 'mix/1', taskId: 'mix', label: 'Powder mixing', pattern: 'mixing', startMinute: 756, endMinute: 846, heldWords: 'may not start', isElsewhere: false },
      { id: 'elsewhere/marisol/0', taskId: '', label: 'Freight shed', pattern: 'grinding', startMinute: 420, endMinute: 480, heldWords: null, isElsewhere: true },
    ]);
    expect(lane).toMatchObject({ note: 'Español', alert: 'listed twice from 12:40', table1Minutes: 105 });
  });

  it('speak Spanish to those who read Spanish', () => {
    const [lane] = lanesOf({ people: [person], tasks: [task] }, answer, 'es');
    expect(lane?.blocks[0]).toMatchObject({ label: 'Mezclar polvo', heldWords: 'no puede empezar' });
    expect(lane).toMatchObject({ note: '', alert: 'anotado dos veces desde las 12:40' });
  });
});
