import type { DataSource, EntityManager } from 'typeorm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { createClock } from '#api/clock.ts'
import { EventEntity } from '#api/entities/event.entity.ts'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import { hashOfEvent } from '#api/features/site-head/event-chain.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import { silentPublisher } from '#api/realtime/publish.ts'
import { buildMembership } from '#tests/factories/membership.ts'
import { closeTestDataSource, testDataSource } from '#tests/setup/test-data-source.ts'

let dataSource: DataSource
let siteId: string

beforeAll(async () => {
  dataSource = await testDataSource()
})

afterAll(closeTestDataSource)

beforeEach(async () => {
  const member = await buildMembership(dataSource.manager, { role: 'qc-lead' })
  siteId = member.siteId
  const deps = { dataSource, clock: createClock(), publisher: silentPublisher }
  for (const name of ['North', 'Süd ½ "quoted"', 'East']) {
    await writeToSite(deps, { siteId, userId: member.userId, verb: 'site.setup' }, async (write) => {
      write.record('zone.added', { type: 'zone', id: name.slice(0, 1) }, { name, elevation: 1e21, share: 0.1 })
      write.record('zone.drawn', { type: 'zone', id: name.slice(0, 1) }, { points: 4 })
    })
  }
})

/** Somebody who got round the triggers: the events as they are, but one of them altered, under a site of its own. */
async function tamper(alter: (events: EventEntity[]) => EventEntity[]): Promise<Awaited<ReturnType<typeof verifyChain>>> {
  const events = await dataSource.manager.find(EventEntity, { where: { siteId }, order: { seq: 'ASC' } })
  const altered = alter(events)
  const pretend = {
    findOneByOrFail: dataSource.manager.findOneByOrFail.bind(dataSource.manager),
    find: (_entity: unknown, { where }: { where: { seq: { value: number } } }) =>
      Promise.resolve(altered.filter(({ seq }) => seq > where.seq.value)),
  } as unknown as EntityManager
  return verifyChain(pretend, siteId)
}

describe('verifyChain', () => {
  it('finds an untouched chain sound', async () => {
    expect(await verifyChain(dataSource.manager, siteId)).toMatchObject({ ok: true, length: 6 })
    expect(await tamper((events) => events)).toMatchObject({ ok: true, length: 6 })
  })

  it.each([
    ['payload', { payload: '{"name":"West"}' }],
    ['actor', { actorId: '00000000-0000-4000-8000-000000000000' }],
    ['actor’s name', { actorName: 'Somebody else' }],
    ['instant', { recordedAt: new Date('2020-01-01T00:00:00Z') }],
    ['instant of the act', { happenedAt: new Date('2020-01-01T00:00:00Z') }],
    ['verb', { verb: 'zone.removed' }],
    ['subject', { subjectId: 'X' }],
    ['revision', { revision: 99 }],
  ])('finds an altered %s', async (_what, change) => {
    const verdict = await tamper((events) => events.map((event) => (event.seq === 3 ? { ...event, ...change } : event)))
    expect(verdict).toEqual({ ok: false, seq: 3, reason: 'changed' })
  })

  it('finds an event altered together with its hash, at the next one', async () => {
    const verdict = await tamper((events) =>
      events.map((event) => {
        if (event.seq !== 3) return event
        const altered = { ...event, verb: 'zone.removed' }
        return { ...altered, hash: hashOfEvent(altered) }
      }),
    )
    expect(verdict).toEqual({ ok: false, seq: 4, reason: 'not-linked' })
  })

  it('finds an event that was taken out, in the middle and at the end', async () => {
    expect(await tamper((events) => events.filter(({ seq }) => seq !== 2))).toEqual({ ok: false, seq: 2, reason: 'missing' })
    expect(await tamper((events) => events.slice(0, -1))).toEqual({ ok: false, seq: 6, reason: 'missing' })
  })

  it('finds a last event altered together with its hash, by the head of the site', async () => {
    const verdict = await tamper((events) =>
      events.map((event) => {
        if (event.seq !== 6) return event
        const altered = { ...event, verb: 'zone.removed' }
        return { ...altered, hash: hashOfEvent(altered) }
      }),
    )
    expect(verdict).toEqual({ ok: false, seq: 6, reason: 'head-differs' })
  })
})

describe('the table of events', () => {
  it('refuses to change or remove a row', async () => {
    await expect(dataSource.query("UPDATE `event` SET `verb` = 'x' WHERE `site_id` = ?", [siteId])).rejects.toMatchObject({
      driverError: { sqlState: '45000' },
    })
    await expect(dataSource.query('DELETE FROM `event` WHERE `site_id` = ?', [siteId])).rejects.toMatchObject({
      driverError: { sqlState: '45000' },
    })
    expect(await verifyChain(dataSource.manager, siteId)).toMatchObject({ ok: true, length: 6 })
  })
})
