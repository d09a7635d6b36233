// @ts-check

/**
 * @typedef {{ passed: number, failed: number, skipped: number }} Totals
 * @typedef {{ testResults: { message?: string, assertionResults: { status: string, title: string }[] }[] }} JestReport
 */

/** A test that could not look at what it is about says so in its title, and counts as skipped though it passes. */
const notRunMark = '(not run:';

/**
 * Counts one jest report (`--json`). A file that fails before its first test counts as one failure.
 * @param {JestReport} report
 * @param {boolean} isFiltered whether only tests with a certain name were asked for: the others are not skipped, but not meant
 * @returns {Totals}
 */
export function countReport({ testResults }, isFiltered) {
  const totals = { passed: 0, failed: 0, skipped: 0 };
  for (const { message, assertionResults } of testResults) {
    if (assertionResults.length === 0 && message) totals.failed += 1;
    for (const { status, title } of assertionResults) {
      if (status === 'failed') totals.failed += 1;
      else if (status === 'passed' && !title.includes(notRunMark)) totals.passed += 1;
      else if (status === 'passed' || !isFiltered) totals.skipped += 1;
    }
  }
  return totals;
}

/**
 * @param {readonly Totals[]} all
 * @returns {Totals}
 */
export function sumTotals(all) {
  return all.reduce((sum, each) => ({ passed: sum.passed + each.passed, failed: sum.failed + each.failed, skipped: sum.skipped + each.skipped }), { passed: 0, failed: 0, skipped: 0 });
}

/**
 * The closing line that a CI reads.
 * @param {Totals} totals
 */
export function closingLine({ passed, failed, skipped }) {
  return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}
