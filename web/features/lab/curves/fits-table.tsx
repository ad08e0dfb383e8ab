import { saturation } from '#shared/domain/phase-relations.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'
import type { CurveUse } from '#shared/schemas/lab.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { FIT_WORDS } from '#web/features/lab/lab-words.ts'

const USES: readonly CurveUse[] = ['spline', 'quadratic', 'cubic', 'reported']

type FitsTableProps = { fits: Readonly<Record<'spline' | 'quadratic' | 'cubic', MaximumPair | null>>; gs: number; reported: MaximumPair | null; inUse: CurveUse | null }

/** The pairs the fits give, side by side, with the saturation of each peak; the one in use is marked in words. */
export function FitsTable({ fits, gs, reported, inUse }: FitsTableProps) {
  const { site, units } = useSite()
  const saturated = ({ maxDryDensity, optimumMoisture }: MaximumPair): string => {
    const result = saturation(maxDryDensity, optimumMoisture, gs, site.waterDensity)
    return result.ok ? units.number(result.value, 0) : '–'
  }
  const pairs: Readonly<Record<CurveUse, MaximumPair | null>> = { ...fits, reported }
  return (
    <Table caption="Fits compared" className="mt-4">
      <thead>
        <tr>
          <HeadCell className="pl-0">Fit</HeadCell>
          <HeadCell numeric>Max dry, {units.marks.density}</HeadCell>
          <HeadCell numeric>Optimum, %</HeadCell>
          <HeadCell numeric>Saturation, %</HeadCell>
        </tr>
      </thead>
      <tbody>
        {USES.filter((use) => use !== 'reported' || reported !== null).map((use) => {
          const pair = pairs[use]
          return (
            <Row key={use} selected={use === inUse}>
              <RowHead className="pl-0">
                {FIT_WORDS[use]}
                {use === inUse && <span className="font-medium text-ink-2">, this pair</span>}
              </RowHead>
              <Cell numeric>{pair === null ? 'no maximum' : units.densityNumber(pair.maxDryDensity)}</Cell>
              <Cell numeric>{pair === null ? '–' : units.number(pair.optimumMoisture, 1)}</Cell>
              <Cell numeric>{pair === null ? '–' : saturated(pair)}</Cell>
            </Row>
          )
        })}
      </tbody>
    </Table>
  )
}

/** What is worth knowing before a pair is confirmed. */
export function FitWarnings({ warnings }: { warnings: readonly { readonly code: string; readonly message: string }[] }) {
  if (warnings.length === 0) return null
  return (
    <ul aria-label="Worth knowing" className="mt-3 mb-0 list-none border-l-[5px] border-warn bg-film px-4 pt-[11px] pb-[9px] text-warn">
      {warnings.map(({ code, message }) => (
        <li key={code} className="font-medium">
          {message}
        </li>
      ))}
    </ul>
  )
}
