import type { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { releaseNumber } from '#api/features/releases/releases.service.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { GroundMark } from '#api/features/tests/mark-ground.ts'
import { groundStateOf } from '#shared/domain/ground-state.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import type { SharePair } from '#shared/domain/lot-facts.ts'
import type { RejudgeAnswer } from '#shared/schemas/rejudge.ts'

/** State code by "lift cell". */
type States = ReadonlyMap<string, { readonly lift: number; readonly cell: number; readonly state: number }>

/** What stands stored of these lifts now. */
export async function readStates({ manager, siteId }: SiteWrite, lifts: readonly number[]): Promise<States> {
  if (lifts.length === 0) return new Map()
  const rows: { lift: number; cell: number; state: number }[] = await manager.query('SELECT `lift`, `cell`, `state` FROM `cell_lift` WHERE `site_id` = ? AND `lift` IN (?) ORDER BY `lift`, `cell`', [siteId, lifts])
  return new Map(rows.map((row) => [`${row.lift} ${row.cell}`, row]))
}

/** Cells that have come to another state since, by lift and states. */
export async function movesSince(write: SiteWrite, lifts: readonly number[], before: States): Promise<RejudgeAnswer['moves']> {
  const after = await readStates(write, lifts)
  const moved = [...after].flatMap(([key, now]) => {
    const was = before.get(key)
    return was && was.state !== now.state ? [{ ...now, was: was.state }] : []
  })
  return [...groupBy(moved, ({ lift, was, state }) => `${lift} ${was} ${state}`).values()].flatMap((cells) => {
    const [first] = cells
    return first ? [{ lift: first.lift, from: groundStateOf(first.was), to: groundStateOf(first.state), cells: cells.map((cell) => cell.cell) }] : []
  })
}

export interface RevokedRelease {
  readonly number: string
  readonly lift: number
  readonly cells: readonly { readonly cell: number; readonly pairs: readonly SharePair[] }[]
}

/** Releases of which this write revoked cells. */
export async function revokedReleases({ manager, siteId, now }: SiteWrite): Promise<RevokedRelease[]> {
  const rows: { seq: number; lift: number; cell: number; pairs: string | SharePair[] }[] = await manager.query(
    'SELECT r.`seq`, c.`lift`, c.`cell`, c.`pairs` FROM `release_cell` c JOIN `release_record` r ON r.`site_id` = c.`site_id` AND r.`id` = c.`release_id` WHERE c.`site_id` = ? AND c.`revoked_at` = ? ORDER BY r.`seq`, c.`cell`',
    [siteId, now],
  )
  return [...groupBy(rows, (row) => row.seq)].map(([seq, cells]) => ({
    number: releaseNumber(seq),
    lift: cells[0]?.lift ?? 0,
    cells: cells.map(({ cell, pairs }) => ({ cell, pairs: typeof pairs === 'string' ? (JSON.parse(pairs) as SharePair[]) : pairs })),
  }))
}

/** How many of the revoked cells stood on this test or are marked by it. */
export function revokedBy(releases: readonly RevokedRelease[], test: Pick<FieldTestEntity, 'id' | 'lift'>, marks: readonly GroundMark[]): number {
  const marked = new Set(marks.flatMap((mark) => mark.cells))
  const cells = releases.filter((release) => release.lift === test.lift).flatMap((release) => release.cells)
  return cells.filter(({ cell, pairs }) => marked.has(cell) || pairs.some((pair) => pair.testId === test.id)).length
}
