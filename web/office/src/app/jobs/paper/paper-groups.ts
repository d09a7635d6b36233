import { type ChecklistText, type Mark } from '#compliance';

/** A line of the paper list; what several tasks share is asked once. */
export interface PaperRow {
  readonly id: string;
  readonly text: string;
  /** Beside most lines; the place's hazards and where to send help stand only here. */
  readonly why: string;
  readonly mark: Mark | null;
  readonly taskNames: readonly string[];
  readonly source: string;
}

export interface PaperGroups {
  readonly morning: readonly PaperRow[];
  /** At each start: controls, access, housekeeping. */
  readonly controls: readonly PaperRow[];
  /** After them: what is worn. */
  readonly protection: readonly PaperRow[];
}

/** The lines of a published text in the order of the day, controls before protection (rule of conduct 1). */
export function paperGroups({ morning, tasks }: ChecklistText): PaperGroups {
  const rows = new Map<string, { id: string; text: string; why: string; mark: Mark | null; taskNames: string[]; source: string }>();
  for (const { name, live } of tasks) {
    for (const { id, text, why, mark, source } of live) {
      const key = JSON.stringify([text, why, mark, source]);
      const known = rows.get(key);
      if (!known) rows.set(key, { id, text, why, mark, taskNames: [name], source });
      else if (!known.taskNames.includes(name)) known.taskNames.push(name);
    }
  }
  return {
    morning: morning.map(({ id, text, why, mark, source }) => ({ id, text, why, mark, taskNames: [], source })),
    controls: [...rows.values()].filter(({ mark }) => mark === null),
    protection: [...rows.values()].filter(({ mark }) => mark !== null),
  };
}
