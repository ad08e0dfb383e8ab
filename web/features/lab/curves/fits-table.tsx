import type { MaximumPair } from '#shared/domain/reference-curve.ts'
import type { Curve, CurveUse } from '#shared/schemas/lab.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useUnits } from '#web/lib/site-context.tsx'
import { FIT_WORDS } from '#web/features/lab/lab-words.ts'

const USES: readonly CurveUse[] = ['spline', 'quadratic', 'cubic', 'reported']

/** The pairs the fits give, side by side; the one in use is marked in words. */
export function FitsTable({ fits, reported, inUse }: { fits: Readonly<Record<'spline' | 'quadratic' | 'cubic', MaximumPair | null>>; reported: Curve['reported']; inUse: CurveUse | null }) {
  const units = useUnits()
  const pairs: Readonly<Record<CurveUse, MaximumPair | null>> = { ...fits, reported }
  return (
    <Table caption="Fits compared" className="mt-4">
      <thead>
        <tr>
          <HeadCell>Fit</HeadCell>
          <HeadCell numeric>Max dry, {units.marks.density}</HeadCell>
          <HeadCell numeric>Optimum moisture, %</HeadCell>
          <HeadCell>Use</HeadCell>
        </tr>
      </thead>
      <tbody>
        {USES.filter((use) => use !== 'reported' || reported !== null).map((use) => {
          const pair = pairs[use]
          return (
            <Row key={use} selected={use === inUse}>
              <RowHead>{FIT_WORDS[use]}</RowHead>
              <Cell numeric>{pair === null ? 'no maximum' : units.densityNumber(pair.maxDryDensity)}</Cell>
              <Cell numeric>{pair === null ? '–' : units.number(pair.optimumMoisture, 1)}</Cell>
              <Cell>{use === inUse ? 'this pair' : ''}</Cell>
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
