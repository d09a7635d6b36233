import { findLabelled } from './labels';
import { type Line, type Segment } from './lines';
import { type Field, type SignalWord } from './reading';
import { type SheetParts } from './sheet-parts';
import { matchStatements } from './statement-matcher';
import { fold, joinSpacedLetters } from './words';

const label = /^(ghs )?(signal ?words?|palabras? de (advertencia|aviso|senal)|palabra clave|mentions? d'avertissement|mot(-| )?indicateur|signalw(o|oe)rt(er)?|avvertenza|palavra-?( de )?(sinal|advertencia)|signaalwoord)\b/;
const danger = /^(danger|peligro|gefahr|pericolo|perigo|gevaar)\b/;
const warning = /^(warning|atencion|advertencia|attention|achtung|avertissement|attenzione|atencao|waarschuwing)\b/;
const none = /^(none|no signal word|not applicable|not required|n\/?a\b|no\b|ninguna|sin palabra|no aplica|aucune?|sans objet|kein|keine|entfallt|nicht|not classified|-+$)/;

/** "Danger" or "Warning" of section 2; `none` when the section prints neither and no statement asks for one. */
export function signalWord(parts: SheetParts): Field<SignalWord> | null {
  const lines = parts.sections.bodies.get('hazards');
  const heading = parts.sections.headingLines.get('hazards');
  if (!lines || !heading) return null;
  for (const hit of [...findLabelled(lines, label), ...findLabelled(lines, label, true)]) {
    const [first] = hit.values;
    const value = first ? wordOf(first.text) : null;
    if (first && value) return field(value, first, value === 'none' ? 0.95 : 0.97);
  }
  const alone = standingAlone(lines) ?? inSentence(lines);
  if (alone) return alone;
  const unclassified = lines.find((line) => /not classified|not hazardous|not a hazardous|non-?hazardous|no clasificad|nicht eingestuft|non classe|nicht gefahrlich|kennzeichnung nicht erforderlich|no es peligros/.test(fold(line.text)));
  // Statements without a word: the word may be drawn as a picture. Better no answer than a false "none".
  const isSaid = globalWords.test(fold(lines.map((line) => line.text).join(' '))) && matchStatements(lines.map((line) => line.text).join('\n'), parts.language, 'H', false).length > 0;
  if (!unclassified && (isSaid || lines.some((line) => /(?<![A-Z0-9])H[23]\d\d\b/.test(line.text) || label.test(fold(line.text))))) return null;
  const place = unclassified ?? heading;
  const because = unclassified ? 'Section 2 says the product is not classified and prints no signal word.' : 'Section 2 prints no signal word.';
  return { value: 'none', page: place.page, box: place.box, quote: place.text, confidence: unclassified ? 0.9 : 0.6, because };
}

function wordOf(text: string): SignalWord | null {
  const folded = fold(joinSpacedLetters(text)).replace(/^[^a-z-]+/, '');
  return danger.test(folded) ? 'danger' : warning.test(folded) ? 'warning' : none.test(folded) ? 'none' : null;
}

/** Without a label: the word as a cell of its own, or as the cry before a sentence in capitals ("DANGER! …"). */
function standingAlone(lines: Line[]): Field<SignalWord> | null {
  for (const line of lines) {
    for (const segment of line.segments) {
      const bare = fold(joinSpacedLetters(segment.text)).replace(/[^a-z ]/g, '').trim();
      const value = wordOf(bare);
      const isCry = /^\P{L}*(DANGER|WARNING|PELIGRO|GEFAHR|ACHTUNG)\s*[!:.]/u.test(segment.text) && !/proposition|california/i.test(segment.text);
      // A word that begins small is the end of a label ("Tactile warning of" / "danger").
      if (value && value !== 'none' && /^\P{L}*\p{Lu}/u.test(segment.text) && (bare.split(' ').length === 1 || isCry)) return { ...field(value, segment, isCry ? 0.65 : 0.85), because: 'No label "signal word" stands beside it.' };
    }
  }
  return null;
}

/** "…, Category 1. Signal word: Danger. May be corrosive to metals." */
function inSentence(lines: Line[]): Field<SignalWord> | null {
  for (const segment of lines.flatMap((line) => line.segments)) {
    const word = /\b(?:signal ?words?|(?:ghs |hazard )?label(?: elements?)?|kennzeichnung(?:selemente)?|(?:elements d')?etiquetage|etiqueta(?:do)?|elementos de la etiqueta|palabras? de advertencia|mentions? d'avertissement|signalwort)\s?[:-]\s?([a-z]+)/.exec(fold(segment.text))?.[1];
    const value = word ? wordOf(word) : null;
    if (value && value !== 'none') return field(value, segment, 0.9);
  }
  return null;
}

/** Words of the global system: sentences beside them are its statements. */
export const globalWords = /\bghs\b|\bsga\b|\bsgh\b|\b(category|categoria|categorie|kategorie) ?\d|1272\/2008|(hazard|precautionary) (statement|phrase)|\b(skin|eye|acute|aquatic|flam|carc|repr|resp|asp|stot|muta|met)\.? (irrit|corr|dam|sens|tox|acute|chronic|liq|sol|se|re|\d)\b/;

const field = (value: SignalWord, segment: Segment, confidence: number): Field<SignalWord> => ({ value, page: segment.page, box: segment.box, quote: segment.text, confidence });
