import { type IsoDate } from './iso-date';
import { type Outcome, type Words } from './outcome';
import { type Source } from './source';

/** Facts a verdict used, by plain name with unit, as shown under "why". */
export type Inputs = Readonly<Record<string, string | number | boolean | null>>;

interface VerdictBase {
  readonly reason: Words;
  readonly inputs: Inputs;
  /** What would turn the answer; null where nothing a person can do would. */
  readonly whatWouldChange: Words | null;
  /** The day by which something must be done, where the rule sets one. */
  readonly dueOn: IsoDate | null;
  /** Days, levels or amounts the rule computed, by plain name with unit. */
  readonly results: Inputs;
}

/** One rule's answer. An undecided one always names who must decide: the type does not allow otherwise. */
export type Verdict =
  | (VerdictBase & { readonly outcome: Exclude<Outcome, 'undecided'>; readonly whoDecides: null })
  | (VerdictBase & { readonly outcome: 'undecided'; readonly whoDecides: Words });

/**
 * A duty decided. `evaluate` is pure: the same facts and day give the same verdict in the browser, on the server and on the command line.
 * Impossible values throw an InputError naming the field; facts that do not settle the matter give `undecided`.
 */
export interface Rule<Facts> {
  /** Permanent, kebab-case; never reused for another meaning. */
  readonly id: string;
  readonly title: Words;
  readonly source: Source;
  /** Ids of the duties it serves, for example 'SIL-08'. */
  readonly duties: readonly string[];
  evaluate(facts: Facts, asOf: IsoDate): Verdict;
}

/** A rule whose facts are not known here, as a registry lists it. */
export type ListedRule = Rule<never>;

/** One tested example of a rule; every rule has some, each with its source. */
export interface RuleCase<Facts> {
  readonly name: string;
  readonly facts: Facts;
  readonly asOf: IsoDate;
  readonly expected: Outcome;
  readonly expectedDueOn?: IsoDate | null;
  readonly source: Source;
}

type VerdictExtra = Partial<Omit<VerdictBase, 'reason'>>;

function decided(outcome: Exclude<Outcome, 'undecided'>, reason: Words, extra: VerdictExtra): Verdict {
  return { outcome, reason, inputs: {}, whatWouldChange: null, dueOn: null, results: {}, whoDecides: null, ...extra };
}

export const met = (reason: Words, extra: VerdictExtra = {}): Verdict => decided('met', reason, extra);
export const unmet = (reason: Words, extra: VerdictExtra = {}): Verdict => decided('unmet', reason, extra);
export const notApplicable = (reason: Words, extra: VerdictExtra = {}): Verdict => decided('not-applicable', reason, extra);

export function undecided(reason: Words, whoDecides: Words, extra: VerdictExtra = {}): Verdict {
  return { outcome: 'undecided', reason, inputs: {}, whatWouldChange: null, dueOn: null, results: {}, whoDecides, ...extra };
}

/** Who settles what the facts leave open. */
export const WHO = {
  competentPerson: { en: 'the competent person', es: 'la persona competente' },
  safetyOfficer: { en: 'the safety officer', es: 'el responsable de seguridad' },
  hygienist: { en: 'an industrial hygienist', es: 'un higienista industrial' },
  clinician: { en: 'the licensed clinician', es: 'el médico o profesional de salud autorizado' },
  supplier: { en: 'the supplier of the product', es: 'el proveedor del producto' },
  maker: { en: 'the maker of the machine', es: 'el fabricante de la máquina' },
  localAuthority: { en: 'someone who knows the local code', es: 'alguien que conozca la norma local' },
} as const satisfies Record<string, Words>;
