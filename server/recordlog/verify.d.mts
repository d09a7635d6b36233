export interface Verification {
  isGood: boolean;
  /** What to show, the outcome or the first trouble first. */
  lines: string[];
  warnings: string[];
}

export function verifyLog(path: string, options?: { keys?: string[]; earlier?: string[] }): Verification;
