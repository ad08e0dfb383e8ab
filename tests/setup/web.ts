import { cleanup, configure } from '@testing-library/react'
import { afterAll, afterEach, beforeAll, beforeEach, expect, vi } from 'vitest'
import { apiStandIn } from './api-stand-in.ts'
import './browser-gaps.ts'

// what is waited for comes, however busy the machine is
configure({ asyncUtilTimeout: 15_000 })

beforeAll(() => apiStandIn.listen({ onUnhandledRequest: 'error' }))
afterAll(() => apiStandIn.close())

beforeEach(() => {
  vi.spyOn(console, 'error')
  vi.spyOn(console, 'warn')
})

afterEach(() => {
  cleanup()
  apiStandIn.resetHandlers()
  const printed = [...vi.mocked(console.error).mock.calls, ...vi.mocked(console.warn).mock.calls]
  vi.restoreAllMocks()
  // A test that expects a message mocks the console itself and clears the mock after checking it.
  expect(printed.map((words) => words.map(String).join(' '))).toEqual([])
})
