import { ReleaseCellEntity } from '#api/entities/release-cell.entity.ts'
import { ReleaseEntity } from '#api/entities/release.entity.ts'
import { conflict, forbidden, invalid, notFound } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import type { GroundWriteAnswer } from '#api/features/placements/record-placement.service.ts'
import { loadReleaseCheck, loadUncheckedGauges } from '#api/features/releases/check-release.queries.ts'
import type { CheckedRelease } from '#api/features/releases/check-release.queries.ts'
import { isHoldPoint } from '#api/features/releases/holds.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { can } from '#shared/policies/policy.ts'
import type { CreateRelease } from '#shared/schemas/release.ts'

/** A-012 of 12: the authority to cover. */
export function releaseNumber(seq: number): string {
  return `A-${String(seq).padStart(3, '0')}`
}

/**
 * Releases cells (the lead), or asks for their release (the superintendent). What the lead releases at a hold point
 * waits for the owner's acceptance. Red findings block; frequency short may be overridden with a reason.
 */
export async function createRelease(write: SiteWrite, input: CreateRelease): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, role, now } = write
  const plan = await loadSitePlan(manager, siteId)
  const zone = plan.zone(input.zoneId)
  const happenedAt = notInFuture(new Date(input.happenedAt), now)
  const check = await loadReleaseCheck(manager, plan, input)
  const issuing = can(role, 'release.issue')
  if (issuing) refuseRed(check, input.overrideReason)
  const cells = check.cells.map(({ row }) => row.cell)
  const hold = isHoldPoint(plan, zone, input.lift, cells)
  const status = !issuing ? 'asked' : hold ? 'awaiting-acceptance' : 'released'
  const seq = write.take('release')
  await manager.insert(ReleaseEntity, {
    siteId,
    id: input.id,
    seq,
    zoneId: zone.id,
    lift: input.lift,
    status,
    hold,
    happenedAt,
    askedBy: issuing ? null : user.id,
    issuedBy: issuing ? user.id : null,
    issuedAt: issuing ? now : null,
    acceptedBy: null,
    acceptedAt: null,
    declinedReason: null,
    overrideReason: check.verdict === 'with-reason' ? input.overrideReason : null,
    remarks: input.remarks,
    createdAt: now,
    updatedAt: now,
  })
  await storeCells(write, input.id, input.lift, check)
  return finish(write, plan, { id: input.id, seq, lift: input.lift, status, check, happenedAt })
}

/** The lead issues a release that the superintendent asked for, on the checklist as it stands now. */
export async function issueAsked(write: SiteWrite, id: string, overrideReason: string | null): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, now } = write
  const release = await loadRelease(write, id, 'asked')
  const plan = await loadSitePlan(manager, siteId)
  const asked = await manager.findBy(ReleaseCellEntity, { siteId, releaseId: id })
  const cells = asked.map((row) => row.cell)
  const check = await loadReleaseCheck(manager, plan, { zoneId: release.zoneId, lift: release.lift, cells })
  refuseRed(check, overrideReason)
  const hold = isHoldPoint(plan, plan.zone(release.zoneId), release.lift, cells)
  const status = hold ? 'awaiting-acceptance' : 'released'
  await manager.update(ReleaseEntity, { siteId, id }, { status, hold, issuedBy: user.id, issuedAt: now, happenedAt: now, overrideReason, updatedAt: now })
  await manager.delete(ReleaseCellEntity, { siteId, releaseId: id })
  await storeCells(write, id, release.lift, check)
  return finish(write, plan, { id, seq: release.seq, lift: release.lift, status, check, happenedAt: now })
}

/** The owner accepts at a hold point: only now may the cells be covered. */
export async function acceptRelease(write: SiteWrite, id: string): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, now } = write
  const release = await loadRelease(write, id, 'awaiting-acceptance')
  const plan = await loadSitePlan(manager, siteId)
  const cells = (await manager.findBy(ReleaseCellEntity, { siteId, releaseId: id })).filter((row) => row.revokedAt === null)
  if (cells.length === 0) throw conflict('Every cell of this release was revoked meanwhile. Nothing was changed.')
  await refuseUncheckedGauges(write, cells)
  await manager.update(ReleaseEntity, { siteId, id }, { status: 'released', acceptedBy: user.id, acceptedAt: now, updatedAt: now })
  const check = await loadReleaseCheck(manager, plan, { zoneId: release.zoneId, lift: release.lift, cells: cells.map((row) => row.cell) })
  return finish(write, plan, { id, seq: release.seq, lift: release.lift, status: 'released', check, happenedAt: now })
}

/** The lead declines what was asked, or the owner what waits for acceptance, with a reason. */
export async function declineRelease(write: SiteWrite, id: string, reason: string): Promise<GroundWriteAnswer> {
  const { manager, siteId, role, now } = write
  const release = await manager.findOneBy(ReleaseEntity, { siteId, id })
  if (!release) throw notFound()
  const mayDecline = release.status === 'asked' ? can(role, 'release.issue') : release.status === 'awaiting-acceptance' && can(role, 'release.accept')
  if (release.status === 'declined' || release.status === 'released') throw conflict(`${releaseNumber(release.seq)} is ${release.status} already. Nothing was changed.`)
  if (!mayDecline) throw forbidden()
  const plan = await loadSitePlan(manager, siteId)
  const cells = await manager.findBy(ReleaseCellEntity, { siteId, releaseId: id })
  await manager.update(ReleaseEntity, { siteId, id }, { status: 'declined', declinedReason: reason, updatedAt: now })
  const number = releaseNumber(release.seq)
  write.record('release.declined', { type: 'release', id }, { number, reason })
  write.changed('release', id)
  const change = await changeTouched(write, plan, release.lift, cells.map((row) => row.cell))
  return { id, number, revision: write.revision, cells: change.cells.length, volume: cells.reduce((sum, row) => sum + row.volumeCm3, 0) }
}

function refuseRed(check: CheckedRelease, overrideReason: string | null): void {
  if (check.verdict === 'free' || (check.verdict === 'with-reason' && overrideReason !== null)) return
  const words = check.red.map((finding) => finding.message).join(' ')
  const advice = check.verdict === 'with-reason' ? 'You may release with a reason, which goes to the owner.' : 'Leave those cells out; nothing was released.'
  throw conflict(`${words} ${advice}`, { red: check.red, overridable: check.verdict === 'with-reason' }, 'release_blocked')
}

/** A count voided since the lead issued it holds the acceptance too. */
async function refuseUncheckedGauges({ manager, siteId }: SiteWrite, cells: readonly ReleaseCellEntity[]): Promise<void> {
  const troubles = await loadUncheckedGauges(manager, siteId, cells.flatMap((cell) => cell.pairs.map((pair) => pair.testId)))
  if (troubles.length === 0) return
  const why = [...new Set(troubles.map((trouble) => trouble.message))].join(' ')
  throw conflict(`${troubles.map((trouble) => trouble.test).join(', ')}: ${why} It cannot be accepted until that day’s count is good. Nothing was changed.`, undefined, 'release_blocked')
}

async function loadRelease(write: SiteWrite, id: string, status: ReleaseEntity['status']): Promise<ReleaseEntity> {
  const { manager, siteId } = write
  const release = await manager.findOneBy(ReleaseEntity, { siteId, id })
  if (!release) throw notFound()
  if (release.status !== status) throw conflict(`${releaseNumber(release.seq)} stands at "${release.status}" now. Nothing was changed.`)
  return release
}

async function storeCells({ manager, siteId }: SiteWrite, releaseId: string, lift: number, check: CheckedRelease): Promise<void> {
  if (check.cells.length === 0) throw invalid('Nothing is placed in these cells at this lift. Choose others; what you entered was kept.')
  await manager.insert(
    ReleaseCellEntity,
    check.cells.map(({ row, pairs }) => ({ siteId, releaseId, cell: row.cell, lift, volumeCm3: row.volumeCm3, pairs: [...pairs], revokedAt: null, revokedReason: null })),
  )
}

interface Finished {
  readonly id: string
  readonly seq: number
  readonly lift: number
  readonly status: ReleaseEntity['status']
  readonly check: CheckedRelease
  readonly happenedAt: Date
}

async function finish(write: SiteWrite, plan: SitePlan, { id, seq, lift, status, check, happenedAt }: Finished): Promise<GroundWriteAnswer> {
  const number = releaseNumber(seq)
  const cells = check.cells.map(({ row }) => row.cell)
  write.record(`release.${status}`, { type: 'release', id }, { number, lift, cells: cells.map((cell) => plan.label(cell)), volumeCm3: check.volumeCm3, red: check.red.map((finding) => finding.code), amber: check.amber.map((finding) => finding.code) }, happenedAt)
  write.changed('release', id)
  await changeTouched(write, plan, lift, cells)
  return { id, number, revision: write.revision, cells: cells.length, volume: check.volumeCm3 }
}

async function changeTouched(write: SiteWrite, plan: SitePlan, lift: number, cells: readonly number[]) {
  if (lift === 0) return changeGround(write, plan, { foundation: cells })
  const rows: { lot_id: string | null }[] = await write.manager.query(
    'SELECT DISTINCT `lot_id` FROM `cell_lift` WHERE `site_id` = ? AND `lift` = ? AND `cell` IN (?)',
    [write.siteId, lift, cells],
  )
  return changeGround(write, plan, { lots: rows.flatMap((row) => row.lot_id ?? []) })
}
