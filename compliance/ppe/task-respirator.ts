import { type RespiratorAnswer } from '../answer';
import { type PersonFacts, type TaskKind } from '../facts';
import { apfName, silicaRespirator, UNDECIDED_RESPIRATOR } from '../silica/respirator';
import { type SilicaTask } from '../silica/silica-context';
import { table1Place } from '../silica/table1';
import { type TaskContext } from '../shift-context';
import { commonPractice, sourced } from '../source';
import { words } from '../words';
import { saysNotNeeded } from './protection';

type SheetDemand = { readonly kind: 'required' | 'conditional'; readonly productName: string; readonly quote: string } | { readonly kind: 'none' };

const CONDITION = /inadequate|insufficient|poor(ly)?\b|exceed|\bif\b|\bwhen\b|\bwhere\b|in case of|\botherwise\b|\bunless\b|insuficiente|\bsi\b|de lo contrario|a menos que/i;

/** What the sheets of the kit ask of breathing protection: P284 without a condition, or section 8 in words. P280 alone names nothing. */
export function sheetRespiratorDemand({ traits, kit }: TaskContext): SheetDemand {
  if (!traits.touchesKit || kit === null) return { kind: 'none' };
  const demands = kit.parts.flatMap((part): readonly Exclude<SheetDemand, { kind: 'none' }>[] => {
    const sheet = part.sheet;
    if (sheet === null) return [];
    const texts = sheet.protectionWords.filter(({ topic, text }) => topic === 'respiratory' && text.trim() !== '' && !saysNotNeeded(text)).map(({ text }) => text);
    const said = texts.map((quote) => ({ kind: CONDITION.test(quote) ? ('conditional' as const) : ('required' as const), productName: part.productName, quote }));
    const codes = sheet.precautionaryCodes.flatMap((code) => code.split('+'));
    // P284's bracketed condition holds only where the sheet explains it; P285 (withdrawn, on old sheets) is always conditional.
    const p284 = codes.includes('P284') && said.every(({ kind }) => kind !== 'conditional') ? [{ kind: 'required' as const, productName: part.productName, quote: 'P284' }] : [];
    const p285 = codes.includes('P285') ? [{ kind: 'conditional' as const, productName: part.productName, quote: 'P285' }] : [];
    return [...said, ...p284, ...p285];
  });
  return demands.find(({ kind }) => kind === 'required') ?? demands[0] ?? { kind: 'none' };
}

const POLICY: Readonly<Partial<Record<TaskKind, RespiratorAnswer['source']>>> = {
  'powder-mixing': commonPractice('The respirator is on before powder is dumped.'),
  'collector-emptying': commonPractice('Worn by policy. 1926.57(f)(5)(iii) has dust-filter masks for short dusty work such as dumping collectors, but speaks of abrasive blasting (WAC 296-818-20010 note 2, read).'),
};

/** "None" in Table 1 is none under Table 1: the site, its owner or another law may still ask a mask. */
const SITE_RULE = sourced('Rule of the site or its owner', 'read', { note: 'As written down for this job.' });

/** A person's respirator in a task: silica first, then the sheets for vapor, then the site's rule, then the house's own. */
export function respiratorOf(context: SilicaTask, person: PersonFacts | null): RespiratorAnswer {
  const { silica, facts, traits, kitHazards, task, table1TimeByPerson, pack } = context;
  const minutes = person === null ? 0 : (table1TimeByPerson.get(person.id)?.minutes ?? 0);
  const forSilica = silicaRespirator(silica, table1Place(facts.setting), minutes, pack.silica?.factors ?? null);
  if (forSilica.outcome === 'undecided') return forSilica;
  const isKitKnown = !traits.touchesKit || (kitHazards !== null && kitHazards.partsWithoutSheet.length === 0);
  if (!isKitKnown) return UNDECIDED_RESPIRATOR;
  const demand = sheetRespiratorDemand(context);
  if (demand.kind === 'required') return bySheet(forSilica, demand);
  if (forSilica.outcome === 'required') return forSilica;
  const siteRule = traits.isDusty ? (facts.siteMaskRule?.trim() ?? '') : '';
  if (siteRule !== '') return { outcome: 'by-policy', apf: null, label: words(`site rule: ${siteRule}`, `regla del sitio: ${siteRule}`), source: SITE_RULE };
  const policy = POLICY[task.kind];
  if (policy !== undefined) {
    const half = apfName(10, pack.silica?.factors ?? null);
    return { outcome: 'by-policy', apf: null, label: words(`${half.en}, by policy`, `${half.es}, por regla`), source: policy };
  }
  if (demand.kind === 'conditional') {
    return { outcome: 'none-required', apf: null, label: words('none while fresh air moves', 'ninguna si corre aire fresco'), source: sheetSource(demand.productName, demand.quote) };
  }
  if (traits.touchesKit) return { outcome: 'none-required', apf: null, label: words('none named on the sheets', 'ninguna en las hojas'), source: sourced('Confirmed safety data sheets of this job', 'read', { paragraph: 'sections 2 and 8' }) };
  return forSilica;
}

function sheetSource(productName: string, quote: string): RespiratorAnswer['source'] {
  return sourced(`Safety data sheet of ${productName}`, 'read', { paragraph: 'sections 2 and 8', note: quote });
}

function bySheet(forSilica: RespiratorAnswer, { productName, quote }: { readonly productName: string; readonly quote: string }): RespiratorAnswer {
  const source = sheetSource(productName, quote);
  if (forSilica.outcome !== 'required') return { outcome: 'required', apf: null, label: words(`as the sheet of ${productName} says`, `como dice la hoja de ${productName}`), source };
  return {
    outcome: 'required',
    apf: forSilica.apf,
    label: words(`${forSilica.label.en}; for vapor as the sheet of ${productName} says`, `${forSilica.label.es}; por vapor, como dice la hoja de ${productName}`),
    source: forSilica.source,
  };
}

/** Strictness for choosing the task's one answer out of its people's. */
export function respiratorRank({ outcome, apf }: RespiratorAnswer): number {
  if (outcome === 'undecided') return Number.MAX_SAFE_INTEGER;
  if (outcome === 'required') return 10 + (apf ?? 0);
  return outcome === 'by-policy' ? 1 : 0;
}

/** The strictest answer of the assigned people; names them where it does not hold for all. */
export function taskRespirator(answers: readonly { readonly person: PersonFacts; readonly respirator: RespiratorAnswer }[], whenNobody: RespiratorAnswer): RespiratorAnswer {
  const top = answers.reduce<RespiratorAnswer | null>((strictest, { respirator }) => (strictest === null || respiratorRank(respirator) > respiratorRank(strictest) ? respirator : strictest), null);
  if (top === null) return whenNobody;
  const same = answers.filter(({ respirator }) => respiratorRank(respirator) === respiratorRank(top));
  if (same.length === answers.length) return top;
  const names = same.map(({ person }) => person.name).join(', ');
  return { ...top, label: words(`${top.label.en} (${names})`, `${top.label.es} (${names})`) };
}
