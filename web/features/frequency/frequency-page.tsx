import { useQuery } from '@tanstack/react-query'
import { useCallback, useMemo, useState } from 'react'
import { Link, useSearchParams } from 'react-router-dom'
import type { Lot } from '#shared/schemas/lot.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { SelectField } from '#web/components/ui/text-fields.tsx'
import { boardQueries } from '#web/data/board/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { orderQueries } from '#web/data/order/queries.ts'
import { stakeQueries } from '#web/data/stake/queries.ts'
import { isApiError } from '#web/lib/api-error.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { oneTestVolume } from './frequency-rule-words.ts'
import { GoHereNext } from './go-here-next.tsx'
import { LotDialog } from './lot-dialog.tsx'
import { LotRegister } from './lot-register.tsx'
import { FILTER_WORDS, fitsStanding, STANDING_FILTERS, type StandingFilter } from './lot-words.ts'
import { TotalsTable } from './totals-table.tsx'
import { VolumeChart } from './volume-chart.tsx'

const NO_ORDERS: readonly Order[] = []

function groupByLot(orders: readonly Order[]): ReadonlyMap<string, readonly Order[]> {
  const groups = new Map<string, Order[]>()
  for (const order of orders) {
    if (order.lotId === null || order.closedAt !== null) continue
    groups.set(order.lotId, [...(groups.get(order.lotId) ?? []), order])
  }
  return groups
}

/** Volume placed against volume spoken for, where to test next, and every lot with what it owes. */
export function FrequencyPage() {
  const { site, can, zone, units } = useSite()
  const [search, setSearch] = useSearchParams()
  const [openId, setOpenId] = useState<string | null>(null)
  const zoneId = zone(search.get('zone') ?? '')?.id
  const standing = STANDING_FILTERS.find((filter) => filter === search.get('standing')) ?? 'all'
  const lots = useQuery(lotQueries.list(site.id))
  const series = useQuery(lotQueries.series(site.id, zoneId === undefined ? {} : { zoneId }))
  const { data: board } = useQuery(boardQueries.detail(site.id))
  const { data: stakes = [] } = useQuery(stakeQueries.list(site.id))
  const { data: orders = NO_ORDERS } = useQuery(orderQueries.list(site.id))
  const ordersOf = useMemo(() => groupByLot(orders), [orders])
  const inZone = useMemo(() => (lots.data ?? []).filter((lot) => zoneId === undefined || lot.zoneId === zoneId), [lots.data, zoneId])
  const shown = useMemo(() => inZone.filter((lot) => fitsStanding(lot, standing)).sort((a, b) => b.seq - a.seq), [inZone, standing])
  const open = lots.data?.find((lot) => lot.id === openId)
  const handleOpen = useCallback((lot: Lot) => setOpenId(lot.id), [])
  const choose = (name: 'zone' | 'standing', value: string) =>
    setSearch(
      (now) => {
        if (value === '' || value === 'all') now.delete(name)
        else now.set(name, value)
        return now
      },
      { replace: true },
    )

  const zones = zoneId === undefined ? site.zones : site.zones.filter(({ id }) => id === zoneId)
  const perTest = oneTestVolume(zones, units)
  const placed = (series.data?.length ?? 0) > 0
  const failed = lots.error ?? series.error
  return (
    <div className="min-h-0 flex-1 overflow-y-auto bg-raised">
      {failed !== null && (
        <Banner tone="bad" title={isApiError(failed) ? failed.message : 'The lots could not be read.'} action={<button type="button" onClick={() => void Promise.all([lots.refetch(), series.refetch()])}>Try again</button>}>
          {lots.data !== undefined && 'What stands here was read before.'}
        </Banner>
      )}
      <div className="grid border-b border-rule-2 lg:grid-cols-[minmax(0,1fr)_384px]">
        <section aria-label="Volume placed and volume spoken for" className="min-w-0 px-4 py-[22px] sm:px-[26px]">
          <h1 className="m-0 mb-2 text-[19px] leading-[1.25] font-bold">
            Volume placed and volume spoken for{' '}
            <small className="ml-2 text-[13.5px] font-medium text-ink-2 max-sm:ml-0 max-sm:block">
              {zoneId === undefined ? 'all zones' : zone(zoneId)?.name}, compacted {units.marks.volume}
              {perTest !== null && `, one test speaks for ${perTest}`}
            </small>
          </h1>
          {series.data === undefined ? (
            failed === null && <Skeleton label="The volumes are on their way" lines={[90, 80, 70, 60, 50]} />
          ) : placed ? (
            <VolumeChart days={series.data} />
          ) : (
            <EmptyState title="Nothing is placed yet" action={<Link to={paths.ground(site.id)} className={buttonClasses('plain')}>To the Ground</Link>}>
              Place fill on the Ground. Its lots, and the tests they need, stand here from then on.
            </EmptyState>
          )}
        </section>
        <div className="border-rule-2 max-lg:border-t lg:border-l">
          <GoHereNext stakes={stakes} doubtful={board?.doubtful ?? []} owed={board?.totals.testsOwed ?? 0} />
        </div>
      </div>
      {lots.data === undefined ? (
        failed === null && (
          <div className="p-[26px]">
            <Skeleton label="The lots are on their way" lines={[96, 92, 95, 90]} />
          </div>
        )
      ) : (
        lots.data.length > 0 && (
          <>
            <div className="flex flex-wrap items-end gap-3 px-4 pt-4 pb-3 sm:px-[26px]">
              <SelectField label="Zone" className="w-48" value={zoneId ?? ''} onChange={(event) => choose('zone', event.target.value)}>
                <option value="">All zones</option>
                {site.zones.map(({ id, name }) => (
                  <option key={id} value={id}>
                    {name}
                  </option>
                ))}
              </SelectField>
              <SelectField label="Standing" className="w-56" value={standing} onChange={(event) => choose('standing', event.target.value)}>
                {STANDING_FILTERS.map((filter: StandingFilter) => (
                  <option key={filter} value={filter}>
                    {FILTER_WORDS[filter]}
                  </option>
                ))}
              </SelectField>
              <span role="status" className="pb-2 text-ink-2">
                {shown.length} of {lots.data.length} lots
              </span>
            </div>
            {shown.length === 0 ? (
              <p className="m-0 border-t border-rule px-4 py-5 text-ink-2 sm:px-[26px]">No lot stands like this now.</p>
            ) : (
              <LotRegister
                key={`${zoneId ?? ''} ${standing}`}
                lots={shown}
                ordersOf={ordersOf}
                blockHead={perTest === null ? 'Each block is one test’s volume' : `Each block is one test’s ${perTest}`}
                units={units}
                mayDraw={can('stake.draw')}
                onOpen={handleOpen}
              />
            )}
            <h2 className="m-0 px-4 pt-7 pb-2 text-head font-bold sm:px-[26px]">Totals by zone and material</h2>
            <TotalsTable lots={inZone} />
          </>
        )
      )}
      {open !== undefined && <LotDialog lot={open} orders={ordersOf.get(open.id) ?? NO_ORDERS} stakes={stakes.filter((stake) => stake.lotId === open.id)} onClose={() => setOpenId(null)} />}
    </div>
  )
}
