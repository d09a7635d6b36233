import { InjectionToken } from '@angular/core';
import { answerShift } from '#compliance';
import { type ShiftAnswer } from '#compliance/answer';
import { type ShiftFacts } from '#compliance/facts';

export type AnswerShift = (facts: ShiftFacts, asOf: string) => ShiftAnswer;

/** The rules, asked in the browser at every change; the server asks the same ones again. */
export const ANSWER_SHIFT = new InjectionToken<AnswerShift>('answerShift', { providedIn: 'root', factory: () => answerShift });
