import { TestKey } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { describe, expect, it } from '@jest/globals';
import { type AssignmentChange, type ShiftBlock, type ShiftLane } from './shift-lane';
import { ShiftStrip } from './shift-strip';
import { ShiftStripHarness } from './shift-strip-harness';

const grinding: ShiftBlock = { id: 'grind/0', taskId: 'grind', label: 'Floor grinding', pattern: 'grinding', startMinute: 420, endMinute: 550, heldWords: null, isElsewhere: false };
const blasting: ShiftBlock = { id: 'blast/0', taskId: 'blast', label: 'Shot blasting', pattern: 'blasting', startMinute: 570, endMinute: 720, heldWords: 'may not start', isElsewhere: false };
const elsewhere: ShiftBlock = { id: 'away/0', taskId: '', label: 'Freight shed', pattern: 'grinding', startMinute: 420, endMinute: 690, heldWords: null, isElsewhere: true };
const lanes: readonly ShiftLane[] = [
  { personId: 'dov', name: 'Dov Lindqvist', note: 'lead', alert: null, blocks: [grinding], table1Minutes: 130, maskRuleChangesAtMinute: null },
  { personId: 'per', name: 'Per Aldana', note: '', alert: 'listed twice from 09:30', blocks: [elsewhere, blasting], table1Minutes: 270, maskRuleChangesAtMinute: 660 },
];

/** A page that follows the strip, as the job page does. */
@Component({
  selector: 'kb-strip-page',
  imports: [ShiftStrip],
  template: '<kb-shift-strip [lanes]="lanes()" [isReadOnly]="isReadOnly()" (assignmentChange)="follow($event)" />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class StripPage {
  readonly lanes = signal(lanes);
  readonly isReadOnly = signal(false);
  readonly changes: AssignmentChange[] = [];

  follow(change: AssignmentChange): void {
    this.changes.push(change);
    const { startMinute, endMinute } = change;
    this.lanes.update((current) => current.map((lane) => ({ ...lane, blocks: lane.blocks.map((block) => (block.id === change.blockId ? { ...block, startMinute, endMinute } : block)) })));
  }
}

async function show() {
  const fixture = TestBed.createComponent(StripPage);
  const strip = await TestbedHarnessEnvironment.loader(fixture).getHarness(ShiftStripHarness);
  return { page: fixture.componentInstance, strip, element: fixture.nativeElement as HTMLElement, fixture };
}

describe('the shift strip', () => {
  it('names every block with its person and times, and says which may not start', async () => {
    const { strip } = await show();
    expect(await strip.blockWords()).toEqual([
      'Floor grinding, Dov Lindqvist: 07:00 to 09:10',
      'Freight shed, at another job, Per Aldana, 07:00 to 11:30',
      'Shot blasting, may not start, Per Aldana: 09:30 to 12:00',
    ]);
  });

  it('ends a lane with Table 1 time in words, and says when the mask rule changes', async () => {
    const { strip } = await show();
    const [first, second] = await strip.laneWords();
    expect(first).toContain('Table 1 time, all jobs: 2 h 10');
    expect(first).not.toContain('over 4 h');
    expect(second).toContain('listed twice from 09:30');
    expect(second).toContain('4 h 30 over 4 h');
    expect(second).toContain('mask rule changes 11:00');
  });

  it('moves a block by five minutes with an arrow key, and by half an hour with page keys', async () => {
    const { strip, page } = await show();
    await strip.press('Floor grinding', TestKey.RIGHT_ARROW);
    await strip.press('Floor grinding', TestKey.PAGE_UP);
    expect(page.changes).toEqual([
      { blockId: 'grind/0', taskId: 'grind', personId: 'dov', startMinute: 425, endMinute: 555 },
      { blockId: 'grind/0', taskId: 'grind', personId: 'dov', startMinute: 455, endMinute: 585 },
    ]);
  });

  it('moves only the end with Shift, and tells it through the live region', async () => {
    const { strip, page } = await show();
    await strip.press('Floor grinding', TestKey.LEFT_ARROW, true);
    expect(page.changes.at(-1)).toMatchObject({ startMinute: 420, endMinute: 545 });
    await new Promise((resolve) => setTimeout(resolve, 150));
    expect(document.querySelector('[aria-live="polite"]')?.textContent).toBe('Floor grinding, Dov Lindqvist, 07:00 to 09:05');
  });

  it('takes a clock time after a click, for those who neither drag nor type arrows', async () => {
    const { strip } = await show();
    await strip.setTime('Shot blasting', 'end', '13:15');
    expect((await strip.blockWords())[2]).toBe('Shot blasting, may not start, Per Aldana: 09:30 to 13:15');
  });

  it('puts back what is no time', async () => {
    const { strip, page, element } = await show();
    await strip.setTime('Shot blasting', 'end', 'noon');
    expect(page.changes).toEqual([]);
    expect([...element.querySelectorAll<HTMLInputElement>('.times input')].map((input) => input.value)).toEqual(['09:30', '12:00']);
  });

  it('follows the pointer in five-minute steps from an edge, and a broken-off drag leaves things as they were', async () => {
    const { strip, page, element, fixture } = await show();
    const bar = element.querySelector('.hours .bar');
    const edge = element.querySelector('.block .edge.end');
    if (!bar || !edge) throw new Error('nothing to drag');
    // 07:00 to 12:00 over 600 pixels: two pixels a minute.
    bar.getBoundingClientRect = () => new DOMRect(0, 0, 600, 20);
    const point = (type: string, x: number) => edge.dispatchEvent(Object.assign(new MouseEvent(type, { bubbles: true, clientX: x, button: 0 }), { pointerId: 1, pointerType: 'mouse' }));
    point('pointerdown', 260);
    point('pointermove', 283);
    await fixture.whenStable();
    expect((await strip.blockWords())[0]).toBe('Floor grinding, Dov Lindqvist: 07:00 to 09:20');
    point('pointercancel', 283);
    await fixture.whenStable();
    expect((await strip.blockWords())[0]).toBe('Floor grinding, Dov Lindqvist: 07:00 to 09:10');
    point('pointermove', 400);
    expect(page.changes).toHaveLength(2);
  });

  it('holds still when it is only to be read, and never moves work of another job', async () => {
    const { strip, page, fixture } = await show();
    await strip.press('Freight shed', TestKey.RIGHT_ARROW);
    page.isReadOnly.set(true);
    await fixture.whenStable();
    await strip.press('Floor grinding', TestKey.RIGHT_ARROW);
    expect(page.changes).toEqual([]);
    expect(await strip.blockWords()).toContain('Floor grinding, Dov Lindqvist, 07:00 to 09:10');
  });

  it('says so when nobody has a task yet', async () => {
    const { page, element, fixture } = await show();
    page.lanes.set([]);
    await fixture.whenStable();
    expect(element.textContent).toContain('Nobody has a task in this shift yet.');
  });
});
