import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { CurveOff } from '#shared/domain/family-of-curves.ts'
import type { Reason } from '#shared/domain/result.ts'
import { formatPercent, formatUnitWeight } from '#shared/units/format.ts'
import type { UnitSystem } from '#shared/units/format.ts'

const CODE = 'one-point-off'

interface Finding {
  /** the check's */
  readonly number: string
  readonly curve: string
  readonly off: CurveOff
  readonly unitSystem: UnitSystem
}

/** Advice on a test: its curve is off by a one-point check. The verdict stands. */
export async function flagTest(write: SiteWrite, test: FieldTestEntity, { number, curve, off, unitSystem }: Finding): Promise<void> {
  const by = (value: number, text: string, more: string, less: string) => `${text} too ${value > 0 ? more : less}`
  const maximum = by(off.dryDensity, formatUnitWeight(Math.abs(off.dryDensity), unitSystem), 'high', 'low')
  const optimum = by(off.moisture, formatPercent(Math.abs(off.moisture)), 'wet', 'dry')
  const flag: Reason = { code: CODE, message: `One-point check ${number}: the maximum of ${curve} is ${maximum}, its optimum ${optimum} for this soil. Check the curve.` }
  await store(write, test, [...test.flags, flag])
}

/** Takes the advice of a voided check off its test. */
export async function unflagTest(write: SiteWrite, testId: string, number: string): Promise<void> {
  const test = await write.manager.findOneByOrFail(FieldTestEntity, { siteId: write.siteId, id: testId })
  const flags = test.flags.filter((flag) => flag.code !== CODE || !flag.message.includes(` ${number}:`))
  if (flags.length < test.flags.length) await store(write, test, flags)
}

async function store({ manager, siteId, now, changed }: SiteWrite, { id }: FieldTestEntity, flags: readonly Reason[]): Promise<void> {
  await manager.update(FieldTestEntity, { siteId, id }, { flags: flags as never, updatedAt: now })
  changed('test', id)
}
