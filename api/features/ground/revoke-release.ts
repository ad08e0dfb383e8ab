import type { LoadedLot } from '#api/features/ground/lot-facts.queries.ts'
import { loadTestNames } from '#api/features/ground/running-numbers.queries.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import type { BrokenRelease } from '#shared/domain/lot-facts.ts'

const WORDS: Readonly<Record<BrokenRelease['reason'], string>> = {
  failed: 'a failing test marks it',
  'basis-lost': 'the result it stood on is no longer in force',
  removed: 'its fill was voided',
}

/** Revokes releases that lost their basis, each cell with the reason, in one event a lot. */
export async function revokeBroken(write: SiteWrite, plan: SitePlan, { lot }: LoadedLot, broken: readonly BrokenRelease[]): Promise<void> {
  if (broken.length === 0) return
  const { manager, siteId } = write
  const names = await loadTestNames(manager, siteId, broken.map((release) => release.testId))
  const wordsOf = ({ reason, testId }: BrokenRelease) => {
    const name = names.get(testId ?? '')
    return name === undefined ? WORDS[reason] : `${WORDS[reason]} (${name})`
  }
  for (const [words, cells] of groupBy(broken, wordsOf)) await revoke(write, lot.lift, cells.map((release) => release.cell), words)
  write.record('release.revoked', { type: 'lot', id: lot.id }, {
    lift: lot.lift,
    cells: broken.map((release) => ({ cell: plan.label(release.cell), reason: WORDS[release.reason], testId: release.testId })),
  })
  write.changed('release', lot.id)
}

/** Revokes what stands released of these cells at a lift, for a reason of its own. */
export async function revokeCells(
  write: SiteWrite,
  plan: SitePlan,
  { lift, cells, reason }: { readonly lift: number; readonly cells: readonly number[]; readonly reason: string },
): Promise<void> {
  const revoked = await revoke(write, lift, cells, reason)
  if (revoked === 0) return
  write.record('release.revoked', { type: 'site', id: write.siteId }, { lift, cells: cells.map((cell) => plan.label(cell)), reason })
  write.changed('release', write.siteId)
}

async function revoke({ manager, siteId, now }: SiteWrite, lift: number, cells: readonly number[], reason: string): Promise<number> {
  const result: { affectedRows: number } = await manager.query(
    "UPDATE `release_cell` c JOIN `release_record` r ON r.`site_id` = c.`site_id` AND r.`id` = c.`release_id` SET c.`revoked_at` = ?, c.`revoked_reason` = ? WHERE c.`site_id` = ? AND c.`lift` = ? AND c.`cell` IN (?) AND c.`revoked_at` IS NULL AND r.`status` IN ('released', 'awaiting-acceptance')",
    [now, reason, siteId, lift, cells],
  )
  return result.affectedRows
}
