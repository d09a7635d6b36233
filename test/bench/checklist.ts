import { answerShift, generateChecklist, renderChecklistText, type ShiftFacts } from '#compliance';
import { kitFacts, shiftFacts } from '#test/support/shift-facts';
import { median, type Bench } from './bench';

const BAR_MS = 5;
const RUNS_PER_ROUND = 100;

/** Six tasks and three kits. Facts are new objects for each run, as they are when they come from the wire. */
function sixTasks(): ShiftFacts {
  const base = shiftFacts();
  const kinds = ['floor-grinding', 'edge-grinding', 'shot-blasting', 'powder-mixing', 'spreading', 'clean-up'];
  return { ...base, tasks: base.tasks.filter(({ kind }) => kinds.includes(kind)), kits: ['quarrybond-40', 'primer', 'topcoat'].map((id) => kitFacts({ id })) };
}

/** From a shift's facts to both stored texts: what the server does at publishing, and the page at each drag. */
export const checklistBench: Bench = {
  name: 'checklist',
  run(rounds) {
    const times: number[] = [];
    for (let run = 0; run < rounds * RUNS_PER_ROUND; run += 1) {
      const facts = sixTasks();
      const start = performance.now();
      const checklist = generateChecklist(facts, answerShift(facts, '2026-12-03T12:00:00Z'));
      renderChecklistText(checklist, 'en');
      renderChecklistText(checklist, 'es');
      times.push(performance.now() - start);
    }
    const ours = median(times);
    return Promise.resolve({ name: 'checklist', ours, reference: null, ratio: null, unit: 'ms', bar: BAR_MS, ok: ours < BAR_MS });
  },
};
