import { ChangeDetectionStrategy, Component, type ElementRef, computed, inject, input, output, signal, viewChild } from '@angular/core';
import { LiveAnnouncer } from '@angular/cdk/a11y';
import { type Language } from '#compliance/outcome';
import { type Grip, MASK_RULE_MINUTES, METER_MINUTES, type MinuteRange, STEP_MINUTES, clock, hoursOf, lengthWords, minuteOfClock, moved, percentOf, rangeOf, rowsOf } from './shift-geometry';
import { type AssignmentChange, type ShiftBlock, type ShiftLane } from './shift-lane';
import { SHIFT_WORDS } from './shift-words';

interface Drag {
  readonly block: ShiftBlock;
  readonly lane: ShiftLane;
  readonly grip: Grip;
  readonly fromX: number;
  readonly minutesPerPixel: number;
  readonly range: MinuteRange;
}

/**
 * One day's work: a lane for each person, tasks in their true times, Table 1 time at the lane's end.
 * Edges and whole blocks are dragged in five-minute steps, moved with arrow keys, or set as clock times after a click.
 * The strip holds no plan: it shows `lanes`, emits what was asked, and follows when the lanes change.
 */
@Component({
  selector: 'kb-shift-strip',
  templateUrl: './shift-strip.html',
  styleUrl: './shift-strip.scss',
  host: { '[class.small]': 'isSmall()', '[class.fixed]': 'isReadOnly()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShiftStrip {
  private readonly announcer = inject(LiveAnnouncer);
  private readonly hourBar = viewChild<ElementRef<HTMLElement>>('hourBar');

  readonly lanes = input.required<readonly ShiftLane[]>();
  readonly isReadOnly = input(false);
  /** Low lanes for the printed sheet and the tablet's side. */
  readonly isSmall = input(false);
  readonly language = input<Language>('en');
  /** Minute of the day to mark as now; null for none. */
  readonly nowMinute = input<number | null>(null);
  readonly assignmentChange = output<AssignmentChange>();

  protected readonly words = computed(() => SHIFT_WORDS[this.language()]);
  protected readonly drag = signal<Drag | null>(null);
  protected readonly openBlockId = signal<string | null>(null);
  // The scale stands still while something is dragged, or the block would run from under the pointer.
  protected readonly range = computed(() => this.drag()?.range ?? rangeOf(this.lanes()));
  protected readonly hours = computed(() => hoursOf(this.range()).map((minute) => ({ minute, left: percentOf(minute, this.range()), words: clock(minute) })));
  protected readonly nowLeft = computed(() => {
    const now = this.nowMinute();
    const range = this.range();
    return now === null || now < range.startMinute || now > range.endMinute ? null : percentOf(now, range);
  });
  private isDragged = false;
  private pulledTo: MinuteRange | null = null;
  protected readonly maskRuleLeft = (MASK_RULE_MINUTES / METER_MINUTES) * 100;
  protected readonly step = STEP_MINUTES;
  protected readonly rows = computed(() => {
    const range = this.range();
    const words = this.words();
    return this.lanes().map((lane) => {
      const { rowById, count } = rowsOf(lane.blocks);
      const change = lane.maskRuleChangesAtMinute;
      const isOver = lane.table1Minutes > MASK_RULE_MINUTES;
      return {
        lane,
        count,
        isOver,
        table1Words: lane.table1Minutes === 0 ? words.none : lengthWords(lane.table1Minutes),
        meterWidth: Math.min(100, (lane.table1Minutes / METER_MINUTES) * 100),
        change: change === null || change < range.startMinute || change > range.endMinute ? null : { left: percentOf(change, range), words: words.maskRuleAt(clock(change)) },
        blocks: lane.blocks.map((block) => {
          const left = percentOf(block.startMinute, range);
          const times = words.fromTo(clock(block.startMinute), clock(block.endMinute));
          return {
            block,
            row: rowById.get(block.id) ?? 0,
            left,
            width: percentOf(block.endMinute, range) - left,
            times,
            name: [block.label, block.isElsewhere ? words.elsewhere : '', block.heldWords ?? '', lane.name].filter(Boolean).join(', '),
          };
        }),
      };
    });
  });
  protected readonly open = computed(() => {
    const id = this.openBlockId();
    if (id === null || this.isReadOnly()) return null;
    for (const lane of this.lanes()) {
      const block = lane.blocks.find((candidate) => candidate.id === id);
      if (block) return { lane, block, start: clock(block.startMinute), end: clock(block.endMinute) };
    }
    return null;
  });

  protected grab(event: PointerEvent, lane: ShiftLane, block: ShiftBlock, grip: Grip): void {
    const bar = this.hourBar()?.nativeElement.getBoundingClientRect();
    if (this.isReadOnly() || block.isElsewhere || event.button !== 0 || !bar || bar.width === 0) return;
    // By touch a block is first tapped open, so that a finger scrolling the page never moves a shift.
    if (event.pointerType === 'touch' && this.openBlockId() !== block.id) return;
    event.stopPropagation();
    (event.currentTarget as Element).setPointerCapture?.(event.pointerId);
    const range = this.range();
    const minutesPerPixel = (range.endMinute - range.startMinute) / bar.width;
    this.drag.set({ block, lane, grip, fromX: event.clientX, minutesPerPixel, range });
    this.isDragged = false;
    this.pulledTo = null;
  }

  protected pull(event: PointerEvent): void {
    const drag = this.drag();
    if (!drag) return;
    const next = moved(drag.block, drag.grip, (event.clientX - drag.fromX) * drag.minutesPerPixel);
    if (Math.abs(event.clientX - drag.fromX) > 3) this.isDragged = true;
    // Several moves may come before the lanes follow: each step is asked for once.
    if (next.startMinute === this.pulledTo?.startMinute && next.endMinute === this.pulledTo.endMinute) return;
    this.pulledTo = next;
    this.ask(drag.lane, drag.block.id, next);
  }

  protected letGo(): void {
    const drag = this.drag();
    if (!drag) return;
    this.drag.set(null);
    const now = this.find(drag.block.id);
    if (now && (now.startMinute !== drag.block.startMinute || now.endMinute !== drag.block.endMinute)) this.announce(drag.lane, now);
  }

  /** A drag that is broken off (Escape, a second finger) leaves things as they were. */
  protected breakOff(): void {
    const drag = this.drag();
    if (!drag) return;
    this.drag.set(null);
    this.ask(drag.lane, drag.block.id, drag.block);
  }

  protected tap(block: ShiftBlock): void {
    // The click that ends a drag is not a tap.
    if (!this.isDragged) this.toggle(block);
    this.isDragged = false;
  }

  private toggle(block: ShiftBlock): void {
    if (this.isReadOnly() || block.isElsewhere) return;
    this.openBlockId.update((id) => (id === block.id ? null : block.id));
  }

  protected key(event: KeyboardEvent, lane: ShiftLane, block: ShiftBlock): void {
    if (event.key === 'Escape') {
      this.breakOff();
      this.openBlockId.set(null);
      return;
    }
    if (event.key === 'Enter' || event.key === ' ') {
      event.preventDefault();
      this.toggle(block);
      return;
    }
    const steps = { ArrowLeft: -1, ArrowDown: -1, ArrowRight: 1, ArrowUp: 1, PageDown: -6, PageUp: 6 }[event.key];
    if (steps === undefined || this.isReadOnly() || block.isElsewhere) return;
    event.preventDefault();
    const next = moved(block, event.shiftKey ? 'end' : 'whole', steps * STEP_MINUTES);
    if (this.ask(lane, block.id, next)) this.announce(lane, { ...block, ...next });
  }

  /** What is no time is put back as it was. */
  protected setTime(lane: ShiftLane, block: ShiftBlock, grip: 'start' | 'end', field: HTMLInputElement): void {
    const before = grip === 'start' ? block.startMinute : block.endMinute;
    const minute = minuteOfClock(field.value, before);
    field.value = clock(before);
    if (minute !== null) this.shiftTime(lane, block, grip, minute - before);
  }

  protected shiftTime(lane: ShiftLane, block: ShiftBlock, grip: 'start' | 'end', byMinutes: number): void {
    this.ask(lane, block.id, moved(block, grip, byMinutes));
  }

  /** Emits when something would change; whether it did. */
  private ask(lane: ShiftLane, blockId: string, { startMinute, endMinute }: MinuteRange): boolean {
    const now = this.find(blockId);
    if (!now || (now.startMinute === startMinute && now.endMinute === endMinute)) return false;
    this.assignmentChange.emit({ blockId, taskId: now.taskId, personId: lane.personId, startMinute, endMinute });
    return true;
  }

  private find(blockId: string): ShiftBlock | undefined {
    return this.lanes()
      .flatMap((lane) => lane.blocks)
      .find((block) => block.id === blockId);
  }

  private announce(lane: ShiftLane, block: ShiftBlock): void {
    void this.announcer.announce(`${block.label}, ${lane.name}, ${this.words().fromTo(clock(block.startMinute), clock(block.endMinute))}`);
  }
}
