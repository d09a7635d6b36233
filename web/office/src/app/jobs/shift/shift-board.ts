import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, model } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { v7 } from 'uuid';
import { type ShiftAnswer } from '#compliance/answer';
import { type TaskKind } from '#compliance/facts';
import { Empty } from '#ui/empty';
import { lanesOf } from '#ui/shift-strip/lanes-of';
import { type AssignmentChange } from '#ui/shift-strip/shift-lane';
import { ShiftStrip } from '#ui/shift-strip/shift-strip';
import { dayName, timeOf } from '../../pieces/dates';
import { CrewEditor } from './crew-editor';
import { ShiftEditor } from './shift-editor';
import { addKit, addPerson, moveAssignment, newTask, putTask, removeKit, removePerson, removeTask, setCover, setKitCount, setLead, type PlannedTask } from './shift-plan';
import { ShiftSurroundings } from './shift-surroundings';
import { TaskEditor } from './task-editor';
import { TaskKindSelect } from './task-kind-select';

/** The day with its strip, and what changes it: people, tasks, times. Saves by itself and says so. */
@Component({
  selector: 'kb-shift-board',
  imports: [CrewEditor, Empty, MatButton, ShiftStrip, TaskEditor, TaskKindSelect],
  templateUrl: './shift-board.html',
  styleUrl: './shift-board.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShiftBoard {
  protected readonly editor = inject(ShiftEditor);
  protected readonly around = inject(ShiftSurroundings);

  readonly answer = input.required<ShiftAnswer>();
  readonly mayEdit = input(false);
  readonly openTaskId = model<string | null>(null);

  /** Opening a task closes the crew: one thing is changed at a time. */
  protected readonly isCrewOpen = linkedSignal({ source: this.openTaskId, computation: () => false });
  protected readonly day = computed(() => dayName(this.editor.shift()?.date ?? ''));
  protected readonly lanes = computed(() => {
    const facts = this.editor.facts();
    return facts ? lanesOf(facts, this.answer()) : [];
  });
  protected readonly openTask = computed(() => this.editor.plan()?.tasks.find(({ id }) => id === this.openTaskId()) ?? null);
  protected readonly saved = computed(() => {
    const at = this.editor.savedAt();
    switch (this.editor.saveState()) {
      case 'saved':
        return at ? `saved ${timeOf(at)}` : '';
      case 'waiting':
      case 'saving':
        return 'saving …';
      case 'failed':
        return 'not saved';
      case 'conflict':
        return 'not saved: choose a version above';
    }
  });

  protected move({ blockId, taskId, startMinute, endMinute }: AssignmentChange): void {
    const index = Number(blockId.slice(blockId.lastIndexOf('/') + 1));
    this.editor.change((plan) => moveAssignment(plan, taskId, index, startMinute, endMinute));
  }

  protected addTask(kind: TaskKind): void {
    const id = v7();
    this.editor.change((plan) => putTask(plan, newTask(plan, id, kind)));
    this.isCrewOpen.set(false);
    this.openTaskId.set(id);
  }

  protected changeTask(task: PlannedTask): void {
    const before = this.editor.plan()?.tasks.find(({ id }) => id === task.id);
    // A kit's hazards are only known to the server: send at once, so that the lines answer with them.
    this.editor.change((plan) => putTask(plan, task), { atOnce: before?.kitId !== task.kitId });
  }

  protected removeTask(taskId: string): void {
    this.openTaskId.set(null);
    this.editor.change((plan) => removeTask(plan, taskId));
  }

  protected toggleCrew(): void {
    this.openTaskId.set(null);
    this.isCrewOpen.update((isOpen) => !isOpen);
  }

  protected putPerson({ personId, isOn }: { readonly personId: string; readonly isOn: boolean }): void {
    // What the person does elsewhere that day comes only with the server's answer.
    this.editor.change((plan) => (isOn ? addPerson(plan, personId) : removePerson(plan, personId)), { atOnce: true });
  }

  protected setLead(personId: string | null): void {
    this.editor.change((plan) => setLead(plan, personId));
  }

  protected setCover(personId: string | null): void {
    this.editor.change((plan) => setCover(plan, personId));
  }

  protected putKit({ kitId, isOn }: { readonly kitId: string; readonly isOn: boolean }): void {
    this.editor.change((plan) => (isOn ? addKit(plan, kitId) : removeKit(plan, kitId)), { atOnce: true });
  }

  protected setCount({ kitId, count }: { readonly kitId: string; readonly count: number | null }): void {
    this.editor.change((plan) => setKitCount(plan, kitId, count));
  }
}
