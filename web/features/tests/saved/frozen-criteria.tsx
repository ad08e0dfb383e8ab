import { describeCriterion, readingOf } from '#shared/domain/limits.ts'
import type { Criterion } from '#shared/domain/limits.ts'
import { formatNumber, NO_VALUE } from '#shared/units/format.ts'
import { convertDensity, DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { SheetSection } from './sheet-section.tsx'

const UNROUNDED = 4

/** The value that a limit was compared with, before any rounding. */
function comparedWith(criterion: Criterion, { verdict, dryDensity }: Pick<TestDetail, 'verdict' | 'dryDensity'>): string {
  switch (criterion.kind) {
    case 'rc-min':
    case 'rc-min-steps':
    case 'rc-max':
      return `${formatNumber(verdict.rc, UNROUNDED)} %`
    case 'moisture-band':
      return `${formatNumber(verdict.moistureDeviation, UNROUNDED)} points`
    case 'saturation-min':
    case 'saturation-max':
      return verdict.saturation === null ? NO_VALUE : `${formatNumber(verdict.saturation, UNROUNDED)} %`
    case 'air-voids-max':
      return `${formatNumber(verdict.airVoids, UNROUNDED)} %`
    case 'dry-density-min':
      return `${formatNumber(convertDensity(dryDensity, 'kg/m3', criterion.unit), UNROUNDED)} ${DENSITY_UNIT_LABEL[criterion.unit]}`
  }
}

/** What the test was judged by, as it was frozen: each limit, how it is read, and the unrounded value. */
export function FrozenCriteria({ test }: { test: TestDetail }) {
  const { criteria, rounding } = test.verdict.against
  const method = rounding.method === 'absolute' ? 'compared exactly (E29 absolute)' : `rounded to the limit’s last place (E29), ties ${rounding.ties === 'even' ? 'to even' : 'up'}`
  return (
    <SheetSection title="Judged by" aside={method}>
      <ul className="m-0 list-none p-0">
        {criteria.map((criterion) => (
          <li key={describeCriterion(criterion)} className="grid grid-cols-[1fr_auto] gap-x-3 border-b border-rule py-[6px]">
            <span>{describeCriterion(criterion)}</span>
            <span className="num text-right">{comparedWith(criterion, test)}</span>
            <span className="text-small text-ink-2">{readingOf(criterion, rounding)}</span>
            <span className="text-right text-small text-ink-2">unrounded</span>
          </li>
        ))}
      </ul>
    </SheetSection>
  )
}
