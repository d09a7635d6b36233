import { datesIn } from './dates';
import { boxAround, findLabelled, isLabel, type Labelled } from './labels';
import { lineOf, type Line, type Segment } from './lines';
import { type Field } from './reading';
import { type SheetParts } from './sheet-parts';
import { fold, hasLetters, joinSpacedLetters } from './words';

/** Labels of the product's name, the plainest first; folded. */
const nameLabels: readonly { label: RegExp; confidence: number }[] = [
  {
    label:
      /^(product names?(?:\(s\))?(?: ?\/ ?(?:trade names?|codes?|synonyms?))?|product name as (?:used|it appears) on (?:the )?label|material name|name of (the )?product|nombre de la (sustancia( quimica)?( peligrosa)?|mezcla)( o (la )?mezcla)?|commercial product name|product trade name|product name ?[/&] ?trade name|product identity|product i\.?d\.?(?= ?:)|name of the product|nombre( comercial)? del? (producto|material)|identificacion del producto( quimico)?|nom d[ue] produit|nom de la (matiere|substance)|nom commercial du produit|produktname|name des produkts|nome del prodotto|nome do produto|productnaam)\b/,
    confidence: 0.95,
  },
  {
    label:
      /^(trade ?name( or designation of the (mixture|product|substance))?|commercial name|brand name|trade designation|nombre comercial|nombre o designacion comercial( de la mezcla)?|designacion comercial|denominacion comercial|nom commercial|designation commerciale|denomination commerciale|handelsname|produktbezeichnung|artikelbezeichnung|nom du melange|warenzeichen|bezeichnung des (stoffs|stoffes|gemischs|produkts)|nome commerciale|denominazione commerciale|nome comercial|handelsnaam)\b/,
    confidence: 0.9,
  },
  {
    label:
      /^((ghs )?product identifier( used on the label)?|(primary )?identifiers?( ?\(s\))? used on the label|identificador( sga)? del producto|identificateur( sgh)? d[eu] produit|produktidentifikator|identity|common name|material|preparation|article|substance name|name of (the )?(substance|mixture)|mixture name|product|produit|producto|produkt|name|nombre|designation)\b/,
    confidence: 0.75,
  },
];

/** Words that show a text is about something else than a name. */
const notNames =
  /^(not |no |n\/?a\b|none|see |same |mixture|substance$|mezcla|gemisch|melange|solid|liquid|identification|information|section|page|and |of |for |the substance|company|trade name|other means|product (code|number|use|type|category|class|form)|sds|safety data)|@|www\.|https?:|\b(regulation|according to|conforms?|in accordance)\b/;

/** The product's name from section 1, else from the running header, else the title under "Safety data sheet". */
export function productName(parts: SheetParts): Field<string> | null {
  const identification = parts.sections.bodies.get('identification') ?? [];
  const places = [identification, parts.sections.preamble, parts.running];
  for (const { label, confidence } of nameLabels) {
    for (const place of places) {
      for (const hit of findLabelled(place, label)) {
        const field = fieldOf(hit, hit.isBelow ? confidence - 0.1 : confidence);
        if (field) return withSupport(field, parts);
      }
    }
  }
  return looselyLabelled(places, parts) ?? titleName(parts);
}

/** "Product name Quarrybond 40", set without mark or gap: only under the plainest labels. */
function looselyLabelled(places: Line[][], parts: SheetParts): Field<string> | null {
  for (const { label, confidence } of nameLabels.slice(0, 2)) {
    for (const place of places) {
      for (const hit of findLabelled(place, label, true)) {
        const field = /^\P{Ll}/u.test(hit.values[0]?.text ?? '') ? fieldOf(hit, confidence - 0.2) : null;
        if (field) return withSupport(field, parts);
      }
    }
  }
  return null;
}

function fieldOf(hit: Labelled, confidence: number): Field<string> | null {
  const [first] = hit.values;
  if (!first) return null;
  const segments = [first, ...wrappedName(hit)];
  const value = cleanName(segments.map(({ text }) => text).join(' '));
  if (!value) return null;
  return { value, page: first.page, box: boxAround(segments), quote: segments.map(({ text }) => text).join(' '), confidence };
}

/**
 * A name goes on in the next line only at ordinary line spacing and when it does not read like a label; below a label
 * of its own it must also go on in small letters, for there the next label stands at the same edge.
 */
function wrappedName({ values, isBelow }: Labelled): Segment[] {
  const wrapped: Segment[] = [];
  for (let at = 1; at < values.length && at < 3; at++) {
    const before = values[at - 1];
    const segment = values[at];
    if (!before || !segment || segment.box.y - before.box.y > before.box.height * 1.45 || Math.abs(segment.box.height - before.box.height) > 0.6) break;
    if (isBelow && !/^\p{Ll}/u.test(segment.text)) break;
    if (isLabel(segment.text) || /[:.]/.test(segment.text) || before.text.length < 28) break;
    wrapped.push(segment);
  }
  return wrapped;
}

function cleanName(text: string): string | null {
  const value = joinSpacedLetters(text)
    .replace(/^[\s:*"“”'_-]+|[\s:*"“”_,;]+$/g, '')
    .replace(/\s+(product (code|number|no)\b|item (no|number)|sku\b|code:|revision|version\b).*$/i, '')
    .trim();
  if (value.length < 2 || value.length > 120 || !/[\p{L}\p{N}]/u.test(value)) return null;
  const [date] = datesIn(value, { isDayFirst: true });
  // A date beside the label is another cell's.
  if (date && date.end - date.start > value.length * 0.6) return null;
  return notNames.test(fold(value)) || isLabel(value) ? null : value;
}

/** A name that the header repeats is surer. */
function withSupport(field: Field<string>, parts: SheetParts): Field<string> {
  const name = fold(field.value);
  const isRepeated = [...parts.running, ...parts.sections.preamble].some((line) => fold(line.text).includes(name));
  return isRepeated ? { ...field, confidence: Math.min(0.98, field.confidence + 0.05), because: 'The page header repeats this name.' } : field;
}

/** No label anywhere: the line under the title, when the sheet repeats it or sets it large. */
function titleName(parts: SheetParts): Field<string> | null {
  const preamble = parts.sections.preamble;
  const title = preamble.findIndex((line) => isTitle(line));
  // A running line may hold the title and the name side by side.
  const cells = parts.running.filter((line) => line.segments.length > 1).flatMap((line) => line.segments.map((segment) => lineOf([segment])));
  const candidates = [...(title >= 0 ? preamble.slice(title + 1, title + 6) : []), ...parts.running, ...(parts.running.some(hasTitleCell) ? cells : [])].filter(isNameLike);
  const body = median(parts.lines.map((line) => line.box.height));
  const chosen = candidates.find((line) => line.box.height > body * 1.15 || parts.running.some((other) => other.segments.some((segment) => fold(segment.text) === fold(line.text))));
  const value = chosen ? cleanName(chosen.text) : null;
  if (!chosen || !value) return null;
  return { value, page: chosen.page, box: chosen.box, quote: chosen.text, confidence: 0.5, because: 'No label names the product; this stands under the title of the sheet.' };
}

const hasTitleCell = (line: Line): boolean => line.segments.some((segment) => isTitle(lineOf([segment])));

const isTitle = (line: Line): boolean => /^(material )?safety data sheet|^(ficha|hoja) de (datos|seguridad)|^fiche de donnees|^sicherheitsdatenblatt/.test(fold(joinSpacedLetters(line.text)));

const isNameLike = (line: Line): boolean =>
  line.segments.length === 1 &&
  line.text.length < 60 &&
  hasLetters(line.text) &&
  !isTitle(line) &&
  !/\b(date|fecha|datum|page|pagina|seite|version|revision|revised|issue|phone|tel|fax|inc|llc|ltd|gmbh|corp|company|section|supersedes|osha|ghs|hcs|reach|street|avenue|road|regulation|cfr|sheet|sds|msds)\b|\d{5}|@|www/.test(fold(line.text));

function median(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? 0;
}
