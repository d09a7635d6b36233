import { type Source } from './source';

/** What a rule says. `undecided` means: the facts do not settle it, a named kind of person must, and the task is held until then. */
export type Outcome = 'met' | 'unmet' | 'not-applicable' | 'undecided';

export const languages = ['en', 'es'] as const;
/** Languages a checklist is published in. BCP 47. */
export type Language = (typeof languages)[number];

/** One sentence in every language crews read. */
export type Words = Readonly<Record<Language, string>>;

/** Order on screen and paper: controls before protection, always. */
export const topics = ['gate', 'control', 'access', 'housekeeping', 'people', 'protection'] as const;
export type Topic = (typeof topics)[number];

/** One computed line: what to do, why, from which rule and source, and what would change it. */
export interface Finding {
  /** Stable within a shift: rule id, then the task or person it is about. */
  readonly id: string;
  readonly ruleId: string;
  readonly topic: Topic;
  readonly taskId: string | null;
  readonly personId: string | null;
  readonly outcome: Outcome;
  /** Whether this line keeps its task (or, without a task, the whole shift) from starting. */
  readonly isHolding: boolean;
  /** The line itself, as a crew reads it. */
  readonly text: Words;
  readonly reason: Words;
  /** Facts used, by plain name with unit, as shown under "why". */
  readonly inputs: Readonly<Record<string, string | number | boolean | null>>;
  readonly whatWouldChange: Words | null;
  readonly whoDecides: Words | null;
  readonly source: Source;
  readonly packVersion: string;
}
