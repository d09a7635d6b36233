import { fold } from './words';

/** The commonest small words of each language; from memory, no list was copied. */
const smallWords: Readonly<Record<string, readonly string[]>> = {
  en: ['the', 'of', 'and', 'to', 'in', 'for', 'with', 'is', 'not', 'or', 'if', 'this', 'by', 'be', 'are', 'may', 'from', 'on', 'as', 'eyes', 'skin', 'use', 'safety', 'data', 'name', 'product', 'hazard'],
  es: ['el', 'los', 'las', 'del', 'y', 'en', 'para', 'con', 'es', 'por', 'una', 'se', 'al', 'si', 'su', 'puede', 'que', 'la', 'o', 'ojos', 'piel', 'seguridad', 'datos', 'nombre', 'producto'],
  fr: ['le', 'les', 'des', 'du', 'et', 'est', 'pour', 'avec', 'dans', 'une', 'ou', 'par', 'sur', 'au', 'aux', 'en', 'ne', 'pas', 'la', 'yeux', 'peau', 'securite', 'donnees', 'nom', 'produit'],
  de: ['der', 'die', 'das', 'und', 'mit', 'von', 'zu', 'den', 'nicht', 'ist', 'bei', 'oder', 'auf', 'fur', 'im', 'nach', 'werden', 'eine', 'augen', 'haut', 'sicherheitsdatenblatt', 'angaben', 'abschnitt'],
  it: ['il', 'di', 'e', 'per', 'con', 'del', 'della', 'non', 'che', 'nel', 'gli', 'una', 'sono', 'dei', 'alla', 'occhi', 'pelle'],
  pt: ['o', 'os', 'do', 'da', 'e', 'em', 'para', 'com', 'nao', 'uma', 'ou', 'ao', 'por', 'dos', 'das', 'olhos', 'pele'],
  nl: ['de', 'het', 'een', 'en', 'van', 'met', 'niet', 'voor', 'bij', 'of', 'op', 'in', 'door', 'zijn', 'ogen', 'huid'],
};

export interface LanguageGuess {
  language: string;
  confidence: number;
}

/** The first pages decide; the rest of a long sheet costs time and says the same. */
const enoughLetters = 6_000;

/** The language most small words belong to; null for a text too short or too mixed to say. */
export function languageOf(text: string): LanguageGuess | null {
  const counts = new Map<string, number>();
  for (const word of fold(text.slice(0, enoughLetters)).match(/[a-z]+/g) ?? []) counts.set(word, (counts.get(word) ?? 0) + 1);
  const scores = Object.entries(smallWords)
    .map(([language, words]) => ({ language, score: words.reduce((sum, word) => sum + (counts.get(word) ?? 0), 0) }))
    .sort((a, b) => b.score - a.score);
  const [first, second] = scores;
  if (!first || !second || first.score < 4) return null;
  const lead = (first.score - second.score) / first.score;
  return lead < 0.05 ? null : { language: first.language, confidence: Math.min(0.99, 0.6 + lead) };
}
