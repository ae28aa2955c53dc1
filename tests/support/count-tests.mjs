/**
 * How many tests passed and failed. A file that could not be read or a test that was only meant to
 * be tried again counts as failed; a skipped test counts as neither.
 *
 * @typedef {{ readonly passed: number, readonly failed: number }} Count
 */

/**
 * @param {unknown} value
 * @param {string} name
 * @returns {number}
 */
function numberIn(value, name) {
  const found = /** @type {Record<string, unknown> | null | undefined} */ (value)?.[name]
  if (typeof found === 'number' && Number.isInteger(found) && found >= 0) return found
  throw new Error(`the report has no count called ${name}`)
}

/**
 * Counts in a report written by Vitest's `json` reporter. Throws if it is not one.
 *
 * @param {any} report
 * @returns {Count}
 */
export function countUnitTests(report) {
  /** @type {readonly any[]} */
  const files = report?.testResults ?? []
  // A test file that does not load holds no failed test, and would otherwise count for nothing.
  const broken = files.filter(
    (file) =>
      file.status === 'failed' &&
      !file.assertionResults.some((/** @type {any} */ test) => test.status === 'failed'),
  )
  return {
    passed: numberIn(report, 'numPassedTests'),
    failed: numberIn(report, 'numFailedTests') + broken.length,
  }
}

/**
 * Counts in a report written by Playwright's `json` reporter. Throws if it is not one.
 *
 * @param {any} report
 * @returns {Count}
 */
export function countBrowserTests(report) {
  return {
    passed: numberIn(report?.stats, 'expected'),
    failed: numberIn(report?.stats, 'unexpected') + numberIn(report?.stats, 'flaky'),
  }
}

/**
 * What one step adds to the whole. `ended` is whether its program ended well; `count` is what its
 * report says, `null` if the step should have written one and did not, absent for a step without
 * tests. Only tests pass; a step that went wrong without a failed test to show for it adds one
 * failure, and so does a step of tests in which none ran.
 *
 * @param {boolean} ended
 * @param {Count | null} [count]
 * @returns {Count}
 */
export function weighStep(ended, count) {
  if (count === undefined) return { passed: 0, failed: ended ? 0 : 1 }
  if (count === null) return { passed: 0, failed: 1 }
  const wrong = !ended || count.passed + count.failed === 0
  return wrong && count.failed === 0 ? { passed: count.passed, failed: 1 } : count
}
