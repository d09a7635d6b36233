import { casNumbersIn } from './cas';
import { concentrationIn, wholeConcentration } from './concentration';
import { proseIngredients } from './ingredient-prose';
import { around, type Line, type Segment } from './lines';
import { type Field, type Ingredient } from './reading';
import { closedBody, type SheetParts } from './sheet-parts';
import { fold, hasLetters } from './words';

/** A cell of section 3 with its place in one long column of pages. */
interface Cell {
  segment: Segment;
  row: number;
  /** Height over all pages, points. */
  y: number;
}

interface Anchor extends Cell {
  cas: string;
  start: number;
  end: number;
}

interface Amount extends Cell {
  text: string;
}

interface Columns {
  amount: Segment | null;
  /** From where to where the column of names reaches: between its neighbours' headings, for headings may be centered. */
  name: { from: number; to: number } | null;
}

const amountHeading = /%|\b(weight|wt|conc|concentration|concentracion|concentrations|content|contenido|teneur|gehalt|gew|konzentration|percent|porcentaje|range|amount|anteil|peso|poids|quantity|proportion|vol)\b/;
const nameHeading = /\b(chemical name|ingredient|ingredients|component|components|substance|name|material|common name|nombre|ingrediente|componente|componentes|sustancia|nom|composant|composants|stoff|bezeichnung|inhaltsstoff|inhaltsstoffe|bestandteil|chemische)\b/;
const casHeading = /\bc\.?\s?a\.?\s?s\b/;

/** The lines of the composition section that carry a CAS number, with the amount and the name of their row. */
export function ingredients(parts: SheetParts): Field<Ingredient>[] {
  const lines = closedBody(parts, 'composition');
  const cells = cellsOf(lines);
  const anchors = anchorsOf(cells);
  const columns = columnsOf(lines, anchors);
  const free = freeAmounts(cells, columns);
  const amounts = amountsOf(lines, free, anchors, columns);
  const amountRows = new Set(free.map(({ row }) => row));
  const prose = proseIngredients(lines, anchors.map(({ row }) => row));
  const told = prose?.length === anchors.length ? prose : null;
  const found = new Map<string, Field<Ingredient>>();
  for (const [index, anchor] of anchors.entries()) {
    const own = told?.[index];
    const concentration = own ? (own.amount === null ? null : { ...anchor, text: own.amount }) : (amounts.get(anchor) ?? null);
    const known = found.get(anchor.cas);
    if (known) {
      if (known.value.concentration === null && concentration) known.value.concentration = concentration.text;
      continue;
    }
    const name = own?.name ? { segment: anchor.segment, text: own.name } : nameOf(lines, anchor, anchors[index - 1], anchors[index + 1], columns, amountRows);
    const pieces = [anchor.segment, ...(concentration && concentration.segment.page === anchor.segment.page ? [concentration.segment] : []), ...(name && name.segment.page === anchor.segment.page ? [name.segment] : [])];
    const ordered = [...new Set([name?.segment, anchor.segment, concentration?.segment].filter((piece) => piece !== undefined))];
    found.set(anchor.cas, {
      value: { name: name?.text ?? null, cas: anchor.cas, concentration: concentration?.text ?? null },
      page: anchor.segment.page,
      box: pieces.map(({ box }) => box).reduce(around),
      quote: ordered.map(({ text }) => text).join('  '),
      confidence: concentration ? 0.93 : 0.8,
      ...(concentration ? {} : { because: 'No single amount stands in the row of this number.' }),
    });
  }
  return [...found.values()];
}

const pageHeight = 10_000;

function cellsOf(lines: Line[]): Cell[] {
  return lines.flatMap((line, row) => line.segments.map((segment) => ({ segment, row, y: segment.page * pageHeight + segment.box.y })));
}

const middleOf = ({ box }: Segment): number => box.x + box.width / 2;

/** CAS numbers in order; one broken over two lines of a narrow cell ("64742-" / "95-6") is put together. */
function anchorsOf(cells: Cell[]): Anchor[] {
  const anchors: Anchor[] = [];
  for (const cell of cells) {
    const found = casNumbersIn(cell.segment.text);
    for (const { cas, start, end } of found) anchors.push({ ...cell, cas, start, end });
    if (found.length > 0 || !/(^|[\s:])\d{2,7}-(\d{2}-?)?$/.test(cell.segment.text)) continue;
    const next = cells.find((other) => other.row > cell.row && other.row <= cell.row + 2 && (Math.abs(other.segment.box.x - cell.segment.box.x) < 4 || Math.abs(middleOf(other.segment) - middleOf(cell.segment)) < 4));
    const joined = next ? casNumbersIn(`${cell.segment.text}${next.segment.text}`)[0] : undefined;
    if (joined && joined.end > cell.segment.text.length) anchors.push({ ...cell, cas: joined.cas, start: joined.start, end: cell.segment.text.length });
  }
  return anchors;
}

/** The heading cells of the table: the nearest row above the first number that names columns. */
function columnsOf(lines: Line[], anchors: Anchor[]): Columns {
  const first = anchors[0];
  if (!first) return { amount: null, name: null };
  const above = lines.slice(Math.max(0, first.row - 12), first.row + 1).filter((line) => casNumbersIn(line.text).length === 0);
  const headingRow = [...above].reverse().find((line) => line.segments.length >= 2 && line.segments.some(({ text }) => casHeading.test(fold(text)) || nameHeading.test(fold(text))));
  if (!headingRow) return { amount: null, name: null };
  const near = above.filter((line) => line.page === headingRow.page && Math.abs(line.box.y - headingRow.box.y) < headingRow.box.height * 3).flatMap((line) => line.segments);
  const isCell = (segment: Segment): boolean => segment.text.length < 40;
  const amount = near.find((segment) => isCell(segment) && amountHeading.test(fold(segment.text)) && !/tlv|pel|limit|ppm|mg|pressure|cas/.test(fold(segment.text))) ?? null;
  const named = near.find((segment) => isCell(segment) && nameHeading.test(fold(segment.text)) && !casHeading.test(fold(segment.text)));
  if (!named) return { amount, name: null };
  const others = near.filter((segment) => segment !== named);
  const from = Math.max(0, ...others.map(({ box }) => box.x + box.width).filter((end) => end <= named.box.x));
  const to = Math.min(Infinity, ...others.map(({ box }) => box.x).filter((start) => start >= named.box.x + named.box.width));
  return { amount, name: { from, to } };
}

/** Pairs numbers with amounts: same row first, then row by row where both columns have as many entries, then the nearest. */
function amountsOf(lines: Line[], free: Amount[], anchors: Anchor[], columns: Columns): Map<Anchor, Amount> {
  const paired = new Map<Anchor, Amount>();
  // Several amounts in a row and no heading that names one of them: one column a product. Whose, nobody can say here.
  const rowsOfMany = anchors.filter((anchor) => free.filter((amount) => amount.row === anchor.row).length > 1);
  if (rowsOfMany.length >= Math.min(3, anchors.length * 0.2) && rowsOfMany.length > 0 && !rowsOfMany.every((anchor) => free.filter((amount) => amount.row === anchor.row && columns.amount !== null && overlaps(amount.segment, columns.amount)).length === 1)) return paired;
  for (const anchor of anchors) {
    const sameRow = free.filter((amount) => amount.row === anchor.row && amount.segment !== anchor.segment);
    const inColumn = sameRow.filter(({ segment }) => columns.amount !== null && overlaps(segment, columns.amount));
    const chosen = inColumn.length === 1 ? inColumn[0] : sameRow.length === 1 ? sameRow[0] : undefined;
    const inside = concentrationIn(`${anchor.segment.text.slice(0, anchor.start)} ; ${anchor.segment.text.slice(anchor.end)}`) ?? trailing(anchor);
    if (chosen) paired.set(anchor, chosen);
    else if (sameRow.length === 0 && inside) paired.set(anchor, { ...anchor, text: inside });
  }
  const open = [...new Map(anchors.map((anchor) => [anchor.cas, anchor])).values()].filter((anchor) => !paired.has(anchor));
  const used = new Set([...paired.values()].map(({ segment }) => segment));
  const firstOf = new Set(anchors.filter((anchor, index) => anchors.findIndex(({ cas }) => cas === anchor.cas) === index));
  pairApart(lines, columns, open.filter((anchor) => firstOf.has(anchor)), anchors, free.filter(({ segment }) => !used.has(segment)), paired);
  for (const anchor of open) {
    const beside = paired.has(anchor) ? null : besideIn(lines[anchor.row], anchor);
    // Where the amounts have a column, a percentage elsewhere is part of a name or a limit.
    if (beside && (columns.amount === null || overlaps(beside.segment, columns.amount))) paired.set(anchor, { ...anchor, ...beside });
  }
  return paired;
}

/** Cells that are nothing but an amount; with a known column only those in it. Split amounts ("20 -" / "25") are joined. */
function freeAmounts(cells: Cell[], columns: Columns): Amount[] {
  const amounts: Amount[] = [];
  const skip = new Set<Segment>();
  cells.forEach((cell) => {
    if (skip.has(cell.segment)) return;
    const text = cell.segment.text.replace(/^:\s*/, '');
    const isOpen = /^[<>≤≥]?=?\s?\d{1,3}([.,]\d+)?\s?%?\s?(-|–|—|to)$/.test(text);
    const next = isOpen ? cells.find((other) => other.row > cell.row && other.row <= cell.row + 3 && Math.abs(other.segment.box.x - cell.segment.box.x) < 8 && wholeConcentration(other.segment.text) !== null) : undefined;
    if (next) skip.add(next.segment);
    const amount = wholeConcentration(next ? `${text} ${next.segment.text}` : text);
    if (amount) amounts.push({ ...cell, text: amount });
  });
  const inColumn = columns.amount ? amounts.filter(({ segment }) => columns.amount !== null && overlaps(segment, columns.amount)) : [];
  if (inColumn.length > 0) return inColumn;
  // Without a column, a bare figure may be anything: ask for a range, a percent sign or a comparison, or for several
  // such amounts in its own column.
  const clear = amounts.filter(({ text }) => /%|[<>≤≥]|\d\s?(-|–|—|to)\s?[<≤]?\s?\d/.test(text));
  return amounts.filter((amount) => clear.includes(amount) || clear.filter((other) => other.segment.box.x < amount.segment.box.x + amount.segment.box.width && other.segment.box.x + other.segment.box.width > amount.segment.box.x).length >= 2);
}

const overlaps = (segment: Segment, heading: Segment): boolean => {
  const margin = 14;
  return segment.box.x < heading.box.x + heading.box.width + margin && segment.box.x + segment.box.width > heading.box.x - margin;
};

/** "1330-20-7 10-30" or "10-30 1330-20-7" within one cell, where the amount carries no percent sign. */
function trailing(anchor: Anchor): string | null {
  const after = wholeConcentration(anchor.segment.text.slice(anchor.end).trim());
  const before = wholeConcentration(/(?:^|\s)([<>≤≥]?\s?[\d.,]+(?:\s?[-–]\s?[<≤]?\s?[\d.,]+)?\s?%?)\s*$/.exec(anchor.segment.text.slice(0, anchor.start))?.[1] ?? '');
  return after ?? before;
}

/** An amount with words around it in another cell of the row ("Xylene 10-30%"). */
function besideIn(line: Line | undefined, anchor: Anchor): { segment: Segment; text: string } | null {
  const found = (line?.segments ?? [])
    .filter((segment) => segment !== anchor.segment && /%/.test(segment.text) && !/ppm|mg\/m/i.test(segment.text))
    .map((segment) => ({ segment, text: concentrationIn(segment.text) }))
    .filter((entry): entry is { segment: Segment; text: string } => entry.text !== null);
  return found.length === 1 ? (found[0] ?? null) : null;
}

/** Blocks where number and amount stand on different lines of one entry. */
function pairApart(lines: Line[], columns: Columns, open: Anchor[], all: Anchor[], amounts: Amount[], paired: Map<Anchor, Amount>): void {
  const isNamed = (row: number, own: Segment): boolean => nameSegments(lines[row], columns).some((segment) => segment !== own);
  // A row with a name of its own keeps its amount to itself.
  const fits = (anchor: Anchor, amount: Amount): boolean => isNear(anchor, amount, all) && !(isNamed(anchor.row, anchor.segment) && isNamed(amount.row, amount.segment));
  if (open.length === amounts.length) {
    open.forEach((anchor, index) => {
      const amount = amounts[index];
      if (amount && fits(anchor, amount)) paired.set(anchor, amount);
    });
    return;
  }
  const used = new Set<Amount>();
  for (const anchor of open) {
    const near = amounts.filter((amount) => !used.has(amount) && fits(anchor, amount)).sort((a, b) => distance(anchor, a) - distance(anchor, b));
    const [nearest] = near;
    if (!nearest) continue;
    used.add(nearest);
    paired.set(anchor, nearest);
  }
}

/** Cells that hold words of a name; in the name column where it is known. */
function nameSegments(line: Line | undefined, { name }: Columns): Segment[] {
  return (line?.segments ?? []).filter((segment) => isNameText(withoutCas(segment.text)) && (name === null || (segment.box.x >= name.from - 6 && segment.box.x < name.to)));
}

/** Rows apart; a page turn counts as nothing. */
const distance = (anchor: Anchor, amount: Amount): number => Math.abs(anchor.row - amount.row);

/** No other number stands between the two. */
function isNear(anchor: Anchor, amount: Amount, all: Anchor[]): boolean {
  const [from, to] = anchor.row < amount.row ? [anchor.row, amount.row] : [amount.row, anchor.row];
  return to - from <= 8 && !all.some((other) => other.cas !== anchor.cas && other.row >= from && other.row <= to);
}

/** The name of the row: in the name column, else the first words on the line, else the nearest line above. */
function nameOf(lines: Line[], anchor: Anchor, before: Anchor | undefined, after: Anchor | undefined, columns: Columns, amountRows: ReadonlySet<number>): { segment: Segment; text: string } | null {
  const from = Math.max(before && before.row < anchor.row ? before.row + 1 : 0, anchor.row - (columns.name ? 12 : 5));
  for (let row = anchor.row; row >= from; row--) {
    const line = lines[row];
    const segment = line ? nameCell(line, anchor, columns) : null;
    if (!line || !segment) continue;
    const rest = [...(row < anchor.row ? wordsAbove(lines, row, segment, from, amountRows) : []), segment.text];
    let last = segment;
    for (let below = row + 1; below < Math.min(lines.length, after && after.row > row ? after.row : lines.length, row + 4); below++) {
      const next = lines[below]?.segments.find((other) => Math.abs(other.box.x - segment.box.x) < 5);
      if (!next || next.page !== last.page || next.box.y - last.box.y > last.box.height * 2 || !isNameText(next.text) || /:|\.$/.test(next.text) || below === anchor.row) break;
      // A row with its own amount is another ingredient; a row that names the columns opens another table.
      if (below > anchor.row && (next.text.length > 60 || amountRows.has(below) || isHeadingRow(lines[below]))) break;
      rest.push(next.text);
      last = next;
    }
    const text = cleanName(rest.join(' '), anchor.cas);
    return text ? { segment, text } : null;
  }
  return null;
}

/** The lines of a name above its last one, where the number stands lower in the row. */
function wordsAbove(lines: Line[], row: number, segment: Segment, from: number, amountRows: ReadonlySet<number>): string[] {
  const words: string[] = [];
  let last = segment;
  for (let above = row - 1; above >= Math.max(from, row - 3); above--) {
    const piece = lines[above]?.segments.find((other) => Math.abs(other.box.x - segment.box.x) < 5);
    if (!piece) continue;
    const isApart = piece.page !== last.page || last.box.y - piece.box.y > last.box.height * 2.2;
    if (isApart || !isNameText(piece.text) || /[:.]$/.test(piece.text) || isHeadingRow(lines[above])) break;
    words.unshift(piece.text);
    last = piece;
    if (amountRows.has(above)) break;
  }
  return words;
}

const isHeadingRow = (line: Line | undefined): boolean => line?.segments.some(({ text }) => casHeading.test(fold(text)) || (amountHeading.test(fold(text)) && !/\d/.test(text))) ?? false;

/** The name on one line: in the name column where that is known, else the first words, else what stands beside the number. */
function nameCell(line: Line, anchor: Anchor, columns: Columns): Segment | null {
  const own = line.segments.includes(anchor.segment) && isNameText(withoutCas(anchor.segment.text)) ? anchor.segment : null;
  return nameSegments(line, columns)[0] ?? own;
}

const withoutCas = (text: string): string => text.replace(/\(?\s*(\(?cas\)?)?\s*(-?\s*(no|nr|n°|number|#|rn))?\.?\s*:?\s*\d{2,7}-\d{2}-\d\s*\)?/gi, ' ').trim();

const isNameText = (text: string): boolean => hasLetters(text) && wholeConcentration(text) === null && !/^(cas|ec|einecs|index|rrn|reach|reg)\b[\s:.#-]*(registration )?(no|nr|number|n°)?[\s:.]*(\d|$)|^(classification$|ghs\d|h\d{3}|not |acute|skin irrit|eye|flam|stot|classification|type\b|see |\[\d\]|xn|xi\b|trade secret$|other (components|ingredients)|-$)|\bH[2-4]\d\d\b/i.test(text.trim());

function cleanName(text: string, cas: string): string {
  const name = withoutCas(text).replaceAll(cas, ' ').replace(/\s*\b(\d+([.,]\d+)?\s?(-|–)\s?)?\d+([.,]\d+)?\s?%.*$/, '').replace(/\s+/g, ' ').replace(/^[\s:;,-]+|[\s:;,(-]+$/g, '').trim();
  return name;
}
