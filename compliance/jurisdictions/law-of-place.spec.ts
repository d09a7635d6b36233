import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import { anyShiftFacts } from '#test/support/shift-arbitrary';
import { basisFacts, shiftFacts } from '#test/support/shift-facts';
import { type ShiftAnswer } from '../answer';
import { answerShift } from '../answer-shift';
import { generateChecklist } from '../checklists/generate';
import { checklistText } from '../checklists/text';
import { type ShiftFacts } from '../facts';
import { type Finding } from '../outcome';
import { dayPlan } from '../plans/day-plan';
import { listPlaces } from './pack';
import { PLACES_WITHOUT_PACK } from './places.data';

const AS_OF = '2026-12-03T12:00:00Z';
const ABROAD = [...PLACES_WITHOUT_PACK.filter(({ isUsState }) => !isUsState).map(({ id }) => id), 'atlantis', 'nowhere', 'no-pack', ''];
const STATES = [...PLACES_WITHOUT_PACK.filter(({ isUsState }) => isUsState).map(({ id }) => id), 'us-texas'];

const findingsOf = (answer: ShiftAnswer): readonly Finding[] => [...answer.gates, ...answer.tasks.flatMap((task) => task.findings), ...answer.people.flatMap((person) => person.findings), ...answer.kits.flatMap((kit) => kit.findings), ...answer.consumables];
const isUsText = ({ source }: { readonly source: Finding['source'] }): boolean => /\b29 CFR\b|\bOSHA\b/.test(`${source.citation} ${source.paragraph ?? ''}`);
/** The federal limits and Table 1's four hours as any line could say them. */
const US_FIGURE = /\b(50|25)\s*µg|Table 1|Tabla 1|\b4 h\b/;
/** Everything decided by signed papers, so that whatever stays held is held by the place alone. */
const settled = (jurisdictionId: string): ShiftFacts => shiftFacts({ jurisdictionId, bases: [basisFacts({ exposureMicrogramsPerM3: 38 }), basisFacts({ id: 'mix', taskKind: 'powder-mixing', kind: 'below-action-level', exposureMicrogramsPerM3: 12 })] });

/** Rule of conduct 9 (design): a place without its own pack says "no pack"; no other country's figure or paragraph ever stands in. */
describe.each(ABROAD)('[LOC-02] abroad without a pack: %j (conduct 9)', (jurisdictionId) => {
  const answer = answerShift(settled(jurisdictionId), AS_OF);

  it('lets nothing start: every piece of work is held, clean-up too', () => {
    expect(answer.tasks.filter(({ state }) => state === 'ready').map(({ taskId }) => taskId)).toEqual(['inspection']);
    const cleanUp = answer.tasks.find(({ taskId }) => taskId === 'clean-up');
    expect(cleanUp).toMatchObject({ state: 'may-not-start', silicaBasis: 'held', respirator: { outcome: 'undecided', apf: null } });
    expect(cleanUp!.summary.en).toContain('No pack for this place');
  });

  it('cites no US paragraph anywhere, on the page or on the checklist', () => {
    expect(findingsOf(answer).filter(isUsText).map(({ ruleId }) => ruleId)).toEqual([]);
    expect(answer.tasks.flatMap(({ respirator, protection }) => [respirator, ...protection]).filter(isUsText)).toEqual([]);
    const checklist = generateChecklist(settled(jurisdictionId), answer);
    for (const language of ['en', 'es'] as const) expect(JSON.stringify(checklistText(checklist, language)).replaceAll('O. Reg. 490/09 Table 1', '')).not.toMatch(/29 CFR|OSHA|Table 1|Tabla 1/);
    expect(checklist.notice.en).toMatch(/^No pack for this place/);
    const plan = dayPlan(settled(jurisdictionId), answer);
    expect(JSON.stringify(plan).replaceAll('O. Reg. 490/09 Table 1', '')).not.toMatch(/29 CFR|OSHA|Table 1|Tabla 1/);
    expect(plan.notice).toEqual(checklist.notice);
    expect(plan.tasks.filter(({ state }) => state === 'ready').map(({ name }) => name.en)).toEqual(['Inspection']);
  });

  it('shows its own silica figure where one is known, with its source, and says that it decides nothing', () => {
    const law = answer.gates.find(({ ruleId }) => ruleId === 'rules-of-the-place');
    expect(law).toMatchObject({ outcome: 'undecided', whoDecides: { en: 'someone who knows the local code' } });
    if (answer.pack.orientation === null) expect(law!.reason.en).not.toMatch(/\d/);
    else {
      expect(law!.reason.en).toMatch(/Its silica limit, for orientation only: 0\.\d+ mg\/m³ as 8-hour average \(/);
      expect(law!.source).toEqual(answer.pack.orientation.source);
      expect(generateChecklist(settled(jurisdictionId), answer).notice.en).toContain('for orientation only');
    }
  });

  it('counts no Table 1 time and no four hours', () => {
    for (const person of answer.people) expect(person).toMatchObject({ table1Minutes: 0, table1MinutesElsewhere: 0, maskRuleChangesAtMinute: null });
  });
});

it('[LOC-02] places whose figure is known show exactly theirs (limits table; verified as marked there)', () => {
  const shown = Object.fromEntries(ABROAD.map((id) => [id, answerShift(settled(id), AS_OF).pack.orientation?.words.en.match(/[\d.]+ mg\/m³/)?.[0] ?? null]));
  expect(shown).toMatchObject({ 'new-zealand': '0.025 mg/m³', australia: '0.05 mg/m³', 'european-union': '0.1 mg/m³', 'canada-ontario': '0.1 mg/m³', 'canada-british-columbia': '0.025 mg/m³', 'canada-alberta': '0.025 mg/m³', 'canada-other': null, atlantis: null });
});

describe.each(STATES)('[LOC-01] a US state without a pack: %s (conduct 9)', (jurisdictionId) => {
  const answer = answerShift(settled(jurisdictionId), AS_OF);

  it('shows the federal text as orientation only: nothing is met by it, silica work and clean-up are held', () => {
    const federal = findingsOf(answer).filter(isUsText);
    expect(federal.length).toBeGreaterThan(5);
    for (const finding of federal) {
      expect(finding.outcome).toBe('undecided');
      expect(finding.source.citation).toMatch(/^Federal text, for orientation: 29 CFR/);
      expect(finding.reason.en).toContain('federal text shown for orientation, check the state’s');
    }
    for (const id of ['floor-grinding', 'shot-blasting', 'clean-up']) expect(answer.tasks.find(({ taskId }) => taskId === id)?.state).toBe('may-not-start');
  });
});

describe('[LOC-02] any facts in any place without a pack', () => {
  it('give no line that is met by US text, no US figure as a limit, and no mask from US tables', () => {
    fc.assert(
      fc.property(anyShiftFacts, fc.constantFrom(...ABROAD, ...STATES), (facts, jurisdictionId) => {
        const answer = answerShift({ ...facts, jurisdictionId }, AS_OF);
        for (const finding of findingsOf(answer)) {
          if (finding.outcome === 'met') expect([finding.ruleId, isUsText(finding)]).toEqual([finding.ruleId, false]);
          for (const [name, value] of Object.entries(finding.inputs)) if (name.startsWith('limit')) expect(value).toBeNull();
          expect(`${finding.text.en} ${finding.text.es} ${finding.reason.en}`.replace(/Its silica limit, for orientation only: [^)]*\)\./, '')).not.toMatch(US_FIGURE);
        }
        for (const { respirator, table1Row } of answer.tasks) {
          expect([respirator.apf, table1Row]).toEqual([null, null]);
          if (respirator.outcome !== 'undecided') expect(isUsText(respirator)).toBe(false);
        }
      }),
      { numRuns: 300 },
    );
  });
});

describe('[LOC-02] a foreign pack that is incomplete: Great Britain', () => {
  const answer = answerShift(settled('great-britain'), AS_OF);

  it('decides by its own limit and cites it; what it does not hold is undecided, never met by US text', () => {
    expect(findingsOf(answer).filter(isUsText).map(({ ruleId }) => ruleId)).toEqual([]);
    const blasting = answer.tasks.find(({ taskId }) => taskId === 'shot-blasting');
    expect(blasting?.findings.find(({ ruleId }) => ruleId === 'silica-signed-basis')).toMatchObject({ outcome: 'met', inputs: { 'limit, µg/m³ as 8-hour average': 100 }, source: { citation: 'EH40 workplace exposure limit' } });
    expect(answer.gates.find(({ ruleId }) => ruleId === 'first-aid-named')).toMatchObject({ outcome: 'undecided', source: { citation: 'No text on file for Great Britain', verified: 'not-on-file' } });
  });

  it('asks of clean-up what it asks of other silica work: the housekeeping paragraph is not its law', () => {
    expect(answer.tasks.find(({ taskId }) => taskId === 'clean-up')).toMatchObject({ state: 'not-decided', respirator: { outcome: 'undecided' } });
  });

  it('knows no Table 1 time', () => {
    expect(answer.people.every(({ table1Minutes }) => table1Minutes === 0)).toBe(true);
  });
});

it('every place of the lists is tried here', () => {
  const tried = [...ABROAD, ...STATES, 'us-federal', 'us-california', 'great-britain'];
  expect(listPlaces().map(({ id }) => id).filter((id) => !tried.includes(id))).toEqual([]);
});
