import { type TaskKind } from '#compliance/facts';

/** What a block looks like beside its words: dust by dots and stripes, wet work plain, pauses in brass lines. */
export type ShiftPattern = 'grinding' | 'cutting' | 'blasting' | 'mixing' | 'spreading' | 'clean-up' | 'pause';

/** One stretch of work of one person. Minutes from local midnight of the shift's date; may pass 1440. */
export interface ShiftBlock {
  /** Unique within the strip. */
  readonly id: string;
  readonly taskId: string;
  readonly label: string;
  readonly pattern: ShiftPattern;
  readonly startMinute: number;
  readonly endMinute: number;
  /** "may not start", when its task is held. */
  readonly heldWords: string | null;
  /** Work at another job: shown, not moved from here. */
  readonly isElsewhere: boolean;
}

export interface ShiftLane {
  readonly personId: string;
  readonly name: string;
  /** Under the name: "lead", "Español", "at Freight shed to 11:30". */
  readonly note: string;
  /** Said in stop words under the name: "listed twice from 09:00". */
  readonly alert: string | null;
  readonly blocks: readonly ShiftBlock[];
  /** Minutes of Table 1 work over all jobs of the day. */
  readonly table1Minutes: number;
  /** Minute of the day at which the mask rule changes for this person; null when it never does. */
  readonly maskRuleChangesAtMinute: number | null;
}

/** A block was moved, or one of its edges. Emitted at every five-minute step while it is dragged. */
export interface AssignmentChange {
  readonly blockId: string;
  readonly taskId: string;
  readonly personId: string;
  readonly startMinute: number;
  readonly endMinute: number;
}

const PATTERNS: Readonly<Record<TaskKind, ShiftPattern>> = {
  'floor-grinding': 'grinding',
  'edge-grinding': 'grinding',
  'sanding-coating': 'grinding',
  'mastic-scraping': 'cutting',
  'joint-sawing': 'cutting',
  'handheld-sawing': 'cutting',
  'crack-chasing': 'cutting',
  'mortar-removal': 'cutting',
  chipping: 'cutting',
  drilling: 'cutting',
  'shot-blasting': 'blasting',
  scarifying: 'blasting',
  'powder-mixing': 'mixing',
  'liquid-mixing': 'mixing',
  priming: 'spreading',
  spreading: 'spreading',
  'quartz-broadcast': 'spreading',
  'quartz-pick-up': 'clean-up',
  'shot-pick-up': 'clean-up',
  'collector-emptying': 'clean-up',
  'tool-washing': 'clean-up',
  'slurry-handling': 'clean-up',
  'clean-up': 'clean-up',
  inspection: 'pause',
  break: 'pause',
};

export function patternOf(kind: TaskKind): ShiftPattern {
  return PATTERNS[kind];
}
