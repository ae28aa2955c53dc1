import { describe, expect, it } from 'vitest'
import { countBrowserTests, countUnitTests, weighStep } from './count-tests.mjs'

const report = { numPassedTests: 7, numFailedTests: 0, testResults: [] }

describe('the count of unit tests', () => {
  it('is what the report says', () => {
    expect(countUnitTests({ ...report, numFailedTests: 2 })).toEqual({ passed: 7, failed: 2 })
  })

  it('has one failure for a file that does not load', () => {
    const testResults = [
      { status: 'failed', assertionResults: [] },
      { status: 'passed', assertionResults: [{ status: 'passed' }] },
    ]
    expect(countUnitTests({ ...report, testResults })).toEqual({ passed: 7, failed: 1 })
  })

  it('does not count a failed test twice', () => {
    const testResults = [{ status: 'failed', assertionResults: [{ status: 'failed' }] }]
    const counted = countUnitTests({ ...report, numFailedTests: 1, testResults })
    expect(counted).toEqual({ passed: 7, failed: 1 })
  })

  it.each([null, {}, { numPassedTests: '7' }])('is refused where the report is %j', (broken) => {
    expect(() => countUnitTests(broken)).toThrow('no count called numPassedTests')
  })
})

describe('the count of browser tests', () => {
  it('takes a test that passed only when tried again for failed', () => {
    const stats = { expected: 5, unexpected: 1, flaky: 2, skipped: 4 }
    expect(countBrowserTests({ stats })).toEqual({ passed: 5, failed: 3 })
  })

  it.each([null, {}, { stats: { expected: 5 } }])('is refused where the report is %j', (broken) => {
    expect(() => countBrowserTests(broken)).toThrow('no count called')
  })
})

describe('the weight of a step', () => {
  it.each([
    ['a check that passed adds nothing', true, undefined, 0, 0],
    ['a check that failed adds one failure', false, undefined, 0, 1],
    ['tests add what they counted', true, { passed: 3, failed: 0 }, 3, 0],
    ['failed tests are counted once', false, { passed: 3, failed: 2 }, 3, 2],
    ['a runner that failed with all tests passed adds one', false, { passed: 3, failed: 0 }, 3, 1],
    ['a missing report adds one failure', true, null, 0, 1],
    ['no test at all is a failure', true, { passed: 0, failed: 0 }, 0, 1],
  ] as const)('%s', (_, ended, count, passed, failed) => {
    expect(weighStep(ended, count)).toEqual({ passed, failed })
  })
})
