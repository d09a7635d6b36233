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
    [[span(0, 240)], null],
    [[span(0, 241)], 240],
    [[span(0, 120), span(300, 420)], null],
    [[span(0, 120), span(300, 421)], 420],
    [[span(0, 120), span(60, 200), span(300, 400)], 340],
    [[span(300, 400), span(0, 200)], 340],
  ])('%j passes four hours at %s; exactly four hours never does (trap 3)', (spans, minute) => {
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

describe('[SIL-04] planned and logged time together, to the stricter side (trap 4; OSHA staff answers: nobody is asked for a stopwatch)', () => {
  const day = (planned: [number, number], ...logged: [number, number][]) => {
    const person = personFacts();
    const at = ([startMinute, endMinute]: [number, number]) => ({ personId: person.id, startMinute, endMinute });
    return table1Time(shiftFacts({ people: [person], tasks: [taskFacts({ kind: 'edge-grinding', assignments: [at(planned)], logged: logged.map(at) })] }), person);
  };

  it.each<[string, [number, number], [number, number][], number, number]>([
    ['nothing logged: the plan', [420, 660], [], 240, 0],
    ['a log that ends early takes nothing off', [420, 660], [[420, 600]], 240, 0],
    ['a log that runs on adds its part', [420, 660], [[420, 661]], 241, 1],
    ['a log outside the plan adds all of it', [420, 600], [[700, 760]], 240, 60],
    ['two logs that overlap count once', [420, 420], [[420, 480], [450, 500]], 80, 80],
    ['a begun minute counts whole', [420, 660], [[659.5, 660.2]], 241, 1],
    ['a begun minute of the plan counts whole too', [420, 660.1], [], 241, 0],
  ])('%s', (_name, planned, logged, minutes, beyond) => {
    expect(day(planned, ...logged)).toMatchObject({ minutes, minutesLoggedBeyondPlan: beyond, passesAtMinute: minutes > 240 ? 660 : null });
  });

  it('nothing logged ever lowers the sum, and neither half alone is above it', () => {
    const span = fc.tuple(fc.double({ min: 0, max: 1200, noNaN: true }), fc.double({ min: 0, max: 300, noNaN: true })).map(([start, length]): [number, number] => [start, start + length]);
    fc.assert(
      fc.property(span, fc.array(span, { maxLength: 4 }), (planned, logged) => {
        const both = day(planned, ...logged).minutes;
        expect(both).toBeGreaterThanOrEqual(day(planned).minutes);
        expect(both).toBeGreaterThanOrEqual(day([0, 0], ...logged).minutes);
      }),
    );
  });

  it('leaves out what another person logged, and a log that cannot be', () => {
    const person = personFacts();
    const task = taskFacts({ kind: 'edge-grinding', assignments: [{ personId: 'dov', startMinute: 420, endMinute: 480 }], logged: [{ personId: 'marisol', startMinute: 480, endMinute: 700 }, { personId: 'dov', startMinute: 600, endMinute: 500 }] });
    expect(table1Time(shiftFacts({ people: [person], tasks: [task] }), person)).toMatchObject({ minutes: 60, minutesLoggedBeyondPlan: 0 });
  });
});
