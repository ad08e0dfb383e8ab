import type { Deps } from '#api/deps.ts'
import { attachFile } from '#api/features/attachments/attachments.service.ts'
import { listCurves } from '#api/features/lab/curves.queries.ts'
import type { Role } from '#shared/policies/role.ts'
import type { CreateAttachment } from '#shared/schemas/attachment.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import { drawPdf, drawPicture } from '#seed/demo/demo-pictures.ts'
import { createChance } from '#seed/demo/demo-random.ts'

interface Files {
  readonly deps: Deps
  readonly siteId: string
  readonly people: DemoIds
}

interface TestRow {
  readonly id: string
  readonly number: string
  readonly purpose: string
  readonly outcome: string
  readonly method: string
  readonly lift: number
  readonly sampled_at: Date
}

/** The last of these tests, each with its pictures. */
const PICTURED = { fail: 2, suspect: 1, pass: 3, verification: 1 } as const

/** Sketches at some of the last tests and the laboratory's sheet of each curve, added as people add them. */
export async function attachDemoFiles({ deps, siteId, people }: Files): Promise<void> {
  if (!deps.objects.configured) {
    deps.logger.warn('The demo has no photos and documents: there is no store for files (S3_ENDPOINT is not set)')
    return
  }
  const chance = createChance('demo files')
  const attach = async (role: Role, input: Omit<CreateAttachment, 'id'>, file: { bytes: Buffer; name: string }): Promise<void> => {
    await attachFile(deps, { siteId, userId: people[role], input: { ...input, id: chance.id() }, file })
  }
  const curves = await listCurves(deps.dataSource.manager, siteId)
  for (const { id, code, materialName, method, procedure, points } of curves.filter((curve) => curve.testsJudged > 0)) {
    const rows = points.map(({ moisture, dryDensity }) => `${moisture.toFixed(1)} %     ${convertDensity(dryDensity, 'kg/m3', 'pcf').toFixed(1)} pcf`)
    const bytes = drawPdf([`Compaction test ${code}, ${materialName}`, `${method} method ${procedure}`, 'Demonstration sheet of an invented laboratory', '', 'moisture    dry unit weight', ...rows])
    await attach('technician', { subject: 'curve', subjectId: id, caption: `Laboratory sheet of ${code}` }, { bytes, name: `${code}-report.pdf` })
  }
  for (const test of await picturedTests(deps, siteId)) {
    const role = test.purpose === 'verification' ? 'owner-rep' : 'technician'
    for (const [scene, caption] of scenesOf(test)) {
      const bytes = await drawPicture({ scene, board: [test.number, `Lift ${test.lift}`], takenAt: test.sampled_at })
      await attach(role, { subject: 'test', subjectId: test.id, caption }, { bytes, name: `${test.number}-${scene}.jpg` })
    }
  }
}

type Shot = readonly [Parameters<typeof drawPicture>[0]['scene'], string]

const DEVICES: Readonly<Record<string, Shot>> = {
  'nuclear-gauge': ['gauge', 'Gauge at the stake, lead in view'],
  'sand-cone': ['cone', 'Cone on the plate, hole dug to depth'],
}

function scenesOf({ method, outcome }: TestRow): Shot[] {
  const place = ['stake', 'Stake and number board, looking north'] as const
  const device = DEVICES[method] ?? place
  if (outcome === 'fail') return [device, ['crumbs', 'Dry and crumbling beside the hole']]
  return outcome === 'suspect' || device === place ? [device] : [device, place]
}

async function picturedTests({ dataSource }: Deps, siteId: string): Promise<TestRow[]> {
  const tests: TestRow[] = await dataSource.query(
    'SELECT `id`, `number`, `purpose`, `outcome`, `method`, `lift`, `sampled_at` FROM `field_test` WHERE `site_id` = ? AND `voided_at` IS NULL ORDER BY `seq` DESC',
    [siteId],
  )
  const own = (outcome: 'fail' | 'suspect' | 'pass') => tests.filter((test) => test.purpose === 'required' && test.outcome === outcome).slice(0, PICTURED[outcome])
  const verification = tests.filter((test) => test.purpose === 'verification').slice(0, PICTURED.verification)
  return [...own('fail'), ...own('suspect'), ...own('pass'), ...verification].sort((a, b) => a.sampled_at.getTime() - b.sampled_at.getTime())
}
