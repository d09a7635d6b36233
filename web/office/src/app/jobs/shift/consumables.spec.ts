import { beforeEach, describe, expect, it } from '@jest/globals';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { answerShift } from '#compliance';
import { assembleFacts, type ShiftPlan } from '#shared/jobs';
import { Consumables } from './consumables';
import { shiftFixture } from './shift-fixture';
import { setRate, type StatedRate } from './shift-plan';

describe('what a shift uses up, on its page', () => {
  let fixture: ComponentFixture<Consumables>;
  let plan: ShiftPlan;
  let told: (StatedRate | null)[];

  const show = (): void => {
    const shift = shiftFixture();
    fixture.componentRef.setInput('lines', answerShift(assembleFacts({ ...shift, plan }), '2026-12-03T12:00:00Z').consumables);
    fixture.componentRef.setInput('plan', plan);
    fixture.componentRef.setInput('mayEdit', true);
    fixture.detectChanges();
  };
  const element = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const press = (label: string): void => {
    [...element().querySelectorAll('button')].find((button) => button.getAttribute('aria-label') === label || button.textContent?.trim() === label)!.click();
    fixture.detectChanges();
  };
  const type = (label: string, value: string): void => {
    const input = [...element().querySelectorAll('label')].find(({ textContent }) => textContent?.trim().startsWith(label))!.querySelector('input, select') as HTMLInputElement;
    input.value = value;
    input.dispatchEvent(new Event(input.tagName === 'SELECT' ? 'change' : 'input'));
    fixture.detectChanges();
  };

  beforeEach(() => {
    plan = shiftFixture().plan;
    told = [];
    fixture = TestBed.createComponent(Consumables);
    fixture.componentInstance.rate.subscribe(({ item, rate }) => {
      told.push(rate);
      plan = setRate(plan, item, rate);
      show();
    });
    show();
  });

  it('says "not known" and who can say, and never a number of its own', () => {
    expect(element().textContent).toContain('Diamond tools: amount not known.');
    expect(element().textContent).toContain('Can say: the maker of the machine.');
    expect(element().querySelector('ul')?.textContent).not.toMatch(/\d/);
  });

  it('takes a stated rate and shows the amount with who stated it; takes it away again', () => {
    press('State a rate: Diamond tools');
    type('Amount', '1/2');
    type('Counted by', 'hour');
    type('Stated by', 'maker’s manual, page 12');
    press('Use this rate');
    expect(told).toEqual([{ item: 'diamonds', amount: 0.5, unit: 'pieces', per: 'hour', statedBy: 'maker’s manual, page 12' }]);
    // Two hours of grinding at half a set an hour.
    expect(element().textContent).toContain('Diamond tools: 1 piece.');
    expect(element().textContent).toContain('stated by maker’s manual, page 12');
    press('Change rate: Diamond tools');
    press('Take it away');
    expect(plan.consumableRates).toEqual([]);
    expect(element().textContent).toContain('Diamond tools: amount not known.');
  });

  it('reads 1,500 as fifteen hundred, as every other field here does', () => {
    press('State a rate: Diamond tools');
    type('Amount', '1,500');
    type('Stated by', 'somebody');
    press('Use this rate');
    expect(told).toMatchObject([{ amount: 1500, per: 'ft2' }]);
  });

  it.each([['', 'somebody'], ['0', 'somebody'], ['-1', 'somebody'], ['x', 'somebody'], ['0,5', 'somebody'], ['2', ' ']])('refuses the amount "%s" stated by "%s" in words', (amount, by) => {
    press('State a rate: Diamond tools');
    type('Amount', amount);
    type('Stated by', by);
    press('Use this rate');
    expect(told).toEqual([]);
    expect(element().querySelector('[role=alert]')?.textContent).toContain('Give an amount above 0');
  });
});
