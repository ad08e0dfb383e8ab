import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { loadReferences } from '#api/features/test-exchange/exchange-references.ts'
import { gatherWrite } from '#api/features/test-exchange/gather-write.ts'
import { loadKnownTests } from '#api/features/test-exchange/known-tests.ts'
import { inHappenedOrder } from '#shared/exchange/happened-order.ts'
import { resolveRow } from '#api/features/test-exchange/resolve-row.ts'
import { problemsOf } from '#api/features/test-exchange/row-problems.ts'
import { recordTest } from '#api/features/tests/record-test.service.ts'
import { authorizeRecording } from '#api/features/tests/test-rights.ts'
import { AppError } from '#api/errors.ts'
import { refusal } from '#api/http/refuse-input.ts'
import type { CreateTest, RecordTestAnswer } from '#shared/schemas/field-test.ts'
import type { ImportRow, ImportTests, ImportTestsAnswer, RowProblem } from '#shared/schemas/test-exchange.ts'

/**
 * Records a batch of a file, whole or not at all: its rows one after another in the order they happened, each exactly as if it
 * had been recorded by itself. Rows that stand on the site already, the same, are left as they are; anything else that is
 * not ready refuses the batch and names its line.
 */
export async function importTests(write: SiteWrite, { id, file, rows, setAside }: ImportTests): Promise<ImportTestsAnswer> {
  const { manager, siteId, role } = write
  for (const { test } of rows) authorizeRecording(role, test.purpose)
  const plan = await loadSitePlan(manager, siteId)
  const references = await loadReferences(manager, siteId)
  const known = await loadKnownTests(manager, plan, rows, references)
  const { gathering, finish } = gatherWrite(write)
  const recorded: ImportTestsAnswer['recorded'] = []
  const already: number[] = []
  for (const row of inHappenedOrder(rows)) {
    const before = known.recorded(row)
    if (before?.differs.length === 0) {
      already.push(row.line)
      continue
    }
    if (before) throw refuseRow(row, before.differs.map((column) => ({ column, message: `${before.number} stands on record otherwise. Set the row aside.` })))
    const twin = known.twin(row)
    if (twin !== undefined) throw refuseRow(row, [{ column: 'sampledAt', message: `${twin} was recorded at this place, lift and time already.` }])
    const resolved = resolveRow(row.test, { plan, references, idOfNumber: known.idOfNumber })
    if (!resolved.ok) throw refuseRow(row, resolved.problems)
    const answer = await recordRow(gathering, row, resolved.input)
    recorded.push({ line: row.line, reference: row.reference, ...answer })
  }
  finish()
  const tests = recorded.map(({ line, reference, id: testId, number }) => ({ line, reference, id: testId, number }))
  write.record('tests.imported', { type: 'import', id }, { file, recorded: recorded.length, already: already.length, setAside, tests })
  return { id, revision: write.revision, recorded, already }
}

async function recordRow(write: SiteWrite, row: ImportRow, input: CreateTest): Promise<RecordTestAnswer> {
  try {
    return await recordTest(write, input)
  } catch (error) {
    // what went wrong with the server is nothing of the row's
    if (error instanceof AppError && error.expected) throw refuseRow(row, problemsOf(error, row.test))
    throw error
  }
}

function refuseRow({ line }: ImportRow, problems: readonly RowProblem[]): AppError {
  const [first, ...others] = problems.map(({ column, message }) => ({ path: `line.${line}.${column}`, message: `Line ${line}: ${message}` }))
  if (!first) throw new Error(`Line ${line} was refused without a reason`)
  return refusal([first, ...others])
}
