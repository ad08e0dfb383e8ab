import { writeFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { countReport, Tally } from '#api/setup/tally.mjs'
import { temporaryFolder } from './temporary-folder.ts'

function report(...files: { status: string; tests: string[] }[]): string {
  const file = path.join(temporaryFolder(), 'report.json')
  const testResults = files.map(({ status, tests }, index) => ({
    name: `file-${index}.test.ts`,
    status,
    assertionResults: tests.map((state, number) => ({ status: state, fullName: `test ${number}` })),
  }))
  writeFileSync(file, JSON.stringify({ testResults }))
  return file
}

test('passed tests are counted', () => {
  expect(countReport(report({ status: 'passed', tests: ['passed', 'passed'] }), 0)).toEqual({ passed: 2, failed: 0, notPassed: [] })
})

test('skipped and unfinished tests count as failed', () => {
  const counted = countReport(report({ status: 'passed', tests: ['passed', 'skipped', 'todo', 'pending'] }), 0)
  expect([counted.passed, counted.failed]).toEqual([1, 3])
})

test('a file that could not be loaded counts as one failure', () => {
  expect(countReport(report({ status: 'failed', tests: [] }, { status: 'passed', tests: ['passed'] }), 1)).toEqual({
    passed: 1,
    failed: 1,
    notPassed: ['failed: file-0.test.ts'],
  })
})

test('a file whose failed test is counted is not counted again', () => {
  expect(countReport(report({ status: 'failed', tests: ['failed', 'passed'] }), 1)).toMatchObject({ passed: 1, failed: 1 })
})

test('a run that ends badly with every test passed counts as one failure', () => {
  expect(countReport(report({ status: 'passed', tests: ['passed'] }), 1)).toMatchObject({ passed: 1, failed: 1 })
})

test('a run without tests or without a report counts as one failure', () => {
  expect(countReport(report(), 0)).toMatchObject({ passed: 0, failed: 1 })
  expect(countReport('/nowhere/report.json', 0)).toMatchObject({ passed: 0, failed: 1 })
})

test('the last line adds up steps and reports', () => {
  const tally = new Tally()
  tally.addStep('lint', true)
  tally.addStep('types', false)
  tally.addReport('shared', { passed: 40, failed: 1, notPassed: ['failed: x'] })
  expect(tally.lastLine()).toBe('41 passed, 2 failed')
  expect(tally.failures).toEqual(['types', 'shared: failed: x'])
})
