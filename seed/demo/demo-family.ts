import type { Deps } from '#api/deps.ts'
import { approveCurve, createCurve } from '#api/features/lab/curves.service.ts'
import { recordOnePoint } from '#api/features/one-point/one-point.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { CreateCurve } from '#shared/schemas/lab.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'
import { createChance } from '#seed/demo/demo-random.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import { demoCurve } from '#seed/demo/demo-site.ts'

const MOULD_FT3 = 0.0333
const MOULD_G = 4_242

/** Mould and wet soil, then wet and dry soil with each of two tins and the tins, in grams. */
const RB_2_SPECIMENS = [
  [6_020, 161.84, 149.84, 31.24, 175.56, 162.07, 30.87],
  [6_128, 174, 158.31, 30.96, 169.65, 154.32, 31.52],
  [6_196, 156.73, 140.8, 31.08, 162.42, 145.55, 30.65],
  [6_199, 172.18, 151.94, 30.88, 168.65, 148.82, 31.37],
  [6_151, 164.73, 143.71, 31.41, 181.81, 157.89, 31.19],
] as const

const RB_2_ENTRY: CreateCurve['entry'] = {
  kind: 'masses',
  massUnit: 'g',
  mould: MOULD_G,
  volumeUnit: 'ft3',
  mouldVolume: MOULD_FT3,
  specimens: RB_2_SPECIMENS.map(([mouldAndSoil, wet1, dry1, tin1, wet2, dry2, tin2]) => ({
    mouldAndSoil,
    moisture: { massUnit: 'g', tins: [{ wetAndTin: wet1, dryAndTin: dry1, tin: tin1 }, { wetAndTin: wet2, dryAndTin: dry2, tin: tin2 }] },
  })),
}

/** A denser and a lighter part of the ridge beside RB-3: three curves by one method make a family. */
const RIDGE_FAMILY = [
  { code: 'RB-1', gs: 2.68, method: 'D698', procedure: 'A', pcf: [[7.4, 115.2], [9.2, 120.4], [10.9, 122.3], [12.6, 120.1], [14.4, 115]] },
  { code: 'RB-2', gs: 2.68, method: 'D698', procedure: 'A', entry: RB_2_ENTRY, apparatus: { edition: '2007', mould: '4-in', layers: 3, blows: 25, oversizePercent: 2 } },
] as const

/** Wet unit weights of a new stretch of the pit, pcf over percent: a draft that waits for the lead. */
const PIT_DRAFT = [[5.2, 127.9], [7.1, 134.6], [8.9, 138.4], [10.7, 138.6], [12.5, 135.3]] as const

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

export async function recordDraft({ deps, people, siteId }: FamilyStage, materialId: string, now: Date): Promise<void> {
  const entry: CreateCurve['entry'] = { kind: 'wet', densityUnit: 'pcf', specimens: PIT_DRAFT.map(([percent, density]) => ({ density, moisture: { percent } })) }
  const input = demoCurve(createChance('A draft of the pit'), {
    code: 'PR-2',
    materialId,
    method: 'D698',
    procedure: 'C',
    gs: 2.66,
    entry,
    apparatus: { edition: '2007', mould: '6-in', layers: 3, blows: 56, oversizePercent: 11 },
    coarse: { bulkGravity: 2.63, moisture: 1.4 },
    sampledAt: new Date(now.getTime() - 26 * 3_600_000),
  })
  await writeToSite(deps, { siteId, userId: people.technician, verb: 'curve.record' }, (write) => createCurve(write, input))
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
