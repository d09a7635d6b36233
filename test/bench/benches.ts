import { type Bench } from './bench';
import { checklistBench } from './checklist';
import { searchBench } from './search';
import { verifyLogBench } from './verify-log';

/** Every bench, in the order of quality.md. */
export const benches: readonly Bench[] = [checklistBench, searchBench, verifyLogBench];
