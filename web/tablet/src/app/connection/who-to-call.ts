import { computed, inject, Injectable } from '@angular/core';
import { Day } from '../day/day';
import { Words } from '../words/words';
import { Connection } from './connection';

/** Whom the crew calls after a "No". Without signal it says that nobody was told, because nobody was. */
@Injectable({ providedIn: 'root' })
export class WhoToCall {
  private readonly connection = inject(Connection);
  private readonly day = inject(Day);
  private readonly words = inject(Words);

  /** "Ines Halloran, 555-0142", or '' when the office named nobody. */
  readonly contact = computed(() => {
    const day = this.day.day();
    return day?.officerName ? [day.officerName, day.officerPhone].filter(Boolean).join(', ') : '';
  });
  readonly afterNo = computed(() => {
    const say = this.words.say().call;
    if (this.connection.state() === 'online') return say.online;
    return this.contact() ? say.offline(this.contact()) : say.offlineNobody;
  });
}
