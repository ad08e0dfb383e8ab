import { useEffect, useState } from 'react'
import type { RegisterPage } from '#shared/schemas/test-register.ts'
import { Button } from '#web/components/ui/button.tsx'
import { TextField } from '#web/components/ui/text-fields.tsx'
import { FilterDialog } from './filter-dialog.tsx'
import { PlaceFields } from './filter-fields.tsx'
import { chipsOf } from './filter-words.ts'
import { OutcomeToggles } from './outcome-toggles.tsx'
import { isNarrowed } from './register-address.ts'
import { useFilterNames } from './use-filter-names.ts'
import type { RegisterControls } from './use-register.ts'

const WAIT_MS = 300

/** What narrows the register: the usual in sight, the rest in a dialog, and all of it said. */
export function RegisterFilters({ controls, page }: { controls: RegisterControls; page: RegisterPage | undefined }) {
  const [asking, setAsking] = useState(false)
  const { address, narrow, clear } = controls
  const { filter } = address
  const chips = chipsOf(filter, useFilterNames(filter))
  const behind = chips.length + (filter.zoneId === undefined ? 0 : 1) + (filter.lift === undefined ? 0 : 1)
  return (
    <>
      <div className="flex flex-wrap items-end gap-x-3 gap-y-[10px]">
        <SearchField value={filter.search ?? ''} onChange={(search) => narrow({ search: search === '' ? undefined : search })} />
        <PlaceFields filter={filter} narrow={narrow} className="w-28 max-md:hidden xl:w-36" />
        <OutcomeToggles counts={page?.counts} filter={filter} narrow={narrow} />
        <Button onClick={() => setAsking(true)} className="min-h-[38px] pointer-coarse:min-h-12 max-md:hidden">
          More filters{chips.length > 0 && ` (${chips.length})`}
        </Button>
        <Button onClick={() => setAsking(true)} className="min-h-[38px] pointer-coarse:min-h-12 md:hidden">
          Sort and filter{behind > 0 && ` (${behind})`}
        </Button>
      </div>
      {(chips.length > 0 || isNarrowed(address)) && (
        <div className="mt-[10px] flex flex-wrap items-center gap-x-2 gap-y-1">
          {chips.map(({ key, text }) => (
            <button key={key} type="button" onClick={() => narrow({ [key]: undefined })} className="inline-flex min-h-7 items-center gap-2 border border-rule-2 bg-film px-2 text-small font-medium pointer-coarse:min-h-11">
              {text}
              <svg aria-hidden width="9" height="9" viewBox="0 0 9 9">
                <path d="M1 1l7 7m0-7l-7 7" stroke="currentColor" strokeWidth="1.4" />
              </svg>
              <span className="sr-only"> take away</span>
            </button>
          ))}
          <button type="button" onClick={clear} className="link-ink min-h-7 px-1 text-small pointer-coarse:min-h-11">
            Clear filters
          </button>
        </div>
      )}
      {asking && <FilterDialog controls={controls} total={page?.total} onClose={() => setAsking(false)} />}
    </>
  )
}

/** Asked for once typing pauses. */
function SearchField({ value, onChange }: { value: string; onChange: (text: string) => void }) {
  const [text, setText] = useState(value)
  const [known, setKnown] = useState(value)
  if (known !== value) {
    setKnown(value)
    setText(value)
  }
  useEffect(() => {
    if (text === value) return
    const timer = setTimeout(() => onChange(text), WAIT_MS)
    return () => clearTimeout(timer)
  }, [text, value, onChange])
  return <TextField label="Number, cell, curve or name" type="search" maxLength={40} placeholder="T-0142 or N4" className="min-w-0 flex-1 basis-36 md:max-w-40 xl:max-w-56" value={text} onChange={(event) => setText(event.target.value)} />
}
