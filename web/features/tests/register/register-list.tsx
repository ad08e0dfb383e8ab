import { Link } from 'react-router-dom'
import type { RegisterTest } from '#shared/schemas/test-register.ts'
import { paths } from '#web/app/paths.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { ResultCell } from './result-cell.tsx'

/** The register on a phone: a few lines a test. */
export function RegisterList({ tests }: { tests: readonly RegisterTest[] }) {
  const { site, units, label, zone } = useSite()
  return (
    <ul aria-label="Field tests" className="m-0 list-none border-t border-ink p-0 md:hidden">
      {tests.map((test) => (
        <li key={test.id}>
          <Link to={paths.test(site.id, test.id)} className="block min-h-12 border-b border-rule py-[9px] text-ink no-underline">
            <span className="flex items-center justify-between gap-2">
              <b className="font-semibold">{test.number}</b>
              <ResultCell test={test} />
            </span>
            <span className="block text-small text-ink-2">
              {label(test.cell)}, {zone(test.zoneId)?.shortName} lift {test.lift}, {units.percent(test.rc)}
              {test.rcLimit !== null && ` of ${test.rcLimit}\u2009%`}, {units.deviation(test.moistureDeviation)} from opt.
            </span>
            <span className="block text-small text-ink-2">
              {units.dateTime(test.sampledAt)}, {test.recordedBy.name}
            </span>
            {test.flags.length > 0 && <span className="block text-small text-warn">{test.flags.map((flag) => flag.message).join(' ')}</span>}
          </Link>
        </li>
      ))}
    </ul>
  )
}
