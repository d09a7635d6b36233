import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { type ShiftAnswer } from '#compliance/answer';
import { type ShiftPlan } from '#shared/jobs';
import { type ShiftThings } from './shift-names';

/** Who is on the shift, who leads it, and which kits it uses: small, under the strip. */
@Component({
  selector: 'kb-crew-editor',
  template: `
    <fieldset>
      <legend>People of this shift</legend>
      <ul class="kb-plain list">
        @for (person of people(); track person.id) {
          <li>
            <label class="tick"><input type="checkbox" [checked]="person.isOn" (change)="put.emit({ personId: person.id, isOn: $any($event.target).checked })" />{{ person.name }}</label>
          </li>
        } @empty {
          <li class="kb-quiet">Nobody is listed under People yet.</li>
        }
      </ul>
    </fieldset>
    <div class="line">
      <label for="competent-person">Competent person</label>
      <select class="kb-field" id="competent-person" (change)="lead.emit($any($event.target).value || null)">
        <option value="" [selected]="plan().competentPersonId === null">nobody named yet</option>
        @for (person of onShift(); track person.id) {
          <option [value]="person.id" [selected]="person.id === plan().competentPersonId">{{ person.name }}</option>
        }
      </select>
    </div>
    <div class="line">
      <label for="inspection-cover">Inspects meanwhile</label>
      <select class="kb-field" id="inspection-cover" (change)="cover.emit($any($event.target).value || null)">
        <option value="" [selected]="(plan().inspectionCoverId ?? null) === null">nobody named yet</option>
        @for (person of mayCover(); track person.id) {
          <option [value]="person.id" [selected]="person.id === plan().inspectionCoverId">{{ person.name }}</option>
        }
      </select>
    </div>
    <fieldset>
      <legend>Kits of this shift</legend>
      <ul class="kb-plain list">
        @for (kit of kits(); track kit.id) {
          <li>
            <label class="tick"><input type="checkbox" [checked]="kit.isOn" (change)="putKit.emit({ kitId: kit.id, isOn: $any($event.target).checked })" />{{ kit.name }}</label>
            @if (kit.isOn) {
              <label class="count">
                <input class="kb-field" inputmode="numeric" size="4" [attr.aria-label]="'Number of ' + kit.name" [value]="kit.count ?? ''" [placeholder]="kit.computed ?? ''" (change)="count.emit({ kitId: kit.id, count: wholeOf($any($event.target).value) })" />
                <span class="kb-quiet">{{ kit.count === null ? (kit.computed === null ? 'kits: area and thickness wanted' : 'kits, from area and thickness') : 'kits, by hand' }}</span>
              </label>
            }
          </li>
        } @empty {
          <li class="kb-quiet">No kits yet. Add them under Products and kits.</li>
        }
      </ul>
    </fieldset>
  `,
  styleUrl: './crew-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CrewEditor {
  readonly plan = input.required<ShiftPlan>();
  readonly things = input.required<ShiftThings>();
  readonly answer = input.required<ShiftAnswer>();
  readonly put = output<{ readonly personId: string; readonly isOn: boolean }>();
  readonly lead = output<string | null>();
  readonly cover = output<string | null>();
  readonly putKit = output<{ readonly kitId: string; readonly isOn: boolean }>();
  readonly count = output<{ readonly kitId: string; readonly count: number | null }>();

  protected readonly people = computed(() => {
    const on = new Set(this.plan().personIds);
    return this.things()
      .people.filter((person) => person.isActive || on.has(person.id))
      .map((person) => ({ id: person.id, name: person.name, isOn: on.has(person.id) }));
  });
  protected readonly onShift = computed(() => this.people().filter(({ isOn }) => isOn));
  protected readonly mayCover = computed(() => this.onShift().filter(({ id }) => id !== this.plan().competentPersonId));
  protected readonly kits = computed(() =>
    this.things().kits.map((kit) => {
      const planned = this.plan().kits.find(({ kitId }) => kitId === kit.id);
      const computed = this.answer().kits.find(({ kitId }) => kitId === kit.id)?.kits ?? null;
      return { id: kit.id, name: kit.name, isOn: planned !== undefined, count: planned?.count ?? null, computed };
    }),
  );

  protected wholeOf(text: string): number | null {
    return /^\d{1,5}$/.test(text.trim()) ? Math.min(10_000, Number(text)) : null;
  }
}
