import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { AppUpdate } from '../app-update';
import { Connection } from '../connection/connection';
import { Day } from '../day/day';
import { Frame } from '../frame/frame';
import { bestText } from '../jobs/found-job';
import { jobView } from '../jobs/job-view';
import { Outbox } from '../outbox/outbox';
import { Sender } from '../outbox/sender';
import { dayName, whenTime } from '../words/dates';
import { messagesIn, tabletLanguages, Words } from '../words/words';

/** The tablet's first page: which job are you on? */
@Component({
  selector: 'kb-today',
  imports: [Frame, Empty, Note, RouterLink],
  templateUrl: './today.html',
  styleUrl: './today.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Today {
  private readonly day = inject(Day);
  private readonly outbox = inject(Outbox);
  private readonly sender = inject(Sender);
  private readonly connection = inject(Connection);
  protected readonly update = inject(AppUpdate);
  protected readonly words = inject(Words);
  protected readonly languages = tabletLanguages.map((code) => ({ code, name: messagesIn(code).languageName }));

  protected readonly organisation = computed(() => {
    const day = this.day.day();
    return day ? `${day.organisationName}, ${day.tablet.name}` : '';
  });
  protected readonly heard = computed(() => {
    const at = this.day.heardAt();
    const say = this.words.say().signal;
    return at ? say.heard(whenTime(at, this.words.language())) : say.neverHeard;
  });
  protected readonly isUnpaired = computed(() => this.connection.state() === 'not-paired');
  protected readonly emptyState = computed(() => {
    const say = this.words.say().today;
    if (!this.day.isLoaded() || (this.connection.state() === 'checking' && !this.day.day())) return { state: 'loading', heading: say.loading, detail: '' } as const;
    if (this.day.day()) return { state: 'empty', heading: say.none, detail: say.noneDetail } as const;
    return { state: 'offline', heading: say.never, detail: say.neverDetail } as const;
  });

  protected readonly jobs = computed(() => {
    const language = this.words.language();
    const say = this.words.say();
    const serverTime = this.day.day()?.serverTime ?? '';
    return this.day.jobs().map(({ job, texts }) => {
      const text = bestText(texts, language);
      const signed = text ? jobView(job, text.text, this.outbox.posted(), serverTime).signedCount : 0;
      return {
        shiftId: job.shiftId,
        name: job.jobName,
        where: `${job.siteName}, ${dayName(job.date, language)}`,
        version: say.today.version(job.version.number, whenTime(job.version.publishedAt, language)),
        signed: say.today.signed(signed, job.people.length),
        isAllSigned: signed === job.people.length,
      };
    });
  });

  protected lookAgain(): void {
    void this.sender.sendNow().then(() => this.day.refresh());
  }
}
