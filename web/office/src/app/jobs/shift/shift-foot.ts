import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type KitAnswer, type ShiftAnswer } from '#compliance/answer';
import { type Job, type PublishedVersion, type Shift } from '#shared/jobs';
import { type Tablet } from '#shared/tablets';
import { Pictogram } from '#ui/pictogram';
import { dayShort, heardAt } from '../../pieces/dates';

/** Below the answers, in three columns: kits with their hazards, who is on site and signed, the days before. */
@Component({
  selector: 'kb-shift-foot',
  imports: [Pictogram, RouterLink],
  template: `
    <div class="kb-split" style="--kb-columns: 1.3fr 1fr 1fr">
      <section aria-label="Kits">
        @for (kit of kits(); track kit.answer.kitId) {
          <div class="kit">
            @for (code of kit.answer.pictograms; track code) {
              <kb-pictogram [code]="code" />
            }
            <div class="kb-grow">
              <b>{{ kit.name }}</b>
              <div class="kb-small kb-quiet">{{ kit.figures }}</div>
              @if (kit.answer.partsWithoutSheet.length > 0) {
                <div class="kb-small missing">No confirmed sheet: {{ kit.answer.partsWithoutSheet.join(', ') }}</div>
              }
            </div>
          </div>
        } @empty {
          <b>No kit on this shift</b>
          <div class="kb-small kb-quiet">Preparation only, or nobody chose one yet.</div>
        }
      </section>
      <section aria-label="Crew and signatures">
        <b>{{ onShift() }} on this shift</b>{{ signedWords() }}
        @for (tablet of tabletLines(); track tablet) {
          <div class="kb-small kb-quiet">{{ tablet }}</div>
        }
      </section>
      <section aria-label="Other days">
        @for (day of otherDays(); track day.id) {
          <div>
            <a [routerLink]="['/jobs', shift().jobId, 'shifts', day.id]">{{ day.name }}</a> {{ day.words }}
          </div>
        } @empty {
          <b>First shift of this job</b>
        }
      </section>
    </div>
  `,
  styles: `
    .kit {
      display: flex;
      gap: 8px;
      align-items: center;
      margin-bottom: 8px;

      --kb-pictogram-size: 38px;
    }

    .missing {
      color: var(--kb-stop);
    }

    .kb-grow {
      padding-inline-start: 4px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShiftFoot {
  readonly shift = input.required<Shift>();
  readonly answer = input.required<ShiftAnswer>();
  readonly version = input<PublishedVersion | null>(null);
  readonly job = input<Job | null>(null);
  readonly tablets = input<readonly Tablet[]>([]);

  protected readonly kits = computed(() =>
    this.answer().kits.map((answer) => {
      const facts = this.shift().context.kits.find(({ id }) => id === answer.kitId);
      const parts = facts?.parts.map(({ part }) => part).join(', ');
      return { answer, name: facts ? `${facts.name}${parts ? `, parts ${parts}` : ''}` : 'Kit', figures: kitFigures(answer) };
    }),
  );
  protected readonly onShift = computed(() => this.answer().people.length);
  protected readonly signedWords = computed(() => {
    const version = this.version();
    if (!version) return ', nobody asked to sign yet';
    const signed = version.asked.filter(({ state }) => state === 'signed').length;
    return `, ${signed} of ${version.asked.length} signed version ${version.number}`;
  });
  protected readonly tabletLines = computed(() => {
    const now = new Date();
    return this.tablets()
      .filter(({ withdrawnAt, lastHeardAt }) => withdrawnAt === null && lastHeardAt !== null)
      .slice(0, 3)
      .map(({ name, lastHeardAt }) => `${name} last heard ${heardAt(lastHeardAt ?? '', now)}`);
  });
  protected readonly otherDays = computed(() =>
    (this.job()?.shifts ?? [])
      .filter(({ id }) => id !== this.shift().id)
      .sort((a, b) => b.date.localeCompare(a.date))
      .slice(0, 3)
      .map(({ id, date, publishedVersion, signed, asked, openActions }) => ({
        id,
        name: dayShort(date),
        words: publishedVersion === null ? 'not published' : `${signed} of ${asked} signed${openActions > 0 ? `, ${openActions} stopped` : ''}`,
      })),
  );
}

function kitFigures({ kits, mixingMinutes, powderDumps }: KitAnswer): string {
  if (kits === null) return 'Area and thickness give the number of kits.';
  const mixing = mixingMinutes === null ? '' : `, ${mixingMinutes} min of mixing`;
  const dumps = powderDumps ? `, ${powderDumps} powder dumps` : '';
  return `${kits === 1 ? '1 kit' : `${kits} kits`}${mixing}${dumps}`;
}
