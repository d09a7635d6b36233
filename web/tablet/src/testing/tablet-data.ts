import { type Mark } from '#compliance/answer';
import { type Language } from '#compliance/outcome';
import { type TabletDay } from '#shared/envelopes';
import { type ChecklistText, type TextLine } from '#compliance/checklists/text';
import { type DayJob } from '../app/day/day';
import { type Draft } from '../app/outbox/outbox';
import { sha256Hex } from '../app/checklists/opened-text';

const id = (number: number): string => `0193a000-0000-7000-8000-${String(number).padStart(12, '0')}`;
export const ids = { shift: id(500), job: id(400), version: id(701), earlierVersion: id(700), dov: id(1), marisol: id(2), abe: id(3), mixing: id(102), scraping: id(106), nobody: id(999), action: id(800) } as const;

const line = (more: Partial<TextLine> & { readonly id: string }): TextLine => ({ ruleId: 'rule', taskId: null, mark: null, isCritical: false, text: `Text of ${more.id}`, why: 'Because.', source: '29 CFR 1926.1153 (c)(1) [text read]', ...more });

/** An invented checklist text with one open task, one held, a critical line about a task and one about the whole job. */
export function checklistText(language: Language = 'en'): ChecklistText {
  const protection: ChecklistText['tasks'][number]['protection'] = [{ mark: 'respirator' satisfies Mark, name: language === 'en' ? 'Half mask, P100' : 'Media máscara, P100' }];
  return {
    format: 'kneeboard-checklist-text/1',
    language,
    title: 'Day checklist',
    date: '2026-12-03',
    jobName: 'Process hall floor',
    siteName: 'Tollgate Creamery',
    competentPersonName: 'Dov Lindqvist',
    packId: 'us-federal',
    packVersion: '1',
    morning: [line({ id: 'survey', isCritical: true }), line({ id: 'masks', taskId: ids.mixing, isCritical: true }), line({ id: 'tape' })],
    tasks: [
      { taskId: ids.mixing, name: language === 'en' ? 'Powder mixing' : 'Mezcla de polvo', state: 'ready', heldBecause: null, personIds: [ids.marisol, ids.abe], respirator: 'Half mask, P100.', protection, live: [line({ id: 'shroud', isCritical: true }), line({ id: 'seal', mark: 'respirator', isCritical: true }), line({ id: 'gloves', mark: 'hands' })] },
      { taskId: ids.scraping, name: 'Mastic scraping', state: 'may-not-start', heldBecause: 'Nobody has said what it is.', personIds: [ids.abe], respirator: 'Not decided.', protection: [], live: [] },
    ],
    people: [
      { personId: ids.dov, name: 'Dov Lindqvist', language: 'en', taskIds: [], lines: [] },
      { personId: ids.marisol, name: 'Marisol Tena', language: 'es', taskIds: [ids.mixing], lines: ['12:40 a 14:10'] },
      { personId: ids.abe, name: 'Abe Kowalczyk', language: 'en', taskIds: [ids.mixing], lines: ['12:40 to 14:10'] },
    ],
    sentence: language === 'en' ? 'I was briefed in a language I understand.' : 'Me explicaron el trabajo en un idioma que entiendo.',
    notice: 'Follow the strictest.',
  };
}

export function dayJob(more: Partial<DayJob> = {}): DayJob {
  const person = { state: 'not-yet' as const, at: null, isPinProven: true, pinState: null };
  return {
    shiftId: ids.shift,
    jobId: ids.job,
    jobName: 'Process hall floor',
    siteName: 'Tollgate Creamery',
    date: '2026-12-03',
    version: { id: ids.version, number: 2, publishedAt: '2026-12-03T11:50:00Z', texts: [] },
    people: [
      { id: ids.dov, name: 'Dov Lindqvist', language: 'en', isLead: true, hasPin: true, ...person },
      { id: ids.marisol, name: 'Marisol Tena', language: 'es', isLead: false, hasPin: false, ...person, isPinProven: false },
      { id: ids.abe, name: 'Abe Kowalczyk', language: 'en', isLead: false, hasPin: true, ...person },
    ],
    briefing: null,
    stopped: [],
    reopened: [],
    startedTaskIds: [],
    unprovenTaskIds: [],
    sheets: [],
    ...more,
  };
}

/** A day with one job whose texts carry their true fingerprints. */
export async function tabletDay(sealingKey: string, job: DayJob = dayJob()): Promise<TabletDay> {
  const texts = await Promise.all((['en', 'es'] as const).map(async (language) => {
    const text = JSON.stringify(checklistText(language));
    return { language, text, sha256: await sha256Hex(text) };
  }));
  return {
    tablet: { id: id(900), name: 'Truck 2' },
    organisationName: 'Marrow & Slate Floors',
    serverTime: '2026-12-03T12:00:00Z',
    sealingKey,
    officerName: 'Ines Halloran',
    officerPhone: '555-0142',
    witnesses: [{ id: ids.dov, name: 'Dov Lindqvist' }],
    jobs: [{ ...job, version: { ...job.version, texts } }],
  };
}

export function cannotSign(more: { readonly personId?: string } = {}): Draft {
  return { kind: 'could-not-sign', versionId: ids.version, language: 'en', textSha256: 'a'.repeat(64), personId: ids.abe, reason: 'missing-gear', note: null, ...more };
}
