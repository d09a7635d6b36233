import { type Finding, type Words } from './outcome';
import { type Source } from './source';

/** What the rules answer for one shift; the same on the office page (live) and on the server (again). */
export interface ShiftAnswer {
  readonly pack: {
    readonly id: string;
    readonly version: string;
    readonly name: Words;
    readonly isComplete: boolean;
    readonly gap: Words | null;
    /** What the US federal text is here: the law, shown for orientation, or another country's. */
    readonly federalText: 'law' | 'orientation' | 'foreign';
    /** The place's own silica figure where no pack holds its law; decides nothing. */
    readonly orientation: { readonly words: Words; readonly source: Source } | null;
  };
  readonly tasks: readonly TaskAnswer[];
  readonly people: readonly PersonAnswer[];
  /** Lines about the whole shift: floor, engines, host, first aid, floor profile. */
  readonly gates: readonly Finding[];
  readonly kits: readonly KitAnswer[];
  /** What the work uses up: amounts by stated rates, or "not known" and who can say. */
  readonly consumables: readonly Finding[];
  readonly notice: Words;
}

export type TaskState = 'may-not-start' | 'not-decided' | 'ready';

export interface TaskAnswer {
  readonly taskId: string;
  readonly name: Words;
  readonly state: TaskState;
  /** Short state as shown first in the row: "Table 1, xiii", "May not start". */
  readonly label: Words;
  /** One or two sentences: the figures that decide. */
  readonly summary: Words;
  readonly silicaBasis: 'table-1' | 'alternative' | 'held' | 'outside';
  /** Table 1 row as printed in the standard: "xiii". */
  readonly table1Row: string | null;
  readonly respirator: RespiratorAnswer;
  readonly protection: readonly ProtectionItem[];
  /** Controls before protection. */
  readonly findings: readonly Finding[];
}

export interface RespiratorAnswer {
  readonly outcome: 'required' | 'none-required' | 'by-policy' | 'undecided';
  readonly apf: number | null;
  readonly label: Words;
  readonly source: Source;
}

export const marks = ['eyes', 'face', 'ears', 'hands', 'clothing', 'boots', 'respirator'] as const;
export type Mark = (typeof marks)[number];

export interface ProtectionItem {
  readonly mark: Mark;
  readonly name: Words;
  readonly reason: Words;
  readonly source: Source;
}

export interface PersonAnswer {
  readonly personId: string;
  /** Table 1 time of the whole shift, all jobs together. */
  readonly table1Minutes: number;
  /** The part of it on other jobs. */
  readonly table1MinutesElsewhere: number;
  /** Minute of the day at which the person's Table 1 sum passes four hours; null when it never does. */
  readonly maskRuleChangesAtMinute: number | null;
  readonly doubleBookings: readonly { readonly startMinute: number; readonly endMinute: number; readonly with: string }[];
  /** This person's own respirator in each assigned task; the task's answer is the strictest of its people. */
  readonly respirators: readonly { readonly taskId: string; readonly respirator: RespiratorAnswer }[];
  readonly findings: readonly Finding[];
}

export interface KitAnswer {
  readonly kitId: string;
  readonly kits: number | null;
  readonly mixingMinutes: number | null;
  readonly powderDumps: number | null;
  /** Union of the parts' hazards for protection, not classification. */
  readonly hazardCodes: readonly string[];
  readonly pictograms: readonly string[];
  readonly partsWithoutSheet: readonly string[];
  readonly findings: readonly Finding[];
}

/** The day's checklist, language-neutral: both languages side by side; frozen when published. */
export interface Checklist {
  readonly format: 'kneeboard-checklist/1';
  readonly title: Words;
  readonly date: string;
  readonly jobName: string;
  readonly siteName: string;
  readonly competentPersonName: string | null;
  readonly packId: string;
  readonly packVersion: string;
  /** What must be true in the morning, answered by the lead. */
  readonly morning: readonly ChecklistLine[];
  readonly tasks: readonly ChecklistTask[];
  readonly people: readonly ChecklistPerson[];
  /** The one sentence that is signed, the same everywhere. */
  readonly sentence: Words;
  readonly notice: Words;
}

export interface ChecklistTask {
  readonly taskId: string;
  readonly name: Words;
  readonly state: TaskState;
  readonly heldBecause: Words | null;
  readonly personIds: readonly string[];
  readonly respirator: Words;
  readonly protection: readonly { readonly mark: Mark; readonly name: Words }[];
  /** Two to four live lines that unlock the task each time it starts. */
  readonly live: readonly ChecklistLine[];
}

export interface ChecklistLine {
  readonly id: string;
  readonly ruleId: string;
  readonly taskId: string | null;
  readonly mark: Mark | null;
  /** "No" on a critical line holds the task and opens a corrective action. */
  readonly isCritical: boolean;
  readonly text: Words;
  readonly why: Words;
  readonly source: Source;
}

export interface ChecklistPerson {
  readonly personId: string;
  readonly name: string;
  readonly language: 'en' | 'es';
  readonly taskIds: readonly string[];
  /** This person's own lines: tasks with times, mask, protection. */
  readonly lines: readonly Words[];
}
