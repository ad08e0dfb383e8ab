import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { ReworkStepEntity } from '#api/entities/rework-step.entity.ts'
import type { Role } from '#shared/policies/role.ts'
import { recordTestAnswerSchema, testDetailSchema, testPreviewSchema, voidTestAnswerSchema } from '#shared/schemas/field-test.ts'
import type { CreateTest, RecordTestAnswer } from '#shared/schemas/field-test.ts'
import { lotListSchema } from '#shared/schemas/lot.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { TOO_LOOSE, middleOf, testInput } from '#tests/factories/test-input.ts'
import type { TestApp } from '#tests/setup/api.ts'

export const minutesAgo = (minutes: number): string => new Date(Date.now() - minutes * 60_000).toISOString()

/** Cells that stand in a state, lowest first. */
export function cellsIn(states: Record<number, string>, state: string): number[] {
  return Object.keys(states).map(Number).filter((cell) => states[cell] === state)
}

/** What people do with tests on an open site, through the routes; anything but success is an error. */
export function fieldWork(app: TestApp, open: OpenSite) {
  const { manager } = app.dataSource
  const lead = open.people['qc-lead']

  async function post(role: Role, path: string, body: object, expected: number): Promise<unknown> {
    const answer = await open.people[role].post(open.path(path), body)
    if (answer.status !== expected) throw new Error(`${path} answered ${answer.status}: ${JSON.stringify(answer.body)}`)
    return answer.body
  }

  const record = async (overrides: Partial<CreateTest> = {}, role: Role = 'technician'): Promise<RecordTestAnswer> =>
    recordTestAnswerSchema.parse(await post(role, '/tests', testInput(open, overrides), 201))

  const lots = async () => lotListSchema.parse((await lead.get(open.path('/lots'))).body).lots

  return {
    record,
    lots,
    preview: async (overrides: Partial<CreateTest> = {}) => testPreviewSchema.parse(await post('technician', '/tests/preview', testInput(open, overrides), 200)),
    detailOf: async (id: string) => testDetailSchema.parse((await lead.get(open.path(`/tests/${id}`))).body),
    voidTest: async (id: string, role: Role = 'qc-lead') => voidTestAnswerSchema.parse(await post(role, `/tests/${id}/void`, { reason: 'Wrong sheet copied' }, 200)),
    lotIds: async () => (await lots()).map((lot) => lot.id),
    orderOf: (id: string | null) => manager.findOneByOrFail(ReworkOrderEntity, { siteId: open.siteId, id: id ?? '' }),
    stepsOf: async (orderId: string | null) =>
      (await manager.find(ReworkStepEntity, { where: { siteId: open.siteId, orderId: orderId ?? '' }, order: { position: 'ASC' } })).map((step) => step.kind),
    /** A pass in F1, then a failure in A1: A1, B1 and C1 are nearer to the failure. */
    async passThenFail(sheet: CreateTest['sheet'] = TOO_LOOSE): Promise<RecordTestAnswer> {
      await record({ at: middleOf(5), sampledAt: minutesAgo(50) })
      return record({ at: middleOf(0), sampledAt: minutesAgo(40), sheet })
    },
  }
}
