import { checkCas } from '#compliance/hazcom/cas';

/** Letters a recogniser puts for a digit; each stands for one digit only, so that a repair is never a choice. */
const digitOf: Readonly<Record<string, string>> = { O: '0', o: '0', Q: '0', D: '0', l: '1', I: '1', '|': '1', i: '1', '!': '1', Z: '2', z: '2', S: '5', s: '5', B: '8' };
const digitLike = '[0-9OoQDlI|i!ZzSsB]';
const dash = '[-\u2010-\u2015\u2212~_=]';
const form = new RegExp(`(?<![\\w-])(${digitLike}{2,7})${dash}{1,2}(${digitLike}{2})${dash}{1,2}(${digitLike})(?![\\w-])`, 'g');
/** More letters than this are a word and no number. */
const mostLetters = 2;

/** Puts digits for letters in what has the form of a CAS number, only where the check digit then fits. */
export function repairCas(text: string): string {
  return text.replace(form, (found: string, ...groups: string[]) => {
    const parts = groups.slice(0, 3);
    const letters = parts.join('').replace(/\d/g, '').length;
    if (letters > mostLetters) return found;
    const cas = parts.map((part) => part.replace(/\D/g, (letter) => digitOf[letter] ?? letter)).join('-');
    return checkCas(cas).isValid ? cas : found;
  });
}

export const withRepairedCas = <T extends { text: string }>(words: readonly T[]): T[] => words.map((word) => ({ ...word, text: repairCas(word.text) }));
