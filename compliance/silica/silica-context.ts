import { type PersonFacts } from '../facts';
import { type TaskContext } from '../shift-context';
import { type SilicaDecision } from './decision';

/** A task with what the silica rule decided about it. */
export interface SilicaTask extends TaskContext {
  readonly silica: SilicaDecision;
}

export interface SilicaPerson extends SilicaTask {
  readonly person: PersonFacts;
}

/** Whether the work makes or moves respirable silica, decided or not. */
export function isSilicaWork({ silica }: SilicaTask): boolean {
  return silica.kind !== 'none';
}
