import { type Outcome } from '../outcome';
import { type Rule, type RuleCase, type Verdict } from '../rule';
import { type Source } from '../source';

/** The tested examples of one rule, ready to run without knowing its facts. */
export interface RuleCases {
  readonly ruleId: string;
  readonly duties: readonly string[];
  readonly cases: readonly { readonly name: string; readonly expected: Outcome; readonly expectedDueOn: string | null | undefined; readonly source: Source; readonly facts: unknown; run(): Verdict }[];
}

export function casesOf<Facts>(rule: Rule<Facts>, cases: readonly RuleCase<Facts>[]): RuleCases {
  return {
    ruleId: rule.id,
    duties: rule.duties,
    cases: cases.map(({ name, expected, expectedDueOn, source, facts, asOf }) => ({ name, expected, expectedDueOn, source, facts, run: () => rule.evaluate(facts, asOf) })),
  };
}
