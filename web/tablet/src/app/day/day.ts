import { computed, inject, Injectable, signal } from '@angular/core';
import { formatISO } from 'date-fns';
import { TabletDay } from '#shared/envelopes';
import { type OpenedText, openText } from '../checklists/opened-text';
import { CallFailed, TabletApi } from '../connection/tablet-api';
import { Storage } from '../outbox/storage';
import { type KeptDay } from '../outbox/tablet-database';

export type DayJob = TabletDay['jobs'][number];
/** A job of the day with its texts held against their fingerprints. */
export interface OpenedJob {
  readonly job: DayJob;
  readonly texts: readonly OpenedText[];
}

interface OpenedDay extends KeptDay {
  readonly jobs: readonly OpenedJob[];
}

/** Everything the office published for this tablet, as last heard and kept for when there is no signal. */
@Injectable({ providedIn: 'root' })
export class Day {
  private readonly api = inject(TabletApi);
  private readonly storage = inject(Storage);
  private readonly opened = signal<OpenedDay | null>(null);
  private reading: Promise<void> | null = null;

  /** Whether the tablet has looked into its own storage yet. */
  readonly isLoaded = signal(false);
  readonly day = computed(() => this.opened()?.day ?? null);
  /** Tablet's clock when the office was last heard; null when never. */
  readonly heardAt = computed(() => this.opened()?.heardAt ?? null);
  readonly jobs = computed<readonly OpenedJob[]>(() => this.opened()?.jobs ?? []);

  /** Shows what was kept on the tablet. */
  async load(): Promise<void> {
    try {
      const kept = await this.storage.use((database) => database.get('kept', 'day'));
      const day = isKeptDay(kept) ? TabletDay.safeParse(kept.day) : null;
      if (day?.success && isKeptDay(kept)) await this.show({ day: day.data, heardAt: kept.heardAt });
    } finally {
      this.isLoaded.set(true);
    }
  }

  /** Asks the office for the day and keeps it. Without signal what was kept stays. Never throws. */
  refresh(): Promise<void> {
    this.reading ??= this.read().finally(() => (this.reading = null));
    return this.reading;
  }

  private async read(): Promise<void> {
    try {
      const kept: KeptDay = { day: await this.api.readDay(), heardAt: formatISO(new Date()) };
      await this.show(kept);
      await this.storage.use((database) => database.put('kept', kept, 'day'));
    } catch (error) {
      if (!(error instanceof CallFailed)) console.error(error);
    }
  }

  private async show(kept: KeptDay): Promise<void> {
    const jobs = await Promise.all(kept.day.jobs.map(async (job) => ({ job, texts: await Promise.all(job.version.texts.map(openText)) })));
    this.opened.set({ ...kept, jobs });
  }
}

function isKeptDay(value: unknown): value is KeptDay {
  return typeof value === 'object' && value !== null && 'day' in value && 'heardAt' in value && typeof value.heardAt === 'string';
}
