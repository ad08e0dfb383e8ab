import { readFileSync } from 'node:fs'

/** @typedef {{ passed: number, failed: number }} Count */

/**
 * Counts a vitest JSON report. Everything that did not pass failed: skipped and unfinished tests, and files that could not be loaded.
 * @param {string} file
 * @param {number} exitCode of the run: a run that ended badly counts at least one failure
 * @returns {Count & { notPassed: string[] }} notPassed: what failed, for the summary
 */
export function countReport(file, exitCode) {
  const report = readReport(file)
  if (report === null) return { passed: 0, failed: 1, notPassed: ['the run ended without a report'] }
  let passed = 0
  /** @type {string[]} */
  const notPassed = []
  for (const testFile of report.testResults) {
    for (const test of testFile.assertionResults) {
      if (test.status === 'passed') passed += 1
      else notPassed.push(`${test.status}: ${testFile.name}: ${test.fullName}`)
    }
    const explained = testFile.assertionResults.some((test) => test.status !== 'passed')
    if (testFile.status !== 'passed' && !explained) notPassed.push(`failed: ${testFile.name}`)
  }
  if (passed + notPassed.length === 0) notPassed.push('there are no tests')
  else if (exitCode !== 0 && notPassed.length === 0) notPassed.push(`the run ended with code ${exitCode} although every test passed`)
  return { passed, failed: notPassed.length, notPassed }
}

/**
 * @typedef {{ status: string, name: string, assertionResults: { status: string, fullName: string }[] }} TestFile
 * @param {string} file @returns {{ testResults: TestFile[] } | null}
 */
function readReport(file) {
  try {
    const report = JSON.parse(readFileSync(file, 'utf8'))
    return Array.isArray(report.testResults) ? report : null
  } catch {
    return null
  }
}

/** Adds up the steps of a run. */
export class Tally {
  passed = 0
  /** @type {string[]} */
  failures = []

  /** @param {string} step @param {boolean} ok */
  addStep(step, ok) {
    if (ok) this.passed += 1
    else this.failures.push(step)
  }

  /** @param {string} step @param {ReturnType<typeof countReport>} count */
  addReport(step, count) {
    this.passed += count.passed
    this.failures.push(...count.notPassed.map((line) => `${step}: ${line}`))
  }

  /** @returns {string} the last line of the run */
  lastLine() {
    return `${this.passed} passed, ${this.failures.length} failed`
  }
}
