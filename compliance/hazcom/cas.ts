import { sourced } from '../source';

/** CAS's own description of the check digit; the leading-zero rule from a trade note. */
export const CAS_SOURCE = sourced('CAS Registry Number check digit, CAS support page', 'read');

export type CasCheck =
  | { readonly isValid: true; readonly casNumber: string }
  | { readonly isValid: false; readonly casNumber: string; readonly fault: 'malformed' | 'check-digit'; readonly expectedCheckDigit: number | null };

// Two to seven digits without a leading zero, two digits, one check digit.
const FORM = /^([1-9]\d{1,6})-(\d{2})-(\d)$/;

/** The check digit of a CAS number's digits without it: digit × position from the right, summed, modulo 10. */
export function casCheckDigit(digitsBeforeCheck: string): number {
  let sum = 0;
  for (let i = 0; i < digitsBeforeCheck.length; i += 1) sum += Number(digitsBeforeCheck[digitsBeforeCheck.length - 1 - i]) * (i + 1);
  return sum % 10;
}

/** Whether the text is a well-formed CAS number with the right check digit. A valid digit does not prove that the number exists or names that substance. */
export function checkCas(text: string): CasCheck {
  const casNumber = text.trim();
  const match = FORM.exec(casNumber);
  if (match === null) return { isValid: false, casNumber, fault: 'malformed', expectedCheckDigit: null };
  const expected = casCheckDigit(`${match[1]}${match[2]}`);
  if (expected !== Number(match[3])) return { isValid: false, casNumber, fault: 'check-digit', expectedCheckDigit: expected };
  return { isValid: true, casNumber };
}
