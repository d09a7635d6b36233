import { ChangeDetectionStrategy, Component, computed, input, output, signal } from '@angular/core';
import { consumableBases, consumableUnits } from '#compliance/facts';
import { type Finding } from '#compliance/outcome';
import { CONSUMABLES } from '#compliance/quantities/consumables.data';
import { ConsumableRate, type ShiftPlan } from '#shared/jobs';
import { Why } from '#ui/why';
import { numberFrom } from '../../pieces/units';
import { type StatedRate } from './shift-plan';

type Item = StatedRate['item'];
type Typed = { readonly amount: string; readonly unit: StatedRate['unit']; readonly per: StatedRate['per']; readonly statedBy: string };
const perWords: Readonly<Record<StatedRate['per'], string>> = { ft2: 'a ft²', m2: 'a m²', hour: 'a machine hour', kit: 'a kit', person: 'a person' };

/** What the shift uses up: amounts by rates that somebody stated. Without a rate it says "not known" and who can tell. */
@Component({
  selector: 'kb-consumables',
  imports: [Why],
  template: `
    <section aria-labelledby="consumables-heading">
      <h2 id="consumables-heading">What it uses up</h2>
      <ul class="kb-rows" style="--kb-columns: minmax(0, 1fr) 7rem 3rem" aria-label="What it uses up">
        @for (row of rows(); track row.item) {
          <li>
            <span
              >{{ row.line.text.en }} <span class="kb-quiet">{{ row.line.reason.en }}{{ row.line.whoDecides ? ' Can say: ' + row.line.whoDecides.en + '.' : '' }}</span></span
            >
            @if (mayEdit()) {
              <button type="button" class="kb-link" [attr.aria-expanded]="open() === row.item" [attr.aria-label]="(row.rate ? 'Change rate: ' : 'State a rate: ') + row.name" (click)="toggle(row.item)">{{ row.rate ? 'change rate' : 'state a rate' }}</button>
            } @else {
              <span></span>
            }
            <kb-why [finding]="row.line" [about]="row.line.text.en" [open]="why() === row.item" (openChange)="why.set($event ? row.item : null)" [class.open]="why() === row.item" />
            @if (open() === row.item) {
              <form class="rate" (submit)="state($event, row.item)">
                <label>Amount <input class="kb-field" inputmode="decimal" size="6" [value]="typed().amount" (input)="type({ amount: $any($event.target).value })" /></label>
                <label
                  >Unit
                  <select class="kb-field" (change)="type({ unit: $any($event.target).value })">
                    @for (unit of units; track unit) {
                      <option [value]="unit" [selected]="unit === typed().unit">{{ unit }}</option>
                    }
                  </select></label
                >
                <label
                  >Counted by
                  <select class="kb-field" (change)="type({ per: $any($event.target).value })">
                    @for (per of bases; track per) {
                      <option [value]="per" [selected]="per === typed().per">{{ perWords[per] }}</option>
                    }
                  </select></label
                >
                <label class="wide">Stated by <input class="kb-field" [value]="typed().statedBy" (input)="type({ statedBy: $any($event.target).value })" /></label>
                <button type="submit" class="kb-link">Use this rate</button>
                @if (row.rate) {
                  <button type="button" class="kb-link" (click)="drop(row.item)">Take it away</button>
                }
                @if (trouble()) {
                  <p class="kb-small" role="alert">{{ trouble() }}</p>
                }
              </form>
            }
          </li>
        }
      </ul>
      <p class="kb-small kb-quiet">No rate is put in by Kneeboard: take it from the maker, the supplier or your own count.</p>
    </section>
  `,
  styles: `
    .rate,
    kb-why.open {
      grid-column: 1 / -1;
    }

    .rate {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem 1rem;
      align-items: end;
    }

    .rate label {
      display: grid;
      font-size: var(--kb-small);
      color: var(--kb-ink-2);
    }

    .wide {
      flex: 1 1 14rem;
    }

    kb-why {
      text-align: right;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Consumables {
  readonly lines = input.required<readonly Finding[]>();
  readonly plan = input.required<ShiftPlan>();
  readonly mayEdit = input(false);
  readonly rate = output<{ readonly item: Item; readonly rate: StatedRate | null }>();

  protected readonly units = consumableUnits;
  protected readonly bases = consumableBases;
  protected readonly perWords = perWords;
  protected readonly open = signal<Item | null>(null);
  protected readonly why = signal<Item | null>(null);
  protected readonly typed = signal<Typed>({ amount: '', unit: 'pieces', per: 'ft2', statedBy: '' });
  protected readonly trouble = signal('');
  protected readonly rows = computed(() =>
    CONSUMABLES.flatMap(({ id, name }) => {
      const line = this.lines().find((each) => each.id.endsWith(`/${id}`));
      return line ? [{ item: id, name: name.en, line, rate: this.plan().consumableRates?.find(({ item }) => item === id) ?? null }] : [];
    }),
  );

  protected toggle(item: Item): void {
    this.trouble.set('');
    if (this.open() === item) return this.open.set(null);
    const stated = this.plan().consumableRates?.find((each) => each.item === item);
    this.typed.set(stated ? { amount: String(stated.amount), unit: stated.unit, per: stated.per, statedBy: stated.statedBy } : { amount: '', unit: 'pieces', per: 'ft2', statedBy: '' });
    this.open.set(item);
  }

  protected type(change: Partial<Typed>): void {
    this.typed.update((typed) => ({ ...typed, ...change }));
  }

  protected state(event: Event, item: Item): void {
    event.preventDefault();
    const { amount, ...rest } = this.typed();
    const rate = ConsumableRate.safeParse({ item, amount: numberFrom(amount), ...rest });
    if (!rate.success) return this.trouble.set('Give an amount above 0, and say who states it or which paper.');
    this.rate.emit({ item, rate: rate.data });
    this.open.set(null);
  }

  protected drop(item: Item): void {
    this.rate.emit({ item, rate: null });
    this.open.set(null);
  }
}
