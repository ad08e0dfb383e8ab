import { correctForOversize, oversizeSieve, OVERSIZE_THRESHOLD } from '#shared/domain/oversize.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { sieveWords } from '#web/features/lab/lab-words.ts'
import { useSite } from '#web/lib/site-context.tsx'

const STEP = 5

/** What the reference becomes with the stones of a test, share by share, as far as D4718 corrects. */
export function OversizePairs({ curve }: { curve: Curve }) {
  const { site, units } = useSite()
  const { pair, coarse, gs, method, procedure } = curve
  if (pair === null || coarse === null) return null
  const stones = { ...coarse, sieve: oversizeSieve(method, procedure) }
  const rows = Array.from({ length: 100 / STEP }, (_, i) => (i + 1) * STEP).flatMap((share) => {
    const corrected = correctForOversize({ ...pair, gs }, share, stones, { waterDensity: site.waterDensity })
    return corrected.ok ? [{ share, reference: corrected.value }] : []
  })
  const last = rows[rows.length - 1]
  return (
    <details className="mb-4">
      <summary className="min-h-9 cursor-pointer py-1 font-semibold pointer-coarse:min-h-11">With stones, corrected by D4718 to {last?.share ?? 0} % of them</summary>
      <Table caption="Reference by share of stones">
        <thead>
          <tr>
            <HeadCell className="pl-0">Kept on the {sieveWords(method, procedure)}</HeadCell>
            <HeadCell numeric>Max dry, {units.marks.density}</HeadCell>
            <HeadCell numeric>Optimum, %</HeadCell>
            <HeadCell numeric>Combined Gs</HeadCell>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ share, reference }) => (
            <Row key={share}>
              <RowHead className="num pl-0">{share} %</RowHead>
              <Cell numeric>{units.densityNumber(reference.maxDryDensity)}</Cell>
              <Cell numeric>{units.number(reference.optimumMoisture, 1)}</Cell>
              <Cell numeric>{units.number(reference.gs, 3)}</Cell>
            </Row>
          ))}
        </tbody>
      </Table>
      <p className="mt-2 mb-0 text-small text-ink-2">Below {OVERSIZE_THRESHOLD} % the reference is used as it is. Beyond {last?.share ?? 0} % the correction is outside the standard and a test is refused.</p>
    </details>
  )
}
