import { QueryClient, type QueryKey } from '@tanstack/react-query'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { CHANGED_RESOURCES, type ChangedResource } from '#shared/realtime.ts'
import { hearEvent } from '#web/app/use-realtime.ts'

const START: QueryKey = ['site', 's']
let client: QueryClient
let read: string[]

beforeEach(() => {
  client = new QueryClient()
  read = []
  vi.spyOn(client, 'invalidateQueries').mockImplementation((filters) => {
    const key = filters?.queryKey ?? []
    read.push(key.slice(key[0] === START[0] ? 2 : 0).join('/'))
    return Promise.resolve()
  })
})

const hear = (resource: ChangedResource, revision = 4): void =>
  hearEvent(client, { type: 'site:changed', siteId: 's', resource, id: 'x', updatedAt: '2026-12-01T22:00:00Z', revision }, vi.fn())

describe('notices of the server', () => {
  it.each([
    ['test', ['tests', 'curves', 'stakes', 'events', 'board', 'columns', 'releases/check']],
    ['order', ['orders', 'events', 'board', 'columns', 'releases/check']],
    ['lot', ['lots']],
    ['stake', ['stakes', 'lots', 'events']],
    ['member', ['members', 'events']],
    ['site', ['site-list', 'detail', 'board']],
  ] as const)('of a %s read again what shows it', (resource, keys) => {
    hear(resource)
    expect(read).toEqual(keys)
  })

  it.each(CHANGED_RESOURCES)('of a %s is heard once for one revision', (resource) => {
    hear(resource)
    const first = read.filter((key) => key !== 'site-list').length
    expect(first).toBeGreaterThan(0)
    hear(resource)
    expect(read.filter((key) => key !== 'site-list')).toHaveLength(first)
  })

  it('of a patch read the board and the open columns again, of a head nothing', () => {
    hearEvent(client, { type: 'ground:patch', siteId: 's', revision: 4, patches: [] }, vi.fn())
    expect(read).toEqual(['board', 'columns', 'releases/check'])
    hearEvent(client, { type: 'ground:head', siteId: 's', revision: 9 }, vi.fn())
    expect(read).toHaveLength(3)
  })

  it('of the own membership go to who handles it', () => {
    const handle = vi.fn()
    hearEvent(client, { type: 'membership:changed', siteId: 's', role: null }, handle)
    expect(handle).toHaveBeenCalledWith({ type: 'membership:changed', siteId: 's', role: null })
    expect(read).toEqual([])
  })
})
