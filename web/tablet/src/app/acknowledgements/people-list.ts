import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { type PersonView } from '../jobs/job-view';
import { clockTime } from '../words/dates';
import { messagesIn, Words } from '../words/words';

/** Who signs today and how far each is; a signature is stamped, in words, with whether the office has it. */
@Component({
  selector: 'kb-people-list',
  template: `
    @let say = words.say().people;
    <ul class="kb-plain" [attr.aria-label]="say.list">
      @for (person of people(); track person.id) {
        <li>
          <button type="button" [class.now]="person.id === signingId()" [attr.aria-current]="person.id === signingId() ? 'true' : null" [disabled]="signingId() !== null && person.id !== signingId()" (click)="choose(person)">
            <span class="who">
              <b>{{ person.name }}</b>
              <span class="kb-quiet">{{ languageName(person) }}@if (person.isLead) {, {{ say.lead }}}</span>
            </span>
            @if (person.id === signingId()) {
              <span class="kb-quiet">{{ say.now }}</span>
            } @else if (person.state === 'signed') {
              <span class="stamp" [class.waiting]="person.sending === 'waiting'">
                {{ say.signed }} <b>{{ at(person) }}</b>
                @if (person.sending; as sending) {
                  <span class="sending">{{ say[sending] }}</span>
                }
              </span>
            } @else {
              <span class="word" [class.caution]="person.state === 'not-confirmed' || person.state === 'sign-again'" [class.kb-quiet]="person.state === 'not-yet'">{{ person.state === 'not-confirmed' ? say.doubts[person.doubt ?? 'pin-wrong'] : say[person.state] }}</span>
            }
          </button>
        </li>
      }
    </ul>
  `,
  styleUrl: './people-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeopleList {
  readonly people = input.required<readonly PersonView[]>();
  readonly signingId = input.required<string | null>();
  readonly chosen = output<PersonView>();
  protected readonly words = inject(Words);

  protected choose(person: PersonView): void {
    if (this.signingId() === null) this.chosen.emit(person);
  }

  protected languageName(person: PersonView): string {
    return messagesIn(person.language).languageName;
  }

  protected at(person: PersonView): string {
    return person.at ? clockTime(person.at, this.words.language()) : '';
  }
}
