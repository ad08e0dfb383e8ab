import { DropdownMenu, Popover as RadixPopover } from 'radix-ui'
import type { ReactNode } from 'react'

const FRAME = 'z-50 min-w-52 max-w-[calc(100vw-24px)] border-2 border-ink bg-raised text-ink'
const ITEM =
  'flex w-full min-h-9 pointer-coarse:min-h-12 items-center gap-2 px-4 pt-[7px] pb-[5px] text-left font-medium text-ink no-underline cursor-pointer outline-none data-[highlighted]:bg-ink data-[highlighted]:text-raised data-[disabled]:opacity-40 data-[disabled]:cursor-not-allowed'

/** A list of acts behind one control. `trigger` is a single button. */
export function Menu({ trigger, children, align = 'end' }: { trigger: ReactNode; children: ReactNode; align?: 'start' | 'end' }) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align={align} sideOffset={8} collisionPadding={12} className={`${FRAME} py-1`}>
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}

export function MenuItem({ onSelect, disabled = false, children }: { onSelect: () => void; disabled?: boolean; children: ReactNode }) {
  return (
    <DropdownMenu.Item className={ITEM} disabled={disabled} onSelect={onSelect}>
      {children}
    </DropdownMenu.Item>
  )
}

/** A menu line that is a link: pass the link itself. */
export function MenuLink({ children }: { children: ReactNode }) {
  return (
    <DropdownMenu.Item asChild className={ITEM}>
      {children}
    </DropdownMenu.Item>
  )
}

export function MenuLabel({ children }: { children: ReactNode }) {
  return <DropdownMenu.Label className="cap px-4 pt-[10px] pb-1">{children}</DropdownMenu.Label>
}

export const MenuRule = () => <DropdownMenu.Separator className="my-1 border-t border-rule" />

type MenuChoiceProps<T extends string> = { value: T; options: readonly { value: T; label: string }[]; onChange: (value: T) => void }

/** One of a few, inside a menu; the chosen one carries a filled square. */
export function MenuChoice<T extends string>({ value, options, onChange }: MenuChoiceProps<T>) {
  return (
    <DropdownMenu.RadioGroup
      value={value}
      onValueChange={(next) => {
        const option = options.find((each) => each.value === next)
        if (option !== undefined) onChange(option.value)
      }}
    >
      {options.map((option) => (
        <DropdownMenu.RadioItem key={option.value} value={option.value} className={ITEM} onSelect={(event) => event.preventDefault()}>
          <span aria-hidden className="grid size-[13px] place-items-center border-[1.5px] border-current">
            <DropdownMenu.ItemIndicator className="block size-[7px] bg-current" />
          </span>
          {option.label}
        </DropdownMenu.RadioItem>
      ))}
    </DropdownMenu.RadioGroup>
  )
}

/** Words or controls beside the thing they belong to. `trigger` is a single button. */
export function Popover({ trigger, children, label }: { trigger: ReactNode; children: ReactNode; label: string }) {
  return (
    <RadixPopover.Root>
      <RadixPopover.Trigger asChild>{trigger}</RadixPopover.Trigger>
      <RadixPopover.Portal>
        <RadixPopover.Content aria-label={label} sideOffset={8} collisionPadding={12} className={`${FRAME} px-4 pt-3 pb-[10px]`}>
          {children}
        </RadixPopover.Content>
      </RadixPopover.Portal>
    </RadixPopover.Root>
  )
}
