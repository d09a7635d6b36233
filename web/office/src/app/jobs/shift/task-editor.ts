import { afterNextRender, ChangeDetectionStrategy, Component, computed, ElementRef, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { type DustMethod, type EquipmentKind, type TaskKind } from '#compliance/facts';
import { TASKS } from '#compliance/silica/tasks.data';
import { type ShiftPlan } from '#shared/jobs';
import { TaskKindSelect } from './task-kind-select';
import { minuteFrom, planEnd, timeText, type PlannedTask } from './shift-plan';
import { type ShiftThings } from './shift-names';

const collecting: readonly EquipmentKind[] = ['collector', 'vacuum', 'bucket-extraction', 'air-mover'];
const dustChoices: readonly { readonly value: DustMethod | null; readonly label: string }[] = [
  { value: null, label: 'not chosen yet' },
  { value: 'vacuum', label: 'collector or vacuum at the tool' },
  { value: 'water', label: 'water at the tool' },
  { value: 'none', label: 'no dust control' },
];

let lastId = 0;

/** One task in place, under the strip: every change counts at once, and the lines below answer it. */
@Component({
  selector: 'kb-task-editor',
  imports: [MatButton, TaskKindSelect],
  templateUrl: './task-editor.html',
  styleUrl: './task-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskEditor {
  readonly task = input.required<PlannedTask>();
  readonly plan = input.required<ShiftPlan>();
  readonly things = input.required<ShiftThings>();
  readonly changed = output<PlannedTask>();
  readonly removed = output<void>();
  readonly closed = output<void>();

  protected readonly id = `kb-task-editor-${(lastId += 1)}`;
  protected readonly dustChoices = dustChoices;

  protected readonly name = computed(() => TASKS[this.task().kind].name.en);
  protected readonly tools = computed(() => this.things().equipment.filter(({ kind }) => !collecting.includes(kind)));
  protected readonly collectors = computed(() => this.things().equipment.filter(({ kind }) => collecting.includes(kind)));
  protected readonly isDusty = computed(() => TASKS[this.task().kind].isDusty || this.task().collectorId !== null || this.task().dustMethod !== null);
  protected readonly usesTool = computed(() => {
    const { isLoud, isIgnition, touchesKit } = TASKS[this.task().kind];
    return isLoud || isIgnition || touchesKit || this.task().equipmentId !== null;
  });
  protected readonly usesKit = computed(() => TASKS[this.task().kind].touchesKit || this.task().kitId !== null);
  protected readonly logged = computed(() => this.task().logged ?? []);
  protected readonly hasLog = computed(() => this.logged().length > 0);
  protected readonly rows = computed(() =>
    this.plan().personIds.map((personId) => {
      const stretches = this.task().assignments.flatMap((assignment, index) => (assignment.personId === personId ? [{ index, start: timeText(assignment.startMinute), end: timeText(assignment.endMinute) }] : []));
      const logged = this.logged().flatMap((span, index) => (span.personId === personId ? [{ index, start: timeText(span.startMinute), end: timeText(span.endMinute) }] : []));
      return { personId, name: this.nameOf(personId), stretches, logged };
    }),
  );

  constructor() {
    const element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    // It may have been opened from a row far below.
    afterNextRender(() => {
      element.scrollIntoView?.({ block: 'nearest' });
      element.querySelector<HTMLElement>('.editor')?.focus({ preventScroll: true });
    });
  }

  protected set(change: Partial<PlannedTask>): void {
    this.changed.emit({ ...this.task(), ...change });
  }

  protected setKind(kind: TaskKind): void {
    this.set({ kind, kitId: TASKS[kind].touchesKit ? this.task().kitId : null });
  }

  /** Puts a person on the task, from when the others start, or after the rest of the day. */
  protected put(personId: string, isOn: boolean): void {
    const { assignments } = this.task();
    if (!isOn) return this.set({ assignments: assignments.filter((assignment) => assignment.personId !== personId) });
    const like = assignments[0];
    const startMinute = like?.startMinute ?? Math.min(planEnd(this.plan()), 2880 - 60);
    this.set({ assignments: [...assignments, { personId, startMinute, endMinute: like?.endMinute ?? startMinute + 60 }] });
  }

  /** A second stretch of the same task for the same person, an hour after the last one ends. */
  protected addStretch(personId: string): void {
    const { assignments } = this.task();
    const last = Math.max(...assignments.filter((assignment) => assignment.personId === personId).map(({ endMinute }) => endMinute));
    const startMinute = Math.min(last + 60, 2820);
    this.set({ assignments: [...assignments, { personId, startMinute, endMinute: startMinute + 60 }] });
  }

  protected setStart(index: number, text: string): void {
    const startMinute = minuteFrom(text);
    if (startMinute === null) return;
    this.set({
      assignments: this.task().assignments.map((assignment, at) => {
        if (at !== index) return assignment;
        // The length stays, so that moving the start never leaves an end before it.
        return { ...assignment, startMinute, endMinute: Math.min(2880, startMinute + (assignment.endMinute - assignment.startMinute)) };
      }),
    });
  }

  protected setEnd(index: number, text: string): void {
    const start = this.task().assignments[index]?.startMinute ?? 0;
    const endMinute = minuteFrom(text, start % 1440);
    if (endMinute === null) return;
    const day = Math.floor(start / 1440) * 1440;
    this.set({ assignments: this.task().assignments.map((assignment, at) => (at === index ? { ...assignment, endMinute: Math.min(2880, endMinute + day) } : assignment)) });
  }

  /** Starts from what was planned: what was really worked is typed over it. */
  protected log(personId: string): void {
    const planned = this.task().assignments.find((assignment) => assignment.personId === personId);
    if (planned) this.set({ logged: [...this.logged(), { ...planned }] });
  }

  protected unlog(index: number): void {
    this.set({ logged: this.logged().filter((_, at) => at !== index) });
  }

  protected setLogged(index: number, { start, end }: { readonly start?: string; readonly end?: string }): void {
    const span = this.logged()[index];
    if (!span) return;
    const startMinute = start === undefined ? span.startMinute : minuteFrom(start);
    if (startMinute === null) return;
    // A time at or before the start is the next day's.
    const endMinute = minuteFrom(end ?? timeText(span.endMinute), startMinute % 1440);
    if (endMinute === null) return;
    const day = Math.floor(startMinute / 1440) * 1440;
    this.set({ logged: this.logged().map((each, at) => (at === index ? { ...each, startMinute, endMinute: Math.min(2880, endMinute + day) } : each)) });
  }

  private nameOf(personId: string): string {
    return this.things().people.find(({ id }) => id === personId)?.name ?? 'somebody no longer listed';
  }
}
