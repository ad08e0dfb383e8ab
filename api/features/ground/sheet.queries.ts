import type { EntityManager } from 'typeorm'
import { lastPatchRevision } from '#api/features/site-head/pending-write.ts'
import { toTenths } from '#api/features/ground/layer-rows.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import { liftAtElevation } from '#shared/domain/lift-schedule.ts'
import { decodePatch, encodeSheet } from '#shared/ground-codec.ts'
import type { GroundCut } from '#shared/ground-codec.ts'

interface ShownRow {
  readonly cell: number
  readonly lift: number
  readonly state: number
  readonly flags: number
  readonly top_um: string
  readonly lot: number | null
  readonly test: number | null
}

const SHOWN =
  'SELECT s.`cell`, s.`lift`, s.`state`, s.`flags`, s.`top_um`, l.`seq` AS `lot`, t.`seq` AS `test` FROM `cell_lift` s LEFT JOIN `lot` l ON l.`site_id` = s.`site_id` AND l.`id` = s.`lot_id` LEFT JOIN `field_test` t ON t.`site_id` = s.`site_id` AND t.`id` = s.`naming_test_id`'

/** The Ground at a cut, every cell of the site, in the one binary form. */
export async function loadSheet(manager: EntityManager, plan: SitePlan, cut: GroundCut, revision: number): Promise<Uint8Array> {
  const n = plan.cells.length
  const sheet = {
    revision,
    cut,
    state: new Uint8Array(n),
    flags: new Uint8Array(n),
    lift: new Int16Array(n),
    top: new Int32Array(n),
    lot: new Uint32Array(n),
    test: new Uint32Array(n),
  }
  const lifts = cut.kind === 'elevation' ? cutLifts(plan, cut.um, sheet) : null
  for (const row of await loadShown(manager, plan, lifts)) {
    if (lifts && lifts[row.cell] !== row.lift) continue
    sheet.state[row.cell] = row.state
    sheet.flags[row.cell] = row.flags
    sheet.lift[row.cell] = row.lift
    sheet.top[row.cell] = toTenths(Number(row.top_um))
    sheet.lot[row.cell] = row.lot ?? 0
    sheet.test[row.cell] = row.test ?? 0
  }
  return encodeSheet(sheet)
}

async function loadShown(manager: EntityManager, plan: SitePlan, lifts: readonly number[] | null): Promise<ShownRow[]> {
  if (lifts === null) {
    return manager.query(`${SHOWN} JOIN \`cell\` c ON c.\`site_id\` = s.\`site_id\` AND c.\`cell\` = s.\`cell\` AND c.\`surface_lift\` = s.\`lift\` WHERE s.\`site_id\` = ?`, [plan.site.id])
  }
  const wanted = [...new Set(lifts)].filter((lift) => lift >= 0)
  if (wanted.length === 0) return []
  return manager.query(`${SHOWN} WHERE s.\`site_id\` = ? AND s.\`lift\` IN (?)`, [plan.site.id, wanted])
}

/** The lift shown in each cell at an elevation (-1 where no fill belongs there), the sheet filled as if nothing were placed. */
function cutLifts(plan: SitePlan, um: number, sheet: { state: Uint8Array; lift: Int16Array; top: Int32Array }): number[] {
  return plan.cells.map(({ cell, baseUm }) => {
    const lift = plan.zoneOf(cell) ? liftAtElevation(plan.layersOf(cell), um) : undefined
    if (lift === undefined || lift === 0) {
      sheet.lift[cell] = -1
      sheet.top[cell] = toTenths(baseUm)
      return -1
    }
    sheet.lift[cell] = lift
    sheet.state[cell] = groundStateCode('not-placed')
    sheet.top[cell] = toTenths(layerOf(plan, cell, lift)?.topUm ?? baseUm)
    return lift
  })
}

/** A client farther behind than this reads the sheet again: cheaper for both. */
const MOST_PATCHES = 500

interface Patches {
  readonly reset: boolean
  readonly revision: number
  /** base64 of encodePatch */
  readonly patches: readonly string[]
}

/** The patches after a revision, or `reset` where they are no longer all kept. */
export async function loadPatchesSince(manager: EntityManager, siteId: string, since: number): Promise<Patches> {
  const revision = await lastPatchRevision(manager, siteId)
  const rows: { body: Buffer }[] = await manager.query(
    'SELECT `body` FROM `patch` WHERE `site_id` = ? AND `revision` > ? ORDER BY `revision` LIMIT ?',
    [siteId, since, MOST_PATCHES + 1],
  )
  const [first] = rows
  if (!first) return { reset: false, revision, patches: [] }
  const complete = decodePatch(first.body).base <= since && rows.length <= MOST_PATCHES
  return complete ? { reset: false, revision, patches: rows.map((row) => row.body.toString('base64')) } : { reset: true, revision, patches: [] }
}
