/** CAS Registry Numbers: two to seven digits, two digits, a check digit. */

const casForm = /(?<![\d-])(\d{2,7})\s?[-\u2010-\u2015\u2212]\s?(\d{2})\s?[-\u2010-\u2015\u2212]\s?(\d)(?![\d]|[-\u2010-\u2015]\d)/g;

export interface FoundCas {
  cas: string;
  start: number;
  end: number;
}

/**
 * Whether the last digit is the check digit of the others: each digit times its place counted from the right, summed,
 * modulo 10 (CAS, "Check Digit Verification of CAS Registry Numbers").
 */
export function hasCasCheckDigit(cas: string): boolean {
  const digits = cas.replace(/\D/g, '');
  const sum = [...digits.slice(0, -1)].reverse().reduce((total, digit, index) => total + Number(digit) * (index + 1), 0);
  return digits.length >= 5 && sum % 10 === Number(digits.at(-1));
}

/** Every CAS number in a text; figures of that form with a wrong check digit (phones, EC and index numbers) are left out. */
export function casNumbersIn(text: string): FoundCas[] {
  const found: FoundCas[] = [];
  for (const match of text.matchAll(casForm)) {
    const cas = `${(match[1] ?? '').replace(/^0+(?=\d{2})/, '')}-${match[2]}-${match[3]}`;
    if (hasCasCheckDigit(cas)) found.push({ cas, start: match.index, end: match.index + match[0].length });
  }
  return found;
}
