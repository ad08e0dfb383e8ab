import { useState } from 'react'
import { toast } from 'sonner'
import { createOrderSchema, type CreateOrder } from '#shared/schemas/rework.ts'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useCreateOrder } from '#web/data/order/mutations.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CellsChoice } from './cells-choice.tsx'
import { TaskFrame } from './task-frame.tsx'

type Action = CreateOrder['actions'][number]

const ACTIONS: readonly { value: Action; label: string }[] = [
  { value: 'too-dry', label: 'Too dry' },
  { value: 'too-wet', label: 'Too wet' },
  { value: 'too-loose', label: 'Too loose' },
  { value: 'too-dense', label: 'Too dense' },
  { value: 'other', label: 'Something else' },
]

/** A rework order by hand, for ground that no failing test marked. */
export function ReworkOrder({ lift }: { lift: number }) {
  const { site } = useSite()
  const { plan, chosen, end } = useGroundView()
  const create = useCreateOrder(site.id, { saysOwnErrors: true })
  const [id] = useState(() => crypto.randomUUID())
  const [actions, setActions] = useState<readonly Action[]>([])
  const [remarks, setRemarks] = useState('')
  const zones = new Set(chosen.map((cell) => plan.zoneOf(cell)?.id))
  const [zoneId = ''] = zones
  const read = createOrderSchema.safeParse({ id, zoneId, lift, cells: [...chosen], actions: [...actions], remarks })
  const toggle = (action: Action): void => setActions((before) => (before.includes(action) ? before.filter((each) => each !== action) : [...before, action]))
  const handleSave = (): void => {
    if (!read.success) return
    create.mutate(read.data, {
      onSuccess: ({ number }) => {
        toast(`${number ?? 'Rework order'} issued`, { description: `${countOf(chosen.length, 'cell')} at ${liftWords(lift)}` })
        end()
      },
    })
  }
  return (
    <TaskFrame title={`Rework order, ${liftWords(lift)}`} act={create} saveLabel="Issue order" canSave={read.success && zones.size === 1} onSave={handleSave}>
      <CellsChoice error={zones.size > 1 ? 'These cells lie in more than one zone. Issue one order a zone.' : undefined} />
      <fieldset className="m-0 border-0 p-0">
        <legend className="mb-1 p-0 text-small font-medium text-ink-2">What is wrong</legend>
        {ACTIONS.map(({ value, label }) => (
          <label key={value} className="flex min-h-9 items-center gap-3 pointer-coarse:min-h-12">
            <input type="checkbox" className="size-[18px] accent-[var(--ink)]" checked={actions.includes(value)} onChange={() => toggle(value)} />
            {label}
          </label>
        ))}
      </fieldset>
      <TextArea label="What was seen, what to do" value={remarks} maxLength={2000} onChange={(event) => setRemarks(event.target.value)} />
    </TaskFrame>
  )
}
