import { LauncherError } from './launcher-error.mjs';

/**
 * @typedef {object} Report What Vitest's JSON reporter writes, as far as it is read here.
 * @property {number} numTotalTests
 * @property {number} numPassedTests
 * @property {number} numFailedTests
 * @property {{ status: string, assertionResults: { status: string }[] }[]} testResults one for each file
 */

/**
 * @param {Report} report
 * @param {number} code with which Vitest ended
 */
export function countTests({ numTotalTests, numPassedTests, numFailedTests, testResults }, code) {
  // A file that does not load holds no test, and must not pass for that.
  const brokenFiles = testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && !assertionResults.some((assertion) => assertion.status === 'failed'),
  ).length;
  if (numTotalTests === 0 && brokenFiles === 0)
    throw new LauncherError('No test ran; look at the names after "npm test --".');
  const failed = numFailedTests + brokenFiles;
  return {
    passed: numPassedTests,
    // Vitest also fails for errors that belong to no test.
    failed: failed === 0 && code !== 0 ? 1 : failed,
    skipped: numTotalTests - numPassedTests - numFailedTests,
  };
}
