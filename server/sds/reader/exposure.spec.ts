import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { readLines } from './read-sheet';

const read = (section8: string) =>
  readLines(pagesFrom(`Section 1. Identification\nProduct name: Quarrybond 40, a product of the demonstration\nSection 8. Exposure controls/personal protection\n${section8}\nSection 9. Physical and chemical properties\nVapor pressure 5 mg/m3`));
const limits = (section8: string): string[] => read(section8).limits.map(({ value }) => `${value.substance} | ${value.kind} | ${value.value} ${value.unit}`);

describe('exposure limits', () => {
  it('take their kind from the head of their column', () => {
    expect(limits('Component             ACGIH TLV          OSHA PEL\nStoddard solvent      TWA: 100 ppm       TWA: 500 ppm\nQuartz                TWA: 0.025 mg/m3   TWA: 0.05 mg/m3')).toEqual(['Stoddard solvent | ACGIH TLV TWA | 100 ppm', 'Stoddard solvent | OSHA PEL TWA | 500 ppm', 'Quartz | ACGIH TLV TWA | 0.025 mg/m³', 'Quartz | OSHA PEL TWA | 0.05 mg/m³']);
  });

  it('keep the substance of the row above and the kind of the table', () => {
    expect(limits('US. ACGIH Threshold Limit Values\nComponents              Type      Value\nPhosphoric acid (CAS    STEL      3 mg/m3\n7664-38-2)\n                        TWA       1 mg/m3')).toEqual(['Phosphoric acid | ACGIH TLV STEL | 3 mg/m³', 'Phosphoric acid | ACGIH TLV TWA | 1 mg/m³']);
  });

  it('read figures without a leading nought, ceilings and fibers', () => {
    expect(limits('OSHA PEL\nMDI         ceiling .02 ppm\nGlass wool  1 f/cc')).toEqual(['MDI | OSHA PEL ceiling | 0.02 ppm', 'Glass wool | OSHA PEL | 1 f/cc']);
  });

  it('end with the controls and with the section', () => {
    expect(limits('OSHA PEL\nXylene      100 ppm\nEngineering controls     Keep air below the limit.\nRespiratory protection   Above 1000 ppm wear supplied air.')).toEqual(['Xylene | OSHA PEL | 100 ppm']);
  });

  it('are none where none is set', () => {
    expect(limits('No exposure limits noted for ingredient(s).')).toEqual([]);
  });
});

describe('protective equipment', () => {
  it('is given word for word under its label', () => {
    const found = read('Personal protective equipment\nEye/face protection      Wear safety glasses with side shields.\nSkin protection\n  Hand protection        Nitrile gloves, at least\n                         0.4 mm thick.\nRespiratory protection   Use a half mask with P100 filters.\nHearing protection       Wear ear plugs beside the grinder.').ppeWords;
    expect(found.map(({ value }) => [value.topic, value.text])).toEqual([
      ['eyes', 'Wear safety glasses with side shields.'],
      ['hands', 'Nitrile gloves, at least 0.4 mm thick.'],
      ['respiratory', 'Use a half mask with P100 filters.'],
      ['hearing', 'Wear ear plugs beside the grinder.'],
    ]);
  });

  it('is found in Spanish', () => {
    expect(read('Protección respiratoria: Usar mascarilla N95 como mínimo.\nProtección de las manos: Usar guantes de nitrilo.').ppeWords.map(({ value }) => value.topic)).toEqual(['hands', 'respiratory']);
  });

  it('is nothing when section 8 says nothing', () => {
    expect(read('No information available.').ppeWords).toEqual([]);
  });
});
