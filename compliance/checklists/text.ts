import { type Checklist, type ChecklistLine, type Mark, type TaskState } from '../answer';
import { type Language, type Words } from '../outcome';
import { sourceLine } from '../source';

export const CHECKLIST_TEXT_FORMAT = 'kneeboard-checklist-text/1';

/** A checklist in one language: what is stored, served, hashed and signed, byte for byte. */
export interface ChecklistText {
  readonly format: typeof CHECKLIST_TEXT_FORMAT;
  readonly language: Language;
  readonly title: string;
  /** Local date of the shift, ISO. */
  readonly date: string;
  readonly jobName: string;
  readonly siteName: string;
  readonly competentPersonName: string | null;
  readonly packId: string;
  readonly packVersion: string;
  readonly morning: readonly TextLine[];
  readonly tasks: readonly TextTask[];
  readonly people: readonly TextPerson[];
  readonly sentence: string;
  readonly notice: string;
}

export interface TextLine {
  readonly id: string;
  readonly ruleId: string;
  readonly taskId: string | null;
  readonly mark: Mark | null;
  readonly isCritical: boolean;
  readonly text: string;
  readonly why: string;
  /** One line: citation, paragraph, how sure. */
  readonly source: string;
}

export interface TextTask {
  readonly taskId: string;
  readonly name: string;
  readonly state: TaskState;
  readonly heldBecause: string | null;
  readonly personIds: readonly string[];
  readonly respirator: string;
  readonly protection: readonly { readonly mark: Mark; readonly name: string }[];
  readonly live: readonly TextLine[];
}

export interface TextPerson {
  readonly personId: string;
  readonly name: string;
  readonly language: Language;
  readonly taskIds: readonly string[];
  readonly lines: readonly string[];
}

/** The checklist's text in one language. Keys stand in this order, always: the bytes are hashed. */
export function checklistText(checklist: Checklist, language: Language): ChecklistText {
  const say = (text: Words): string => text[language];
  const line = ({ id, ruleId, taskId, mark, isCritical, text, why, source }: ChecklistLine): TextLine => ({ id, ruleId, taskId, mark, isCritical, text: say(text), why: say(why), source: sourceLine(source) });
  return {
    format: CHECKLIST_TEXT_FORMAT,
    language,
    title: say(checklist.title),
    date: checklist.date,
    jobName: checklist.jobName,
    siteName: checklist.siteName,
    competentPersonName: checklist.competentPersonName,
    packId: checklist.packId,
    packVersion: checklist.packVersion,
    morning: checklist.morning.map(line),
    tasks: checklist.tasks.map((task) => ({
      taskId: task.taskId,
      name: say(task.name),
      state: task.state,
      heldBecause: task.heldBecause === null ? null : say(task.heldBecause),
      personIds: [...task.personIds],
      respirator: say(task.respirator),
      protection: task.protection.map(({ mark, name }) => ({ mark, name: say(name) })),
      live: task.live.map(line),
    })),
    people: checklist.people.map((person) => ({ personId: person.personId, name: person.name, language: person.language, taskIds: [...person.taskIds], lines: person.lines.map(say) })),
    sentence: say(checklist.sentence),
    notice: say(checklist.notice),
  };
}

/** The bytes of a checklist in one language, as a string to be encoded in UTF-8: JSON, two spaces, fixed key order, ending with a newline. */
export function renderChecklistText(checklist: Checklist, language: Language): string {
  return `${JSON.stringify(checklistText(checklist, language), null, 2)}\n`;
}

/** Reads stored bytes back. Throws a SyntaxError for anything that is not a checklist text of this format; unknown further keys are left in place. */
export function parseChecklistText(bytes: string): ChecklistText {
  const value: unknown = JSON.parse(bytes);
  if (!isChecklistText(value)) throw new SyntaxError(`not a ${CHECKLIST_TEXT_FORMAT} text`);
  return value;
}

const isRecord = (value: unknown): value is Readonly<Record<string, unknown>> => typeof value === 'object' && value !== null && !Array.isArray(value);
const isArrayOf = (value: unknown, isItem: (item: unknown) => boolean): boolean => Array.isArray(value) && value.every(isItem);
const isText = (value: unknown): boolean => typeof value === 'string';
const isTextOrNull = (value: unknown): boolean => value === null || typeof value === 'string';

function isChecklistText(value: unknown): value is ChecklistText {
  return (
    isRecord(value) &&
    value['format'] === CHECKLIST_TEXT_FORMAT &&
    (value['language'] === 'en' || value['language'] === 'es') &&
    ['title', 'date', 'jobName', 'siteName', 'packId', 'packVersion', 'sentence', 'notice'].every((key) => isText(value[key])) &&
    isTextOrNull(value['competentPersonName']) &&
    isArrayOf(value['morning'], isLine) &&
    isArrayOf(value['tasks'], isTask) &&
    isArrayOf(value['people'], isPerson)
  );
}

function isLine(value: unknown): boolean {
  return isRecord(value) && ['id', 'ruleId', 'text', 'why', 'source'].every((key) => isText(value[key])) && isTextOrNull(value['taskId']) && isTextOrNull(value['mark']) && typeof value['isCritical'] === 'boolean';
}

function isTask(value: unknown): boolean {
  return (
    isRecord(value) &&
    ['taskId', 'name', 'state', 'respirator'].every((key) => isText(value[key])) &&
    isTextOrNull(value['heldBecause']) &&
    isArrayOf(value['personIds'], isText) &&
    isArrayOf(value['protection'], (item) => isRecord(item) && isText(item['mark']) && isText(item['name'])) &&
    isArrayOf(value['live'], isLine)
  );
}

function isPerson(value: unknown): boolean {
  return isRecord(value) && ['personId', 'name', 'language'].every((key) => isText(value[key])) && isArrayOf(value['taskIds'], isText) && isArrayOf(value['lines'], isText);
}
