import { Link } from 'react-router-dom'
import { ROLE_LABELS } from '#shared/policies/role.ts'
import type { SiteListItem } from '#shared/schemas/site.ts'
import { formatEarthVolume, formatNumber, formatSiteArea } from '#shared/units/format.ts'
import { paths } from '#web/app/paths.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useGround } from '#web/lib/use-ground.ts'
import { SitePlan } from './site-plan.tsx'

type FactProps = { label: string; value: string; of: string; tone?: 'bad' | undefined }

function SiteFact({ label, value, of, tone }: FactProps) {
  return (
    <div className="min-w-0 border-l border-rule pl-3">
      <dt className="cap">{label}</dt>
      <dd className="m-0 mt-1">
        <span className={classNames('text-value font-semibold whitespace-nowrap', tone === 'bad' && 'text-bad')}>{value}</span>
        <span className="block text-small text-ink-2">{of}</span>
      </dd>
    </div>
  )
}

const counted = (count: number, one: string, many: string): string => `${formatNumber(count, 0)} ${count === 1 ? one : many}`

/** One site: what it is, how it looks now, what is short. Opens its Ground. */
export function SiteRow({ site }: { site: SiteListItem }) {
  const { id, name, subtitle, role, unitSystem, areaMm2, columns, rows } = site
  const ground = useGround(id)
  const totals = ground.totals ?? site.totals
  return (
    <li className="relative border-b border-rule-2 hover:bg-film">
      <div className="grid items-center gap-x-7 gap-y-4 py-5 sm:grid-cols-[168px_minmax(0,1fr)] lg:grid-cols-[168px_minmax(0,1fr)_minmax(0,500px)]">
        <SitePlan siteId={id} columns={columns} rows={rows} />
        <div className="min-w-0">
          <h2 className="m-0 text-head font-bold">
            {/* the link covers the row, so that a touch anywhere opens the site */}
            <Link to={paths.ground(id)} className="text-ink no-underline after:absolute after:inset-0">
              {name}
            </Link>
          </h2>
          <p className="m-0 mt-1 text-ink-2">{[subtitle, formatSiteArea(areaMm2, unitSystem)].filter((words) => words !== '').join(' · ')}</p>
          <p className="m-0 mt-1 text-small text-ink-2">You are here as {ROLE_LABELS[role].toLowerCase().replace('qc', 'QC')}</p>
        </div>
        <dl className="m-0 grid grid-cols-3 gap-x-3 sm:col-span-2 lg:col-span-1">
          <SiteFact label="Tests owed" value={formatNumber(totals.testsOwed, 0)} of={`of ${formatNumber(totals.testsRequired, 0)} required`} />
          <SiteFact
            label="In rework"
            value={counted(totals.cellsInRework, 'cell', 'cells')}
            of={counted(totals.openOrders, 'open order', 'open orders')}
            tone={totals.cellsInRework > 0 ? 'bad' : undefined}
          />
          <SiteFact label="Ready for fill" value={formatEarthVolume(totals.readyCm3, unitSystem)} of={counted(totals.readyCells, 'cell', 'cells')} />
        </dl>
      </div>
    </li>
  )
}
