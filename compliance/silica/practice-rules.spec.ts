import { describe, expect, it } from '@jest/globals';
import { basisFacts, equipmentFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { type Finding } from '../outcome';
import { answerShift } from '../answer-shift';
import { type ShiftFacts, type TaskFacts, type TaskKind } from '../facts';

function find(kind: TaskKind, ruleId: string, task: Partial<TaskFacts> = {}, shift: Partial<ShiftFacts> = {}): Finding | undefined {
  const facts = shiftFacts({ tasks: [taskFacts({ kind, assignments: [{ personId: 'abe', startMinute: 400, endMinute: 500 }], ...task })], ...shift });
  return answerShift(facts, '2026-12-03T12:00:00Z').tasks[0]!.findings.find((finding) => finding.ruleId === ruleId);
}

describe('how the work is done', () => {
  it('[SIL-13] blasting keeps its dust in; its shot is picked up by magnet and vacuum (1926.57(f), parallel text)', () => {
    expect(find('shot-blasting', 'shot-blasting-safeguards')?.text.en).toBe('Seals whole, collector on before the wheel, and on after it stops.');
    expect(find('shot-pick-up', 'shot-blasting-safeguards')?.text.en).toBe('Shot and dust picked up by magnet and vacuum.');
    expect(find('floor-grinding', 'shot-blasting-safeguards')).toBeUndefined();
  });

  it('[SIL-13] blasting stays held by the silica rule although its safeguards stand (trap 24)', () => {
    expect(find('shot-blasting', 'silica-signed-basis')).toMatchObject({ isHolding: true });
  });

  it.each<[TaskKind, boolean]>([['floor-grinding', true], ['clean-up', true], ['slurry-handling', true], ['spreading', false], ['break', false]])('[SIL-15] %s: no dry sweeping, no blown air: %s', (kind, isSaid) => {
    expect(find(kind, 'silica-housekeeping') !== undefined).toBe(isSaid);
  });

  it.each<[TaskKind, boolean]>([['floor-grinding', true], ['powder-mixing', true], ['clean-up', false], ['spreading', false]])('[GATE-07] %s keeps others out of the dust: %s', (kind, isSaid) => {
    expect(find(kind, 'silica-access') !== undefined).toBe(isSaid);
  });

  it('[SIL-05] water runs full where the row is the water row', () => {
    const tool = { equipment: [equipmentFacts({ hasWaterFeed: true })] };
    expect(find('floor-grinding', 'silica-water-flow', { equipmentId: 'grinder', dustMethod: 'water' }, tool)?.text.en).toBe('Water on full. No dust you can see.');
    expect(find('floor-grinding', 'silica-water-flow', { equipmentId: 'grinder', collectorId: 'collector', dustMethod: 'vacuum' })).toBeUndefined();
  });

  it('[SIL-12] powder: extraction at the bucket is on the list, or its absence is said', () => {
    expect(find('powder-mixing', 'powder-dust-at-bucket')).toMatchObject({ outcome: 'met' });
    expect(find('powder-mixing', 'powder-dust-at-bucket', {}, { equipment: [equipmentFacts()] })).toMatchObject({ outcome: 'unmet', isHolding: false, text: { en: 'No extraction at the bucket. Cut bags low and fold them in.' } });
  });

  it('[SIL-08] a sampling day says that samples are taken', () => {
    const day = { bases: [basisFacts({ kind: 'sampling-day', exposureMicrogramsPerM3: null, interimApf: 10, endsOn: '2026-12-03' })] };
    expect(find('shot-blasting', 'silica-sampling-day', {}, day)?.text.en).toBe('Air pump on and running before the work starts.');
    expect(find('shot-blasting', 'silica-sampling-day', {}, { bases: [basisFacts()] })).toBeUndefined();
  });

  it.each([[0], [-10], [Number.NaN]])('a sampling day with a factor of %d names no respirator: held', (interimApf) => {
    expect(find('shot-blasting', 'silica-signed-basis', {}, { bases: [basisFacts({ kind: 'sampling-day', exposureMicrogramsPerM3: null, interimApf, endsOn: '2026-12-03' })] })).toMatchObject({ outcome: 'undecided', isHolding: true });
  });

  it('an exposure of nothing is below the action level; a negative one settles nothing', () => {
    const below = (exposureMicrogramsPerM3: number) => find('shot-blasting', 'silica-signed-basis', {}, { bases: [basisFacts({ kind: 'below-action-level', exposureMicrogramsPerM3 })] });
    expect(below(0)).toMatchObject({ outcome: 'met' });
    expect(below(-1)).toMatchObject({ outcome: 'undecided' });
  });

  it('counts the bases on file for the work that waits', () => {
    expect(find('shot-blasting', 'silica-signed-basis', {}, { bases: [basisFacts({ endsOn: '2026-11-30' }), basisFacts({ id: 'other', taskKind: 'drilling' })] })?.inputs).toMatchObject({ 'bases on file for this task': 1 });
  });
});
