import { randomUUID } from 'node:crypto'
import { setTimeout as sleep } from 'node:timers/promises'
import { QueryFailedError } from 'typeorm'
import type { DataSource } from 'typeorm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { WriteDeps } from '#api/deps.ts'
import { EventEntity } from '#api/entities/event.entity.ts'
import { PatchEntity } from '#api/entities/patch.entity.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { Publication } from '#api/realtime/publish.ts'
import { decodePatch } from '#shared/ground-codec.ts'
import { buildPatch } from '#tests/factories/ground-patch.ts'
import { buildMembership } from '#tests/factories/membership.ts'
import { buildUser } from '#tests/factories/user.ts'
import { closeTestDataSource, testDataSource } from '#tests/setup/test-data-source.ts'

const NOW = new Date('2026-11-30T22:00:00.123Z')

let dataSource: DataSource
let deps: WriteDeps
let published: Publication[]
let siteId: string
let userId: string

beforeAll(async () => {
  dataSource = await testDataSource()
})

afterAll(closeTestDataSource)

beforeEach(async () => {
  published = []
  deps = {
    dataSource,
    clock: () => NOW,
    publisher: { publish: (publications) => void published.push(...publications), endSession: () => undefined },
  }
  ;({ siteId, userId } = await buildMembership(dataSource.manager, { role: 'qc-lead' }))
})

function head(): Promise<SiteHeadEntity> {
  return dataSource.manager.findOneByOrFail(SiteHeadEntity, { siteId })
}

function lead() {
  return { siteId, userId, verb: 'site.setup' } as const
}

/** An error as the driver gives it when the database broke a tie against the transaction. */
function deadlock(): QueryFailedError {
  return new QueryFailedError('SELECT 1', [], Object.assign(new Error('deadlock'), { errno: 1213, code: 'ER_LOCK_DEADLOCK' }))
}

describe('writeToSite', () => {
  it('raises the revision by one, numbers things in order and hands in the person, the role and the instant', async () => {
    const answer = await writeToSite(deps, lead(), async (write) => ({
      revision: write.revision,
      tests: [write.take('test'), write.take('test')],
      lot: write.take('lot'),
      role: write.role,
      user: write.user.id,
      now: write.now.toISOString(),
    }))
    expect(answer).toEqual({ revision: 1, tests: [1, 2], lot: 1, role: 'qc-lead', user: userId, now: NOW.toISOString() })
    expect(await head()).toMatchObject({ revision: 1, nextTest: 3, nextLot: 2, nextOrder: 1 })
  })

  it('answers 404 to a stranger and for a site that is not there', async () => {
    const stranger = await buildUser(dataSource.manager)
    const work = () => Promise.reject(new Error('the work must not be reached'))
    await expect(writeToSite(deps, { ...lead(), userId: stranger.id }, work)).rejects.toMatchObject({ status: 404, code: 'not_found' })
    await expect(writeToSite(deps, { ...lead(), siteId: randomUUID() }, work)).rejects.toMatchObject({ status: 404 })
  })

  it('answers 403 to a role without the right, by verb and by rule', async () => {
    const { userId: operator } = await buildMembership(dataSource.manager, { siteId, role: 'operator' })
    const work = () => Promise.reject(new Error('the work must not be reached'))
    await expect(writeToSite(deps, { ...lead(), userId: operator }, work)).rejects.toMatchObject({ status: 403, code: 'forbidden' })
    const byRule = { siteId, userId, authorize: () => false }
    await expect(writeToSite(deps, byRule, work)).rejects.toMatchObject({ status: 403 })
  })

  it('chains its events and stores their payload as canonical JSON', async () => {
    const happenedAt = new Date('2026-11-29T10:00:00.001Z')
    await writeToSite(deps, lead(), async (write) => {
      write.record('zone.added', { type: 'zone', id: 'z1' }, { name: 'North', area: 1.5, again: undefined })
      write.record('zone.added', { type: 'zone', id: 'z2' }, { b: 1, a: [NOW] }, happenedAt)
    })
    const [first, second] = await dataSource.manager.find(EventEntity, { where: { siteId }, order: { seq: 'ASC' } })
    expect(first).toMatchObject({ seq: 1, revision: 1, actorId: userId, previous: '0'.repeat(64), payload: '{"area":1.5,"name":"North"}' })
    expect(first?.happenedAt).toEqual(NOW)
    expect(second).toMatchObject({ seq: 2, previous: first?.hash, payload: `{"a":["${NOW.toISOString()}"],"b":1}` })
    expect([second?.happenedAt, second?.recordedAt]).toEqual([happenedAt, NOW])
    expect(await head()).toMatchObject({ chainLength: 2, chainHead: second?.hash })
  })

  it('stores the patch under the new revision and tells it, then what changed, after the commit', async () => {
    let publishedInside = -1
    await writeToSite(deps, lead(), async (write) => {
      write.changed('lot', 'lot-1')
      write.patch(buildPatch({ lots: ['lot-1'] }))
      publishedInside = published.length
    })
    expect(publishedInside).toBe(0)
    expect(published.map(({ type }) => type)).toEqual(['patch', 'site:changed'])
    const stored = await dataSource.manager.findOneByOrFail(PatchEntity, { siteId })
    expect(decodePatch(stored.body)).toMatchObject({ revision: 1, base: 0, lots: ['lot-1'] })
    expect(published[1]).toEqual({ type: 'site:changed', siteId, resource: 'lot', id: 'lot-1', updatedAt: NOW.toISOString(), revision: 1 })
  })

  it('refuses a second patch in one write', async () => {
    const twice = writeToSite(deps, lead(), async (write) => {
      write.patch(buildPatch())
      write.patch(buildPatch())
    })
    await expect(twice).rejects.toThrow(/once/)
  })

  it('leaves nothing and tells nothing when the work fails', async () => {
    const failing = writeToSite(deps, lead(), async (write) => {
      write.take('test')
      write.record('zone.added', { type: 'zone', id: 'z1' }, {})
      write.changed('zone', 'z1')
      await write.manager.update(SiteEntity, { id: siteId }, { name: 'Half done' })
      throw new Error('half way')
    })
    await expect(failing).rejects.toThrow('half way')
    expect(published).toEqual([])
    expect(await head()).toMatchObject({ revision: 0, nextTest: 1, chainLength: 0 })
    expect(await dataSource.manager.countBy(EventEntity, { siteId })).toBe(0)
    expect((await dataSource.manager.findOneByOrFail(SiteEntity, { id: siteId })).name).toBe('Alder bench')
  })

  it('lets writers of one site follow one another', async () => {
    let inside = 0
    let most = 0
    const one = () =>
      writeToSite(deps, lead(), async (write) => {
        most = Math.max(most, ++inside)
        await sleep(15)
        inside--
        return write.take('test')
      })
    const numbers = await Promise.all([one(), one(), one(), one(), one()])
    expect([...numbers].sort()).toEqual([1, 2, 3, 4, 5])
    expect(most).toBe(1)
    expect((await head()).revision).toBe(5)
  })

  it('runs again after a deadlock, with nothing of the failed attempt left', async () => {
    let attempts = 0
    const number = await writeToSite(deps, lead(), async (write) => {
      write.changed('zone', `attempt ${++attempts}`)
      write.record('zone.added', { type: 'zone', id: 'z' }, { attempts })
      const taken = write.take('test')
      if (attempts < 3) throw deadlock()
      return taken
    })
    expect([attempts, number]).toEqual([3, 1])
    expect(published.map((publication) => 'id' in publication && publication.id)).toEqual(['attempt 3'])
    expect(await head()).toMatchObject({ revision: 1, chainLength: 1, nextTest: 2 })
  })

  it('runs again after a real deadlock between two transactions', async () => {
    const other = await buildMembership(dataSource.manager, { role: 'qc-lead' })
    const both = [
      { write: lead(), rows: [siteId, other.siteId] },
      { write: { siteId: other.siteId, userId: other.userId, verb: 'site.setup' } as const, rows: [other.siteId, siteId] },
    ]
    await Promise.all(
      both.map(({ write, rows }) =>
        writeToSite(deps, write, async ({ manager }) => {
          for (const id of rows) {
            await manager.update(SiteEntity, { id }, { subtitle: write.siteId })
            await sleep(60)
          }
        }),
      ),
    )
    expect((await head()).revision).toBe(1)
    expect((await dataSource.manager.findOneByOrFail(SiteHeadEntity, { siteId: other.siteId })).revision).toBe(1)
  })

  it('gives up after three repetitions', async () => {
    let attempts = 0
    const hopeless = writeToSite(deps, lead(), () => {
      attempts++
      return Promise.reject(deadlock())
    })
    await expect(hopeless).rejects.toBeInstanceOf(QueryFailedError)
    expect(attempts).toBe(4)
    expect(published).toEqual([])
  })
})

describe('a request with an id', () => {
  it('sent again gets the stored answer, and its work is not done twice', async () => {
    const id = randomUUID()
    const send = (body: object) =>
      writeToSite(deps, { ...lead(), request: { id, body } }, async (write) => {
        write.changed('test', id)
        return { number: write.take('test'), at: write.now }
      })
    const first = await send({ wet: 1, dry: { a: 1, b: 2 } })
    const again = await send({ dry: { b: 2, a: 1 }, wet: 1 })
    expect(again).toEqual(first)
    expect(first).toEqual({ number: 1, at: NOW.toISOString() })
    expect(published).toHaveLength(1)
    expect(await head()).toMatchObject({ revision: 1, nextTest: 2 })
  })

  it('sent twice at the same time is done once', async () => {
    const request = { id: randomUUID(), body: { wet: 1 } }
    const send = () => writeToSite(deps, { ...lead(), request }, async (write) => write.take('test'))
    expect(await Promise.all([send(), send(), send()])).toEqual([1, 1, 1])
  })

  it('with another body is refused, 409, and changes nothing', async () => {
    const id = randomUUID()
    const send = (body: object) => writeToSite(deps, { ...lead(), request: { id, body } }, async (write) => write.take('test'))
    await send({ wet: 1 })
    await expect(send({ wet: 2 })).rejects.toMatchObject({ status: 409, code: 'id_reused' })
    expect((await head()).nextTest).toBe(2)
  })

  it('on another site is another record', async () => {
    const other = await buildMembership(dataSource.manager, { role: 'qc-lead', userId })
    const id = randomUUID()
    const send = (at: string, wet: number) =>
      writeToSite(deps, { ...lead(), siteId: at, request: { id, body: { wet } } }, async () => wet)
    expect([await send(siteId, 1), await send(other.siteId, 2)]).toEqual([1, 2])
  })

  it('is checked after the membership: a stranger gets 404, not the answer', async () => {
    const request = { id: randomUUID(), body: {} }
    await writeToSite(deps, { ...lead(), request }, async () => 'secret')
    const stranger = await buildUser(dataSource.manager)
    await expect(writeToSite(deps, { ...lead(), userId: stranger.id, request }, async () => '')).rejects.toMatchObject({ status: 404 })
  })
})

describe('readSite', () => {
  it('sees one state throughout, whatever is written meanwhile', async () => {
    const [before, after] = await readSite(deps, { siteId, userId, verb: 'site.see' }, async ({ manager, revision }) => {
      await writeToSite(deps, lead(), (write) => write.manager.update(SiteEntity, { id: siteId }, { name: 'Renamed' }))
      return [revision, (await manager.findOneByOrFail(SiteEntity, { id: siteId })).name]
    })
    expect([before, after]).toEqual([0, 'Alder bench'])
    expect((await dataSource.manager.findOneByOrFail(SiteEntity, { id: siteId })).name).toBe('Renamed')
  })

  it('answers 404 to a stranger and 403 to a role without the right', async () => {
    const stranger = await buildUser(dataSource.manager)
    const { userId: operator } = await buildMembership(dataSource.manager, { siteId, role: 'operator' })
    const read = (reader: string) => readSite(deps, { siteId, userId: reader, verb: 'registers.see' }, async () => 'seen')
    await expect(read(stranger.id)).rejects.toMatchObject({ status: 404 })
    await expect(read(operator)).rejects.toMatchObject({ status: 403 })
  })
})
