import { type EquipmentFacts } from '../facts';
import { met, notApplicable, unmet } from '../rule';
import { type TaskContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { listed, words } from '../words';

/** (c)(1) Table 1: tools and dust controls are run by the maker's instructions; 1926.300 to .303: guards and safe tools. Here: the maker's manual of each machine and collector of the task is on file. */
export const manualRule: ShiftRule<TaskContext> = {
  id: 'machine-manual-on-file',
  title: words('The maker\'s manual on file', 'El manual del fabricante a la mano'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(c)(1) Table 1; 1926.300, .302, .303', note: 'Table 1 rows ask use by the maker\'s manual; the tool sections recalled.' }),
  duties: ['GATE-04'],
  topic: 'gate',
  holds: true,
  evaluate({ tool, collector }) {
    const machines = [tool, collector].filter((machine): machine is EquipmentFacts => machine !== null);
    if (machines.length === 0) return notApplicable(words('No machine in this task.', 'Sin máquina en esta tarea.'));
    const missing = machines.filter(({ hasManualOnFile }) => !hasManualOnFile).map(({ name }) => name);
    const inputs = { machines: machines.map(({ name }) => name).join(', '), 'without a manual on file': missing.join(', ') || null };
    const names = listed(missing);
    return missing.length === 0
      ? met(words('The manual opens in one tap.', 'El manual se abre con un toque.'), { inputs })
      : unmet(words(`No manual on file: ${names.en}.`, `Sin manual: ${names.es}.`), { inputs, whatWouldChange: words('Put the manual on file.', 'Guarde el manual.') });
  },
  line: ({ traits }, { outcome }) =>
    outcome === 'met' ? words('Check guard, cord and ground-fault plug. Unplug before touching the tool.', 'Revise guarda, cable y enchufe GFCI. Desconecte antes de tocar.') : words(`${traits.name.en} may not start: no manual on file.`, `${traits.name.es}: no puede empezar, falta el manual.`),
};
