import { type RevisionSummary } from '#shared/sheets';
import { languageNames } from '../../sheets/sheet-words';

/** The sheet in use in one language; null: there is none, though crews read it. */
export interface LanguageSheet {
  readonly language: string;
  readonly name: string;
  readonly current: RevisionSummary | null;
}

/** Crews read these two: a missing one is shown as missing. */
const wanted = ['en', 'es'] as const;

/** English and Spanish side by side whether or not they are there, then other languages that are. */
export function sheetsByLanguage(confirmed: readonly RevisionSummary[]): readonly LanguageSheet[] {
  const current = confirmed.filter(({ isCurrent }) => isCurrent);
  const others = [...new Set(current.map(({ language }) => language ?? ''))].filter((language) => !(wanted as readonly string[]).includes(language)).sort();
  return [...wanted, ...others].map((language) => ({ language, name: languageNames[language] ?? (language || 'Language not known'), current: current.find((revision) => (revision.language ?? '') === language) ?? null }));
}
