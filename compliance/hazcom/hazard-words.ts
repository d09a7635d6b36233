import { type Words } from '../outcome';
import { words } from '../words';
import { singleCodes } from './statements';

interface HazardWords {
  readonly codes: RegExp;
  readonly text: Words;
}

/** Plain words for what hazard statements warn of, worst for a floor crew first. The statements are those of UN GHS Annex 3; the plain wording is ours. */
const HAZARD_WORDS: readonly HazardWords[] = [
  { codes: /^H(?:300|310|330|301|311|331)/, text: words('can kill', 'puede matar') },
  { codes: /^H(?:350|351)/, text: words('can cause cancer', 'puede causar cáncer') },
  { codes: /^H334/, text: words('can start asthma', 'puede causar asma') },
  { codes: /^H(?:370|371|372|373)/, text: words('harms lungs or organs', 'daña pulmones u órganos') },
  { codes: /^H(?:314|318)/, text: words('burns skin or eyes', 'quema piel u ojos') },
  { codes: /^H317/, text: words('can cause a skin allergy', 'puede dar alergia a la piel') },
  { codes: /^H(?:340|341|360|361|362)/, text: words('can harm an unborn child or its parents', 'puede dañar al bebé o a sus padres') },
  { codes: /^H(?:302|312|332|304|305)/, text: words('is bad to breathe or swallow', 'es malo respirarlo o tragarlo') },
  { codes: /^H(?:315|319|320|316|335)/, text: words('stings skin, eyes or nose', 'irrita piel, ojos o nariz') },
  { codes: /^H336/, text: words('can make you dizzy', 'puede marear') },
  { codes: /^H22[0-9]/, text: words('catches fire', 'se prende fuego') },
];

/** What a set of hazard statements means to a crew, each said once, in a fixed order; empty when none touches people or fire. */
export function hazardWords(codes: readonly string[]): readonly Words[] {
  const single = singleCodes(codes);
  return HAZARD_WORDS.filter((row) => single.some((code) => row.codes.test(code))).map((row) => row.text);
}
