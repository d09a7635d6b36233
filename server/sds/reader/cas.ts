import { checkCas } from '#compliance/hazcom/cas';

/** CAS Registry Numbers as printed: two to seven digits, two digits, a check digit, with any dash and stray blanks. */
const casForm = /(?<![\d-])(\d{2,7})\s?[-\u2010-\u2015\u2212]\s?(\d{2})\s?[-\u2010-\u2015\u2212]\s?(\d)(?![\d]|[-\u2010-\u2015]\d)/g;

export interface FoundCas {
  cas: string;
  start: number;
  end: number;
}

/** Every CAS number in a text; figures of that form with a wrong check digit (phones, EC and index numbers) are left out. */
export function casNumbersIn(text: string): FoundCas[] {
  const found: FoundCas[] = [];
  for (const match of text.matchAll(casForm)) {
    const cas = `${(match[1] ?? '').replace(/^0+(?=\d{2})/, '')}-${match[2]}-${match[3]}`;
    if (checkCas(cas).isValid) found.push({ cas, start: match.index, end: match.index + match[0].length });
  }
  return found;
}
