import { describe, expect, it } from '@jest/globals';
import { kitFacts } from '#test/support/shift-facts';
import { containerLabelFor } from './container-label';

const parts = kitFacts().parts;
const powder = parts.filter(({ part }) => part === 'C');

// 29 CFR 1910.1200(f)(6)(ii), read.
describe('[HAZ-03] label on a container of mixed or decanted material: part, state, identifier, signal word, general hazard words (conduct 14)', () => {
  it('names parts and state, with the statements of the sheets and their label elements', () => {
    const label = containerLabelFor(parts, 'wet');
    expect(label.identifier).toBe('Quarrybond 40 part A + Quarrybond 40 part B + Quarrybond 40 part C');
    expect(label.state).toEqual({ en: 'mixed, wet', es: 'mezclado, húmedo' });
    expect(label.signalWord).toBe('danger');
    expect(label.pictograms).toEqual(['GHS05', 'GHS07', 'GHS08']);
    expect(label.statements.map(({ code }) => code)).toEqual(['H315', 'H317', 'H318', 'H319', 'H332', 'H334', 'H335', 'H350i', 'H351', 'H372', 'H373']);
    expect(label.effects.map(({ en }) => en)).toEqual(expect.arrayContaining([expect.stringContaining('Wet cement'), expect.stringContaining('Never close a bucket')]));
    expect(label.blockedBy).toEqual([]);
  });

  it('names a product by itself without an empty part', () => {
    expect(containerLabelFor(powder.map((part) => ({ ...part, part: '', productName: 'Northlode Slab Degreaser' })), 'wet').identifier).toBe('Northlode Slab Degreaser');
  });

  it('says other things of the dry powder than of the wet mix', () => {
    const label = containerLabelFor(powder, 'dry');
    expect(label.statements.map(({ code }) => code)).not.toContain('H334');
    expect(label.effects).toEqual([]);
    expect(containerLabelFor(powder, 'mixing').effects.map(({ en }) => en)).toEqual([expect.stringContaining('Silica dust')]);
  });

  it('carries no statement that no sheet carries: effects are words, not a classification', () => {
    const withoutSilicaStatements = powder.map((part) => ({ ...part, sheet: { ...part.sheet!, hazardCodes: ['H318'] } }));
    expect(containerLabelFor(withoutSilicaStatements, 'mixing').statements.map(({ code }) => code)).toEqual(['H318']);
  });

  it('is blocked by a part without a confirmed sheet', () => {
    expect(containerLabelFor([{ ...parts[0]!, sheet: null }], 'wet').blockedBy).toEqual(['Quarrybond 40 part A']);
  });
});
