import { type ShiftBlock, type ShiftLane } from './shift-lane';

/** All times here are minutes from local midnight of the shift's date. */
export interface MinuteRange {
  readonly startMinute: number;
  readonly endMinute: number;
}

export const STEP_MINUTES = 5;
/** A plan may run into the second day, no further (as the contract of a shift says). */
export const LAST_MINUTE = 2880;
/** Table 1 changes its respirator at more than four hours a shift. Source: 29 CFR 1926.1153(c)(1), Table 1, column heads. */
export const MASK_RULE_MINUTES = 240;
/** The meter's full width, so that the four-hour mark stands at four fifths. */
export const METER_MINUTES = 300;

export type Grip = 'start' | 'end' | 'whole';

/** What the strip spans: whole half hours around all blocks, at least four hours. */
export function rangeOf(lanes: readonly ShiftLane[]): MinuteRange {
  const blocks = lanes.flatMap((lane) => lane.blocks);
  if (blocks.length === 0) return { startMinute: 390, endMinute: 900 };
  const startMinute = Math.floor(Math.min(...blocks.map((block) => block.startMinute)) / 30) * 30;
  const endMinute = Math.ceil(Math.max(...blocks.map((block) => block.endMinute)) / 30) * 30;
  return { startMinute, endMinute: Math.max(endMinute, startMinute + 240) };
}

/** Full hours inside the range, its ends left out where their words would hang over. */
export function hoursOf(range: MinuteRange): readonly number[] {
  const hours: number[] = [];
  for (let minute = Math.ceil((range.startMinute + 15) / 60) * 60; minute <= range.endMinute - 15; minute += 60) hours.push(minute);
  return hours;
}

/** Place of a minute in the range, in percent of its width. */
export function percentOf(minute: number, range: MinuteRange): number {
  return ((minute - range.startMinute) / (range.endMinute - range.startMinute)) * 100;
}

export function snap(minutes: number): number {
  return Math.round(minutes / STEP_MINUTES) * STEP_MINUTES;
}

/** A block after its grip was moved by whole steps. It keeps at least one step of length and stays within two days. */
export function moved(block: MinuteRange, grip: Grip, byMinutes: number): MinuteRange {
  const by = snap(byMinutes);
  const { startMinute, endMinute } = block;
  if (grip === 'start') return { startMinute: clamp(startMinute + by, 0, endMinute - STEP_MINUTES), endMinute };
  if (grip === 'end') return { startMinute, endMinute: clamp(endMinute + by, startMinute + STEP_MINUTES, LAST_MINUTE) };
  const length = endMinute - startMinute;
  const start = clamp(startMinute + by, 0, LAST_MINUTE - length);
  return { startMinute: start, endMinute: start + length };
}

/** Blocks of a lane in as few rows as keep overlapping ones apart, with the row of each. */
export function rowsOf(blocks: readonly ShiftBlock[]): { readonly rowById: ReadonlyMap<string, number>; readonly count: number } {
  const rowById = new Map<string, number>();
  const ends: number[] = [];
  for (const block of [...blocks].sort((a, b) => a.startMinute - b.startMinute || a.endMinute - b.endMinute)) {
    const free = ends.findIndex((end) => end <= block.startMinute);
    const row = free === -1 ? ends.length : free;
    ends[row] = block.endMinute;
    rowById.set(block.id, row);
  }
  return { rowById, count: Math.max(1, ends.length) };
}

/** 24-hour clock of a minute: 430 is "07:10", 1500 is "01:00". */
export function clock(minute: number): string {
  const ofDay = ((minute % 1440) + 1440) % 1440;
  return `${String(Math.floor(ofDay / 60)).padStart(2, '0')}:${String(ofDay % 60).padStart(2, '0')}`;
}

/** The minute a typed clock time means ("7:10", "0710", "07:10"), on the day nearest to the minute it replaces; null when it is no time. */
export function minuteOfClock(time: string, near: number): number | null {
  const match = /^\s*(\d{1,2})[:.]?(\d{2})\s*$/.exec(time);
  const hours = Number(match?.[1]);
  const minutes = Number(match?.[2]);
  if (!match || hours > 23 || minutes > 59) return null;
  const ofDay = hours * 60 + minutes;
  const nextDay = ofDay + 1440;
  return Math.abs(nextDay - near) < Math.abs(ofDay - near) ? nextDay : ofDay;
}

/** Length in words: "45 min", "2 h 10", "4 h". */
export function lengthWords(minutes: number): string {
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${String(rest).padStart(2, '0')}`;
}

function clamp(value: number, low: number, high: number): number {
  return Math.min(high, Math.max(low, value));
}
