import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { kitFacts, sheetFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { answerShift } from '../answer-shift';
import { consumableBases, consumableUnits, consumableKinds, type ConsumableRate, type ShiftFacts } from '../facts';
import { rounded } from './consumables';
import { CONSUMABLES } from './consumables.data';

const rate = (overrides: Partial<ConsumableRate> = {}): ConsumableRate => ({ item: 'shot', amount: 0.4, unit: 'kg', per: 'm2', statedBy: 'Dov Lindqvist, counted on the last job', ...overrides });
const linesOf = (facts: ShiftFacts) => answerShift(facts, '2026-12-03T12:00:00Z').consumables;
const lineOf = (item: string, facts: ShiftFacts) => linesOf(facts).find(({ id }) => id === `consumable-amount/${item}`);
const maskSheet = kitFacts({ parts: [{ productId: 'b', productName: 'Part B', part: 'B', form: 'liquid', sheet: sheetFacts({ precautionaryCodes: ['P284'] }) }] });

// Common practice, no source: what wears is known to the trade; how fast is only ever stated by somebody.
describe('what a shift uses up (consumable-amount)', () => {
  it('lists what the planned work uses, each "not known" until somebody states a rate, with who can', () => {
    expect(linesOf(shiftFacts()).map(({ id, outcome, text, whoDecides }) => [id.split('/')[1], outcome, text.en, whoDecides?.en])).toEqual([
      ['shot', 'undecided', 'Steel shot: amount not known.', 'the maker of the machine'],
      ['diamonds', 'undecided', 'Diamond tools: amount not known.', 'the maker of the machine'],
      ['collector-bags', 'undecided', 'Collector bags: amount not known.', 'the competent person'],
      ['hepa-filters', 'undecided', 'HEPA filters: amount not known.', 'the maker of the machine'],
      ['tape', 'undecided', 'Masking tape: amount not known.', 'the crew lead'],
    ]);
    expect(linesOf(shiftFacts({ tasks: [taskFacts({ kind: 'break' })] }))).toEqual([]);
    expect(lineOf('blades', shiftFacts({ tasks: [taskFacts({ kind: 'joint-sawing' })] }))?.outcome).toBe('undecided');
    expect(lineOf('cartridges', shiftFacts({ kits: [maskSheet] }))?.whoDecides?.en).toBe('the safety officer');
  });

  // Derived by hand from the demo shift: 600 ft² = 55.741824 m²; blasting 150 min; grinding 130 + edges 45 min; 24 kits; one blaster operator.
  it.each<[string, ConsumableRate, string]>([
    ['0.4 kg a m² of 55.74 m²', rate(), 'Steel shot: 22.3 kg.'],
    ['8 kg a machine hour, 2.5 h', rate({ amount: 8, per: 'hour' }), 'Steel shot: 20 kg.'],
    ['a set for each 6 machine hours, 2 h 55 min: one piece begun', rate({ item: 'diamonds', amount: 1 / 6, unit: 'pieces', per: 'hour' }), 'Diamond tools: 1 piece.'],
    ['a bag for 4 m²: 13.9 are 14', rate({ item: 'collector-bags', amount: 0.25, unit: 'pieces' }), 'Collector bags: 14 pieces.'],
    ['3 m of tape a kit, 24 kits', rate({ item: 'tape', amount: 3, unit: 'm', per: 'kit' }), 'Masking tape: 72 m.'],
    ['two filters a person, one person at the blaster', rate({ amount: 2, unit: 'pieces', per: 'person' }), 'Steel shot: 2 pieces.'],
  ])('%s', (_name, stated, text) => {
    const line = lineOf(stated.item, shiftFacts({ consumableRates: [stated] }));
    expect(line).toMatchObject({ outcome: 'met', text: { en: text } });
    expect(line?.reason.en).toContain('stated by Dov Lindqvist');
  });

  it('counts by square feet, as a US maker states it', () => {
    // 55.74 m² are 600 ft² (1 ft = 0.3048 m exactly, NIST Handbook 44, appendix C); 600 × 0.08 lb = 48 lb.
    const line = lineOf('shot', shiftFacts({ areaM2: 600 * 0.3048 ** 2, consumableRates: [rate({ amount: 0.08, unit: 'lb', per: 'ft2' })] }));
    expect(line?.text.en).toBe('Steel shot: 48 lb.');
    expect(line?.reason.en).toContain('0.08 lb a ft²');
  });

  it('two cartridges for each person whose sheet asks a mask', () => {
    expect(lineOf('cartridges', shiftFacts({ kits: [maskSheet], consumableRates: [rate({ item: 'cartridges', amount: 2, unit: 'pieces', per: 'person' })] }))?.text.en).toBe('Mask cartridges: 8 pieces.');
  });

  it.each<[string, Partial<ConsumableRate>]>([['zero', { amount: 0 }], ['less than nothing', { amount: -1 }], ['no number', { amount: Number.NaN }], ['nobody named', { statedBy: ' ' }]])('a rate of %s is no rate', (_name, wrong) => {
    expect(lineOf('shot', shiftFacts({ consumableRates: [rate(wrong)] }))).toMatchObject({ outcome: 'unmet', text: { en: 'Steel shot: amount not known.' } });
  });

  it('stays not known while the floor is not measured or the kits are not counted', () => {
    expect(lineOf('shot', shiftFacts({ areaM2: null, consumableRates: [rate()] }))).toMatchObject({ outcome: 'undecided', whoDecides: { en: 'the crew lead' } });
    expect(lineOf('tape', shiftFacts({ thicknessMm: null, consumableRates: [rate({ item: 'tape', per: 'kit' })] }))?.outcome).toBe('undecided');
    expect(lineOf('tape', shiftFacts({ kits: [], consumableRates: [rate({ item: 'tape', per: 'kit' })] }))?.outcome).toBe('undecided');
  });

  it('rounds up, pieces to whole ones, and not for the noise of a conversion', () => {
    expect([rounded(13.9, 'pieces'), rounded(14.0004, 'pieces'), rounded(14.002, 'pieces'), rounded(0.101, 'kg'), rounded(0.1, 'kg'), rounded(2, 'm')]).toEqual([14, 14, 15, 0.11, 0.1, 2]);
  });

  it('refuses two rates for one thing by name', () => {
    expect(answerShift(shiftFacts({ consumableRates: [rate(), rate()] }), '2026-12-03T12:00:00Z').gates.find(({ ruleId }) => ruleId === 'facts-possible')?.reason.en).toContain('consumableRates.item');
  });

  it('never holds work, never throws, and no number appears that nobody stated', () => {
    const anyRate = fc.record({ item: fc.constantFrom(...consumableKinds), amount: fc.double({ min: -1, max: 100, noNaN: true }), unit: fc.constantFrom(...consumableUnits), per: fc.constantFrom(...consumableBases), statedBy: fc.constantFrom('', 'Dov Lindqvist') });
    fc.assert(
      fc.property(fc.uniqueArray(anyRate, { selector: ({ item }) => item, maxLength: 7 }), (consumableRates) => {
        const stated = new Set(consumableRates.filter(({ amount, statedBy }) => amount > 0 && statedBy !== '').map(({ item }) => item as string));
        for (const { id, outcome, text, isHolding } of linesOf(shiftFacts({ consumableRates }))) {
          expect(isHolding).toBe(false);
          if (!stated.has(id.split('/')[1] ?? '')) expect([outcome === 'met', /\d/.test(text.en)]).toEqual([false, false]);
        }
      }),
    );
  });

  it('names every kind once', () => {
    expect(CONSUMABLES.map(({ id }) => id)).toEqual([...consumableKinds]);
  });
});
