import { createHash, randomUUID } from 'node:crypto'
import ExcelJS from 'exceljs'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { EventEntity } from '#api/entities/event.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { columnOf, INPUT_KEYS } from '#shared/exchange/test-columns.ts'
import type { Role } from '#shared/policies/role.ts'
import { importPreviewAnswerSchema, importTestsAnswerSchema, type ImportRow, type ImportTest, type ImportTests, type PreviewedRow } from '#shared/schemas/test-exchange.ts'
import { calibrationInput, coneSheet } from '#tests/factories/calibration.ts'
import { readExchangeFile, type ReadFile } from '#tests/factories/exchange-file.ts'
import { fieldWork, minutesAgo } from '#tests/factories/field-work.ts'
import { countInput, gaugeInput, gaugeSheet } from '#tests/factories/gauge.ts'
import { openSite, rowsOf, type OpenSite } from '#tests/factories/open-site.ts'
import { drySheet, middleOf, TOO_LOOSE } from '#tests/factories/test-input.ts'
import { placeCells, statesOf } from '#tests/factories/work-on-site.ts'
import { testApp, type TestApp } from '#tests/setup/api.ts'

const CODE = 'RB-3'
const ROW_ONE = [0, 1, 2, 3, 4, 5]
const PERFORMED = minutesAgo(90)
const SERIAL = 'M-0417'

let app: TestApp
let source: OpenSite
let exported: string

/** Sites as alike as two can be: plan, curve, gauge, calibration, and fill in row 1. */
async function alike(): Promise<OpenSite> {
  const open = await openSite(app, { curve: { code: CODE }, site: { name: 'Juniper bench, "north"' } })
  const lead = open.people['qc-lead']
  const gauge = gaugeInput({ serial: SERIAL })
  expect((await lead.post(open.path('/gauges'), gauge)).status).toBe(201)
  expect((await lead.post(open.path(`/gauges/${gauge.id}/counts`), countInput())).status).toBe(201)
  expect((await lead.post(open.path('/calibrations'), calibrationInput({ performedAt: PERFORMED }))).status).toBe(201)
  await placeCells(app, open, ROW_ONE)
  return open
}

async function fill(open: OpenSite): Promise<void> {
  const work = fieldWork(app, open)
  const { manager } = app.dataSource
  const [gauge] = await rowsOf(manager, 'gauge', open.siteId)
  const [calibration] = await rowsOf(manager, 'calibration', open.siteId)
  await work.record({ at: middleOf(5), sampledAt: minutesAgo(50), remarks: '=HYPERLINK("x"), first\nsecond', surfaceUm: null, depthUm: 152_400 })
  const failure = await work.record({ at: middleOf(0), sampledAt: minutesAgo(40), sheet: TOO_LOOSE, remarks: '-3 passes; Tölz' })
  await work.record({ at: middleOf(0, 1 / 3), sampledAt: minutesAgo(30), follows: { testId: failure.id, kind: 'retest' }, sheet: drySheet(117.6000000000001, 12) })
  await work.record({ at: middleOf(3), sampledAt: minutesAgo(20), sheet: coneSheet([String(calibration?.id)]), oversizePercent: 2.5 })
  await work.record({ at: middleOf(4), sampledAt: minutesAgo(10), sheet: gaugeSheet(String(gauge?.id)) })
}

const file = (rows: number): ImportTests['file'] => ({ name: 'tests.csv', sha256: createHash('sha256').update('file').digest('hex'), rows })
const batch = (rows: readonly ImportRow[], overrides: Partial<ImportTests> = {}): ImportTests => ({ id: randomUUID(), file: file(rows.length), rows: [...rows], setAside: [], ...overrides })

async function exportCsv(open: OpenSite, query = ''): Promise<string> {
  const answer = await open.people.technician.get(open.path(`/tests/export?format=csv&sort=sampled&direction=asc${query}`))
  expect(answer.status, answer.text).toBe(200)
  return answer.text
}

async function preview(open: OpenSite, rows: readonly ImportRow[], role: Role = 'technician'): Promise<PreviewedRow[]> {
  const answer = await open.people[role].post(open.path('/tests/import/preview'), { rows, context: [] })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return importPreviewAnswerSchema.parse(answer.body).rows
}

const changed = (row: ImportRow, test: Partial<ImportTest>): ImportRow => ({ ...row, test: { ...row.test, ...test } })
/** The same row as a laboratory's own file has it: it names no record. */
const unnamed = (row: ImportRow, test: Partial<ImportTest> = {}): ImportRow => ({ ...changed(row, { id: randomUUID(), ...test }), identified: false })

const inputs = ({ heads, records }: ReadFile) => {
  const read = heads.filter((head) => INPUT_KEYS.some((key) => head === columnOf(key).label || head.startsWith(`${columnOf(key).label} (`)))
  return records.map((record) => read.map((head) => `${head}=${record[head] ?? ''}`))
}

beforeAll(async () => {
  app = await testApp()
  source = await alike()
  await fill(source)
  exported = await exportCsv(source)
})

afterAll(() => app.end())

describe('GET /api/sites/:siteId/tests/export', () => {
  it('is for those who see the registers', async () => {
    const path = source.path('/tests/export?format=csv')
    expect((await app.visitor().get(path)).status).toBe(401)
    expect((await (await app.signedIn()).get(path)).status).toBe(404)
    expect((await source.people.operator.get(path)).status).toBe(403)
    expect((await source.people['owner-rep'].get(path)).status).toBe(200)
  })

  it('refuses a form or filter it does not know', async () => {
    const { technician } = source.people
    expect((await technician.get(source.path('/tests/export?format=pdf'))).status).toBe(400)
    expect((await technician.get(source.path('/tests/export'))).status).toBe(400)
    expect((await technician.get(source.path('/tests/export?format=csv&colour=red'))).status).toBe(400)
  })

  it('is a file to save, kept by nobody on the way, and says where it comes from', async () => {
    const answer = await source.people.technician.get(source.path('/tests/export?format=csv&lift=1'))
    expect(answer.headers['content-type']).toBe('text/csv; charset=utf-8')
    expect(answer.headers['cache-control']).toBe('no-store')
    expect(answer.headers['content-disposition']).toMatch(/^attachment; filename="juniper-bench-north-tests-\d{4}-\d{2}-\d{2}\.csv"/)
    const { provenance } = readExchangeFile(answer.text)
    expect(provenance).toContain('# Site: Juniper bench, "north"')
    expect(provenance).toContain('# Filter: lift 1')
    expect(provenance).toContain('# Tests: 5')
    expect(answer.text.startsWith('\ufeff')).toBe(true)
    expect((await exportCsv(source, '&bom=false')).startsWith('\ufeff')).toBe(false)
  })

  it('holds what the database holds, to the last digit', async () => {
    const { records } = readExchangeFile(exported)
    const stored = await app.dataSource.manager.find(FieldTestEntity, { where: { siteId: source.siteId }, order: { sampledAt: 'ASC' } })
    expect(records.map((record) => [record.Record, record.Number, Number(record['Easting (us-ft)']), Number(record['Compaction (%)']), record.Remarks, record.Result])).toEqual(
      stored.map((test) => [test.id, test.number, test.easting, test.rc, test.remarks, test.outcome]),
    )
    expect(records.map((record) => Date.parse(record['Sampled at'] ?? ''))).toEqual(stored.map((test) => test.sampledAt.getTime()))
    expect(records[3]).toMatchObject({ Method: 'Sand cone', 'Mass unit': 'g', 'Moist soil': '4553', 'Density unit': 'g/cm3', Calibrations: `Sand, batch 4 @ ${PERFORMED}`, 'Oversize (%)': '2.5', 'Depth (in)': '6' })
    expect(records[4]).toMatchObject({ Method: 'Nuclear gauge', Gauge: SERIAL })
    expect(records[2]).toMatchObject({ Follows: stored[1]?.number, 'Follows record': stored[1]?.id, 'Follow kind': 'Retest', 'Dry density': '117.6000000000001' })
  })

  it('takes the register’s filter and its order', async () => {
    const text = await exportCsv(source, '&outcome=fail')
    expect(readExchangeFile(text).records.map((record) => record.Result)).toEqual(['fail'])
    const newest = await source.people.technician.get(source.path('/tests/export?format=csv'))
    expect(readExchangeFile(newest.text).records.map((record) => record.Number)).toEqual(readExchangeFile(exported).records.map((record) => record.Number).reverse())
  })

  it('guards words that a spreadsheet would run, and gives them back unguarded', () => {
    expect(exported).toContain(`"'=HYPERLINK(""x""), first\nsecond"`)
    expect(exported).toContain("'-3 passes; Tölz")
    expect(readExchangeFile(exported).rows.map((row) => row.test.remarks).slice(0, 2)).toEqual(['=HYPERLINK("x"), first\nsecond', '-3 passes; Tölz'])
  })

  it('as a workbook holds typed numbers and times, the units and where it comes from', async () => {
    const answer = await source.people.technician.get(source.path('/tests/export?format=xlsx&sort=sampled&direction=asc')).buffer(true).parse((response, done) => {
      const parts: Buffer[] = []
      response.on('data', (part: Buffer) => parts.push(part))
      response.on('end', () => done(null, Buffer.concat(parts)))
    })
    expect(answer.status).toBe(200)
    const book = new ExcelJS.Workbook()
    await book.xlsx.load(answer.body as ArrayBuffer)
    expect(book.worksheets.map((sheet) => sheet.name)).toEqual(['Tests', 'Units', 'Provenance'])
    const sheet = book.getWorksheet('Tests')
    expect(sheet?.views[0]).toMatchObject({ state: 'frozen', ySplit: 1 })
    const heads = (sheet?.getRow(1).values as string[]).slice(1)
    const at = (row: number, head: string) => sheet?.getRow(row).getCell(heads.indexOf(head) + 1).value
    const stored = await app.dataSource.manager.find(FieldTestEntity, { where: { siteId: source.siteId }, order: { sampledAt: 'ASC' } })
    stored.forEach((test, index) => {
      expect(at(index + 2, 'Easting (us-ft)')).toBe(test.easting)
      expect(at(index + 2, 'Compaction (%)')).toBe(test.rc)
      const offset = String(at(index + 2, 'UTC offset'))
      expect(Date.parse((at(index + 2, 'Sampled at') as Date).toISOString().replace('Z', offset))).toBe(test.sampledAt.getTime())
    })
    expect(at(2, 'Remarks')).toBe('=HYPERLINK("x"), first\nsecond')
    expect(book.getWorksheet('Provenance')?.getSheetValues().flat()).toContain('Juniper bench, "north"')
  })
})

describe('a file that is read in again', () => {
  it('makes an alike empty site the same: its export agrees in every column that is read', async () => {
    const twin = await alike()
    const read = readExchangeFile(exported)
    const looked = await preview(twin, read.rows)
    expect(looked.map((row) => [row.state, row.problems])).toEqual(read.rows.map(() => ['ready', []]))
    const answer = await twin.people.technician.post(twin.path('/tests/import'), batch(read.rows))
    expect(answer.status, JSON.stringify(answer.body)).toBe(201)
    expect(looked.map((row) => row.verdict?.headline)).toEqual(importTestsAnswerSchema.parse(answer.body).recorded.map((row) => row.headline))
    expect(inputs(readExchangeFile(await exportCsv(twin)))).toEqual(inputs(read))
    // the ground, orders and verdicts are those of a site where each test was recorded by itself
    expect(await statesOf(app, twin)).toEqual(await statesOf(app, source))
    expect((await rowsOf(app.dataSource.manager, 'rework_order', twin.siteId)).map(({ state, headline }) => [state, headline])).toEqual((await rowsOf(app.dataSource.manager, 'rework_order', source.siteId)).map(({ state, headline }) => [state, headline]))
  })

  it('is known on the site it came from, in any units, and changes nothing', async () => {
    const before = await rowsOf(app.dataSource.manager, 'field_test', source.siteId)
    for (const units of ['as-entered', 'us', 'si']) {
      const { rows } = readExchangeFile(await exportCsv(source, `&units=${units}`))
      expect((await preview(source, rows)).map((row) => [row.state, row.problems])).toEqual(rows.map(() => ['recorded', []]))
      const answer = await source.people.technician.post(source.path('/tests/import'), batch(rows))
      expect(importTestsAnswerSchema.parse(answer.body)).toMatchObject({ recorded: [], already: rows.map((row) => row.line) })
    }
    expect(await rowsOf(app.dataSource.manager, 'field_test', source.siteId)).toEqual(before)
  })

  it('names what differs from the record, and does not write over it', async () => {
    const [first] = readExchangeFile(exported).rows as [ImportRow]
    const row = changed(first, { lift: 2, remarks: 'Other words' })
    const [looked] = await preview(source, [row])
    expect(looked).toMatchObject({ state: 'differs', problems: [{ column: 'lift' }, { column: 'remarks' }] })
    const answer = await source.people.technician.post(source.path('/tests/import'), batch([row]))
    expect(answer.status).toBe(400)
    expect(answer.body.message).toContain(`Line ${row.line}`)
  })

  it('asks about a row without a record that was recorded at the same place, lift and time', async () => {
    const [first] = readExchangeFile(exported).rows as [ImportRow]
    const row = unnamed(first)
    const [looked] = await preview(source, [row])
    expect(looked).toMatchObject({ state: 'attention', twin: true, problems: [{ column: 'sampledAt' }] })
    expect((await source.people.technician.post(source.path('/tests/import'), batch([row]))).status).toBe(400)
    expect((await preview(source, [{ ...row, another: true }]))[0]).toMatchObject({ state: 'ready', twin: false })
  })
})

describe('POST /api/sites/:siteId/tests/import', () => {
  let open: OpenSite
  let rows: ImportRow[]

  beforeAll(async () => {
    open = await alike()
    rows = readExchangeFile(exported).rows
  })

  const send = (body: object, role: Role = 'technician') => open.people[role].post(open.path('/tests/import'), body)

  it('is for those who record tests, each for purposes of its own side', async () => {
    for (const path of ['/tests/import', '/tests/import/preview']) {
      const body = path.endsWith('preview') ? { rows, context: [] } : batch(rows)
      expect((await app.visitor().post(open.path(path), body)).status).toBe(401)
      expect((await (await app.signedIn()).post(open.path(path), body)).status).toBe(404)
      expect((await open.people.superintendent.post(open.path(path), body)).status).toBe(403)
      expect((await open.people.operator.post(open.path(path), body)).status).toBe(403)
    }
    expect((await send(batch(rows), 'owner-rep')).status).toBe(403)
    expect((await preview(open, rows.slice(0, 1), 'owner-rep'))[0]).toMatchObject({ state: 'attention', problems: [{ column: 'purpose' }] })
    expect((await preview(open, [unnamed(rows[0] as ImportRow, { purpose: 'verification' })], 'owner-rep'))[0]).toMatchObject({ state: 'ready' })
  })

  it('names every cell that keeps a row from being recorded', async () => {
    const [first] = rows as [ImportRow]
    const looked = await preview(open, [
      unnamed(first, { curve: 'C-999' }),
      unnamed(first, { place: { cell: 'ZZ9' } }),
      unnamed(first, { place: { easting: 0, northing: 0 } }),
      unnamed(first, { lift: 9 }),
      unnamed(first, { stake: 'N77' }),
      unnamed(first, { sampledAt: new Date(Date.now() + 86_400_000).toISOString() }),
      unnamed(first, { sheet: drySheet(900, 12) }),
      unnamed(first, { surfaceUm: 31_000_000 }),
      unnamed(first, { follows: { kind: 'retest', record: randomUUID(), number: null } }),
      unnamed(first, { follows: { kind: 'retest', record: null, number: 'T-9999' } }),
      unnamed(rows[4] as ImportRow, { gauge: 'M-9999' }),
    ])
    expect(looked.map((row) => [row.state, row.problems.map((problem) => problem.column)])).toEqual(
      ['curve', 'cell', 'easting', 'lift', 'stake', 'sampledAt', 'dryDensity', 'lift', 'follows', 'follows', 'gauge'].map((column) => ['attention', [column]]),
    )
    expect(await rowsOf(app.dataSource.manager, 'field_test', open.siteId)).toEqual([])
  })

  it('knows nothing of another site’s curves, stakes and gauges', async () => {
    const foreign = await openSite(app, { curve: { code: 'FOREIGN-1' } })
    expect(foreign.curve.code).toBe('FOREIGN-1')
    expect((await preview(open, [unnamed(rows[0] as ImportRow, { curve: 'FOREIGN-1' })]))[0]?.problems[0]?.column).toBe('curve')
  })

  it('stores nothing of a batch with one row that is not ready, and says which', async () => {
    const bad = unnamed(rows[1] as ImportRow, { lift: 9, sampledAt: minutesAgo(5) })
    const answer = await send(batch([...rows, { ...bad, line: 99 }]))
    expect(answer.status).toBe(400)
    expect(answer.body.details.issues).toEqual([{ path: 'line.99.lift', message: expect.stringContaining('Line 99: Lift 9 is not planned') }])
    for (const table of ['field_test', 'rework_order', 'test_mark']) expect(await rowsOf(app.dataSource.manager, table, open.siteId)).toEqual([])
  })

  it('records a retest behind the test it follows, whatever their lines, and gives a batch that is sent twice one answer', async () => {
    const body = batch([...rows].reverse(), { setAside: [{ line: 40, reason: 'Not ours' }] })
    const [one, two] = [await send(body), await send(body)]
    expect([one.status, two.status]).toEqual([201, 201])
    expect(two.body).toEqual(one.body)
    const answer = importTestsAnswerSchema.parse(one.body)
    expect(answer.recorded.map((row) => row.number)).toEqual(['T-0001', 'T-0002', 'T-0002-R1', 'T-0003', 'T-0004'])
    expect(await rowsOf(app.dataSource.manager, 'field_test', open.siteId)).toHaveLength(5)
    expect((await send({ ...body, rows: body.rows.slice(1) })).status).toBe(409)
    const events = await app.dataSource.manager.findBy(EventEntity, { siteId: open.siteId, verb: 'tests.imported' })
    expect(events.map((event) => JSON.parse(event.payload) as unknown)).toEqual([
      { file: body.file, recorded: 5, already: 0, setAside: [{ line: 40, reason: 'Not ours' }], tests: answer.recorded.map(({ line, reference, id, number }) => ({ line, reference, id, number })) },
    ])
  })

  it('tells open boards once, with one patch in which the last state of each cell stands', async () => {
    const board = await alike()
    const socket = app.connect(board.people.technician)
    const told: string[] = []
    await new Promise<void>((resolve) => socket.emit('site:join', board.siteId, () => resolve()))
    socket.on('ground:patch', () => told.push('patch'))
    const heard = new Promise<void>((resolve) => socket.on('site:changed', ({ resource }) => {
      told.push(resource)
      if (resource === 'order') resolve()
    }))
    await board.people.technician.post(board.path('/tests/import'), batch(rows))
    await heard
    expect(told.filter((each) => each === 'test')).toHaveLength(1)
    expect(told.filter((each) => each === 'patch')).toHaveLength(1)
  })

  it('refuses more rows than a batch holds, and numbers that are none', async () => {
    const [first] = rows as [ImportRow]
    const many = Array.from({ length: 101 }, (_, index) => ({ ...unnamed(first), line: index + 1 }))
    expect((await send(batch(many, { file: file(101) }))).status).toBe(400)
    expect((await send(batch([{ ...first, test: { ...first.test, depthUm: null as never } }]))).status).toBe(400)
    expect((await send(batch([first], { file: { ...file(1), sha256: 'x' } }))).status).toBe(400)
    expect((await send(batch([changed(first, { remarks: 'x'.repeat(3_000_000) })]))).status).toBe(413)
  })
})
