import type { EntityManager } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { loadSitePlan, type SitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { loadReferences, type ExchangeReferences } from '#api/features/test-exchange/exchange-references.ts'
import { loadKnownTests, type KnownTests } from '#api/features/test-exchange/known-tests.ts'
import { inHappenedOrder } from '#shared/exchange/happened-order.ts'
import { resolveRow } from '#api/features/test-exchange/resolve-row.ts'
import { problemsOf } from '#api/features/test-exchange/row-problems.ts'
import { assessTest, type Assessed } from '#api/features/tests/record-test.service.ts'
import { currentTest, loadChainTests, type Chain } from '#api/features/tests/test-chain.ts'
import { authorizeRecording } from '#api/features/tests/test-rights.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { ImportPreview, ImportRow, PreviewedRow } from '#shared/schemas/test-exchange.ts'

interface Looking {
  readonly read: SiteRead
  readonly plan: SitePlan
  readonly references: ExchangeReferences
  readonly known: KnownTests
  /** tests of this file that would stand before the row, as they would be recorded, and null for one that cannot be */
  readonly before: Map<string, FieldTestEntity | null>
}

/**
 * What would become of each row of a file if it were recorded now, one after another in the order they happened: by the same
 * judgement as recording, with nothing locked or stored.
 */
export async function previewImport(read: SiteRead, { rows, context }: ImportPreview): Promise<PreviewedRow[]> {
  const { manager, siteId } = read
  const plan = await loadSitePlan(manager, siteId)
  const references = await loadReferences(manager, siteId)
  const all = [...context, ...rows]
  const looking: Looking = { read, plan, references, known: await loadKnownTests(manager, plan, all, references), before: new Map() }
  const found = new Map<ImportRow, PreviewedRow>()
  for (const row of inHappenedOrder(all)) found.set(row, await previewRow(looking, row))
  return rows.flatMap((row) => found.get(row) ?? [])
}

async function previewRow(looking: Looking, row: ImportRow): Promise<PreviewedRow> {
  const { read, plan, known, before } = looking
  const { line, test } = row
  const blank = { line, id: test.id, problems: [], number: null, twin: false, cell: null, verdict: null, flags: [] } satisfies Omit<PreviewedRow, 'state'>
  const recorded = known.recorded(row)
  if (recorded) {
    const problems = recorded.differs.map((column) => ({ column, message: `${recorded.number} stands on record otherwise.` }))
    return { ...blank, number: recorded.number, problems, state: problems.length === 0 ? 'recorded' : 'differs' }
  }
  before.set(test.id, null)
  const resolved = resolveRow(test, { plan, references: looking.references, idOfNumber: known.idOfNumber })
  if (!resolved.ok) return { ...blank, state: 'attention', problems: [...resolved.problems] }
  try {
    authorizeRecording(read.role, test.purpose)
    const chain = await chainBefore(looking, resolved.input)
    if (chain === 'open') return { ...blank, state: 'attention', problems: [{ column: 'follows', message: 'The test it follows needs a look first.' }] }
    const assessed = await assessTest(read, plan, resolved.input, chain)
    before.set(test.id, asRecorded(looking, row, resolved.input, assessed))
    return { ...blank, ...told(assessed), ...twinOf(known, row) }
  } catch (error) {
    return { ...blank, state: 'attention', problems: problemsOf(error, test) }
  }
}

function told({ verdict, reduced, cell, flags }: Assessed): Pick<PreviewedRow, 'cell' | 'verdict' | 'flags'> {
  const { outcome, treatedAsFail, near, headline, rc } = verdict
  return { cell, verdict: { outcome, treatedAsFail, near, headline, rc, dryDensity: reduced.dryDensity, moisture: reduced.moisture }, flags: flags.map(({ message }) => message) }
}

function twinOf(known: KnownTests, row: ImportRow): Pick<PreviewedRow, 'state' | 'problems' | 'number' | 'twin'> {
  const number = known.twin(row)
  if (number === undefined) return { state: 'ready', problems: [], number: null, twin: false }
  const message = `${number} was recorded at this place, lift and time already. Set this row aside, or say that it is another test.`
  return { state: 'attention', problems: [{ column: 'sampledAt', message }], number, twin: true }
}

/** The chain a row would stand in: that of this site with the rows of the file before it; undefined where the file adds nothing to it. */
async function chainBefore({ read: { manager, siteId }, before }: Looking, { follows }: CreateTest): Promise<Chain | null | undefined | 'open'> {
  if (follows === null) return null
  const inFile = before.get(follows.testId)
  if (inFile === null) return 'open'
  const followed = inFile ?? (await manager.findOneBy(FieldTestEntity, { siteId, id: follows.testId }))
  const added = [...before.values()].filter((test) => test !== null).filter((test) => test.chainId === followed?.chainId)
  if (!followed || added.length === 0) return undefined
  const tests = await chainTests(manager, siteId, followed.chainId, added)
  return { id: followed.chainId, tests, followed, current: currentTest(tests) }
}

async function chainTests(manager: EntityManager, siteId: string, chainId: string, added: readonly FieldTestEntity[]): Promise<FieldTestEntity[]> {
  const tests = [...(await loadChainTests(manager, siteId, chainId)), ...added]
  return tests.sort((a, b) => a.sampledAt.getTime() - b.sampledAt.getTime() || a.seq - b.seq)
}

/** The row as it would stand on record, for those that follow it. */
function asRecorded({ before }: Looking, { line, reference }: ImportRow, input: CreateTest, assessed: Assessed): FieldTestEntity {
  const { verdict, chain, at } = assessed
  return Object.assign(new FieldTestEntity(), {
    ...assessed,
    id: input.id,
    number: reference === '' ? `The test of line ${line}` : reference,
    seq: Number.MAX_SAFE_INTEGER - 1e6 + before.size,
    chainId: chain?.id ?? input.id,
    purpose: input.purpose,
    lift: input.lift,
    u: at.u,
    v: at.v,
    sheet: input.sheet,
    outcome: verdict.outcome,
    treatedAsFail: verdict.treatedAsFail,
    voidedAt: null,
  })
}
