import { type ShiftAnswer } from '#compliance/answer';
import { type PersonFacts, type ShiftFacts } from '#compliance/facts';
import { type Language } from '#compliance/outcome';
import { clock } from './shift-geometry';
import { type ShiftBlock, type ShiftLane, patternOf } from './shift-lane';

const WORDS = {
  en: { lead: 'lead', held: 'may not start', twice: (time: string) => `listed twice from ${time}`, language: { en: '', es: 'Español' } },
  es: { lead: 'líder', held: 'no puede empezar', twice: (time: string) => `anotado dos veces desde las ${time}`, language: { en: 'English', es: '' } },
} as const;

/** The lanes of a shift from its facts and the rules' answer, one for each person in the order given. Block id: task id, "/", index. */
export function lanesOf(facts: Pick<ShiftFacts, 'people' | 'tasks'>, answer: Pick<ShiftAnswer, 'tasks' | 'people'>, language: Language = 'en'): readonly ShiftLane[] {
  const words = WORDS[language];
  const tasks = new Map(answer.tasks.map((task) => [task.taskId, task]));
  const people = new Map(answer.people.map((person) => [person.personId, person]));
  const own = facts.tasks.flatMap((task) =>
    task.assignments.map(({ personId, startMinute, endMinute }, index) => ({
      personId,
      block: {
        id: `${task.id}/${index}`,
        taskId: task.id,
        label: tasks.get(task.id)?.name[language] ?? task.kind,
        pattern: patternOf(task.kind),
        startMinute,
        endMinute,
        heldWords: tasks.get(task.id)?.state === 'may-not-start' ? words.held : null,
        isElsewhere: false,
      } satisfies ShiftBlock,
    })),
  );
  return facts.people.map((person) => {
    const found = people.get(person.id);
    const twice = found?.doubleBookings[0];
    return {
      personId: person.id,
      name: person.name,
      note: [person.isLead ? words.lead : '', words.language[person.language]].filter(Boolean).join(', '),
      alert: twice ? words.twice(clock(twice.startMinute)) : null,
      blocks: [...own.filter((item) => item.personId === person.id).map((item) => item.block), ...elsewhereBlocks(person)],
      table1Minutes: found?.table1Minutes ?? 0,
      maskRuleChangesAtMinute: found?.maskRuleChangesAtMinute ?? null,
    };
  });
}

function elsewhereBlocks(person: PersonFacts): readonly ShiftBlock[] {
  return person.elsewhere.map(({ jobName, kind, startMinute, endMinute }, index) => ({
    id: `elsewhere/${person.id}/${index}`,
    taskId: '',
    label: jobName,
    pattern: patternOf(kind),
    startMinute,
    endMinute,
    heldWords: null,
    isElsewhere: true,
  }));
}
