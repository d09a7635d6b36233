import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { TASKS } from '#compliance/silica/tasks.data';
import { type PublishedVersion, type ShiftPlan } from '#shared/jobs';
import { State, type StateKind } from '#ui/state';
import { ExactTextDialog, type ExactTextQuestion } from '../../history/exact-text-dialog';
import { pinWords, timeWords } from '../../history/history-words';
import { momentShort, timeOf } from '../../pieces/dates';

type SigningState = PublishedVersion['asked'][number]['state'];
const words: Readonly<Record<SigningState, { readonly kind: StateKind; readonly words: string }>> = {
  signed: { kind: 'done', words: 'signed' },
  'not-yet': { kind: 'plain', words: 'not yet' },
  'could-not-sign': { kind: 'stop', words: 'could not sign yet' },
  'not-confirmed': { kind: 'caution', words: 'PIN not confirmed' },
};

/** Every published version of the shift, newest first, with who has signed and the exact texts. */
@Component({
  selector: 'kb-shift-versions',
  imports: [RouterLink, State],
  template: `
    @for (version of ordered(); track version.id; let first = $first) {
      <section class="version" [attr.aria-label]="'Version ' + version.number">
        <div class="kb-row">
          <b>Version {{ version.number }}</b>
          <span class="kb-quiet kb-grow">published {{ momentShort(version.publishedAt) }} by {{ version.publishedBy }}</span>
          @for (text of version.texts; track text.language) {
            <button type="button" class="kb-link" [attr.aria-label]="languages[text.language] + ' text of version ' + version.number" (click)="read(version, text)">{{ languages[text.language] }} text</button>
            <a [routerLink]="['paper', version.id]" [queryParams]="{ language: text.language }" [attr.aria-label]="languages[text.language] + ' list of version ' + version.number + ' on paper'">on paper</a>
          }
        </div>
        @if (first) {
          <ul class="kb-rows people" style="--kb-columns: minmax(10rem, 1fr) 6rem 13rem" [attr.aria-label]="'Signatures on version ' + version.number">
            @for (person of version.asked; track person.personId) {
              <li>
                <span>{{ person.name }}</span>
                <span class="kb-quiet">{{ languages[person.language] }}</span>
                <kb-state [kind]="states[person.state].kind">{{ stateWords(person) }}{{ person.at ? ' ' + timeOf(person.at) : '' }}</kb-state>
              </li>
            }
          </ul>
          @if (version.answers.length > 0) {
            <ul class="kb-rows people" style="--kb-columns: 10rem minmax(10rem, 1fr) minmax(10rem, 1fr)" [attr.aria-label]="'Briefings and start checks on version ' + version.number">
              @for (set of version.answers; track set.id) {
                <li>
                  <span>{{ set.kind === 'briefing' ? 'Briefing' : 'Start check' }} {{ timeOf(set.timeDoubt ? set.receivedAt : set.at) }}</span>
                  <span>{{ set.personName }}{{ taskWords(set) }}{{ set.noCount > 0 ? ', ' + set.noCount + ' No' : '' }}</span>
                  <kb-state [kind]="set.pinState === 'confirmed' && !set.timeDoubt ? 'done' : 'caution'">{{ answerWords(set) }}</kb-state>
                </li>
              }
            </ul>
          }
        } @else {
          <p class="kb-small kb-quiet">{{ signedOf(version) }}</p>
        }
      </section>
    }
  `,
  styles: `
    .version + .version {
      margin-top: 1rem;
    }

    .people {
      margin-top: 0.5rem;
      max-width: 46rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShiftVersions {
  private readonly dialogs = inject(MatDialog);

  readonly versions = input.required<readonly PublishedVersion[]>();
  readonly tasks = input<ShiftPlan['tasks']>([]);

  protected readonly ordered = computed(() => [...this.versions()].sort((a, b) => b.number - a.number));
  protected readonly states = words;
  protected readonly languages = { en: 'English', es: 'Español' } as const;
  protected readonly momentShort = momentShort;
  protected readonly timeOf = timeOf;

  protected stateWords({ state, pinState }: PublishedVersion['asked'][number]): string {
    return (state === 'not-confirmed' && pinState && pinWords[pinState]) || words[state].words;
  }

  /** ", floor grinding"; nothing for a briefing, or a task that is no longer planned. */
  protected taskWords({ taskId }: PublishedVersion['answers'][number]): string {
    const task = this.tasks().find(({ id }) => id === taskId);
    return task ? `, ${TASKS[task.kind].name.en.toLowerCase()}` : '';
  }

  protected answerWords({ pinState, timeDoubt }: PublishedVersion['answers'][number]): string {
    return [pinWords[pinState] || 'proven by PIN', timeDoubt ? timeWords[timeDoubt] : ''].filter(Boolean).join(', ');
  }

  protected signedOf({ asked }: PublishedVersion): string {
    return `${asked.filter(({ state }) => state === 'signed').length} of ${asked.length} signed it. Their signatures stay on record with this text.`;
  }

  protected read(version: PublishedVersion, text: PublishedVersion['texts'][number]): void {
    this.dialogs.open<ExactTextDialog, ExactTextQuestion>(ExactTextDialog, {
      data: { versionId: version.id, language: text.language, sha256: text.sha256, heading: `Version ${version.number}, ${this.languages[text.language]}` },
      width: '52rem',
      maxWidth: '96vw',
    });
  }
}
