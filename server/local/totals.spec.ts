import { describe, expect, it } from '@jest/globals';
import { closingLine, countReport, sumTotals } from './totals.mjs';

// The form of jest's --json: jestjs.io/docs/cli#--json and configuration#testresultsprocessor-string; statuses as there.
const file = (...results: [string, string][]) => ({ message: '', assertionResults: results.map(([status, title]) => ({ status, title })) });

describe('countReport', () => {
  it('counts what passed, failed and was skipped', () =>
    expect(countReport({ testResults: [file(['passed', 'a'], ['failed', 'b']), file(['passed', 'c'], ['pending', 'd'])] }, false)).toEqual({ passed: 2, failed: 1, skipped: 1 }));

  it('counts a test that could not look as skipped', () => expect(countReport({ testResults: [file(['passed', 'reads real sheets (not run: samples absent)'])] }, false)).toEqual({ passed: 0, failed: 0, skipped: 1 }));

  it('counts a file that broke before its first test as a failure', () =>
    expect(countReport({ testResults: [{ message: 'SyntaxError: …', assertionResults: [] }, file(['passed', 'a'])] }, false)).toEqual({ passed: 1, failed: 1, skipped: 0 }));

  it('leaves out what a name filter did not ask for, but not a failure', () =>
    expect(countReport({ testResults: [file(['passed', 'SIL-07'], ['pending', 'SIL-08'], ['failed', 'SIL-07 again'])] }, true)).toEqual({ passed: 1, failed: 1, skipped: 0 }));
});

it('adds up rounds and says so in one line', () => {
  const sum = sumTotals([{ passed: 10, failed: 0, skipped: 2 }, { passed: 5, failed: 1, skipped: 0 }]);
  expect(closingLine(sum)).toBe('15 passed, 1 failed, 2 skipped');
  expect(closingLine(sumTotals([]))).toBe('0 passed, 0 failed');
});
