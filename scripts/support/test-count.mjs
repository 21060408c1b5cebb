/**
 * Counts from vitest's JSON report. A file that could not be loaded has no tests in it and counts as one that
 * failed; so does a run that went wrong beside the tests.
 * @param run.code  vitest's exit code
 * @param run.report  its report, or null if it wrote none
 */
export function countTests({ code, report }) {
  const files = report?.testResults ?? []
  const broken = files.filter((file) => file.status === 'failed' && !file.assertionResults.some((test) => test.status === 'failed'))
  const passed = report?.numPassedTests ?? 0
  const failed = (report?.numFailedTests ?? 0) + broken.length
  return { passed, failed: failed === 0 && code !== 0 ? 1 : failed }
}
