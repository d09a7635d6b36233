import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { type PartFacts } from '../facts';
import { checkCas } from './cas';
import { HAZARD_ROWS } from './ghs-hazards.data';
import { kitHazards } from './kit-hazards';
import { MIXING_EFFECTS } from './mixing-effects.data';

const part = (name: string, form: PartFacts['form'], hazardCodes: string[], casNumbers: string[] = []): PartFacts => ({
  productId: name,
  productName: name,
  part: name,
  form,
  sheet: { revisionId: 'r1', revisedOn: '2025-03-01', signalWord: 'danger', hazardCodes, precautionaryCodes: [], casNumbers, protectionWords: [] },
});
const polyol = part('A', 'liquid', ['H319']);
const mdi = part('B', 'liquid', ['H334', 'H317', 'H302+H332'], ['101-68-8']);
const powder = part('C', 'powder', ['H315', 'H318'], ['65997-15-1', '14808-60-7']);
const ids = (parts: PartFacts[], ...rest: Parameters<typeof kitHazards> extends [unknown, ...infer R] ? R : never) => kitHazards(parts, ...rest).effects.map((each) => each.id);

describe('[PPE-01] kit hazards', () => {
  it('are the union of the parts with every pictogram of every sheet', () => {
    const kit = kitHazards([polyol, mdi, powder]);
    expect(kit.codes).toEqual(['H302+H332', 'H315', 'H317', 'H318', 'H319', 'H334']);
    // GHS07 stands on sheet A (H319 alone) and on B (H302+H332); each sheet keeps its own.
    expect(kit.pictograms).toEqual(['GHS05', 'GHS07', 'GHS08']);
    expect(kit.partsWithoutSheet).toEqual([]);
  });

  it('add what mixing adds, by state', () => {
    expect(ids([polyol, mdi, powder])).toEqual(['silica-dust-while-tipping', 'alkaline-when-wet', 'isocyanate-vapor-while-mixing', 'carbon-dioxide-with-water', 'dust-of-cured-coat']);
    expect(kitHazards([polyol, mdi, powder]).addedByMixing).toEqual(['H350', 'H372']);
    expect(ids([polyol, mdi, powder], 'mixing')).toEqual(['silica-dust-while-tipping', 'isocyanate-vapor-while-mixing']);
    expect(ids([polyol])).toEqual([]);
    expect(ids([part('A', 'liquid', ['EUH205']), part('B', 'liquid', ['H314'], ['2855-13-2'])])).toEqual(['heat-of-reaction-epoxy']);
  });

  it('does not raise dust from silica in a liquid part', () => {
    expect(ids([part('A', 'liquid', [], ['14808-60-7'])])).toEqual(['dust-of-cured-coat']);
  });

  it('[HAZ-04] names a part without a confirmed sheet and a code nobody knows', () => {
    const kit = kitHazards([{ ...polyol, sheet: null }, part('B', 'liquid', ['H334', 'H9'])]);
    expect(kit.partsWithoutSheet).toEqual(['A']);
    expect(kit.unknownCodes).toEqual([{ productName: 'B', text: 'H9' }]);
    expect(kit.codes).toEqual(['H334']);
  });

  it('lose nothing when a part is added, whatever the order', () => {
    const anyPart = fc.record({ form: fc.constantFrom<PartFacts['form']>('liquid', 'powder'), codes: fc.subarray([...new Set(HAZARD_ROWS.map((row) => row.code))], { maxLength: 6 }), cas: fc.subarray(['101-68-8', '65997-15-1', '14808-60-7', '25068-38-6', '2855-13-2']) });
    fc.assert(
      fc.property(fc.array(anyPart, { maxLength: 4 }), anyPart, (some, more) => {
        const parts = [...some, more].map(({ form, codes, cas }, i) => part(String(i), form, codes, cas));
        const before = kitHazards(parts.slice(0, -1));
        const after = kitHazards(parts);
        const all = [...after.codes, ...after.addedByMixing];
        for (const code of [...before.codes, ...before.addedByMixing]) expect(all).toContain(code);
        expect(kitHazards([...parts].reverse()).codes).toEqual(after.codes);
      }),
    );
  });

  it('are triggered by CAS numbers with a right check digit', () => {
    for (const { trigger, with: other } of MIXING_EFFECTS) for (const number of [...trigger.casNumbers, ...(other?.casNumbers ?? [])]) expect(checkCas(number).isValid).toBe(true);
  });
});
