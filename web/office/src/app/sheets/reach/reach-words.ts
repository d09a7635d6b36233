import { type FieldChange, type Reach } from '#shared/library';

/** Names of the fields as the review page writes them. */
export const fieldNames: Readonly<Record<FieldChange['field'], string>> = {
  productName: 'Product',
  supplier: 'Supplier',
  signalWord: 'Signal word',
  hazardCodes: 'Hazards',
  precautionaryCodes: 'Precautions',
  ingredients: 'Ingredients',
  limits: 'Limits',
  protectionWords: 'Protection',
};

const small = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'] as const;

/** A count as it stands in a sentence: in words up to twelve, in figures above. */
export function countWords(count: number, one: string, many: string): string {
  return `${small[count] ?? count} ${count === 1 ? one : many}`;
}

/** "H350", "H350 and H372", "H334, H350 and H372" */
export function listWords(items: readonly string[]): string {
  return items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
}

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** Open jobs among the touched shifts, shifts whose published checklist the sheet changes, signatures given on those. */
export interface ReachCounts {
  readonly jobs: number;
  readonly published: number;
  readonly signed: number;
  readonly asked: number;
  /** Jobs with a published checklist that changes. */
  readonly crews: number;
}

export function countsOf(reach: Reach): ReachCounts {
  const changed = reach.shifts.filter(({ publishedVersion, changesChecklist }) => publishedVersion !== null && changesChecklist);
  const sum = (of: (shift: Reach['shifts'][number]) => number) => changed.reduce((total, shift) => total + of(shift), 0);
  return {
    jobs: new Set(reach.shifts.map(({ jobId }) => jobId)).size,
    published: changed.length,
    signed: sum(({ signed }) => signed),
    asked: sum(({ asked }) => asked),
    crews: new Set(changed.map(({ jobId }) => jobId)).size,
  };
}

/** The note of a revision: a bold beginning, then what it reaches and what follows. */
export interface ReachNote {
  readonly kind: 'stop' | 'caution' | 'plain';
  readonly lead: string;
  readonly rest: string;
}

/** What the new sheet adds or changes, whom it reaches and what has to be done; null when there is nothing to compare with and nobody is touched. */
export function reachNote(reach: Reach, isConfirmed: boolean): ReachNote | null {
  const counts = countsOf(reach);
  if (reach.previous === null && counts.jobs === 0 && reach.kits.length === 0) return null;
  const hazards = reach.changes.find(({ field }) => field === 'hazardCodes');
  const lead = leadOf(reach, hazards);
  const use = counts.jobs === 0 ? 'No open job uses it.' : `${capital(countWords(counts.jobs, 'open job uses', 'open jobs use'))} it`;
  if (counts.jobs === 0) return { kind: hazards?.isNewHazard ? 'caution' : 'plain', lead, rest: use };
  if (counts.published === 0) return { kind: hazards?.isNewHazard ? 'caution' : 'plain', lead, rest: `${use}; no published checklist changes.${hazards?.isNewHazard ? ' Brief the crews on the new hazard all the same: 29 CFR 1910.1200(h)(1).' : ''}` };
  const signatures = counts.signed === 0 ? 'nobody has signed there yet' : `${counts.signed} ${counts.signed === 1 ? 'signature was' : 'signatures were'} given on the older one`;
  const crews = counts.crews === 1 ? 'the crew' : counts.crews === 2 ? 'both crews' : `all ${counts.crews} crews`;
  const next = isConfirmed ? `Applying it asks ${crews} to be briefed and sign again.` : `Once it is confirmed and applied, ${crews} ${counts.crews === 1 ? 'is' : 'are'} asked to be briefed and sign again.`;
  return { kind: 'stop', lead, rest: `${use}; ${signatures}. ${next}` };
}

function leadOf(reach: Reach, hazards: FieldChange | undefined): string {
  if (reach.previous === null) return 'The first sheet of this product in this language.';
  if (reach.changes.length === 0) return 'The new sheet says the same as the older one.';
  const parts = [hazards && hazards.added.length > 0 ? `adds ${listWords(hazards.added)}` : '', hazards && hazards.removed.length > 0 ? `no longer lists ${listWords(hazards.removed)}` : ''].filter(Boolean);
  if (parts.length > 0) return `The new sheet ${parts.join(' and ')}.`;
  return `The new sheet changes ${listWords(reach.changes.map(({ field }) => fieldNames[field].toLowerCase()))}.`;
}
