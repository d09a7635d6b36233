import { marks, type Mark, type ProtectionItem, type RespiratorAnswer } from '../answer';
import { type PartFacts } from '../facts';
import { type TaskContext } from '../shift-context';
import { sourced } from '../source';
import { eachLanguage, words } from '../words';
import { PROTECTION, type ProtectionRow } from './protection.data';

type SheetTopic = NonNullable<PartFacts['sheet']>['protectionWords'][number]['topic'];

interface Candidate extends ProtectionItem {
  readonly rank: number;
  readonly id: string;
}

function asksByWork({ kinds }: ProtectionRow, { task, traits }: TaskContext): boolean {
  if (kinds === 'none') return false;
  if (kinds === 'any-work') return traits.isWork;
  if (kinds === 'dusty') return traits.isDusty;
  if (kinds === 'loud') return traits.isLoud;
  return kinds.includes(task.kind);
}

/** Codes of the row that stand on a confirmed sheet of the kit in hand: only these may be cited. */
function codesFound(row: ProtectionRow, { traits, kitHazards, task }: TaskContext): readonly string[] {
  if (!traits.touchesKit || kitHazards === null || (row.onlyIn !== null && !row.onlyIn.includes(task.kind))) return [];
  return row.codes.filter((code) => kitHazards.single.has(code));
}

function fromTable(context: TaskContext): readonly Candidate[] {
  const isWetCement = context.traits.touchesKit && (context.kitHazards?.isWetCement ?? false);
  return PROTECTION.flatMap((row): readonly Candidate[] => {
    const { id, mark, rank, name, source } = row;
    if (asksByWork(row, context) || (row.asksWetCement && isWetCement)) return [{ id, mark, rank, name, source, reason: row.reason }];
    const codes = codesFound(row, context);
    if (codes.length === 0) return [];
    const reason = eachLanguage((language) => `${row.reason[language]} (${codes.join(', ')}).`);
    return [{ id, mark, rank, name, reason, source: { ...source, paragraph: codes.join(', ') } }];
  });
}

const TOPIC_MARKS: Readonly<Partial<Record<SheetTopic, { readonly mark: Mark; readonly id: string }>>> = {
  eyes: { mark: 'eyes', id: 'goggles' },
  hands: { mark: 'hands', id: 'chemical-gloves' },
  skin: { mark: 'clothing', id: 'coverall' },
  hearing: { mark: 'ears', id: 'ear-muffs' },
};

/** What section 8 of a sheet asks in words. */
function fromSheetWords({ traits, kit }: TaskContext): readonly Candidate[] {
  if (!traits.touchesKit || kit === null) return [];
  return kit.parts.flatMap((part) =>
    (part.sheet?.protectionWords ?? []).flatMap(({ topic, text }): readonly Candidate[] => {
      const target = TOPIC_MARKS[topic];
      const row = PROTECTION.find(({ id }) => id === target?.id);
      if (target === undefined || row === undefined || text.trim() === '' || saysNotNeeded(text)) return [];
      const source = sourced(`Safety data sheet of ${part.productName}`, 'read', { paragraph: 'section 8', note: text });
      return [{ id: row.id, mark: target.mark, rank: row.rank, name: row.name, reason: words(`The sheet of ${part.productName} asks it.`, `Lo pide la hoja de ${part.productName}.`), source }];
    }),
  );
}

/** "Not required", "none needed": the sheet speaks of it only to say no. */
export function saysNotNeeded(text: string): boolean {
  return /\bnot\s+(normally\s+|usually\s+|generally\s+)?(required|needed|necessary)\b|\bno special\b|^\s*none\b|\bno\s+(es|son)\s+necesari/i.test(text);
}

/** Protection of a task: the strongest of each kind, controls having gone before. More hazards never take anything away. */
export function protectionFor(context: TaskContext, respirator: RespiratorAnswer): readonly ProtectionItem[] {
  if (!context.traits.isWork) return [];
  const candidates = [...fromTable(context), ...fromSheetWords(context)];
  const items = marks.flatMap((mark): readonly ProtectionItem[] => {
    const best = candidates.filter((each) => each.mark === mark).reduce<Candidate | null>((top, next) => (top === null || next.rank > top.rank ? next : top), null);
    return best === null ? [] : [{ mark, name: best.name, reason: best.reason, source: best.source }];
  });
  return respirator.outcome === 'required' || respirator.outcome === 'by-policy' ? [...items, maskItem(respirator)] : items;
}

function maskItem({ label, source, outcome }: RespiratorAnswer): ProtectionItem {
  const reason = outcome === 'by-policy' ? words('A rule of the site or the company for this dust.', 'Regla del sitio o de la empresa para este polvo.') : words('The air here asks for it.', 'El aire aquí la exige.');
  return { mark: 'respirator', name: eachLanguage((language) => label[language].charAt(0).toUpperCase() + label[language].slice(1)), reason, source };
}
