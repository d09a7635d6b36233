import { type Mark, type TaskState } from '#compliance/answer';
import { type Language } from '#compliance/outcome';
import { type Source } from '#compliance/source';

export interface LineText { readonly id: string; readonly taskId: string | null; readonly mark: Mark | null; readonly isCritical: boolean; readonly text: string; readonly why: string; readonly source: Source }
export interface TaskText {
  readonly taskId: string; readonly name: string; readonly state: TaskState; readonly heldBecause: string | null; readonly personIds: readonly string[];
  readonly respirator: string; readonly protection: readonly { readonly mark: Mark; readonly name: string }[]; readonly live: readonly LineText[];
}
export interface ChecklistText {
  readonly format: string; readonly language: Language; readonly title: string; readonly date: string; readonly jobName: string; readonly siteName: string;
  readonly competentPersonName: string | null; readonly morning: readonly LineText[]; readonly tasks: readonly TaskText[];
  readonly people: readonly { readonly personId: string; readonly name: string; readonly language: Language; readonly taskIds: readonly string[]; readonly lines: readonly string[] }[];
  readonly sentence: string; readonly notice: string;
}
export function parseChecklistText(text: string): ChecklistText {
  return JSON.parse(text) as ChecklistText;
}
