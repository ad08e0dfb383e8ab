import { QueryClient, QueryObserver } from '@tanstack/react-query'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { refresh, REFRESH_EVERY_MS } from '#web/data/refresh.ts'

const KEY = ['site', 's', 'board']
let client: QueryClient
let reads: number
let revision: number

beforeEach(async () => {
  vi.useFakeTimers({ now: 1_000_000 })
  client = new QueryClient()
  reads = 0
  revision = 5
  const stop = new QueryObserver(client, {
    queryKey: KEY,
    queryFn: () => {
      reads += 1
      return { revision }
    },
  }).subscribe(() => undefined)
  await vi.advanceTimersByTimeAsync(0)
  return () => {
    stop()
    client.clear()
    vi.useRealTimers()
  }
})

async function changed(at: number | null): Promise<void> {
  if (at !== null) revision = at
  refresh(client, KEY, { revision: at })
  await vi.advanceTimersByTimeAsync(0)
}

describe('reading a resource again', () => {
  it('reads at once, then at most every 400 ms, and always the last change', async () => {
    await changed(6)
    expect(reads).toBe(2)
    for (const at of [7, 8, 9]) await changed(at)
    expect(reads).toBe(2)
    await vi.advanceTimersByTimeAsync(REFRESH_EVERY_MS)
    expect(reads).toBe(3)
    expect(client.getQueryData(KEY)).toEqual({ revision: 9 })
    await vi.advanceTimersByTimeAsync(REFRESH_EVERY_MS * 5)
    expect(reads).toBe(3)
  })

  it('reads once for a change that it hears of twice', async () => {
    await changed(6)
    await vi.advanceTimersByTimeAsync(REFRESH_EVERY_MS)
    await changed(6)
    expect(reads).toBe(2)
  })

  it('does not read when the copy at hand is not older', async () => {
    await changed(5)
    expect(reads).toBe(1)
  })

  it('reads when the answer did not say its revision', async () => {
    await changed(null)
    expect(reads).toBe(2)
  })

  it('reads once more when the answer on its way was older than the change', async () => {
    revision = 5
    refresh(client, KEY, { revision: 6 })
    await vi.advanceTimersByTimeAsync(0)
    revision = 6
    await vi.advanceTimersByTimeAsync(REFRESH_EVERY_MS)
    expect(client.getQueryData(KEY)).toEqual({ revision: 6 })
  })
})
