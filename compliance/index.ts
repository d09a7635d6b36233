/** The public surface of the knowledge: what the pages and the service ask. Further tables and sums are imported by their own path. */
export { answerShift } from './answer-shift';
export { generateChecklist } from './checklists/generate';
export { CHECKLIST_TEXT_FORMAT, checklistText, parseChecklistText, renderChecklistText, type ChecklistText, type TextLine, type TextPerson, type TextTask } from './checklists/text';
export { LISTED_SHIFT_RULES } from './shift-rules';
export { NOTICE, signedSentence } from './notice';
export { dayPlan, type DayPlan, type PlanLine, type PlanTask } from './plans/day-plan';
export { coverageM2, kitsFor, mixingOf, statedCoverageFt2 } from './quantities/kits';
export * from './quantities/units';
export { TASKS, type TaskTraits } from './silica/tasks.data';
export { FOUR_HOURS_MINUTES } from './silica/table1';
export { clock, duration } from './words';
export { InputError } from './input-error';
export { sourceLine, type Source, type Verified } from './source';
export * from './answer';
export * from './facts';
export * from './outcome';
