import { type IsoDate } from './iso-date';
import { type Finding, type Topic, type Words } from './outcome';
import { type Rule, type Verdict } from './rule';
import { findingInPlace } from './jurisdictions/law-of-place';
import { type ShiftPack } from './silica/shift-pack';
import { type Source } from './source';

/** A rule that speaks one line of the shift: what it tells the crew, where the line stands, and whether it holds work. */
export interface ShiftRule<Facts> extends Rule<Facts> {
  readonly topic: Topic;
  /** Whether `unmet` and `undecided` keep the task (or the shift) from starting. */
  readonly holds: boolean;
  /** The line as a crew reads it. */
  line(facts: Facts, verdict: Verdict): Words;
  /** A nearer source than the rule's own, for example the Table 1 row. */
  sourceOf?(facts: Facts, verdict: Verdict): Source;
}

export interface FindingPlace {
  readonly pack: ShiftPack;
  readonly day: IsoDate;
  readonly taskId?: string;
  readonly personId?: string;
  /** Tells two findings of one rule about one task apart. */
  readonly about?: string;
}

/** Asks the rule and writes its answer as a line of the shift, as the law of the place lets it stand; null where the rule does not apply. */
export function ask<Facts>(rule: ShiftRule<Facts>, facts: Facts, place: FindingPlace): Finding | null {
  const verdict = rule.evaluate(facts, place.day);
  if (verdict.outcome === 'not-applicable') return null;
  const finding: Finding = {
    id: [rule.id, place.taskId, place.personId, place.about].filter((part) => part !== undefined).join('/'),
    ruleId: rule.id,
    topic: rule.topic,
    taskId: place.taskId ?? null,
    personId: place.personId ?? null,
    outcome: verdict.outcome,
    isHolding: rule.holds && verdict.outcome !== 'met',
    text: rule.line(facts, verdict),
    reason: verdict.reason,
    inputs: { ...verdict.inputs, ...verdict.results },
    whatWouldChange: verdict.whatWouldChange,
    whoDecides: verdict.whoDecides,
    source: rule.sourceOf?.(facts, verdict) ?? rule.source,
    packVersion: place.pack.version,
  };
  return findingInPlace(place.pack, finding, rule.holds);
}

/** Leaves out what did not apply. */
export function present<T>(items: readonly (T | null)[]): readonly T[] {
  return items.filter((item) => item !== null);
}
