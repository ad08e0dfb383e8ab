import { useState } from 'react'
import { toast } from 'sonner'
import type { Lot } from '#shared/schemas/lot.ts'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { stakesToDraw } from '#web/data/lot/stakes-to-draw.ts'
import { useDrawStakes } from '#web/data/stake/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GroupRow, ShowButton } from './group-row.tsx'

function DrawStakesButton({ lot }: { lot: Lot }) {
  const { site } = useSite()
  const draw = useDrawStakes(site.id)
  const [id, setId] = useState(() => crypto.randomUUID())
  const handleDraw = (): void =>
    draw.mutate(
      { id, lotId: lot.id },
      {
        onSuccess: ({ stakes }) => {
          setId(crypto.randomUUID())
          toast(`Drawn for ${lot.name}: ${stakes.map((stake) => stake.label).join(', ')}`)
        },
      },
    )
  return (
    <button type="button" disabled={draw.isPending} aria-label={`Draw stakes for ${lot.name}`} onClick={handleDraw}>
      {draw.isPending ? 'Drawing' : 'Draw stakes'}
    </button>
  )
}

/** Lots that owe tests, with stakes to draw where they have too few. */
export function LotsShortSection({ lots }: { lots: readonly Lot[] }) {
  const { units, can } = useSite()
  if (lots.length === 0) return null
  return (
    <PanelSection title="Lots short of tests">
      <PanelRows label="Lots short of tests">
        {lots.map((lot) => (
          <GroupRow
            key={lot.id}
            mark={<StateSwatch state="awaiting-test" />}
            title={lot.name}
            detail={`owes ${lot.owed} of ${lot.required}${stakesToDraw(lot) === 0 ? ', staked' : ''}; ${units.volume(lot.volumeCm3 - lot.spokenCm3)} not spoken for`}
            action={<ShowButton cells={lot.cells} of={lot.name} />}
            acts={stakesToDraw(lot) > 0 && can('stake.draw') ? <DrawStakesButton lot={lot} /> : undefined}
          />
        ))}
      </PanelRows>
    </PanelSection>
  )
}
