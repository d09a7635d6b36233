import { type TaskAnswer } from './answer';
import { type Finding, type Words } from './outcome';
import { countKits } from './quantities/kit-rules';
import { apfName } from './silica/respirator';
import { type SilicaTask } from './silica/silica-context';
import { table1Place } from './silica/table1';
import { sentences, words } from './words';

/** State, label and summary of a task as its row shows them. */
export function describeTask(context: SilicaTask, findings: readonly Finding[], held: { readonly isHeld: boolean; readonly isShiftHeld: boolean }): Pick<TaskAnswer, 'state' | 'label' | 'summary'> {
  const { silica } = context;
  if (!held.isHeld) return { state: 'ready', label: readyLabel(context), summary: readySummary(context, findings) };
  const holding = findings.filter(({ isHolding }) => isHolding);
  const isScopeOnly = silica.kind === 'undecided' && silica.question === 'scope' && !held.isShiftHeld && holding.every(({ ruleId }) => ruleId === 'silica-signed-basis');
  if (isScopeOnly) return { state: 'not-decided', label: words('Not decided', 'Sin decidir'), summary: scopeSummary(context, findings) };
  const unique = [...new Map(holding.map(({ reason }) => [reason.en, reason])).values()];
  const reasons = unique.filter(({ en }, index) => !unique.slice(0, index).some((earlier) => earlier.en.includes(en)));
  const shiftHold = held.isShiftHeld ? words('The whole shift is held.', 'Todo el turno está detenido.') : null;
  const outside = silica.kind === 'undecided' && silica.question === 'assessment' ? words('Not a Table 1 task.', 'No es tarea de la Tabla 1.') : null;
  return { state: 'may-not-start', label: words('May not start', 'No puede empezar'), summary: sentences(shiftHold, ...reasons.slice(0, 2), outside) };
}

function readyLabel({ silica }: SilicaTask): Words {
  if (silica.kind === 'table-1') return words(`Table 1, ${silica.option.row}`, `Tabla 1, ${silica.option.row}`);
  if (silica.kind === 'basis' && silica.decision.kind === 'sampling-day') return words('Sampling day', 'Día de muestreo');
  if (silica.kind === 'basis') return words('Basis signed', 'Base firmada');
  return words('Ready', 'Listo');
}

function textsOf(findings: readonly Finding[], ...ruleIds: readonly string[]): readonly Words[] {
  return ruleIds.flatMap((ruleId) => findings.filter((finding) => finding.ruleId === ruleId).map(({ text }) => text));
}

function readySummary(context: SilicaTask, findings: readonly Finding[]): Words {
  const { silica } = context;
  if (silica.kind === 'table-1') {
    const airflow = findings.filter(({ id }) => id.includes('/airflow-')).map(({ text }) => text);
    const hepa = findings.filter(({ id }) => id.includes('/hepa-')).map(({ text }) => text);
    return sentences(...airflow, ...hepa, ...textsOf(findings, 'silica-water-flow', 'silica-exhaust-indoors'), over4Hours(context));
  }
  const basis = silica.kind === 'basis' ? textsOf(findings, 'silica-signed-basis') : [];
  const controls = textsOf(findings, 'powder-dust-at-bucket', 'shot-blasting-safeguards', 'flammable-vapor-and-sparks', 'silica-housekeeping');
  const vapor = textsOf(findings, 'vapor-apart-from-dust');
  const lines = [...basis, ...dumps(context), ...controls.slice(0, 2), ...vapor];
  return lines.length > 0 ? sentences(...lines) : words('Nothing else to settle.', 'Nada más que aclarar.');
}

function over4Hours({ silica, facts, pack }: SilicaTask): Words | null {
  if (silica.kind !== 'table-1') return null;
  const respirator = silica.option[table1Place(facts.setting)];
  if (respirator === null || respirator.over4Hours === null || respirator.over4Hours === respirator.upTo4Hours) return null;
  const name = apfName(respirator.over4Hours, pack.silica?.factors ?? null);
  return words(`Over 4 h in all Table 1 work: ${name.en}.`, `Más de 4 h en todo lo de la Tabla 1: ${name.es}.`);
}

function dumps(context: SilicaTask): readonly Words[] {
  if (context.task.kind !== 'powder-mixing' || context.kit === null) return [];
  const count = countKits(context, context.kit);
  return count === null ? [] : [words(`${count.powderDumps} dumps.`, `${count.powderDumps} vaciadas.`)];
}

function scopeSummary(context: SilicaTask, findings: readonly Finding[]): Words {
  const parts = context.kitHazards?.isocyanateParts ?? [];
  const letters = parts.map(({ part }) => part).join(', ');
  const vapor = parts.length === 0 ? null : words(`Part ${letters} vapor decided apart.`, `Vapor de la parte ${letters}: se decide aparte.`);
  return sentences(...dumps(context), ...textsOf(findings, 'powder-dust-at-bucket'), words('Does the silica rule apply?', '¿Aplica la regla de sílice?'), vapor);
}
