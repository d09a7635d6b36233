/** How sure we are of a value. Shown to the user beside the value, never hidden. */
export type Verified =
  /** The text of the cited source was read. */
  | 'read'
  /** A text that copies the cited one nearly word for word was read instead (for example a state rule). */
  | 'parallel-text'
  /** The note says which part was read; the rest is recalled. */
  | 'partly'
  /** Recalled only: check the official text before relying on it. */
  | 'from-memory'
  /** Arithmetic from a cited formula or definition. */
  | 'derived'
  /** A fact or habit of the trade; no law or standard is claimed for it. */
  | 'common-practice'
  /** No text of this place is on file: the line decides nothing. */
  | 'not-on-file';

/** Where a value or rule comes from. Every value in compliance/ carries one, by itself or through its table. */
export interface Source {
  /** For example '29 CFR 1926.1153'. */
  readonly citation: string;
  /** For example '(c)(1) Table 1 row (xii)'. */
  readonly paragraph?: string;
  /** ISO date (YYYY-MM-DD) from which the value holds; absent when it was not looked up. */
  readonly inForceFrom?: string;
  readonly verified: Verified;
  /** What was read, or why it is doubtful. */
  readonly note?: string;
  readonly url?: string;
}

type SourceExtra = Omit<Source, 'citation' | 'verified'>;

/** A source in the Code of Federal Regulations: `usFederal('1926.1153', 'read', { paragraph: '(d)(1)' })`. */
export function usFederal(section: string, verified: Verified, extra: SourceExtra = {}): Source {
  return { citation: `29 CFR ${section}`, verified, ...extra };
}

/** Whether it is the US federal text, which is no law elsewhere. */
export function isFederal({ citation }: Source): boolean {
  return /\b29 CFR\b/.test(citation);
}

/** Any other source, for example a state code, a guideline or a study. */
export function sourced(citation: string, verified: Verified, extra: SourceExtra = {}): Source {
  return { citation, verified, ...extra };
}

/** A habit of the trade for which no source is claimed. */
export function commonPractice(note: string): Source {
  return { citation: 'common practice, no source', verified: 'common-practice', note };
}

/** One line for people: citation, paragraph, and in brackets how it was verified. */
export function sourceLine(source: Source): string {
  const paragraph = source.paragraph === undefined ? '' : ` ${source.paragraph}`;
  return `${source.citation}${paragraph} [${VERIFIED_WORDS[source.verified]}]`;
}

/** How each mark is written for people. */
export const VERIFIED_WORDS: Readonly<Record<Verified, string>> = {
  read: 'text read',
  'parallel-text': 'parallel text read',
  partly: 'partly read',
  'from-memory': 'from memory',
  derived: 'derived',
  'common-practice': 'common practice',
  'not-on-file': 'no text on file',
};
