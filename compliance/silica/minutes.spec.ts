import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { personFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { doubleBookings, isPossible, merge, minuteOfPassing, table1Time, totalMinutes } from './minutes';

const span = (startMinute: number, endMinute: number) => ({ startMinute, endMinute });

describe('[SIL-04] Table 1 minutes of a person ((c)(3); overlapping time counts once: judgement)', () => {
  it.each([
    [[], 0],
    [[span(0, 60), span(60, 90)], 90],
    [[span(0, 60), span(30, 90)], 90],
    [[span(0, 240), span(60, 120)], 240],
    [[span(1380, 1500)], 120],
    [[span(90, 30)], 0],
  ])('%j is %d minutes', (spans, minutes) => {
    expect(totalMinutes(spans)).toBe(minutes);
  });

  it.each([
    // Exactly four hours never passes (trap 3).
    [[span(0, 240)], null],
    [[span(0, 241)], 240],
    [[span(0, 120), span(300, 420)], null],
    [[span(0, 120), span(300, 421)], 420],
    [[span(0, 120), span(60, 200), span(300, 400)], 340],
    [[span(300, 400), span(0, 200)], 340],
  ])('%j passes four hours at %s', (spans, minute) => {
    expect(minuteOfPassing(spans)).toBe(minute);
  });

  it('merges without gaining or losing a minute, in any order', () => {
    const anySpan = fc.tuple(fc.integer({ min: 0, max: 1000 }), fc.integer({ min: 0, max: 300 })).map(([start, length]) => span(start, start + length));
    fc.assert(
      fc.property(fc.array(anySpan, { maxLength: 8 }), (spans) => {
        const minutes = new Set(spans.flatMap(({ startMinute, endMinute }) => Array.from({ length: endMinute - startMinute }, (_, i) => startMinute + i)));
        expect(totalMinutes(spans)).toBe(minutes.size);
        expect(merge([...spans].reverse())).toEqual(merge(spans));
      }),
    );
  });

  it('adds other jobs and leaves out work that is not in Table 1', () => {
    const person = personFacts({ elsewhere: [{ jobName: 'Freight shed', kind: 'edge-grinding', ...span(0, 100) }, { jobName: 'Freight shed', kind: 'spreading', ...span(100, 200) }] });
    const facts = shiftFacts({
      people: [person],
      tasks: [taskFacts({ kind: 'floor-grinding', assignments: [{ personId: 'dov', ...span(300, 441) }, { personId: 'other', ...span(0, 900) }] }), taskFacts({ kind: 'shot-blasting', assignments: [{ personId: 'dov', ...span(500, 700) }] })],
    });
    expect(table1Time(facts, person)).toEqual({ minutes: 241, minutesLoggedBeyondPlan: 0, minutesElsewhere: 100, passesAtMinute: 440 });
  });

  it('notices two places at once, here and on another job, but not a break beside work', () => {
    const person = personFacts({ elsewhere: [{ jobName: 'Freight shed', kind: 'clean-up', ...span(400, 500) }] });
    const facts = shiftFacts({ people: [person], tasks: [taskFacts({ kind: 'spreading', assignments: [{ personId: 'dov', ...span(450, 520) }] }), taskFacts({ kind: 'break', assignments: [{ personId: 'dov', ...span(450, 480) }] })] });
    expect(doubleBookings(facts, person)).toEqual([{ ...span(450, 500), with: 'Freight shed' }]);
    expect(doubleBookings(shiftFacts(), personFacts())).toEqual([]);
  });

  it.each([[span(Number.NaN, 1)], [span(0, 2881)], [span(0, 1441)], [span(-1441, 0)], [span(5, 4)]])('%j cannot be', (times) => {
    expect(isPossible(times)).toBe(false);
  });
});
