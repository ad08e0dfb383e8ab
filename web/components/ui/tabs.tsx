import { Tabs as RadixTabs } from 'radix-ui'
import type { ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

export type Tab = { readonly value: string; readonly label: string; readonly count?: number | undefined; readonly content: ReactNode }

/** Views of one thing, one at a time; the count says how much waits there. */
export function Tabs({ label, tabs, value, onChange, touch = false }: { label: string; tabs: readonly Tab[]; value: string; onChange: (value: string) => void; touch?: boolean }) {
  return (
    <RadixTabs.Root value={value} onValueChange={onChange}>
      <RadixTabs.List aria-label={label} className="flex gap-[22px] overflow-x-auto border-b border-rule-2">
        {tabs.map((tab) => (
          <RadixTabs.Trigger
            key={tab.value}
            value={tab.value}
            className={classNames(
              'border-b-3 border-transparent pt-2 pb-[7px] text-head font-semibold whitespace-nowrap text-ink-2 -outline-offset-3 data-[state=active]:border-ink data-[state=active]:text-ink',
              touch && 'min-h-12',
            )}
          >
            {tab.label}
            {tab.count !== undefined && <span className="num ml-[6px]">{tab.count}</span>}
          </RadixTabs.Trigger>
        ))}
      </RadixTabs.List>
      {tabs.map((tab) => (
        <RadixTabs.Content key={tab.value} value={tab.value} className="pt-[14px]">
          {tab.content}
        </RadixTabs.Content>
      ))}
    </RadixTabs.Root>
  )
}
