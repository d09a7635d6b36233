import { findLabelled, boxAround, type Labelled } from './labels';
import { type Field, type PpeTopic, type PpeWords } from './reading';
import { type SheetParts } from './sheet-parts';
import { fold } from './words';

/** Labels of section 8 on protection, folded. */
const topicLabels: readonly (readonly [PpeTopic, RegExp])[] = [
  ['eyes', /^(eyes? ?(\/|and|or|&)? ?(face)? ?protection|eye\/face|eyes?|face protection|proteccion (para |de )?(los )?(ojos|ocular|la cara)[ /a-z]*|protection (des yeux|oculaire)[ /a-z]*|augen-? ?(\/|und)? ?(gesichts)?schutz)\b/],
  ['hands', /^(hands? protection|hands|gloves?|protective gloves|proteccion (de |para )?(las )?manos|guantes|protection des mains|gants|handschutz|schutzhandschuhe)\b/],
  ['skin', /^((other )?(skin|body) ?(and|\/|&)? ?(body)? ?protection|other skin protection|protective clothing|skin|proteccion (de |para )?(la piel|corporal|cutanea|el cuerpo)[ /a-z]*|ropa de proteccion|protection (de la peau|du corps)[ /a-z]*|vetements de protection|korperschutz|haut-? ?(und korper)?schutz|schutzkleidung)\b/],
  ['respiratory', /^(respiratory ?protection|respiratory|respirators?|proteccion (respiratoria|de las vias respiratorias)|protection (respiratoire|des voies respiratoires)|atemschutz)\b/],
  ['hearing', /^(hearing protection|ear protection|proteccion (auditiva|de los oidos)|protection auditive|gehorschutz)\b/],
];

/** What section 8 says to wear, word for word, under the label it stands by. */
export function ppeWords(parts: SheetParts): Field<PpeWords>[] {
  const lines = parts.sections.bodies.get('exposure') ?? [];
  const found: Field<PpeWords>[] = [];
  for (const [topic, label] of topicLabels) {
    for (const hit of findLabelled(lines, label)) {
      const text = textOf(hit);
      if (text.length < 8 || isHeading(text) || found.some(({ value }) => value.topic === topic && value.text === text)) continue;
      found.push({ value: { topic, text }, page: hit.line.page, box: boxAround(hit.values), quote: text, confidence: hit.isBelow ? 0.75 : 0.85 });
    }
  }
  return found;
}

/** A label that is followed by another label has no text of its own. */
const isHeading = (text: string): boolean => text.length < 40 && topicLabels.some(([, label]) => label.test(fold(text)) && !/[.:]/.test(text));

const textOf = ({ values }: Labelled): string => values.map(({ text }) => text).join(' ').replace(/^[\s:-]+/, '').slice(0, 1200);
