import { Dialog } from '#web/components/ui/dialog.tsx'

const KEYS = [
  ['Arrow keys', 'move the selected cell, on the map'],
  ['Enter', 'read the selected cell'],
  ['Space', 'choose the cell for the task in the panel'],
  ['[ and ]', 'cut the sheet one lift lower or higher'],
  ['L', 'map or list'],
  ['Shift and arrows', 'pan the map'],
  ['+ and −', 'zoom the map; 0 shows the whole site'],
  ['Esc', 'leave the task, then the cell'],
  ['?', 'these keys'],
] as const

export function KeysHelp({ open, onOpenChange }: { open: boolean; onOpenChange: (open: boolean) => void }) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Keys of the Ground">
      <dl className="m-0 grid grid-cols-[auto_1fr] gap-x-5 gap-y-2 pb-3">
        {KEYS.map(([key, does]) => (
          <div key={key} className="contents">
            <dt className="num font-semibold whitespace-nowrap">{key}</dt>
            <dd className="m-0 text-ink-2">{does}</dd>
          </div>
        ))}
      </dl>
    </Dialog>
  )
}
