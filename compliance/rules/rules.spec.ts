import { describe, expect, it } from '@jest/globals';
import { sourceLine } from '../source';
import { RULE_CASES } from './cases';
import { CONTENTS_RULES } from './registry';

const DAY = '2026-12-01';
const ids = (duties: readonly string[]) => duties.map((duty) => `[${duty}]`).join(' ');

describe.each(RULE_CASES.map((each) => [`${ids(each.duties)} ${each.ruleId}`, each] as const))('%s', (_name, { cases }) => {
  it.each(cases.map((each) => [`${each.name} → ${each.expected} (${sourceLine(each.source)})`, each] as const))('%s', (_case, each) => {
    const verdict = each.run();
    expect(verdict.outcome).toBe(each.expected);
    expect(verdict.reason.en.length).toBeGreaterThan(3);
    expect(verdict.reason.es.length).toBeGreaterThan(3);
    if (each.expectedDueOn !== undefined) expect(verdict.dueOn).toBe(each.expectedDueOn);
    // Whoever must act or decide is told what would turn the answer.
    if (verdict.outcome === 'unmet' || verdict.outcome === 'undecided') expect(verdict.whatWouldChange).not.toBeNull();
    if (verdict.outcome === 'undecided') expect(verdict.whoDecides!.en.length).toBeGreaterThan(3);
  });
});

/** The items as the cited paragraphs list them: a dropped or added one turns red. */
const ITEMS: Readonly<Record<string, string>> = {
  'silica-plan-elements': 'tasks controls-per-task housekeeping access',
  'silica-plan-available': 'plan-on-site copy-of-plan copy-of-standard',
  'silica-training-contents': 'health-hazards tasks protection standard competent-person medical language shown certified',
  'silica-clinician-packet': 'standard duties exposure respirator earlier-exams',
  'air-record-contents': 'date task methods results laboratory protection people',
  'objective-data-contents': 'material source protocol work other resembles until',
  'silica-laboratory': 'accreditation method standards quality',
  'monitoring-observation': 'offered protected',
  'hazcom-program': 'program list labels sheets training non-routine',
  'hazcom-multi-employer': 'access precautions labels',
  'workplace-container-label': 'identifier hazards sheet-at-hand',
  'sheets-accessible': 'opens-offline no-permission backup',
  'respirator-voluntary-use': 'no-hazard information fitness care',
  'fit-test-record': 'person type mask date result',
  'waste-handling': 'container acidity no-drain hardened taker',
  'machine-pre-use-check': 'guard cord ground-fault isolation manual',
  'respirator-program': 'administrator selection medical fit use air care training evaluation',
};

describe.each(CONTENTS_RULES.map((rule) => [`${ids(rule.duties)} ${rule.id}`, rule] as const))('%s', (_name, rule) => {
  const all = Object.fromEntries(rule.items.map((item) => [item.id, true]));

  it(`lists what its source lists (${sourceLine(rule.source)})`, () => {
    expect(rule.items.map((item) => item.id).join(' ')).toBe(ITEMS[rule.id]);
  });

  it('is met only with every item: each one missing, or not looked for, changes it', () => {
    expect(rule.evaluate({ present: all }, DAY).outcome).toBe('met');
    for (const item of rule.items) {
      expect(rule.evaluate({ present: { ...all, [item.id]: false } }, DAY)).toMatchObject({ outcome: 'unmet', reason: { en: `Missing: ${item.name.en}.` } });
      expect(rule.evaluate({ present: { ...all, [item.id]: null } }, DAY).outcome).toBe('undecided');
    }
  });
});

describe('[SIL-23] no Social Security number', () => {
  it('is asked for by no rule (84 FR 21416, 2019)', () => {
    const text = JSON.stringify(CONTENTS_RULES.map((rule) => rule.items));
    expect(text).not.toMatch(/social security|\bssn\b|seguro social/i);
  });
});
