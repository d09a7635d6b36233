import { describe, expect, it } from '@jest/globals';
import { answerShift, checklistText, generateChecklist } from '#compliance';
import { assembleFacts } from '#shared/jobs';
import { shiftFixture, shiftIds } from '../shift/shift-fixture';
import { paperGroups } from './paper-groups';

/** The fixture's day with a second task, so that two tasks ask some of the same. */
function text() {
  const shift = shiftFixture();
  const [grinding] = shift.plan.tasks;
  if (!grinding) throw new Error('The fixture has lost its task.');
  const cleanUp = { ...grinding, id: '0190a0a0-0000-7000-8000-000000000099', kind: 'clean-up' as const, assignments: [{ personId: shiftIds.dov, startMinute: 540, endMinute: 560 }], equipmentId: null, collectorId: null, dustMethod: null };
  const facts = assembleFacts({ ...shift, plan: { ...shift.plan, tasks: [grinding, cleanUp] } });
  return checklistText(generateChecklist(facts, answerShift(facts)), 'en');
}

describe('the list on paper', () => {
  it('asks of controls before it asks of protection (rule of conduct 1)', () => {
    const { controls, protection } = paperGroups(text());
    expect(controls.length).toBeGreaterThan(0);
    expect(protection.length).toBeGreaterThan(0);
    expect(controls.every(({ mark }) => mark === null)).toBe(true);
    expect(protection.every(({ mark }) => mark !== null)).toBe(true);
  });

  it('leaves out no line of the text and asks what tasks share once, with the names of all', () => {
    const list = text();
    const { morning, controls, protection } = paperGroups(list);
    expect(morning.map((row) => row.text)).toEqual(list.morning.map((line) => line.text));
    const rows = [...controls, ...protection];
    for (const task of list.tasks) for (const line of task.live) expect(rows.find((row) => row.text === line.text && row.source === line.source)?.taskNames).toContain(task.name);
    const shared = { ...list, tasks: list.tasks.map((task) => ({ ...task, live: list.tasks.flatMap(({ live }) => live) })) };
    const merged = paperGroups(shared);
    expect([...merged.controls, ...merged.protection]).toHaveLength(rows.length);
    expect(merged.controls[0]?.taskNames).toEqual(list.tasks.map(({ name }) => name));
  });
});
