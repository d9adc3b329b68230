import { expect, test } from 'vitest';
import { countTests, type Report } from './test-report.mjs';

function report(overrides: Partial<Report> = {}): Report {
  return { numTotalTests: 3, numPassedTests: 3, numFailedTests: 0, testResults: [], ...overrides };
}

test('all passed', () => {
  expect(countTests(report(), 0)).toEqual({ passed: 3, failed: 0, skipped: 0 });
});

test('one failed and one was left out', () => {
  const testResults = [{ status: 'failed', assertionResults: [{ status: 'failed' }, { status: 'passed' }] }];
  expect(countTests(report({ numPassedTests: 1, numFailedTests: 1, testResults }), 1)).toEqual({
    passed: 1,
    failed: 1,
    skipped: 1,
  });
});

test('a file that does not load counts as a failure', () => {
  const testResults = [{ status: 'failed', assertionResults: [] }];
  expect(countTests(report({ testResults }), 1)).toEqual({ passed: 3, failed: 1, skipped: 0 });
});

test('an error that belongs to no test counts as a failure', () => {
  expect(countTests(report(), 1)).toEqual({ passed: 3, failed: 1, skipped: 0 });
});

test('no test at all is an error', () => {
  expect(() => countTests(report({ numTotalTests: 0, numPassedTests: 0 }), 0)).toThrow(/^No test ran/);
});
