import { type Line, type Segment } from './lines';
import { fold } from './words';

/** The parts of section 2 as its labels name them. */
export type HazardPart = 'hazard' | 'precaution' | 'signal' | 'classification' | 'other';

/** Labels at the start of a line or cell that open a part; folded, first match wins. */
const partLabels: readonly (readonly [HazardPart, RegExp])[] = [
  ['other', /^(supplement|additional|other hazard|hazards? not|hnoc|unknown acute|percentage of|pictogram|symbol|hazard (pictogram|symbol)|contains\b|containing|named chemical|hazard(ous)? (determining|component|ingredient)|hazard-determining|physical\/chemical|pbt|information (supp|on)|indicaciones adicionales|otros peligros|pictograma|contiene|autres dangers|informations? (additionnel|supplement)|pictogramme|contient|sonstige gefahren|weitere gefahren|erganzende|piktogramm|gefahrenpiktogramm|enthalt|gefahrbestimmende|nfpa|hmis|potential health effects|full text|target organ)/],
  ['signal', /^(signal ?word|palabra de (advertencia|aviso|senal)|mention d'?avertissement|signalwort|avvertenza|palavra-?sinal|signaalwoord)/],
  ['precaution', /^((general )?precaution(ary)?s?( statement| phrase|:|$)|prevention|response|storage|disposal|general\s*:|p-?(statement|phrase|code)|consejos? de prudencia|declaraciones? de precaucion|indicaciones? de precaucion|frases? (p\b|de prudencia)|prevencion|intervencion|respuesta|almacenamiento|eliminacion|conseils? de prudence|mises? en garde|intervention|stockage|elimination|sicherheitshinweise|pravention|reaktion|lagerung|entsorgung|p-satze|consigli di prudenza|safety phrases)/],
  ['hazard', /^((ghs )?hazard(s|ous)?( and precautionary)?\s*(statement|phrase|code|:|$)|ghs hazards?\b|h-?(statement|phrase|code)|statements? of hazard|indicaci[o]n(es)? de peligro|declaraci[o]n(es)? de peligro|frases? (h\b|de peligro|de riesgo)|mentions? de danger|indications? de danger|phrases? h\b|gefahrenhinweise?|h-satze|indicazioni di pericolo|advertencias? de perigo|gevarenaanduiding)/],
  ['classification', /^((ghs )?classification|clasificacion|einstufung|classificazione)/],
];

const partOf = (text: string): HazardPart | null => {
  const folded = fold(text).replace(/^[\d.•·*\s-]+/, '');
  return partLabels.find(([, label]) => label.test(folded))?.[0] ?? null;
};

export interface PartText {
  part: HazardPart | null;
  segment: Segment;
}

/** Every cell of section 2 with the part it belongs to; cells before any label belong to none. */
export function hazardParts(lines: Line[]): PartText[] {
  let current: HazardPart | null = null;
  const cells: PartText[] = [];
  for (const line of lines) {
    line.segments.forEach((segment, at) => {
      // A cell that opens with a code is a statement, whatever its words; labels stand first in their line.
      const opens = at === 0 && !/^\W*(EUH|[HP])\s?\d{3}/.test(segment.text) && isLabelLike(segment, line) ? partOf(segment.text) : null;
      if (opens) current = opens;
      cells.push({ part: current, segment });
    });
  }
  return cells;
}

/** Labels are short, or part from their text by a colon. */
const isLabelLike = (segment: Segment, line: Line): boolean => segment.text.length < 60 || /^[^.:]{3,48}:/.test(segment.text) || line.segments.length > 1;
