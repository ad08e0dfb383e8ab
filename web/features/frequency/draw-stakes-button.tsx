import { useState } from 'react'
import { toast } from 'sonner'
import type { Lot } from '#shared/schemas/lot.ts'
import { useDrawStakes } from '#web/data/stake/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Draws, by chance, the places of the tests a lot owes. */
export function DrawStakesButton({ lot }: { lot: Lot }) {
  const { site } = useSite()
  const [id, setId] = useState(() => crypto.randomUUID())
  const draw = useDrawStakes(site.id)
  return (
    <button
      type="button"
      disabled={draw.isPending}
      aria-label={`Draw stakes for ${lot.name}`}
      onClick={() =>
        draw.mutate(
          { id, lotId: lot.id },
          {
            onSuccess: ({ stakes }) => {
              setId(crypto.randomUUID())
              toast(`Go to ${stakes.map((stake) => stake.label).join(', ')}.`)
            },
          },
        )
      }
      className="link-ink text-[13px] whitespace-nowrap disabled:opacity-40 pointer-coarse:min-h-11"
    >
      {draw.isPending ? 'Drawing' : 'Draw stakes'}
    </button>
  )
}
