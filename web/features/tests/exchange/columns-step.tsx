import { GROUP_UNITS, GROUP_WORDS } from '#shared/exchange/exchange-units.ts'
import { columnOf } from '#shared/exchange/test-columns.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { SelectField } from '#web/components/ui/text-fields.tsx'
import { matchHeads } from '#shared/exchange/match-heads.ts'
import { ColumnMap } from './column-map.tsx'
import { FixedFields } from './fixed-fields.tsx'
import { groupsToChoose, type FileSettings } from './file-settings.ts'
import type { Importing, OpenImport } from './use-import.ts'

/** Lines that may head the columns. */
const HEADS_OFFERED = 25

/** What each column of the file is, in which unit, and what the file leaves unsaid. */
export function ColumnsStep({ importing, open }: { importing: Importing; open: OpenImport }) {
  const { table, settings } = open
  const { rows, name, notices } = table
  const groups = groupsToChoose(rows, settings)
  const heads = rows[settings.headLine] ?? []
  const results = matchHeads(heads).filter(({ isResult }) => isResult).length
  const read = settings.columns.filter((key) => key !== null).length
  return (
    <div className="max-w-[980px]">
      <p className="m-0 mb-4 text-ink-2">
        <b className="font-semibold text-ink">{name}</b>, {(rows.length - settings.headLine - 1).toLocaleString('en-US')} rows. {read} of its {heads.length} columns are read.
        {results > 0 && ` ${results === 1 ? 'One column holds' : `${results} columns hold`} results, which are worked out anew and not read.`}
      </p>
      {notices.map((notice) => (
        <Banner key={notice} tone="off" title="Look at this." className="mb-3">
          {notice}
        </Banner>
      ))}
      <SectionHead>How it is written</SectionHead>
      <div className="mb-7 grid grid-cols-1 items-start gap-x-[14px] gap-y-3 sm:grid-cols-3">
        <SelectField label="Heads of the columns" value={String(settings.headLine)} onChange={(event) => importing.headAt(Number(event.target.value))}>
          {rows.slice(0, HEADS_OFFERED).map((row, index) => (
            <option key={index} value={index}>
              Line {index + 1}: {row.filter((field) => field !== '').join(', ').slice(0, 60) || 'empty'}
            </option>
          ))}
        </SelectField>
        <SelectField label="Decimal mark" value={settings.decimal} warning={settings.sure.decimal ? undefined : 'The file does not tell. Look at a figure.'} onChange={(event) => importing.settle({ decimal: event.target.value as FileSettings['decimal'] })}>
          <option value=".">Point, 112.5</option>
          <option value=",">Comma, 112,5</option>
        </SelectField>
        <SelectField label="Dates" value={settings.dateOrder} warning={settings.sure.dateOrder ? undefined : 'The file does not tell. Look at a date.'} onChange={(event) => importing.settle({ dateOrder: event.target.value as FileSettings['dateOrder'] })}>
          <option value="ymd">Year first, 2026-12-01</option>
          <option value="mdy">Month first, 12/01/2026</option>
          <option value="dmy">Day first, 01.12.2026</option>
        </SelectField>
        {groups.map((group) => (
          <SelectField
            key={group}
            label={`Unit: ${GROUP_WORDS[group].toLowerCase()}`}
            value={settings.groupUnits[group]}
            onChange={(event) => importing.settle({ groupUnits: { ...settings.groupUnits, [group]: event.target.value } })}
          >
            {GROUP_UNITS[group].map((unit) => (
              <option key={unit} value={unit}>
                {unit}
              </option>
            ))}
          </SelectField>
        ))}
      </div>
      <FixedFields settings={settings} onChange={(fixed) => importing.settle({ fixed })} />
      <ColumnMap open={open} onChange={(columns) => importing.settle({ columns })} />
      <div className="bottom-0 flex flex-wrap gap-[10px] border-t border-ink bg-raised py-3 pb-4 md:sticky">
        <Button kind="primary" onClick={importing.check} disabled={read === 0} className="pointer-coarse:min-h-12">
          Check the rows
        </Button>
        <Button onClick={importing.forget} className="pointer-coarse:min-h-12">
          Another file
        </Button>
        {read === 0 && <span className="self-center text-ink-2">Say what at least one column is, such as {columnOf('curve').label.toLowerCase()} or lift.</span>}
      </div>
    </div>
  )
}
