import { ChangeDetectionStrategy, Component, computed, input, output, signal } from '@angular/core';
import { type ShiftAnswer } from '#compliance/answer';
import { type ShiftPlan } from '#shared/jobs';
import { Mark } from '#ui/mark';
import { State } from '#ui/state';
import { Why } from '#ui/why';
import { WhyPanel } from '#ui/why-panel';
import { orderedTasks, stateKinds } from './answer-rows';

/** The day's tasks with what the rules answer: state, figures that decide, respirator, marks, why. Worst first. */
@Component({
  selector: 'kb-task-rows',
  imports: [Mark, State, Why, WhyPanel],
  templateUrl: './task-rows.html',
  styleUrl: './task-rows.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskRows {
  readonly answer = input.required<ShiftAnswer>();
  readonly plan = input.required<ShiftPlan>();
  readonly mayEdit = input(false);
  readonly openTask = output<string>();

  private readonly openWhys = signal<ReadonlySet<string>>(new Set());
  protected readonly rows = computed(() =>
    orderedTasks(this.answer(), this.plan()).map((task) => ({
      task,
      kind: stateKinds[task.state],
      marks: [...new Map(task.protection.map((item) => [item.mark, item])).values()],
      panelId: `why-${task.taskId}`,
      isOpen: this.openWhys().has(task.taskId),
    })),
  );

  protected showWhy(taskId: string, isOpen: boolean): void {
    this.openWhys.update((open) => {
      const next = new Set(open);
      if (isOpen) next.add(taskId);
      else next.delete(taskId);
      return next;
    });
  }
}
