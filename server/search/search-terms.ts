/** What a person typed, taken apart: CAS numbers and codes are found by themselves, the rest as words of names. */
export interface SearchTerms {
  /** Digits only, no leading zeros. */
  readonly casDigits: readonly string[];
  /** As CAS writes them, for the answer's words; same order as `casDigits`. */
  readonly casNumbers: readonly string[];
  /** Single codes in lower case: "h302+h332" gives two. */
  readonly codes: readonly string[];
  readonly words: string;
}

const casWithDashes = /(?<![\p{L}\p{N}-])0*([1-9]\d{1,6})-(\d{2})-(\d)(?![\p{L}\p{N}-])/gu;
const digitsAlone = /^(?:cas(?:[\s-]?(?:no|nr|number|rn)\.?)?[\s:#]*)?0*([1-9]\d{1,6})(\d{2})(\d)$/iu;
const code = /(?<![\p{L}\p{N}])(?:EUH\s?\d{3}[A-Z]?|H\s?\d{3}[A-Z]{0,2}|P\s?\d{3})(?![\p{L}\p{N}])/giu;
/** Words that only announce a number or a code. */
const announcement = /(?<![\p{L}\p{N}])cas(?:[\s-]?(?:no|nr|number|rn)\.?)?(?![\p{L}\p{N}])[\s:#]*/giu;

export function searchTerms(typed: string): SearchTerms {
  // Sheets are pasted from: the dashes and spaces of print are those of the keyboard.
  let rest = typed.replace(/[\p{Pd}\u2212]/gu, '-').replace(/\s+/gu, ' ').trim();
  const casDigits: string[] = [];
  const casNumbers: string[] = [];
  const takeCas = (first: string, second: string, check: string): string => {
    casDigits.push(`${first}${second}${check}`);
    casNumbers.push(`${first}-${second}-${check}`);
    return ' ';
  };
  rest = rest.replace(casWithDashes, (_, first: string, second: string, check: string) => takeCas(first, second, check));
  const bare = casDigits.length === 0 ? digitsAlone.exec(rest) : null;
  // Without dashes any figure could be one: only a right check digit says so.
  if (bare && hasRightCheckDigit(`${bare[1]}${bare[2]}`, Number(bare[3]))) rest = takeCas(bare[1] as string, bare[2] as string, bare[3] as string);
  if (casDigits.length > 0) rest = rest.replace(announcement, ' ');
  const codes: string[] = [];
  rest = rest.replace(code, (found) => {
    codes.push(found.replace(/\s/gu, '').toLowerCase());
    return ' ';
  });
  return { casDigits, casNumbers, codes, words: rest.trim() };
}

/** Each digit times its place from the right, the sum modulo 10 (CAS Registry Number check digit). */
function hasRightCheckDigit(digits: string, check: number): boolean {
  const sum = [...digits].reverse().reduce((total, digit, index) => total + Number(digit) * (index + 1), 0);
  return sum % 10 === check;
}
