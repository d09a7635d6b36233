/**
 * What pages, exports and checklists show stands in rows of its own; the log holds what was recorded. Here the two are
 * held against each other, one entry at a time. Pure: rows come as the database gave them.
 */
export interface ShownAcknowledgement extends Readonly<Record<string, unknown>> {
  readonly strokesSha256: string;
  /** Of the delivered bytes; null when the delivery is gone. */
  readonly envelopeSha256: string | null;
}
export interface ShownVersion extends Readonly<Record<string, unknown>> {
  /** SHA-256 of the stored bytes, by the names of the manifest: `facts.json`, `text.en.json`. */
  readonly hashes: Readonly<Record<string, string>>;
  /** What the texts' rows say of themselves. */
  readonly claimed: Readonly<Record<string, string>>;
  /** `id name language` of whom the stored checklist names, and of whom the rows ask to sign; sorted. */
  readonly peopleInChecklist: readonly string[];
  readonly peopleAsked: readonly string[];
}
type Recorded = Readonly<Record<string, unknown>>;

/** Words for what a person would look for on the page; other fields keep their own names. */
const words: Readonly<Record<string, string>> = {
  personName: 'the person’s name', personId: 'the person', jobName: 'the job’s name', jobId: 'the job', shiftDate: 'the shift’s date', versionId: 'the version', versionNumber: 'the version’s number',
  kind: 'the kind', language: 'the language', textSha256: 'the text that was signed', reason: 'the reason', pinState: 'whether the PIN was right', wasSuperseded: 'whether a newer version was out',
  capturedAt: 'the time on the tablet', receivedAt: 'the time of arrival', clockOffsetSeconds: 'the tablet’s clock', tabletName: 'the tablet’s name', tabletId: 'the tablet', strokesSha256: 'the drawn signature', envelopeSha256: 'what the tablet sent',
  answers: 'the answers', text: 'the text', openedAt: 'when it was opened', openedBy: 'who opened it', evidence: 'the evidence', resolvedBy: 'who resolved it', resolvedAt: 'when it was resolved',
  timeDoubt: 'whether the tablet’s time can be right', event: 'what was done', proof: 'who vouched for it', byName: 'who vouched for it', byPersonId: 'who vouched for it', at: 'the time of arrival',
  manifest: 'the manifest', publishedBy: 'who published it', publishedAt: 'when it was published', values: 'the confirmed values', confirmedBy: 'who confirmed it', confirmedAt: 'when it was confirmed', sha256: 'the file',
};
const wordsFor = (field: string): string => words[field] ?? field;

const instants = new Set(['at', 'capturedAt', 'receivedAt', 'openedAt', 'resolvedAt', 'publishedAt', 'confirmedAt', 'signedAt']);

/** The same value, whatever way it was written: ids in any case, instants with any offset, halves of character pairs as the database keeps them. */
function isSame(field: string, recorded: unknown, shown: unknown): boolean {
  if (recorded === shown) return true;
  if (recorded === null || shown === null || recorded === undefined || shown === undefined) return false;
  if (instants.has(field)) return new Date(recorded as string).getTime() === new Date(shown as string).getTime();
  if (typeof recorded !== 'string' || typeof shown !== 'string') return JSON.stringify(recorded) === JSON.stringify(shown);
  return field.endsWith('Id') || field === 'id' ? recorded.toLowerCase() === shown.toLowerCase() : wellFormed(recorded) === wellFormed(shown);
}

const wellFormed = (text: string): string => Buffer.from(text).toString();

/** The first recorded field that the row shows otherwise, in words; undefined when there is none. Fields that were not recorded say nothing. */
function differing(recorded: Recorded, shown: Recorded, fields: readonly string[]): string | undefined {
  const field = fields.find((each) => each in recorded && !isSame(each, recorded[each], shown[each]));
  return field && wordsFor(field);
}

export const acknowledgementFields = [
  'id', 'personName', 'personId', 'jobName', 'jobId', 'shiftId', 'shiftDate', 'versionId', 'versionNumber', 'kind', 'language', 'textSha256', 'reason', 'pinState', 'wasSuperseded',
  'capturedAt', 'receivedAt', 'clockOffsetSeconds', 'tabletName', 'tabletId', 'deliveryId', 'strokesSha256', 'envelopeSha256', 'timeDoubt',
] as const;
export const acknowledgementDiffers = (recorded: Recorded, shown: ShownAcknowledgement): string | undefined => differing(recorded, shown, acknowledgementFields);

/** A briefing or a start check. The answers are compared as text: they are stored as they were recorded. */
export const answersDiffer = (recorded: Recorded, shown: Recorded): string | undefined =>
  differing({ ...recorded, answers: JSON.stringify(recorded['answers']), personId: (recorded['person'] as Recorded | undefined)?.['id'] }, shown, ['id', 'kind', 'versionId', 'taskId', 'personId', 'answers', 'pinState', 'timeDoubt', 'capturedAt', 'receivedAt', 'envelopeSha256']);

/** A PIN that was set or reset, or a start PIN that was given. */
export const pinDiffers = (recorded: Recorded, shown: Recorded): string | undefined =>
  differing(recorded, shown, ['id', 'event', 'personId', 'personName', 'proof', 'byPersonId', 'byName', 'tabletId', 'tabletName', 'deliveryId', 'capturedAt', 'at', 'envelopeSha256']);

export function actionDiffers(recorded: Recorded, shown: Recorded): string | undefined {
  if (recorded['event'] !== 'resolved') return differing(recorded, shown, ['id', 'jobId', 'shiftId', 'versionId', 'taskId', 'lineId', 'text', 'openedAt', 'openedBy', 'deliveryId']);
  return differing({ ...recorded, resolvedBy: (recorded['resolvedBy'] as Recorded | undefined)?.['name'] }, shown, ['id', 'evidence', 'resolvedBy', 'resolvedAt']);
}

/** The manifest was recorded, and it holds the hash of everything that was published: facts, checklist, each text. */
export function versionDiffers(recorded: Recorded, shown: ShownVersion): string | undefined {
  const publisher = recorded['publishedBy'] as Recorded | undefined;
  const own = differing({ ...recorded, id: recorded['versionId'], publishedBy: publisher?.['id'], publishedByName: publisher?.['name'] }, shown, ['id', 'number', 'jobId', 'shiftId', 'date', 'manifest', 'manifestSha256', 'publishedBy', 'publishedByName', 'publishedAt']);
  if (own) return own;
  const listed = Object.fromEntries(String(recorded['manifest']).split('\n').filter(Boolean).map((line) => [line.slice(66), line.slice(0, 64)]));
  const names = [...new Set([...Object.keys(listed), ...Object.keys(shown.hashes)])].sort();
  const changed = names.find((name) => listed[name] !== shown.hashes[name] || (name in shown.claimed && shown.claimed[name] !== listed[name]));
  if (changed) return `the stored bytes of ${changed}`;
  return shown.peopleAsked.join('\n') === shown.peopleInChecklist.join('\n') ? undefined : 'whom it asks to sign';
}

export const basisDiffers = (recorded: Recorded, shown: Recorded): string | undefined =>
  differing(recorded, shown, ['id', 'jobId', 'taskKind', 'kind', 'exposureMicrogramsPerM3', 'conditions', 'endsOn', 'interimApf', 'signedBy', 'signedByName', 'signedAt', 'signedOn']);

const singles = ['productName', 'supplier', 'language', 'revisedOn', 'signalWord'] as const;
const lists = ['hazardCodes', 'precautionaryCodes', 'ingredients', 'limits', 'protectionWords'] as const;
/** The values that a named person confirmed, without where each was read. */
function valuesOf(fields: unknown): Recorded {
  const of = (field: unknown) => (field as { value?: unknown } | null)?.value ?? null;
  const all = (fields ?? {}) as Record<string, unknown>;
  return Object.fromEntries([...singles.map((name) => [name, of(all[name])]), ...lists.map((name) => [name, ((all[name] ?? []) as unknown[]).map(of)])]);
}
export function sheetDiffers(recorded: Recorded, shown: Recorded): string | undefined {
  const confirmer = (recorded['confirmedBy'] as Recorded | undefined)?.['id'];
  const own = differing({ ...recorded, id: recorded['revisionId'], confirmedBy: confirmer, state: 'confirmed' }, shown, ['id', 'state', 'sha256', 'productId', 'confirmedBy', 'confirmedAt']);
  if (own) return own;
  const [confirmed, now] = [recorded['values'] as Recorded, valuesOf(shown['fields'])];
  return [...singles, ...lists].every((name) => sorted(confirmed[name]) === sorted(now[name])) ? undefined : wordsFor('values');
}
/** JSON with keys in one order: the database keeps fields as jsonb, which has an order of its own. */
const sorted = (value: unknown): string => JSON.stringify(value, (_, each: unknown) => (typeof each === 'object' && each !== null && !Array.isArray(each) ? Object.fromEntries(Object.entries(each).sort(([a], [b]) => (a < b ? -1 : 1))) : each));
