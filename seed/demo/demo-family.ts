import type { Deps } from '#api/deps.ts'
import { approveCurve, createCurve } from '#api/features/lab/curves.service.ts'
import { recordOnePoint } from '#api/features/one-point/one-point.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'
import { createChance } from '#seed/demo/demo-random.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import { demoCurve } from '#seed/demo/demo-site.ts'

const MOULD_FT3 = 0.0333
const MOULD_G = 4_242

/** A denser and a lighter part of the ridge beside RB-3: three curves by one method make a family. */
const RIDGE_FAMILY = [
  { code: 'RB-1', gs: 2.68, method: 'D698', procedure: 'A', pcf: [[7.4, 115.2], [9.2, 120.4], [10.9, 122.3], [12.6, 120.1], [14.4, 115]] },
  { code: 'RB-2', gs: 2.68, method: 'D698', procedure: 'A', pcf: [[10.2, 106.8], [12.4, 111.1], [14.6, 112.9], [16.8, 110.9], [18.8, 106.4]] },
] as const

/** One specimen on RB-3, and one between it and the lighter curve, of the soil of the last test. */
const POINTS = [
  { pcf: 116.5, moisture: 11.2, hoursAgo: 26, atTest: false, remarks: '' },
  { pcf: 113.1, moisture: 12.1, hoursAgo: 1, atTest: true, remarks: 'Redder soil in the last loads' },
] as const

interface FamilyStage {
  readonly deps: Deps
  readonly people: DemoIds
  readonly siteId: string
}

export async function recordFamily({ deps, people, siteId }: FamilyStage, materialId: string, sampledAt: Date): Promise<void> {
  // chance of its own, so that the six weeks of work do not depend on it
  const own = createChance('Family of curves')
  const lead = { siteId, userId: people['qc-lead'] }
  for (const curve of RIDGE_FAMILY) {
    const { id } = await writeToSite(deps, { ...lead, verb: 'curve.record' }, (write) => createCurve(write, demoCurve(own, { ...curve, materialId, sampledAt })))
    await writeToSite(deps, { ...lead, verb: 'curve.approve' }, (write) => approveCurve(write, id, 'spline'))
  }
}

export async function checkFamily({ deps, people, siteId }: FamilyStage, curveId: string, now: Date): Promise<void> {
  const own = createChance('One-point checks')
  const [last]: { id: string }[] = await deps.dataSource.query("SELECT `id` FROM `field_test` WHERE `site_id` = ? AND `curve_id` = ? AND `outcome` = 'pass' ORDER BY `seq` DESC LIMIT 1", [siteId, curveId])
  for (const { pcf, moisture, hoursAgo, atTest, remarks } of POINTS) {
    const wet = convertDensity(pcf * (1 + moisture / 100), 'pcf', 'lb/yd3') / 27
    const soil = convertMass(wet * MOULD_FT3, 'lb', 'g')
    await writeToSite(deps, { siteId, userId: people.technician, verb: 'one-point.record' }, (write) =>
      recordOnePoint(write, {
        id: own.id(),
        curveId,
        method: 'D698',
        procedure: 'A',
        testId: atTest ? (last?.id ?? null) : null,
        sheet: { kind: 'mould', massUnit: 'g', mouldAndSoil: Math.round(MOULD_G + soil), mould: MOULD_G, mouldVolume: MOULD_FT3, volumeUnit: 'ft3', moisture: { method: 'stated', percent: moisture } },
        sampledAt: new Date(now.getTime() - hoursAgo * 3_600_000).toISOString(),
        remarks,
      }),
    )
  }
}
