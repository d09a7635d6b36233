import { around, type Line, type Segment } from './lines';
import { type Box } from './reading';
import { fold } from './words';

/** A label with what stands beside or below it. */
export interface Labelled {
  line: Line;
  /** Where in `lines` the label stands. */
  index: number;
  /** Lines of the value, the first one first. */
  values: Segment[];
  isBelow: boolean;
}

/**
 * Labels that name something else: a cell holding one of them is no value. Folded.
 * Common practice on sheets, no source.
 */
const otherLabels =
  /^((revision|issue|print|preparation|effective|expiry) date|date( of| prepared| printed|:|$)|version\b|hmis|nfpa|product (code|number|no|type|class|use|description|category)|item (no|number)|sku|emergency|tele?phone|phone|fax|tel\b|e-?mail|website|web site|internet|address|recommended use|intended use|uses?( of|$|:)|uses advised|relevant identified|restrictions|synonyms?|cas\b|ec[ -]n|formula|chemical (family|formula|name)|prepared by|other means|details of|supplier|manufacturer|company|distributors?( name| address| information|:|$)|makers?\b|hours of|page\b|codigo|telefono|uso |usos |fecha|sinonimos|direccion|fabricante|proveedor|code (du )?produit|utilisation|fournisseur|telephone|adresse|verwendung|notruf|hersteller|lieferant|firma|produktnummer|artikel|telefon|identificateur|identificador|registration|reach|ufi|un number|sds|msds|not applicable|none\b|n\/a)/;

/** "Product code:" and the like name another thing than "Product". */
const otherThing = /^ (code|number|no|nr|type|use|class|category|form|description|date|id|line|group|family|info|emergency|telephone|phone|for)\b/;

/**
 * Every place where a segment is, or begins with, the label; `label` is matched on folded text from its start. A loose
 * search also takes "Signal word Danger", where only a blank parts label and value.
 */
export function findLabelled(lines: Line[], label: RegExp, isLoose = false): Labelled[] {
  const found: Labelled[] = [];
  lines.forEach((line, index) => {
    line.segments.forEach((segment, at) => {
      const printed = withoutNumber(segment.text);
      const folded = fold(printed);
      const own = label.exec(folded);
      // "Details of the supplier" / "of the safety data sheet": what the first line leaves open the second may end.
      const match = own && /^\s*$|[^a-z ]/.test(folded.slice(own[0].length)) ? own : (wrappedMatch(lines, index, segment, folded, label) ?? own);
      if (!match) return;
      const rest = folded.slice(match[0].length);
      // "Product name for shipping" is not "Product name"; "Product name: X", "Product name - X" is.
      const mark = /^\s*(\([^)]{0,60}\))?\s*([:\-–*]|$)/.exec(rest) ?? (otherThing.test(rest) ? null : /^ ?[a-z '/&()]{2,34}:|^ ?(and|&|\/|,) ?(full )?(address|tele?phone|phone|contact)[a-z ,&/]{0,30}$/.exec(rest));
      if (!mark && match[0].length < folded.length) {
        if (isLoose && /^ \S/.test(rest)) found.push({ line, index, values: [tail(segment, rest)], isBelow: false });
        return;
      }
      const values = valueOf(lines, index, at, printed, rest);
      if (values) found.push({ line, index, ...values });
    });
  });
  return found;
}

/** The last part of a segment, as a segment of its own. */
function tail(segment: Segment, rest: string): Segment {
  const text = segment.text.slice(Math.max(0, segment.text.length - rest.trimStart().length)).trim();
  const share = text.length / Math.max(1, segment.text.length);
  return { page: segment.page, text, box: { ...segment.box, x: segment.box.x + segment.box.width * (1 - share), width: segment.box.width * share } };
}

/** The label broken over two lines of a narrow column. */
function wrappedMatch(lines: Line[], index: number, segment: Segment, folded: string, label: RegExp): RegExpExecArray | null {
  if (folded.length > 30 || folded.includes(':')) return null;
  const next = lines[index + 1];
  // A value set at the middle of a label of two lines stands on a row of its own between them.
  const isBetween = next !== undefined && next.segments.every(({ box }) => box.x > segment.box.x + segment.box.width * 0.9);
  const below = (isBetween ? lines[index + 2] : next)?.segments.find((other) => Math.abs(other.box.x - segment.box.x) < 3);
  if (!below || below.page !== segment.page || below.box.y - segment.box.y > segment.box.height * 1.8) return null;
  const both = `${folded} ${fold(below.text)}`;
  const match = label.exec(both);
  return match && match[0].length > folded.length && match[0].length >= both.length - 2 ? match : null;
}

const withoutNumber = (text: string): string => text.replace(/^\s*[•·▪■-]?\s*(\d{1,2}(\.\d{1,2}){0,2}[.)]?\s+)?/, '');

function valueOf(lines: Line[], index: number, at: number, printed: string, rest: string): Pick<Labelled, 'values' | 'isBelow'> | null {
  const line = lines[index];
  const segment = line?.segments[at];
  if (!line || !segment) return null;
  const inline = rest ? /[:*]\s*(\S.*)$|^\s*[-–]\s+(\S.*)$/.exec(afterLabel(printed, rest)) : null;
  const inlineText = (inline?.[1] ?? inline?.[2] ?? '').trim();
  if (inlineText) {
    const share = inlineText.length / segment.text.length;
    const box: Box = { ...segment.box, x: segment.box.x + segment.box.width * (1 - share), width: segment.box.width * share };
    const first = { page: segment.page, text: inlineText, box };
    return { values: [first, ...continued(lines, index, box.x)], isBelow: false };
  }
  const beside = line.segments[at + 1];
  const text = beside?.text.replace(/^[:\s]+/, '') ?? '';
  if (beside && text === '' && line.segments[at + 2]) {
    const next = line.segments[at + 2] as Segment;
    return { values: [next, ...continued(lines, index, next.box.x)], isBelow: false };
  }
  if (beside && text !== '' && !isLabel(beside.text)) {
    const x = beside.box.x + (beside.text.startsWith(':') ? beside.box.height * 0.8 : 0);
    return { values: [{ ...beside, text }, ...continued(lines, index, x)], isBelow: false };
  }
  const middle = beside ? [] : atMiddle(lines, index, segment);
  if (middle.length > 0) return { values: middle, isBelow: false };
  const values = below(lines, index, segment);
  return values.length > 0 ? { values, isBelow: true } : null;
}

/** A value beside the label whose lines stand less than a line higher or lower: cells set to the middle of their row. */
function atMiddle(lines: Line[], index: number, label: Segment): Segment[] {
  for (const at of [index - 1, index + 1]) {
    const line = lines[at];
    const [first] = line?.segments ?? [];
    const isNear = line && first && line.page === label.page && Math.abs(first.box.y - label.box.y) < label.box.height * 0.9;
    if (isNear && first.box.x > label.box.x + label.box.width && !isLabel(first.text)) return [first, ...continued(lines, at, first.box.x)];
  }
  return [];
}

/** The printed text from the label's end on; folding may have changed lengths a little. */
function afterLabel(printed: string, rest: string): string {
  const mark = printed.search(/[:*]/);
  return mark >= 0 && /[:*]/.test(rest) ? printed.slice(mark) : printed.slice(Math.max(0, printed.length - rest.length));
}

/** Whether a cell reads like a label rather than a value. */
export const isLabel = (text: string): boolean => /:\s*$/.test(text) || otherLabels.test(fold(withoutNumber(text)));

/** Lines that go on below a value at its own left edge, with nothing of the label's column beside them. */
function continued(lines: Line[], index: number, x: number): Segment[] {
  const values: Segment[] = [];
  let previous = lines[index];
  for (let next = index + 1; next < lines.length && values.length < 8; next++) {
    const line = lines[next];
    // The rest of a label, on a row of its own between two lines of the value.
    if (line && previous && line.page === previous.page && line.box.y - previous.box.y < previous.box.height * 0.9 && line.segments.every(({ box }) => box.x + box.width < x)) continue;
    const segment = line?.segments.find((other) => Math.abs(other.box.x - x) < 5);
    if (!line || !previous || !segment || line.page !== previous.page || line.box.y - previous.box.y > previous.box.height * 2.6) break;
    // A word in the label's column opens another value, unless it is small: then it ends the label above.
    if (line.segments.some((other) => other.box.x < x - 12 && (isLabel(other.text) || /^\P{L}*\p{Lu}/u.test(other.text)))) break;
    if (/:\s*$/.test(segment.text)) break;
    values.push(segment);
    previous = line;
  }
  return values;
}

/** What stands under a label that has nothing beside it: the first cell below within reach, and its following lines. */
function below(lines: Line[], index: number, label: Segment): Segment[] {
  for (let next = index + 1; next <= index + 4; next++) {
    const line = lines[next];
    if (!line || line.page !== label.page || line.box.y - label.box.y > label.box.height * 4.5 || line.box.y < label.box.y) return [];
    const segment = line.segments.find((other) => other.box.x < label.box.x + label.box.width && other.box.x + other.box.width > label.box.x - 4 && other.box.x > label.box.x - 8);
    if (!segment) continue;
    if (isLabel(segment.text)) return [];
    return [segment, ...continued(lines, next, segment.box.x)];
  }
  return [];
}

export const boxAround = (segments: Segment[]): Box => segments.map(({ box }) => box).reduce(around);
