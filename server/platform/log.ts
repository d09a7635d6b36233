import { pino, type Logger } from 'pino';

export type Log = Logger;
/** JSON lines on standard output; secrets never reach it: no headers, no bodies. */
export const createLog = (level: string): Log => pino({ level, base: null, timestamp: pino.stdTimeFunctions.isoTime });
