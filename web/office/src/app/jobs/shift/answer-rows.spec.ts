import { describe, expect, it } from '@jest/globals';
import { type ShiftAnswer, type TaskAnswer } from '#compliance/answer';
import { type ShiftPlan } from '#shared/jobs';
import { orderedTasks, publishLabel } from './answer-rows';

const task = (taskId: string, state: TaskAnswer['state']) => ({ taskId, state }) as TaskAnswer;
const planned = (id: string, startMinute: number | null): ShiftPlan['tasks'][number] => ({
  id,
  kind: 'clean-up',
  assignments: startMinute === null ? [] : [{ personId: 'p', startMinute, endMinute: startMinute + 60 }],
  equipmentId: null,
  collectorId: null,
  dustMethod: null,
  kitId: null,
});

describe('answer rows', () => {
  it('puts what may not start first, then the undecided, then by start; a task without anybody comes last', () => {
    const answer = { tasks: [task('late', 'ready'), task('nobody', 'ready'), task('early', 'ready'), task('held', 'may-not-start'), task('open', 'not-decided')] } as unknown as ShiftAnswer;
    const plan: ShiftPlan = { competentPersonId: null, personIds: ['p'], kits: [], tasks: [planned('late', 700), planned('nobody', null), planned('early', 400), planned('held', 800), planned('open', 300)] };
    expect(orderedTasks(answer, plan).map(({ taskId }) => taskId)).toEqual(['held', 'open', 'early', 'late', 'nobody']);
  });

  it.each([
    [0, null, 'Publish'],
    [1, null, 'Publish with 1 task held'],
    [3, 1, 'Publish version 2 with 3 tasks held'],
    [0, 4, 'Publish version 5'],
  ])('says what publishing does: %s held after version %s is "%s"', (held, latest, label) => {
    expect(publishLabel(held, latest)).toBe(label);
  });
});
