// What the reports of the two test runners say, as numbers. A test that did not run has not passed.

/** A file that cannot be loaded has no tests to fail, yet fails. */
export function countVitest(report) {
  const broken = report.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.every((test) => test.status !== 'failed'),
  )
  const notRun = report.numTotalTests - report.numPassedTests - report.numFailedTests
  return { passed: report.numPassedTests, failed: report.numFailedTests + broken.length + notRun }
}

/** Flaky ones count as failed: they failed once. */
export function countPlaywright(report) {
  const { expected, unexpected, flaky, skipped } = report.stats
  return { passed: expected, failed: unexpected + flaky + skipped + report.errors.length }
}
