import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { cellLayers } from '#shared/domain/lift-schedule.ts'
import { layerVolumeCm3 } from '#shared/domain/placement-volume.ts'
import { gridToSite } from '#shared/domain/grid.ts'
import { siteCellsSchema, siteListSchema, siteSchema, specificationSchema } from '#shared/schemas/site.ts'
import type { CreateSite, SiteCells } from '#shared/schemas/site.ts'
import { rowsOf } from '#tests/factories/open-site.ts'
import { GROUND_UM, LIFTS, LIFT_UM, cellsRing, siteInput, specificationInput, zoneInput } from '#tests/factories/site-input.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp
let lead: SignedIn
let technician: SignedIn
let stranger: SignedIn
let siteId: string
let input: CreateSite

beforeAll(async () => {
  app = await testApp()
  lead = await app.signedIn()
  stranger = await app.signedIn()
  input = siteInput({ zones: [zoneInput({ ring: [...cellsRing(0, 0, 4, 5)] })] })
  const answer = await lead.post('/api/sites', input)
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  siteId = input.id
  technician = await app.signedIn('technician', siteId)
})

afterAll(() => app.end())

const messageOf = (body: unknown) => (body as { message: string }).message
const pathsOf = (body: unknown) => (body as { details: { issues: { path: string }[] } }).details.issues.map((issue) => issue.path)

async function cellsOf(person: SignedIn, id: string): Promise<SiteCells> {
  return siteCellsSchema.parse((await person.get(`/api/sites/${id}/cells`)).body)
}

describe('POST /api/sites', () => {
  it('asks for a signed-in person', async () => {
    expect((await app.visitor().post('/api/sites', siteInput())).status).toBe(401)
  })

  it('makes its maker the QC lead and answers the plan', async () => {
    const maker = await app.signedIn()
    const body = siteInput()
    const answer = await maker.post('/api/sites', body)
    expect(answer.status).toBe(201)
    const site = siteSchema.parse(answer.body)
    expect(site).toMatchObject({ id: body.id, role: 'qc-lead', crs: 'EPSG:2285', unitSystem: 'us', revision: 1 })
    expect(site.zones[0]).toMatchObject({ index: 0, minBaseUm: GROUND_UM, maxDesignUm: GROUND_UM + LIFTS * LIFT_UM, specification: { version: 1, title: 'Structural fill' } })
    // 300 × 250 US survey ft of 1200/3937 m (C-3 of the check values); half a millimetre along 335 m of outline is 0.17 m²
    expect(Math.abs(site.areaMm2 / 1e6 - 300 * 250 * (1200 / 3937) ** 2)).toBeLessThan(0.17)
    const events = await rowsOf(app.dataSource.manager, 'event', body.id)
    expect(events.map((event) => event.verb)).toEqual(['site.created'])
  })

  it('puts every cell of a zone on a foundation that waits for its inspection, the first lift next', async () => {
    const cells = await rowsOf(app.dataSource.manager, 'cell', siteId)
    expect(cells).toHaveLength(30)
    const inZone = cells.filter((cell) => cell.zone_id !== null)
    expect(inZone).toHaveLength(20)
    for (const cell of inZone) {
      expect(cell).toMatchObject({ surface_lift: 0, ready: 0, next_lift: 1, block_lift: 0, block_reason: 'awaiting-inspection' })
      // 2,500 US survey ft² × 8 in, the outline taken to the millimetre
      expect(Number(cell.next_cm3) / (2500 * (1200 / 3937) ** 2 * 0.2032 * 1e6)).toBeCloseTo(1, 4)
    }
    expect(cells.find((cell) => cell.zone_id === null)).toMatchObject({ zone_index: -1, ready: 0, next_lift: null, next_cm3: '0', block_reason: null })
    const rows = await rowsOf(app.dataSource.manager, 'cell_lift', siteId)
    expect(rows).toHaveLength(20)
    expect(rows[0]).toMatchObject({ lift: 0, state: 2, flags: 0, lot_id: null, bottom_um: String(GROUND_UM), top_um: String(GROUND_UM) })
    const totals = await rowsOf(app.dataSource.manager, 'lift_total', siteId)
    expect(totals).toMatchObject([{ lift: 0, state: 2, cells: 20, cm3: '0' }])
  })

  it('gives the first answer again to the same request, also when both arrive at once', async () => {
    const maker = await app.signedIn()
    const body = siteInput()
    const [one, two] = await Promise.all([maker.post('/api/sites', body), maker.post('/api/sites', body)])
    expect([one.status, two.status]).toEqual([201, 201])
    expect(two.body).toEqual(one.body)
    expect((await maker.post('/api/sites', body)).body).toEqual(one.body)
    const other = await maker.post('/api/sites', { ...body, name: 'Another' })
    expect(other.status).toBe(409)
    expect(other.body).toMatchObject({ code: 'id_reused' })
    expect(await rowsOf(app.dataSource.manager, 'cell', body.id)).toHaveLength(30)
  })

  it('tells a person outside nothing of a site whose identifier they use', async () => {
    expect((await stranger.post('/api/sites', { ...siteInput(), id: siteId })).status).toBe(404)
  })

  it.each<[string, Partial<CreateSite>, string, RegExp]>([
    ['an unknown coordinate system', { crs: 'EPSG:9999' }, 'body.crs', /EPSG:9999 is not on the list/],
    ['feet of the wrong kind', { crs: 'EPSG:2992' }, 'body.grid.unit', /international feet.*US survey feet/],
    ['an unknown time zone', { timeZone: 'Mars/Olympus' }, 'body.timeZone', /Mars\/Olympus is not a known time zone/],
    ['a boundary that crosses itself', { boundary: [0, 2, 1, 3].map((i) => cellsRing(0, 0, 6, 5)[i]!) }, 'body.boundary', /crosses or touches itself/],
    ['a grid that does not cover the boundary', { grid: { ...siteInput().grid, columns: 5 } }, 'body.grid', /does not cover the boundary: its point 2/],
    ['a zone outside the boundary', { zones: [zoneInput({ ring: [...cellsRing(3, 0, 6, 5)] })] }, 'body.zones.0.ring', /Zone Pad: Point 2 is outside/],
    ['a zone that another one covers', { zones: [zoneInput(), zoneInput({ name: 'Road', shortName: 'Road' })] }, 'body.zones.1.ring', /Zone Road holds no cell/],
    ['two zones of one name', { zones: [zoneInput({ ring: [...cellsRing(0, 0, 3, 5)] }), zoneInput({ ring: [...cellsRing(3, 0, 3, 5)], shortName: 'P2' })] }, 'body.zones.1.name', /Zones 1 and 2 have the same name/],
    ['a datum above the ground', { zones: [zoneInput({ liftPlan: { kind: 'level', datumUm: GROUND_UM + 1, thicknessUm: LIFT_UM } })] }, 'body.zones.0.liftPlan', /datum of the level lifts stands above/],
    ['a design with nothing to fill', { zones: [zoneInput({ design: { kind: 'level', elevationUm: GROUND_UM } })] }, 'body.zones.0.design', /nowhere above the ground/],
    ['more lifts than can be', { zones: [zoneInput({ design: { kind: 'level', elevationUm: GROUND_UM + 501 * LIFT_UM } })] }, 'body.zones.0.liftPlan', /more than 500 lifts/],
    ['a ground that stops short of the site', { ground: { kind: 'points', points: cellsRing(0, 0, 5, 5).map((point) => ({ ...point, elevationUm: GROUND_UM })) } }, 'body.ground', /The ground surface does not reach cell F1/],
    ['a surface on one line', { ground: { kind: 'points', points: [0, 1, 2].map((i) => ({ easting: i, northing: i, elevationUm: 0 })) } }, 'body.ground', /all lie on one line/],
    ['a moisture band upside down', { zones: [zoneInput({ specification: specificationInput({ criteria: [{ kind: 'moisture-band', lowText: '2', highText: '-2' }] }) })] }, 'body.zones.0.specification.criteria.0.lowText', /lower end of the moisture band/],
    ['more cells than can be kept', { grid: { ...siteInput().grid, cellSize: 0.4, columns: 750, rows: 625 } }, 'body.grid', /about 468,75\d cells; 150,000 is the most/],
  ])('refuses %s and says where', async (_what, overrides, path, message) => {
    const body = siteInput(overrides)
    const answer = await lead.post('/api/sites', body)
    expect(answer.status).toBe(400)
    expect(pathsOf(answer.body)).toContain(path)
    expect(messageOf(answer.body)).toMatch(message)
    expect(await rowsOf(app.dataSource.manager, 'site_head', body.id)).toEqual([])
  })

  it('tells every problem at once', async () => {
    const answer = await lead.post('/api/sites', siteInput({ crs: 'EPSG:1', timeZone: 'Nowhere' }))
    expect(pathsOf(answer.body)).toEqual(['body.crs', 'body.timeZone'])
  })

  it('takes in a survey of thousands of points, from a signed-in person only', async () => {
    const maker = await app.signedIn()
    const [corner] = cellsRing(0, 0, 6, 5)
    const points = Array.from({ length: 6_000 }, (_, i) => ({
      easting: corner!.easting - 10 + (i % 100) * 3.3 + 0.001,
      northing: corner!.northing - 10 + Math.floor(i / 100) * 4.7 + 0.001,
      elevationUm: GROUND_UM + (i % 7) * 1_000,
    }))
    const body = siteInput({ ground: { kind: 'points', points } })
    expect(JSON.stringify(body).length).toBeGreaterThan(400_000)
    expect((await maker.post('/api/sites', body)).status).toBe(201)
    expect((await app.visitor().post('/api/sites', body)).status).toBe(401)
  })

  it('cuts a turned grid by the boundary: areas sum to the outline, design volumes to all planned layers', async () => {
    const maker = await app.signedIn()
    const grid: CreateSite['grid'] = { origin: { easting: 500_000, northing: 4_400_000 }, cellSize: 10, columns: 9, rows: 7, rotationDeg: 27, unit: 'm' }
    const ring = (corners: [number, number][]) => corners.map(([u, v]) => gridToSite(grid, { u: u * 1000, v: v * 1000 }))
    const boundary = ring([[3, 2], [88, 11], [84, 66], [41, 69], [6, 55]])
    const sloping = (zUm: number) => ring([[-20, -20], [120, -20], [120, 100], [-20, 100]]).map((point, i) => ({ ...point, elevationUm: zUm + i * 400_000 }))
    const zone = { shortName: 'W', name: 'West', design: { kind: 'points' as const, points: sloping(101_700_000) } }
    const body = siteInput({
      crs: 'EPSG:32613', unitSystem: 'si', timeZone: 'America/Denver', grid, boundary,
      ground: { kind: 'points', points: sloping(100_000_000) },
      zones: [
        zoneInput({ ...zone, ring: ring([[8, 8], [45, 12], [41, 65], [10, 50]]), liftPlan: { kind: 'parallel-to-base', thicknessUm: 200_000 } }),
        zoneInput({ ...zone, name: 'East', shortName: 'E', ring: ring([[45, 12], [80, 15], [78, 62], [41, 65]]), liftPlan: { kind: 'level', datumUm: 99_000_000, thicknessUm: 250_000 } }),
      ],
    })
    const site = siteSchema.parse((await maker.post('/api/sites', body)).body)
    // the outline's own shoelace sum, metres in the grid's axes
    const corners: [number, number][] = [[3, 2], [88, 11], [84, 66], [41, 69], [6, 55]]
    const twice = corners.reduce((sum, [u, v], i) => sum + u * corners[(i + 1) % 5]![1] - corners[(i + 1) % 5]![0] * v, 0)
    const cells = await cellsOf(maker, body.id)
    expect(cells.areaMm2.reduce((sum, area) => sum + area, 0)).toBe(site.areaMm2)
    // slivers under 1 % of a cell (1 m²) are left out, at most one along each of the five sides
    expect(Math.abs(site.areaMm2 / 1e6 - twice / 2)).toBeLessThan(5)
    for (const zone of site.zones) {
      const volumes = cells.zone.flatMap((index, cell) =>
        index === zone.index
          ? cellLayers(zone.liftPlan, cells.baseUm[cell]!, cells.designUm[cell]!).map((layer) => layerVolumeCm3(cells.areaMm2[cell]!, layer.topUm - layer.bottomUm))
          : [],
      )
      expect(volumes.length).toBeGreaterThan(20)
      expect(zone.designCm3).toBe(volumes.reduce((sum, volume) => sum + volume, 0))
    }
  })
})

describe('GET /api/sites', () => {
  it('asks for a signed-in person', async () => {
    expect((await app.visitor().get('/api/sites')).status).toBe(401)
  })

  it('lists only the sites a person belongs to, with the role there and the figures', async () => {
    const { sites } = siteListSchema.parse((await technician.get('/api/sites')).body)
    expect(sites).toMatchObject([{ id: siteId, role: 'technician', cells: 30, columns: 6, rows: 5, totals: { placedCm3: 0, testsOwed: 0, readyCells: 0 } }])
    expect(siteListSchema.parse((await stranger.get('/api/sites')).body).sites).toEqual([])
  })
})

describe('GET /api/sites/:siteId', () => {
  it('answers 401 signed out and 404 to a person outside', async () => {
    expect((await app.visitor().get(`/api/sites/${siteId}`)).status).toBe(401)
    expect((await stranger.get(`/api/sites/${siteId}`)).status).toBe(404)
    expect((await lead.get(`/api/sites/${randomUUID()}`)).status).toBe(404)
  })

  it('tells the site, the role and what the making answered', async () => {
    const site = siteSchema.parse((await technician.get(`/api/sites/${siteId}`)).body)
    expect(site).toMatchObject({ name: 'Juniper bench', role: 'technician', boundary: input.boundary, grid: input.grid })
    expect(site.zones[0]?.ring).toEqual(input.zones[0]?.ring)
    expect(site.cellsHash).toBe((await cellsOf(lead, siteId)).hash)
  })
})

describe('GET /api/sites/:siteId/cells', () => {
  it('answers 401 signed out and 404 to a person outside', async () => {
    expect((await app.visitor().get(`/api/sites/${siteId}/cells`)).status).toBe(401)
    expect((await stranger.get(`/api/sites/${siteId}/cells`)).status).toBe(404)
  })

  it('gives columns in cell order, row by row', async () => {
    const cells = await cellsOf(technician, siteId)
    expect([cells.column.slice(0, 7), cells.row.slice(0, 7)]).toEqual([[0, 1, 2, 3, 4, 5, 0], [0, 0, 0, 0, 0, 0, 1]])
    expect(cells.zone.slice(0, 6)).toEqual([0, 0, 0, 0, -1, -1])
    expect(cells.designUm[0]! - cells.baseUm[0]!).toBe(LIFTS * LIFT_UM)
    expect(cells.designUm[5]).toBe(cells.baseUm[5])
  })

  it('answers 304 without a body to who has them already', async () => {
    const first = await lead.get(`/api/sites/${siteId}/cells`)
    const etag = String(first.headers.etag)
    expect(etag).toMatch(/^"[0-9a-f]{64}"$/)
    expect(first.headers['cache-control']).toMatch(/private/)
    const again = await lead.get(`/api/sites/${siteId}/cells`).set('If-None-Match', etag)
    expect([again.status, again.text]).toEqual([304, ''])
    expect((await lead.get(`/api/sites/${siteId}/cells`).set('If-None-Match', '"other"')).status).toBe(200)
  })
})

describe('PATCH /api/sites/:siteId', () => {
  it('is for the lead alone', async () => {
    expect((await app.visitor().patch(`/api/sites/${siteId}`, { name: 'X' })).status).toBe(401)
    expect((await stranger.patch(`/api/sites/${siteId}`, { name: 'X' })).status).toBe(404)
    expect((await technician.patch(`/api/sites/${siteId}`, { name: 'X' })).status).toBe(403)
    expect((await lead.patch(`/api/sites/${siteId}`, { name: '' })).status).toBe(400)
  })

  it('changes units, leaves the rest, and records before and after', async () => {
    const before = siteSchema.parse((await lead.get(`/api/sites/${siteId}`)).body)
    const answer = await lead.patch(`/api/sites/${siteId}`, { unitSystem: 'si', subtitle: '' })
    expect(answer.status).toBe(200)
    const after = siteSchema.parse(answer.body)
    expect(after).toMatchObject({ name: before.name, subtitle: '', unitSystem: 'si' })
    expect(after.zones).toEqual(before.zones)
    expect(after.cellsHash).toBe(before.cellsHash)
    const [event] = (await rowsOf(app.dataSource.manager, 'event', siteId)).filter(({ verb }) => verb === 'site.updated')
    expect(String(event?.payload)).toContain('"unitSystem":"us"')
  })
})

describe('POST /api/sites/:siteId/zones/:id/specifications', () => {
  const path = (zoneId = input.zones[0]?.id) => `/api/sites/${siteId}/zones/${zoneId}/specifications`
  const body = (criteria = specificationInput().criteria) => ({ ...specificationInput({ title: 'Tighter', criteria }), id: randomUUID() })

  it('is for the lead of the site and a zone of it', async () => {
    expect((await app.visitor().post(path(), body())).status).toBe(401)
    expect((await stranger.post(path(), body())).status).toBe(404)
    expect((await technician.post(path(), body())).status).toBe(403)
    expect((await lead.post(path(randomUUID()), body())).status).toBe(404)
  })

  it('refuses limits that cannot be', async () => {
    const answer = await lead.post(path(), body([{ kind: 'rc-min', text: '-5' }]))
    expect(answer.status).toBe(400)
    expect(pathsOf(answer.body)).toEqual(['body.criteria.0.text'])
  })

  it('puts the next version in force once, however often it is sent', async () => {
    const input = body([{ kind: 'rc-min', text: '98' }])
    const answer = await lead.post(path(), input)
    expect(answer.status).toBe(201)
    expect(specificationSchema.parse(answer.body)).toMatchObject({ id: input.id, version: 2, title: 'Tighter' })
    expect((await lead.post(path(), input)).body).toEqual(answer.body)
    const site = siteSchema.parse((await lead.get(`/api/sites/${siteId}`)).body)
    expect(site.zones[0]?.specification).toMatchObject({ version: 2, criteria: [{ kind: 'rc-min', text: '98' }] })
    expect(await rowsOf(app.dataSource.manager, 'specification', siteId)).toHaveLength(2)
  })
})
