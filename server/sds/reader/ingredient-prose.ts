import { casNumbersIn } from './cas';
import { concentrationIn } from './concentration';
import { type Line } from './lines';
import { hasLetters } from './words';

export interface ProseIngredient {
  cas: string;
  name: string | null;
  amount: string | null;
}

/** Letters after a number within which its amount stands. */
const reach = 90;
/** A row that ends like this goes on in the next one. */
const isOpen = /(,|\b(than|to|least|most|of))$/i;
/** A row longer than this beside its number is a sentence, not a cell. */
const longRow = 45;

/**
 * Ingredients that stand in running text ("Xylene (CAS 1330-20-7) 10-30%; toluene …"), in the order of their numbers.
 * Null when the rows from the first to the last number are a table or a plain list. An amount belongs to the number of
 * its own clause and to no other, before the number or after it as the first clause has it.
 */
export function proseIngredients(lines: readonly Line[], rows: readonly number[]): ProseIngredient[] | null {
  const [first] = rows;
  const last = rows.at(-1);
  if (first === undefined || last === undefined) return null;
  const counts = rows.map((row) => rows.filter((other) => other === row).length);
  const isRunning = counts.some((count) => count > 1) || rows.some((row) => isOpen.test(lines[row]?.text ?? '')) || rows.filter((row) => (lines[row]?.text.length ?? 0) > longRow).length > rows.length / 2;
  if (!isRunning || lines.slice(first, last + 1).some((line) => line.segments.length > 1)) return null;
  const text = flow(lines.slice(Math.max(0, first - 1), last + 3));
  const found = casNumbersIn(text);
  const clauses = found.map(({ start, end }, at) => ({
    before: lastClause(text.slice(found[at - 1]?.end ?? 0, start)),
    after: firstClause(text.slice(end, found[at + 1]?.start ?? end + reach)).slice(0, reach),
  }));
  const isBefore = concentrationIn(clauses[0]?.before ?? '') !== null;
  return found.map(({ cas }, at) => {
    const { before = '', after = '' } = clauses[at] ?? {};
    return { cas, name: nameIn(before), amount: concentrationIn(isBefore ? before : after) };
  });
}

const flow = (lines: readonly Line[]): string => lines.reduce((text, line) => text + (/\d-$/.test(text) ? '' : ' ') + line.text, '');

const clauseEnd = /;|\.\s+(?=\p{Lu})/u;
const firstClause = (text: string): string => text.split(clauseEnd)[0] ?? '';
const lastClause = (text: string): string => text.split(clauseEnd).at(-1) ?? '';

/** The words before a number, without the amount of the ingredient before and without "(CAS No." */
function nameIn(before: string): string | null {
  const words = before
    .replace(/^.*\d\s?%\s*(\(?by (weight|volume)\)?|w\/w)?/i, '')
    .replace(/[,(\s]*\b(cas|c\.a\.s\.)?[\s-]*(no|nr|number|#|reg)?[.:#\s(]*$/i, '')
    .replace(/^[\s,;:.)-]+|[\s,;:(-]+$/g, '');
  return hasLetters(words) && words.length < 120 ? words : null;
}
