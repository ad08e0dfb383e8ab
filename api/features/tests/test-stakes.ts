import { IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import type { PlanZone } from '#api/features/ground/site-plan.ts'
import { refusal } from '#api/http/refuse-input.ts'
import type { Reason } from '#shared/domain/result.ts'
import type { GridPoint } from '#shared/domain/site-geometry.ts'
import { stakesRetiredBy } from '#shared/domain/stakes.ts'
import type { SpecificationInput } from '#shared/schemas/site.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

interface AtStake extends Pick<CreateTest, 'stakeId' | 'purpose' | 'follows' | 'lift'> {
  readonly at: GridPoint
  readonly zone: PlanZone
  readonly lotId: string | undefined
  readonly rules: SpecificationInput
}

/** Stakes that still stand in a zone and lift. */
async function loadStanding(manager: EntityManager, siteId: string, zoneId: string, lift: number): Promise<StakeEntity[]> {
  return manager
    .createQueryBuilder(StakeEntity, 's')
    .innerJoin('lot', 'l', 'l.site_id = s.siteId AND l.id = s.lotId')
    .where('s.siteId = :siteId AND s.retiredAt IS NULL AND l.zone_id = :zoneId AND l.lift = :lift', { siteId, zoneId, lift })
    .orderBy('s.seq')
    .getMany()
}

/**
 * The stakes a test takes out, and whether a required one was taken where no stake stands: flagged, or refused where the
 * specification wants required tests at stakes only. Retests and re-runs have places of their own.
 */
export async function checkStakes(manager: EntityManager, siteId: string, test: AtStake): Promise<{ retires: StakeEntity[]; flags: Reason[] }> {
  const { stakeId, purpose, follows, rules, at } = test
  if (stakeId !== null) await refuseWrongStake(manager, siteId, stakeId, test.lotId)
  if (purpose !== 'required') return { retires: [], flags: [] }
  const retires = stakesRetiredBy(await loadStanding(manager, siteId, test.zone.id, test.lift), at, rules.stakeRetireMm)
  if (retires.length > 0 || follows !== null) return { retires, flags: [] }
  if (rules.requiredOnlyAtStakes) {
    throw refusal([
      { path: 'body.at', message: 'This specification takes required tests at drawn stakes only, and none stands here. Go to a stake, or record it as a judgement test.' },
    ])
  }
  return { retires, flags: [{ code: 'off-stake', message: 'A required test that is not at a drawn stake.' }] }
}

async function refuseWrongStake(manager: EntityManager, siteId: string, stakeId: string, lotId: string | undefined): Promise<void> {
  const stake = await manager.findOneBy(StakeEntity, { siteId, id: stakeId, retiredAt: IsNull() })
  if (stake && stake.lotId === lotId) return
  const message = stake ? `Stake ${stake.label} belongs to another lot than this place.` : 'That stake does not stand any more.'
  throw refusal([{ path: 'body.stakeId', message: `${message} Choose another stake, or none.` }])
}
