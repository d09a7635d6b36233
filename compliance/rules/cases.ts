import { AIR_CASES } from '../air/air-rules.cases';
import { SHEET_CASES } from '../hazcom/sheet-rules.cases';
import { NOISE_CASES } from '../noise/noise-rules.cases';
import { RECORD_CASES } from '../records/record-rules.cases';
import { RESPIRATOR_CASES } from '../respirators/respirator-rules.cases';
import { type RuleCases } from './case';

/** Tested examples of the office rules. Kept out of the browser: only tests and the command line import them. */
export const RULE_CASES: readonly RuleCases[] = [...AIR_CASES, ...SHEET_CASES, ...RESPIRATOR_CASES, ...NOISE_CASES, ...RECORD_CASES];
