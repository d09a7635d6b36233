/**
 * Reading ease of short lines. Formulas:
 * Flesch-Kincaid grade = 0.39 · words/sentences + 11.8 · syllables/words − 15.59 (Kincaid et al., 1975);
 * Fernández Huerta = 206.84 − 60 · syllables/words − 1.02 · words/sentences (Fernández Huerta, 1959).
 * Both from memory.
 */

const SENTENCE_END = /[.!?:;]+(?=\s|$)/;

function wordsOf(text: string): readonly string[] {
  return text.match(/[\p{L}\p{N}][\p{L}\p{N}'’/-]*/gu) ?? [];
}

function sentenceCount(text: string): number {
  return Math.max(1, text.split(SENTENCE_END).filter((part) => /[\p{L}\p{N}]/u.test(part)).length);
}

/** Groups of vowels, less a silent final e; figures and codes count one syllable a character group. */
export function englishSyllables(word: string): number {
  const letters = word.toLowerCase().replace(/[^a-z]/g, '');
  if (letters === '') return 1;
  const withoutSilent = letters.replace(/(?:[^laeiouy]es|[^aeiouytd]ed|[^laeiouy]e)$/, (end) => end.charAt(0)).replace(/^y/, '');
  return Math.max(1, (withoutSilent.match(/[aeiouy]{1,2}/g) ?? []).length);
}

/** Vowel groups; two strong vowels, or an accented weak one, make two syllables. */
export function spanishSyllables(word: string): number {
  const letters = word.toLowerCase().replace(/[^a-záéíóúüñ]/g, '').replace(/qu(?=[eiéí])/g, 'q').replace(/gu(?=[eiéí])/g, 'g');
  if (letters === '') return 1;
  const groups = letters.replace(/y$/, 'i').match(/[aeiouáéíóúü]+/g) ?? [];
  const count = groups.reduce((sum, group) => {
    let syllables = 1;
    for (let i = 1; i < group.length; i += 1) {
      const before = group.charAt(i - 1);
      const here = group.charAt(i);
      const isHiatus = (/[aeoáéó]/.test(before) && /[aeoáéó]/.test(here)) || /[íú]/.test(before) || /[íú]/.test(here);
      if (isHiatus) syllables += 1;
    }
    return sum + syllables;
  }, 0);
  return Math.max(1, count);
}

interface Counts {
  readonly words: number;
  readonly sentences: number;
  readonly syllables: number;
}

function count(lines: readonly string[], syllablesOf: (word: string) => number): Counts {
  return lines.reduce<Counts>(
    (sum, line) => {
      const found = wordsOf(line);
      return { words: sum.words + found.length, sentences: sum.sentences + sentenceCount(line), syllables: sum.syllables + found.reduce((all, word) => all + syllablesOf(word), 0) };
    },
    { words: 0, sentences: 0, syllables: 0 },
  );
}

/** US school grade. */
export function fleschKincaidGrade(lines: readonly string[]): number {
  const { words, sentences, syllables } = count(lines, englishSyllables);
  return 0.39 * (words / sentences) + 11.8 * (syllables / words) - 15.59;
}

/** 0 to 100, higher is easier. */
export function fernandezHuerta(lines: readonly string[]): number {
  const { words, sentences, syllables } = count(lines, spanishSyllables);
  return 206.84 - 60 * (syllables / words) - 1.02 * (words / sentences);
}
