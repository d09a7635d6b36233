import { type Bench } from './bench';
import { checklistBench } from './checklist';
import { listUnderLoadBench } from './list-under-load';
import { memoryBench } from './memory';
import { readSheetBench } from './read-sheet';
import { searchBench } from './search';
import { verifyLogBench } from './verify-log';

/** Every bench, in the order of quality.md. */
export const benches: readonly Bench[] = [readSheetBench, checklistBench, searchBench, verifyLogBench, memoryBench, listUnderLoadBench];
