import { type ProtectionItem } from '../answer';
import { met, notApplicable } from '../rule';
import { type TaskContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { inside, listed, words } from '../words';

export interface ProtectedTask extends TaskContext {
  readonly protection: readonly ProtectionItem[];
}

/**
 * 1926.95(a), 1926.28(a): protective equipment is worn wherever hazards of the work or its materials ask it; (c): it fits the one who wears it.
 * Here: the items that sheets, task and place ask, as `ppe/protection.ts` found them, with the reason of each.
 */
export const protectionRule: ShiftRule<ProtectedTask> = {
  id: 'protection-for-task',
  title: words('Protection for the task', 'Protección para la tarea'),
  source: usFederal('1926.95', 'partly', { paragraph: '(a), (c); 1926.28', note: '(c), fitting each worker, read; the rest recalled.' }),
  duties: ['PPE-01', 'NOI-03'],
  topic: 'protection',
  holds: false,
  evaluate({ protection }) {
    if (protection.length === 0) return notApplicable(words('Nothing to wear for this.', 'Nada que ponerse para esto.'));
    return met(words(protection.map(({ name, reason }) => `${name.en}: ${reason.en}`).join(' '), protection.map(({ name, reason }) => `${name.es}: ${reason.es}`).join(' ')), {
      inputs: Object.fromEntries(protection.map(({ mark, name }) => [mark, name.en])),
      whatWouldChange: words('Other products, sheets or tools.', 'Otros productos, hojas o herramientas.'),
    });
  },
  line: ({ protection }) => words(`Wear ${listed(protection.map(({ name }) => inside(name).en)).en}.`, `Use ${listed(protection.map(({ name }) => inside(name).es)).es}.`),
};
