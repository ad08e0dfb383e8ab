import { useMemo, useState } from 'react'
import { flushSync } from 'react-dom'
import { useTotals } from '#web/data/board/use-totals.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useGround } from '#web/lib/use-ground.ts'
import { KeysHelp } from './keys-help.tsx'
import { GroundPanel } from './panel/ground-panel.tsx'
import { useBoard } from './panel/use-panel-data.ts'
import { SURFACE_CUT } from './plan/ground-address.ts'
import { choosesCells } from './plan/ground-task.ts'
import { GroundViewProvider, useGroundView, type GroundView } from './plan/ground-view.tsx'
import { LiftRail, chooseScale } from './rail/lift-rail.tsx'
import { bandAt, railScales, stepCut, type RailScale } from './rail/rail-scale.ts'
import { SheetFrame } from './sheet/sheet-frame.tsx'
import { TitleBlock } from './sheet/title-block.tsx'
import { titleFacts } from './sheet/title-facts.ts'
import { useGroundKeys, type GroundKey } from './use-ground-keys.ts'

/** What each key does with the view. */
function pressKey(key: GroundKey, view: GroundView, scale: RailScale | undefined, help: () => void): void {
  const { address, go, task, end, chosen, choose, shown, show } = view
  switch (key) {
    case 'cut-up':
      return go({ cut: stepCut(scale, address.cut, 1) }, 'replace')
    case 'cut-down':
      return go({ cut: stepCut(scale, address.cut, -1) }, 'replace')
    case 'list':
      return go({ list: !address.list })
    case 'help':
      return help()
    case 'toggle':
      if (address.cell === undefined || !choosesCells(task)) return
      return choose(chosen.includes(address.cell) ? chosen.filter((cell) => cell !== address.cell) : [...chosen, address.cell].sort((a, b) => a - b))
    case 'open':
      flushSync(() => view.openPanel(true))
      return document.getElementById('cell-heading')?.focus()
    case 'leave':
      if (task !== null) return end()
      if (chosen.length > 0) return choose([])
      if (shown.length > 0) return show(shown)
      if (address.cell !== undefined) go({ cell: undefined }, 'replace')
  }
}

function GroundLayout() {
  const { site, units, zoneOfCell } = useSite()
  const view = useGroundView()
  const { address, go, task } = view
  const [help, setHelp] = useState(false)
  const [ruler, setRuler] = useState<string | null>(null)
  const board = useBoard().data
  const totals = useTotals(site.id)
  // fill goes on the working surface, whatever lift was looked at before
  const cut = task?.kind === 'place' ? SURFACE_CUT : address.cut
  const ground = useGround(site.id, cut)
  const surface = useGround(site.id).sheet
  const zone = address.cell === undefined ? undefined : zoneOfCell(address.cell)
  const scales = useMemo(() => railScales(site.zones, board?.lifts ?? []), [site.zones, board?.lifts])
  const scale = chooseScale(scales, ruler, zone?.id)
  const lift = bandAt(scale, cut)?.lift
  useGroundKeys((key) => pressKey(key, view, scale, () => setHelp(true)))

  const showing = cut.kind === 'surface' ? 'working surface' : `${lift === undefined ? 'cut' : `lift ${lift}, cut`} at ${units.elevation(cut.um)}`
  const facts = titleFacts({ site, units, cut, lift, chosen: zone, totals })
  return (
    <div className="relative flex min-h-0 flex-1 flex-col max-lg:pb-12 lg:grid lg:grid-cols-[118px_minmax(0,1fr)_384px] lg:grid-rows-[minmax(0,1fr)_auto]">
      <h1 className="sr-only">Ground</h1>
      <LiftRail scales={scales} scale={scale} cut={cut} onScale={setRuler} onCut={(next) => go({ cut: next })} />
      <div className="relative min-h-0 min-w-0 flex-1 overflow-hidden bg-sheet">
        <SheetFrame ground={ground} showing={showing} />
      </div>
      <div className="min-w-0 lg:col-span-2">
        <TitleBlock facts={facts} />
      </div>
      <GroundPanel surface={surface} />
      <KeysHelp open={help} onOpenChange={setHelp} />
    </div>
  )
}

/** The live sheet of the site: lift rail, map or list, the panel that answers the reader's question, the title block. */
export function GroundPage() {
  return (
    <GroundViewProvider>
      <GroundLayout />
    </GroundViewProvider>
  )
}
