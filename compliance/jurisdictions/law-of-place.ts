import { type ProtectionItem, type RespiratorAnswer } from '../answer';
import { type Finding, type Words } from '../outcome';
import { WHO } from '../rule';
import { type ShiftPack } from '../silica/shift-pack';
import { isFederal, sourced, type Source } from '../source';
import { sentences, words } from '../words';

/** What a line needs to know of the place. */
type Place = Pick<ShiftPack, 'name' | 'federalText' | 'orientation'>;

const isOwnLaw = ({ federalText }: Place): boolean => federalText === 'law';

/**
 * The source as this place may show it. A US state without a pack sees the federal text marked as orientation;
 * another country sees its own silica law where the pack holds it, and otherwise that nothing is on file: never the US paragraph.
 */
export function sourceInPlace(pack: Place, source: Source): Source {
  if (isOwnLaw(pack) || !isFederal(source)) return source;
  if (pack.federalText === 'orientation') return { ...source, citation: `Federal text, for orientation: ${source.citation}` };
  return sourced(`No text on file for ${pack.name.en}`, 'not-on-file', { note: pack.orientation === null ? 'Check the local law.' : `${pack.orientation.words.en} Check the local law.` });
}

/** Rules of arithmetic over a limit: they hold wherever a pack gives the limit. */
const BY_LIMIT: ReadonlySet<string> = new Set(['silica-signed-basis', 'silica-combined-exposure', 'silica-over-limit', 'silica-sampling-day']);

const ASK_LOCALLY = words('Check the local law.', 'Consulte la ley local.');

/** What a line says where no pack holds the law it leans on. */
function noPackReason(pack: ShiftPack, about: Pick<Finding, 'ruleId'>): Words {
  const gap = pack.gap ?? words('The rules of this place are not on file.', 'Las reglas de este lugar no están registradas.');
  const isSilica = about.ruleId.startsWith('silica-') || about.ruleId === 'rules-of-the-place';
  return sentences(gap, isSilica && pack.orientation !== null ? pack.orientation.words : null);
}

/**
 * A line that leans on US text decides nothing where that text is not the law: it turns undecided, and in another country without a pack it holds
 * what its rule can hold. What is a fact of the shift ("nobody asked the host") stays in the reason.
 */
export function findingInPlace(pack: ShiftPack, finding: Finding, canHold: boolean): Finding {
  if (isOwnLaw(pack) || !isFederal(finding.source)) return finding;
  if (pack.silica !== null && BY_LIMIT.has(finding.ruleId)) return { ...finding, source: pack.silica.limitSource };
  const isHeldPlace = pack.silica === null && pack.federalText === 'foreign';
  const isMet = finding.outcome === 'met';
  const source = sourceInPlace(pack, finding.source);
  const said = noPackReason(pack, finding);
  return {
    ...finding,
    outcome: 'undecided',
    isHolding: finding.isHolding || (canHold && isHeldPlace),
    reason: isMet ? said : finding.reason.en.includes(said.en) ? finding.reason : sentences(finding.reason, said),
    whatWouldChange: isMet ? ASK_LOCALLY : sentences(finding.whatWouldChange, ASK_LOCALLY),
    whoDecides: WHO.localAuthority,
    source,
  };
}

/** "None" by US text is no answer elsewhere: without a pack it is undecided. A pack's own factors and limits keep their answer. */
export function respiratorInPlace(pack: ShiftPack, respirator: RespiratorAnswer): RespiratorAnswer {
  if (isOwnLaw(pack) || !isFederal(respirator.source)) return respirator;
  const source = sourceInPlace(pack, respirator.source);
  if (pack.silica !== null) return { ...respirator, source: respirator.outcome === 'required' ? pack.silica.limitSource : source };
  return { outcome: 'undecided', apf: null, label: respirator.outcome === 'undecided' ? respirator.label : words('undecided: no pack for this place', 'sin decidir: sin reglas de este lugar'), source };
}

export function protectionInPlace(pack: ShiftPack, items: readonly ProtectionItem[]): readonly ProtectionItem[] {
  return items.map((item) => ({ ...item, source: sourceInPlace(pack, item.source) }));
}
