import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { type DayPlan, type PlanTask } from '#compliance/plans/day-plan';
import { type Language, type Words } from '#compliance/outcome';
import { Mark } from '#ui/mark';
import { State } from '#ui/state';
import { siteWords } from './site-words';

/** The plan of a day, task by task: controls first, then who is kept out, housekeeping, and protection last. */
@Component({
  selector: 'kb-site-plan',
  imports: [Mark, State],
  template: `
    @let plan = day();
    <p class="kb-small kb-quiet">{{ said(plan.packName) }} {{ plan.packVersion }}. {{ words().people(plan.peopleCount) }}. {{ plan.isCompetentPersonNamed ? words().competentNamed : words().competentMissing }}</p>
    <div class="kb-actions kb-no-print"><button type="button" class="kb-link" [attr.aria-expanded]="isSourced()" (click)="isSourced.set(!isSourced())">{{ isSourced() ? words().hideSources : words().showSources }}</button></div>
    @if (plan.place.length > 0) {
      <h3>{{ words().place }}</h3>
      <ul>
        @for (line of plan.place; track $index) {
          <li>{{ said(line.text) }} <span class="source kb-small kb-quiet" [class.shown]="isSourced()">{{ line.source }}</span></li>
        }
      </ul>
    }
    @for (task of plan.tasks; track $index) {
      <section class="task">
        <h3>{{ said(task.name) }}</h3>
        <p class="kb-quiet">{{ task.span ?? words().noTimes }}@if (task.peopleCount > 0) {, {{ words().people(task.peopleCount) }}}</p>
        @if (task.heldBecause; as held) {
          <p><kb-state kind="stop">{{ words().held }}</kb-state> {{ said(held) }}</p>
        }
        @for (part of parts(task); track part.heading) {
          <h4>{{ part.heading }}</h4>
          <ul>
            @for (line of part.lines; track $index) {
              <li>{{ said(line.text) }} <span class="source kb-small kb-quiet" [class.shown]="isSourced()">{{ line.source }}</span></li>
            }
          </ul>
        }
        <h4>{{ words().protection }}</h4>
        <p class="marks">
          <span><kb-mark mark="respirator" label="" /> {{ said(task.respirator) }}</span>
          @for (item of task.protection; track $index) {
            <span><kb-mark [mark]="item.mark" label="" /> {{ said(item.name) }}</span>
          }
        </p>
      </section>
    }
    <p class="kb-small kb-quiet">{{ said(plan.notice) }}</p>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 0.6rem;
    }

    .task {
      border-top: var(--kb-strip);
      padding-top: 0.7rem;
      break-inside: avoid;
      display: flex;
      flex-direction: column;
      gap: 0.35rem;
    }

    h3 {
      font-size: 1.1rem;
      color: var(--kb-ink);
    }

    h4 {
      font-weight: 600;
    }

    ul {
      padding-inline-start: 1.3rem;
    }

    li + li {
      margin-top: 0.2rem;
    }

    .kb-link {
      min-height: var(--kb-target);
    }

    @media screen {
      .source:not(.shown) {
        display: none;
      }
    }

    .marks {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem 1.1rem;

      --kb-mark-size: 30px;

      span {
        display: inline-flex;
        gap: 0.45rem;
        align-items: center;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SitePlan {
  readonly day = input.required<DayPlan>();
  readonly language = input.required<Language>();

  /** On screen only when asked for; on paper always. */
  protected readonly isSourced = signal(false);
  protected readonly words = computed(() => siteWords[this.language()]);
  protected said(words: Words): string {
    return words[this.language()];
  }
  protected parts({ controls, access, housekeeping }: PlanTask) {
    const words = this.words();
    return [
      { heading: words.controls, lines: controls },
      { heading: words.access, lines: access },
      { heading: words.housekeeping, lines: housekeeping },
    ].filter(({ lines }) => lines.length > 0);
  }
}
