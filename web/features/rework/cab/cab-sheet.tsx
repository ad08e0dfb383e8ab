import { useQuery } from '@tanstack/react-query'
import { Tabs } from 'radix-ui'
import { useState } from 'react'
import type { SessionUser } from '#shared/schemas/session.ts'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { boardQueries } from '#web/data/board/queries.ts'
import { orderQueries } from '#web/data/order/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useThemeChoice } from '#web/lib/theme.ts'
import { useGround } from '#web/lib/use-ground.ts'
import { ReworkNotRead } from '#web/features/rework/rework-not-read.tsx'
import { CabOrder } from './cab-order.tsx'
import { KeepOffList, ReadyList, keepOffGroups } from './cab-lists.tsx'
import { KeptBanner } from './kept-banner.tsx'
import { myOrders, withKept } from './my-orders.ts'
import { useKeptSteps } from './use-kept-steps.ts'

const TAB =
  'min-h-12 border-b-3 border-transparent pt-2 text-[15px] font-semibold whitespace-nowrap text-ink-2 -outline-offset-3 data-[state=active]:border-rework data-[state=active]:text-ink'

/** The machine operator's own sheet: one hand, gloves, sun or night. Dark unless the person chose light. */
export function CabSheet({ user, openId }: { user: SessionUser; openId?: string | undefined }) {
  const { site, units } = useSite()
  const theme = useThemeChoice() === 'light' ? 'light' : 'dark'
  const ground = useGround(site.id)
  const orders = useQuery(orderQueries.list(site.id))
  const board = useQuery(boardQueries.detail(site.id))
  const now = useSiteClock(site.id)
  const kept = useKeptSteps(site.id, user.id, ground.status === 'live')
  const [tab, setTab] = useState('mine')
  const [chosen, setChosen] = useState(openId)

  const standing = withKept(orders.data ?? [], kept.steps)
  const mine = myOrders(standing, user.name)
  const open = mine.find((order) => order.id === chosen) ?? mine[0]
  const keepOff = board.data === undefined ? [] : keepOffGroups(board.data, new Set(mine.map((order) => order.id)))
  const ready = board.data?.ready ?? []
  const title = tab === 'mine' && open !== undefined ? `Rework ${open.number}` : 'Rework'
  usePageTitle(title)
  const liveWords = ground.status === 'offline' && ground.offlineSince !== null ? `No signal since ${units.time(ground.offlineSince)}` : ground.asOf === null ? 'Catching up' : `Live, ${units.time(ground.asOf)}`

  return (
    <div data-theme={theme} className="flex min-h-0 flex-1 flex-col bg-film text-ink">
      <div className="mx-auto flex min-h-0 w-full max-w-[480px] flex-1 flex-col sm:border-x sm:border-rule">
        <div className="flex items-center justify-between gap-3 px-[18px] pt-4 pb-1">
          <h1 className="m-0 text-[17px] font-bold">{title}</h1>
          <span className="text-[13px] font-medium text-ink-2">{liveWords}</span>
        </div>
        <KeptBanner steps={kept.steps} sending={kept.sending} signInNeeded={kept.signInNeeded} onPutAway={kept.putAway} />
        <Tabs.Root value={tab} onValueChange={setTab} className="flex min-h-0 flex-1 flex-col">
          <Tabs.List aria-label="Rework" className="mx-[18px] flex gap-[22px] overflow-x-auto border-b border-rule">
            <Tabs.Trigger value="mine" className={TAB}>
              My rework {mine.length}
            </Tabs.Trigger>
            <Tabs.Trigger value="keep-off" className={TAB}>
              Keep off {keepOff.length}
            </Tabs.Trigger>
            <Tabs.Trigger value="ready" className={TAB}>
              Ready {ready.length}
            </Tabs.Trigger>
          </Tabs.List>
          <Tabs.Content value="mine" className="flex min-h-0 flex-1 flex-col outline-none">
            {orders.data === undefined ? (
              <div className="p-[18px]">{orders.error === null ? <Skeleton label="Your orders are on their way" /> : <ReworkNotRead error={orders.error} retry={() => void orders.refetch()} />}</div>
            ) : open === undefined ? (
              <div className="px-[18px] pt-6">
                <p className="m-0 text-[31px] leading-[1.08] font-extrabold">No rework for you now.</p>
                <p className="mt-2 text-[16px] text-ink-2">A new order shows here by itself. Ask the superintendent where to go.</p>
              </div>
            ) : (
              <CabOrder key={`${open.id} ${open.state}`} order={open} others={mine.filter((order) => order !== open)} sheet={ground.sheet} onOpen={setChosen} onStep={kept.take} now={now} />
            )}
          </Tabs.Content>
          <Tabs.Content value="keep-off" className="min-h-0 flex-1 overflow-y-auto px-[18px] outline-none">
            <KeepOffList groups={keepOff} />
          </Tabs.Content>
          <Tabs.Content value="ready" className="min-h-0 flex-1 overflow-y-auto px-[18px] outline-none">
            <ReadyList groups={ready} />
          </Tabs.Content>
        </Tabs.Root>
      </div>
    </div>
  )
}
