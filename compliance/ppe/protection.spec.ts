import { describe, expect, it } from '@jest/globals';
import { kitFacts, sheetFacts, shiftFacts, taskFacts } from '#test/support/shift-facts';
import { type ProtectionItem } from '../answer';
import { answerShift } from '../answer-shift';
import { type SheetFacts, type TaskKind } from '../facts';
import { PROTECTION } from './protection.data';
import { saysNotNeeded } from './protection';

function protectionOf(kind: TaskKind, sheet: Partial<SheetFacts> | null = {}, form: 'liquid' | 'powder' = 'liquid'): readonly ProtectionItem[] {
  const kit = kitFacts({ parts: [{ productId: 'x', productName: 'Quarrybond X', part: 'A', form, sheet: sheet === null ? null : sheetFacts(sheet) }] });
  const facts = shiftFacts({ kits: [kit], tasks: [taskFacts({ kind, kitId: kit.id, assignments: [{ personId: 'dov', startMinute: 400, endMinute: 500 }] })] });
  return answerShift(facts, '2026-12-03T12:00:00Z').tasks[0]!.protection;
}
const idsOf = (items: readonly ProtectionItem[]): readonly string[] => items.map(({ mark, name }) => `${mark}: ${name.en}`);

describe('[PPE-01] protection from work and sheets', () => {
  // The drawn page and paper: which marks stand beside which work; boots for all work (1926.96, from memory).
  it.each<[TaskKind, readonly string[]]>([
    ['floor-grinding', ['eyes: Safety glasses', 'ears: Ear muffs', 'boots: Safety boots']],
    ['edge-grinding', ['eyes: Safety glasses', 'ears: Ear muffs', 'boots: Safety boots']],
    // 1926.57(f)(6), parallel text: gloves, eye and face protection, safety shoes.
    ['shot-blasting', ['eyes: Safety glasses', 'face: Face shield', 'ears: Ear muffs', 'hands: Leather gloves', 'boots: Safety boots']],
    ['shot-pick-up', ['eyes: Safety glasses', 'hands: Work gloves', 'boots: Safety boots']],
    ['slurry-handling', ['eyes: Safety glasses', 'hands: Waterproof gloves', 'boots: Safety boots']],
    ['clean-up', ['eyes: Safety glasses', 'hands: Work gloves', 'boots: Safety boots']],
    ['spreading', ['boots: Safety boots']],
    ['break', []],
    ['inspection', []],
  ])('%s', (kind, expected) => {
    expect(idsOf(protectionOf(kind))).toEqual(expected);
  });

  // Statements H314 to H319 (GHS): burns or irritates skin, eyes; H317 skin sensitization.
  it.each<[string, readonly string[]]>([
    ['H314', ['eyes: Goggles', 'hands: Chemical-proof gloves', 'clothing: Coverall with long sleeves', 'boots: Safety boots']],
    ['H315', ['hands: Chemical-proof gloves', 'clothing: Coverall with long sleeves', 'boots: Safety boots']],
    ['H317', ['hands: Chemical-proof gloves', 'clothing: Coverall with long sleeves', 'boots: Safety boots']],
    ['H318', ['eyes: Goggles', 'boots: Safety boots']],
    ['H319', ['eyes: Goggles', 'boots: Safety boots']],
    ['H372', ['boots: Safety boots']],
  ])('%s while spreading', (code, expected) => {
    const items = protectionOf('spreading', { hazardCodes: [code] });
    expect(idsOf(items)).toEqual(expected);
    for (const { mark, reason, source } of items.filter((each) => each.mark !== 'boots')) expect([mark, reason.en.includes(`(${code})`), reason.es.includes(`(${code})`), source.paragraph]).toEqual([mark, true, true, code]);
  });

  it('a code in a combination counts', () => {
    expect(idsOf(protectionOf('spreading', { hazardCodes: ['H302+H312'] }))).toContain('hands: Chemical-proof gloves');
  });

  it('a face shield only where corrosive liquid is poured', () => {
    expect(idsOf(protectionOf('liquid-mixing', { hazardCodes: ['H314'] }))).toContain('face: Face shield over the goggles');
    expect(idsOf(protectionOf('spreading', { hazardCodes: ['H314'] })).join()).not.toContain('face:');
  });

  it('the kit\'s codes do not reach a task that leaves the kit alone', () => {
    expect(idsOf(protectionOf('floor-grinding', { hazardCodes: ['H314'] }))).toEqual(idsOf(protectionOf('floor-grinding')));
  });

  it('wet cement asks alkali-proof gloves, and cites no code that the sheet does not carry', () => {
    const items = protectionOf('spreading', { casNumbers: ['65997-15-1'] }, 'powder');
    expect(idsOf(items)).toEqual(['eyes: Goggles', 'hands: Alkali-proof gloves', 'clothing: Coverall with long sleeves', 'boots: Safety boots']);
    expect(JSON.stringify(items)).not.toMatch(/H3\d\d/);
  });

  it.each([
    ['eyes', 'Wear goggles.', 'eyes: Goggles'],
    ['hands', 'Nitrile gloves, 0.4 mm.', 'hands: Chemical-proof gloves'],
    ['skin', 'Long sleeves.', 'clothing: Coverall with long sleeves'],
    ['hearing', 'Ear protection near the mixer.', 'ears: Ear muffs'],
  ] as const)('section 8 words on %s are followed and quoted', (topic, text, expected) => {
    const items = protectionOf('spreading', { protectionWords: [{ topic, text }] });
    expect(idsOf(items)).toContain(expected);
    expect(items.some(({ source }) => source.note === text && source.citation === 'Safety data sheet of Quarrybond X')).toBe(true);
    expect(idsOf(protectionOf('spreading', { protectionWords: [{ topic, text: 'Not normally required.' }] }))).toEqual(['boots: Safety boots']);
    expect(idsOf(protectionOf('spreading', { protectionWords: [{ topic, text: ' ' }] }))).toEqual(['boots: Safety boots']);
  });

  it.each([
    ['Not required.', true], ['Not normally needed', true], ['None', true], ['No special measures.', true], ['No es necesario.', true],
    ['Wear goggles.', false], ['Required at all times.', false], ['Nonetheless wear gloves', false],
  ])('%j says not needed: %s', (text, expected) => {
    expect(saysNotNeeded(text)).toBe(expected);
  });

  it('[PPE-01] ranks what replaces what: the tighter eye cover, the glove for the worst the hand meets', () => {
    // common practice, no source: which glove stands above which; goggles seal where glasses do not.
    expect(PROTECTION.map(({ id, mark, rank }) => `${mark} ${rank} ${id}`).sort()).toEqual([
      'boots 1 safety-boots',
      'clothing 1 coverall',
      'clothing 1 coverall-wet-cement',
      'ears 1 ear-muffs',
      'eyes 1 safety-glasses',
      'eyes 1 safety-glasses-clean-up',
      'eyes 2 goggles',
      'eyes 2 goggles-wet-cement',
      'face 1 face-shield',
      'face 1 face-shield-blasting',
      'hands 1 work-gloves',
      'hands 2 leather-gloves',
      'hands 3 waterproof-gloves',
      'hands 4 chemical-gloves',
      'hands 5 alkali-gloves',
    ]);
  });

  it('each row has its own id, a name and reason in both languages, a source, and a rank that tells rows of its mark apart by name', () => {
    expect(new Set(PROTECTION.map(({ id }) => id)).size).toBe(PROTECTION.length);
    for (const { name, reason, source } of PROTECTION) expect([name.en, name.es, reason.en, reason.es, source.citation].every((text) => text !== '')).toBe(true);
    for (const a of PROTECTION) for (const b of PROTECTION) if (a.mark === b.mark && a.rank === b.rank && a.mark !== 'face') expect(a.name).toEqual(b.name);
  });
});
