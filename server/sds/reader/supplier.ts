import { findLabelled, isLabel } from './labels';
import { type Line, type Segment } from './lines';
import { type Field } from './reading';
import { type SheetParts } from './sheet-parts';
import { fold, hasLetters, joinSpacedLetters } from './words';

const makerLabels =
  /^((name,? address,?( and)? tele?phone( number)? of (the )?)?(chemical )?(manufacturer|supplier|company|importer|producer|responsible party)( or other responsible party)?(?=:)|(name of (the )?)?(manufacturer|supplier|company|importer|producer|vendor|responsible party)('?s)?( \/ ?| or |, |\/)?(manufacturer|supplier|company|importer|distributor|undertaking)?('?s)?( name| identification| information| details| address| name and address| name & address)?|(manufactured|supplied|produced|sold|prepared and distributed|made) (by|for)|(initial )?supplier identifier|makers?|fabricado por|fabrique par|hergestellt (von|durch)|inverkehrbringer|nome da empresa|identificateur du fournisseur initial|manufacturer name|(registered )?company name( of (the )?(supplier|manufacturer))?|firm name|nombre (de la empresa|del proveedor|del fabricante|de la compania)|fabricante( ?\/ ?proveedor)?|proveedor( ?\/ ?fabricante)?|empresa|compania|razon social|denominacion social|nombre o razon social|(nom du )?(fabricant|fournisseur)( ?\/ ?(fabricant|fournisseur))?|societe|raison sociale|nom de la (societe|compagnie)|hersteller( ?\/ ?lieferant)?|lieferant|firma|firmenname|unternehmen|fornitore|produttore|fornecedor|leverancier)\b/;

const blockLabels =
  /^((details|information|data) (of|on|about|concerning) the (supplier|manufacturer|company)|supplier of the safety data sheet|manufacturer or supplier's details|supplier's details|company identification|company ?\/ ?undertaking identification|manufacturer information|supplier information|datos del proveedor( o fabricante)?|datos del fabricante|informacion(es)? (del|sobre el) (proveedor|fabricante)|identificacion de la (empresa|compania|sociedad)|(renseignements|details|donnees) (concernant|sur|relati\w+) (le|au|du) (fabricant|fournisseur)|details du fournisseur|einzelheiten zum lieferanten|angaben zum (lieferanten|hersteller)|informazioni sul fornitore)/;

const distributorLabels = /^(distributor|distributed by|distributed for|distribuidor|distribuido por|distributeur|distribue par|vertrieb|imported by|importador|importateur)\b/;

const emergencyLabels = /^(?:.{0,30}\b)?(emergency|emergencia|urgence|notruf|notfall|poison|24[ -]?(h|hour|hr)s?)\b[a-z0-9 /()-]{0,40}/;

/** Endings of company names in the usual countries. */
const legalForm =
  /\b(inc|incorporated|llc|l\.l\.c|ltd|limited|corp|corporation|company|co|gmbh|ag|kg|kgaa|s\.?a\.?|s\.?a\.?s|sarl|s\.?l\.?|s\.?a\. de c\.?v|s de r\.?l|b\.?v|n\.?v|plc|pty|s\.?p\.?a|s\.?r\.?l|lp|l\.p|oy|ab|a\/s|e\.k)\.?(?=$|[\s,;)])/i;
const tradeWord = /\b(products|industries|coatings|paints?|chemicals?|resins?|polymers|technologies|systems|solutions|laborator(y|ies)|group|international|manufacturing|enterprises|brands|materials|supply)\b/i;

/** Who answers for the sheet: section 1 first, then the running header and footer. */
export function supplier(parts: SheetParts): Field<string> | null {
  const identification = parts.sections.bodies.get('identification') ?? [];
  const found: { segment: Segment; value: string; rank: number; order: number }[] = [];
  for (const [rank, label] of [makerLabels, blockLabels, distributorLabels].entries()) {
    for (const place of [identification, parts.sections.preamble]) {
      for (const hit of findLabelled(place, label)) {
        const values = rank === 1 ? blockUnder(place, hit.index, hit.values) : hit.values;
        const named = firstName(values);
        if (named) found.push({ ...named, rank, order: found.length });
      }
    }
  }
  // A distributor answers only where nobody names a maker or supplier, whatever the form of the names.
  const makers = found.filter(({ rank }) => rank < 2);
  const named = makers.length > 0 ? makers : found;
  const sure = named.find(({ value }) => legalForm.test(value) || tradeWord.test(value)) ?? named[0];
  if (sure) {
    const isFormed = legalForm.test(sure.value);
    return { value: sure.value, page: sure.segment.page, box: sure.segment.box, quote: sure.segment.text, confidence: isFormed ? 0.95 : sure.rank === 0 ? 0.8 : 0.65 };
  }
  return unlabelled(identification, parts);
}

/** A subheading such as "1.3 Details of the supplier" is followed by lines of their own until the next subheading. */
function blockUnder(lines: Line[], index: number, beside: Segment[]): Segment[] {
  const block: Segment[] = [...beside];
  for (const line of lines.slice(index + 1, index + 9)) {
    if (/^\s*1[.,]\d/.test(line.text)) break;
    const [first, second] = line.segments;
    if (first && !isLabel(first.text)) block.push(first);
    if (second) block.push(second);
  }
  return block;
}

function firstName(values: Segment[]): { segment: Segment; value: string } | null {
  const names = values.slice(0, 6).map((segment) => ({ segment, value: companyName(segment.text) }));
  const first = names.findIndex(({ value }) => value !== null);
  // The name comes before the address: look no further than the second line that could be a name.
  const near = first < 0 ? [] : names.slice(first, first + 3).filter(({ value }) => value !== null);
  const chosen = near.find(({ value }) => legalForm.test(value ?? '')) ?? near[0];
  return chosen?.value ? { segment: chosen.segment, value: chosen.value } : null;
}

/** The name at the start of a line, without the address that follows it; null when the line holds no name. */
export function companyName(text: string): string | null {
  let name = joinSpacedLetters(text).replace(/^[\s:*•-]+/, '').replace(/^(name|company|nombre|nom|firma|manufacturer|supplier|manufactured (by|for))\s*:\s*/i, '');
  name = name.replace(/\s+(material )?safety data sheet\b.*$/i, '');
  const address = /[,;]?\s+(?=\d{2,6}[a-z]?[\s,-]+\p{L}|p\.?\s?o\.?\s*box\b|(tele?)?phone\b|tel\b|fax\b|www\.|https?:|\S+@|\(\d{3}\)|\+\d|\d{3}[-.]\d{3})/iu.exec(name);
  if (address && address.index > 2 && !legalForm.test(name.slice(address.index).split(/\s+/).slice(0, 3).join(' '))) name = name.slice(0, address.index);
  const afterForm = /^(.*?\b(?:inc|llc|l\.l\.c|ltd|limited|gmbh|corp|corporation|company|co|plc|s\.?l|s\.?a|b\.?v)\.?)[,\s]+\d/i.exec(name) ?? /^([^,]{3,60}),\s*\d{1,6}[a-z]?\s+\p{L}/iu.exec(name);
  name = withoutAddress(afterForm?.[1] ?? name).replace(/[\s,;:-]+$/, '').trim();
  const folded = fold(name);
  if (name.length < 2 || name.length > 80 || !hasLetters(name) || isLabel(name)) return null;
  if (/^\d(?![a-z]{1,3}\b)|@|www\.|https?:|^(same|see|not|no|none|n\/?a|identification|section|address|for |and |of |the supplier|safety|data|information|undertaking|p\.?o|tel|phone|siehe|wie |igual|idem)\b|\d{3}[- .]\d{3,4}/.test(folded)) return null;
  return name;
}

/** "Slate Paints Ltd., Dock Road, Hull": what follows the legal form is an address, unless it is a form again ("Company, Inc."). */
function withoutAddress(name: string): string {
  for (const comma of name.matchAll(/,\s*|\s[-–—•|]\s/g)) {
    const [before, after] = [name.slice(0, comma.index), name.slice(comma.index + comma[0].length)];
    if (new RegExp(`${legalForm.source}$`, 'i').test(before) && legalForm.exec(after)?.index !== 0) return before;
  }
  return name;
}

/** No label: a line of section 1, or of the running header or footer, that ends in a legal form. */
function unlabelled(identification: Line[], parts: SheetParts): Field<string> | null {
  const firstPage = parts.lines.filter((line) => line.page === 1).sort((a, b) => a.box.y - b.box.y);
  // The company that answers emergency calls is another one as a rule.
  const emergency = new Set(findLabelled(identification, emergencyLabels).flatMap(({ values }) => values));
  const segments = [...identification, ...parts.running, ...parts.sections.preamble, ...firstPage.slice(-2)].flatMap((line) => line.segments);
  for (const segment of segments.filter((each) => !emergency.has(each))) {
    const value = companyName(segment.text);
    if (!value || value.split(' ').length > 8 || !legalForm.test(value) || /[.;] \p{Ll}|\b(is|are|the product|material)\b/u.test(value)) continue;
    return { value, page: segment.page, box: segment.box, quote: segment.text, confidence: 0.55, because: 'No label names the supplier; this is the only company named in section 1 or at the edge of the pages.' };
  }
  return null;
}
