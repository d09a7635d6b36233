import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { taskKinds, type TaskKind } from '#compliance/facts';
import { TASKS } from '#compliance/silica/tasks.data';

let lastId = 0;

interface Group {
  readonly label: string;
  readonly kinds: readonly TaskKind[];
}

const groups: readonly Group[] = [
  { label: 'Prepares the floor', kinds: taskKinds.filter((kind) => TASKS[kind].disturbsFloor) },
  { label: 'Works with the kit', kinds: taskKinds.filter((kind) => TASKS[kind].touchesKit) },
  { label: 'Between and after', kinds: taskKinds.filter((kind) => !TASKS[kind].disturbsFloor && !TASKS[kind].touchesKit && TASKS[kind].isWork) },
  { label: 'No work', kinds: taskKinds.filter((kind) => !TASKS[kind].isWork) },
];

/** Every kind of work of the trade, grouped by what it does. */
@Component({
  selector: 'kb-task-kind-select',
  template: `
    <label [for]="id" [class.kb-visually-hidden]="isLabelHidden()">{{ label() }}</label>
    <select class="kb-field" [id]="id" (change)="choose($any($event.target))">
      @if (kind() === null) {
        <option value="" selected>{{ label() }}</option>
      }
      @for (group of groups; track group.label) {
        <optgroup [label]="group.label">
          @for (choice of group.kinds; track choice) {
            <option [value]="choice" [selected]="choice === kind()">{{ tasks[choice].name.en }}</option>
          }
        </optgroup>
      }
    </select>
  `,
  styles: `
    :host {
      display: block;
    }

    label {
      display: block;
      font-size: var(--kb-small);
      color: var(--kb-ink-2);
      margin-bottom: 3px;
    }

    select {
      width: 100%;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskKindSelect {
  readonly label = input.required<string>();
  readonly isLabelHidden = input(false);
  /** Null: the select is a menu that adds, and goes back to its label afterwards. */
  readonly kind = input<TaskKind | null>(null);
  readonly chosen = output<TaskKind>();

  protected readonly id = `kb-task-kind-${(lastId += 1)}`;
  protected readonly groups = groups;
  protected readonly tasks = TASKS;

  protected choose(select: HTMLSelectElement): void {
    const kind = taskKinds.find((candidate) => candidate === select.value);
    if (!kind) return;
    this.chosen.emit(kind);
    if (this.kind() === null) select.value = '';
  }
}
