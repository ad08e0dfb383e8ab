import { Button } from '#web/components/ui/button.tsx'
import { PAGE_SIZE } from './register-address.ts'

const grouped = (n: number): string => n.toLocaleString('en-US')

/** Which part of the register is in sight, and the way to the rest. */
export function RegisterPager({ page, total, onPage }: { page: number; total: number; onPage: (page: number) => void }) {
  const pages = Math.max(1, Math.ceil(total / PAGE_SIZE))
  if (pages === 1 && page === 1) return null
  const from = (page - 1) * PAGE_SIZE + 1
  return (
    <nav aria-label="Pages of the register" className="flex flex-wrap items-center gap-3 pt-3">
      <Button disabled={page <= 1} onClick={() => onPage(Math.min(page - 1, pages))} className="pointer-coarse:min-h-12">
        Page before
      </Button>
      <Button disabled={page >= pages} onClick={() => onPage(page + 1)} className="pointer-coarse:min-h-12">
        Next page
      </Button>
      <span className="text-ink-2">{from > total ? `There ${pages === 1 ? 'is 1 page' : `are ${grouped(pages)} pages`}.` : `${grouped(from)} to ${grouped(Math.min(page * PAGE_SIZE, total))} of ${grouped(total)}`}</span>
    </nav>
  )
}
