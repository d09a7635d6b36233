/** Lower case without accents, ß as ss, typographic marks as plain ones, blanks single: what labels are compared in. */
export function fold(text: string): string {
  const lower = text.toLowerCase();
  return (isPlain.test(lower) ? lower : withoutMarks(lower)).replace(/\s+/g, ' ').trim();
}

const isPlain = /^[\n -_a-~]*$/;

function withoutMarks(lower: string): string {
  return lower
    .normalize('NFKD')
    .replace(/[\u0300-\u036f]/g, '')
    .replace(/ß/g, 'ss')
    .replace(/œ/g, 'oe')
    .replace(/[\u2010-\u2015\u2212]/g, '-')
    .replace(/[\u2018\u2019\u02bc`´]/g, "'")
    .replace(/[™®©]/g, '');
}

/** Joins words set letter by letter: "H A Z A R D S  I D E N T" → "HAZARDS IDENT". Wider gaps part words. */
export function joinSpacedLetters(text: string): string {
  const letters = /(?<![\p{L}\p{N}])(?:[\p{L}\p{N}&/,.:-] ){3,}[\p{L}\p{N}&/,.:-](?![\p{L}\p{N}])/gu;
  return text.replace(letters, (run) => run.replace(/ /g, ''));
}

/** Letters only, for comparing titles whose words are spaced oddly. */
export const lettersOf = (text: string): string => fold(text).replace(/[^a-z0-9]/g, '');

export const hasLetters = (text: string): boolean => /\p{L}{2,}/u.test(text);
