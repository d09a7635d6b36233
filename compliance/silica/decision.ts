import { type ExposureBasis, type TaskKind } from '../facts';
import { type TaskContext } from '../shift-context';
import { decideByBasis, endedBasis, type BasisDecision, type BasisFault } from './basis';
import { type SilicaLaw } from './shift-pack';
import { selectTable1, table1Place } from './table1';
import { checkControls, type ControlCheck } from './table1-controls';
import { type Table1Method, type Table1Option } from './table1.data';
import { table1Tool } from './table1-tool';

export type UsableBasis = Exclude<BasisDecision, { kind: 'unusable' }>;

/** How the silica rule meets one task today. Everything but `table-1`, `basis`, `incidental`, `housekeeping` and `none` holds the task. */
export type SilicaDecision =
  | { readonly kind: 'none' }
  | { readonly kind: 'housekeeping' }
  | { readonly kind: 'incidental'; readonly to: TaskKind }
  | { readonly kind: 'table-1'; readonly option: Table1Option; readonly checks: readonly ControlCheck[] }
  | { readonly kind: 'basis'; readonly decision: UsableBasis; readonly leftTable1: LeftTable1 | null }
  | { readonly kind: 'no-pack' }
  | { readonly kind: 'control-failed'; readonly control: string }
  | { readonly kind: 'not-chosen'; readonly missing: 'machine' | 'dust-method' }
  | { readonly kind: 'controls-unknown'; readonly option: Table1Option; readonly checks: readonly ControlCheck[] }
  | { readonly kind: 'lost'; readonly left: LeftTable1; readonly undecided: Undecided }
  | { readonly kind: 'undecided'; readonly question: 'scope' | 'assessment'; readonly undecided: Undecided };

/** Why a task of Table 1 is not in Table 1 today. */
export interface LeftTable1 {
  readonly because: 'machine' | 'method' | 'place' | 'controls' | 'not-compared';
  readonly row: string | null;
  readonly checks: readonly ControlCheck[];
}

/** What is known about the missing basis. */
export interface Undecided {
  readonly fault: BasisFault | null;
  readonly unusable: ExposureBasis | null;
  readonly ended: ExposureBasis | null;
}

/** Decides a task that does not hang on another task; `incidental` work gets its answer from `decideIncidental`. */
export function decideSilica(context: TaskContext): SilicaDecision {
  const { task, traits, pack } = context;
  if (traits.silica === 'none') return task.failedControl === null ? { kind: 'none' } : { kind: 'control-failed', control: task.failedControl };
  if (task.failedControl !== null) return { kind: 'control-failed', control: task.failedControl };
  if (pack.silica === null) return { kind: 'no-pack' };
  // The housekeeping paragraph is US text: under another law sweeping up is silica work like any other.
  if (traits.silica === 'housekeeping' && pack.federalText !== 'foreign') return { kind: 'housekeeping' };
  if (traits.silica === 'table-1' && pack.silica.table1Rows.length > 0) return decideTable1(context, pack.silica);
  return byBasis(context, pack.silica, [task.kind], traits.silica === 'table-1' || traits.silica === 'assessed' ? 'assessment' : 'scope');
}

function byBasis(context: TaskContext, law: SilicaLaw, kinds: readonly TaskKind[], question: 'scope' | 'assessment'): SilicaDecision {
  const found = searchBasis(context, law, kinds);
  return 'decision' in found ? { kind: 'basis', decision: found.decision, leftTable1: null } : { kind: 'undecided', question, undecided: found };
}

function searchBasis({ facts }: TaskContext, law: SilicaLaw, kinds: readonly TaskKind[]): { readonly decision: UsableBasis } | Undecided {
  const decision = decideByBasis(facts.bases, kinds, facts.date, law);
  if (decision !== null && decision.kind !== 'unusable') return { decision };
  return { fault: decision?.fault ?? null, unusable: decision?.basis ?? null, ended: endedBasis(facts.bases, kinds, facts.date) };
}

function decideTable1(context: TaskContext, law: SilicaLaw): SilicaDecision {
  const { task, tool, collector, facts } = context;
  if (tool === null) return { kind: 'not-chosen', missing: 'machine' };
  if (task.dustMethod === null) return { kind: 'not-chosen', missing: 'dust-method' };
  const left = (because: LeftTable1['because'], row: string | null, checks: readonly ControlCheck[] = []): SilicaDecision => leave(context, law, { because, row, checks });
  const heading = table1Tool(task.kind, tool);
  if (heading === null) return left('machine', null);
  if (task.dustMethod === 'none') return left('method', null);
  const method: Table1Method = task.dustMethod;
  const place = table1Place(facts.setting);
  const selection = selectTable1({ tool: heading, method, place });
  if (!selection.isCovered) return left(selection.because, selection.row);
  const option = selection.options[0]!;
  if (law.table1Rows !== 'all' && !law.table1Rows.includes(option.row)) return left('not-compared', option.row);
  const checks = checkControls({ option, place, tool, collector, equipment: facts.equipment });
  if (checks.some(({ state }) => state === 'unmet')) return left('controls', option.row, checks);
  if (checks.some(({ state }) => state === 'unknown')) return { kind: 'controls-unknown', option, checks };
  return { kind: 'table-1', option, checks };
}

function leave(context: TaskContext, law: SilicaLaw, left: LeftTable1): SilicaDecision {
  const found = searchBasis(context, law, [context.task.kind]);
  return 'decision' in found ? { kind: 'basis', decision: found.decision, leftTable1: left } : { kind: 'lost', left, undecided: found };
}

/** Table 1 work whose collector is emptied, and blasting whose shot is picked up: the dusty minutes between tasks hang on them. */
export function decideIncidental(context: TaskContext, others: readonly { readonly kind: TaskKind; readonly decision: SilicaDecision }[]): SilicaDecision {
  const { task, pack } = context;
  if (task.failedControl !== null) return { kind: 'control-failed', control: task.failedControl };
  if (pack.silica === null) return { kind: 'no-pack' };
  const own = byBasis(context, pack.silica, [task.kind], 'assessment');
  if (own.kind === 'basis') return own;
  if (task.kind === 'collector-emptying') {
    const host = others.find(({ decision }) => decision.kind === 'table-1' && decision.option.method === 'vacuum');
    if (host !== undefined) return { kind: 'incidental', to: host.kind };
  }
  const blasting = byBasis(context, pack.silica, [task.kind, 'shot-blasting'], 'assessment');
  return blasting.kind === 'basis' ? blasting : own;
}
