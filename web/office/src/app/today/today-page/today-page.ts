import { ChangeDetectionStrategy, Component, computed, DestroyRef, effect, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { type Today } from '#shared/today';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { dayName, heardAt, localDateOf, timeOf } from '../../pieces/dates';
import { Unready } from '../../pieces/unready';
import { NavigationCounts } from '../../shell/navigation-counts';
import { TodayApi } from '../today-api';

const refreshMilliseconds = 60_000;

/** The first page of the day: what needs a person, worst first; who is on site; the library. */
@Component({
  selector: 'kb-today-page',
  imports: [Empty, MatButton, PageHeader, RouterLink, State, Unready],
  templateUrl: './today-page.html',
  styleUrl: './today-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodayPage {
  private readonly access = inject(Access);
  private readonly counts = inject(NavigationCounts);

  protected readonly today = inject(TodayApi).today();
  /** What was read last stays on the page while it is read again. */
  protected readonly shown = signal<Today | null>(null);
  private readonly readAt = signal(new Date());
  protected readonly kicker = computed(() => {
    const now = this.readAt();
    return `${dayName(localDateOf(now))} ${now.getFullYear()}, ${timeOf(now)}`;
  });
  protected readonly mayAddJob = computed(() => this.access.may('addJob'));
  protected readonly mayUpload = computed(() => this.access.may('uploadSheet'));

  constructor() {
    effect(() => {
      if (!this.today.hasValue()) return;
      this.shown.set(this.today.value());
      this.readAt.set(new Date());
      this.counts.show(this.today.value());
    });
    const timer = setInterval(() => this.today.reload(), refreshMilliseconds);
    inject(DestroyRef).onDestroy(() => clearInterval(timer));
  }

  protected tabletWords({ tabletName, tabletHeardAt }: Today['onSite'][number]): string {
    if (tabletName === null) return 'no tablet heard yet';
    return tabletHeardAt === null ? `${tabletName} never heard` : `${tabletName} heard ${heardAt(tabletHeardAt, this.readAt())}`;
  }

  /** Links come as paths of the office, with or without a query. */
  protected pathOf(link: string): string {
    return link.split('?')[0] ?? '/';
  }

  protected queryOf(link: string): Readonly<Record<string, string>> {
    return Object.fromEntries(new URLSearchParams(link.split('?')[1] ?? ''));
  }
}
