import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type ChecklistText } from '#compliance';
import { dayOf } from '../pieces/dates';

const headings = {
  en: { morning: 'In the morning', tasks: 'Tasks', held: 'May not start', start: 'At each start', people: 'People', lead: 'Competent person', signed: 'What is signed' },
  es: { morning: 'Por la mañana', tasks: 'Tareas', held: 'No puede empezar', start: 'En cada inicio', people: 'Personas', lead: 'Persona competente', signed: 'Lo que se firma' },
} as const;

/** A published checklist set as it reads, from its own bytes and nothing else. */
@Component({
  selector: 'kb-signed-text',
  template: `
    @let checklist = text();
    <p class="kb-quiet">{{ checklist.jobName }} · {{ checklist.siteName }} · {{ dayOf(checklist.date) }} · {{ checklist.packId }} {{ checklist.packVersion }}</p>
    <h3 class="title">{{ checklist.title }}</h3>
    @if (checklist.competentPersonName; as name) {
      <p>{{ words().lead }}: {{ name }}</p>
    }
    <h4>{{ words().morning }}</h4>
    <ol>
      @for (line of checklist.morning; track line.id) {
        <li>{{ line.text }} <span class="kb-small kb-quiet">{{ line.source }}</span></li>
      }
    </ol>
    <h4>{{ words().tasks }}</h4>
    @for (task of checklist.tasks; track task.taskId) {
      <p>
        <b>{{ task.name }}.</b> {{ task.respirator }}
        @if (task.heldBecause) {
          <span class="kb-state stop">{{ words().held }}: {{ task.heldBecause }}</span>
        }
      </p>
      @if (task.live.length > 0) {
        <p class="kb-small kb-quiet">{{ words().start }}</p>
        <ul>
          @for (line of task.live; track line.id) {
            <li>{{ line.text }}</li>
          }
        </ul>
      }
    }
    <h4>{{ words().people }}</h4>
    @for (person of checklist.people; track person.personId) {
      <p><b>{{ person.name }}.</b> {{ person.lines.join(' ') }}</p>
    }
    <h4>{{ words().signed }}</h4>
    <p class="sentence">{{ checklist.sentence }}</p>
    <p class="kb-small kb-quiet">{{ checklist.notice }}</p>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.5rem;
    }

    .title {
      font-size: 1.25rem;
      color: var(--kb-ink);
    }

    h4 {
      border-top: var(--kb-strip);
      padding-top: 0.6rem;
      margin-top: 0.4rem;
      font-weight: 600;
    }

    ol,
    ul {
      padding-inline-start: 1.4rem;
    }

    li + li {
      margin-top: 0.25rem;
    }

    .sentence {
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignedText {
  readonly text = input.required<ChecklistText>();
  protected readonly words = computed(() => headings[this.text().language]);
  protected readonly dayOf = dayOf;
}
