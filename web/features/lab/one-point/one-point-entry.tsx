import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import { toast } from 'sonner'
import { checkCurve } from '#shared/domain/check-curve.ts'
import { reduceOnePoint } from '#shared/domain/one-point.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { OnePointCheck, OnePointResult } from '#shared/schemas/one-point.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { CalculatedField, SelectField, TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordOnePoint } from '#web/data/one-point/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { testQueries } from '#web/data/test/queries.ts'
import { issuesOf, LETTERS, METHODS, pairWords } from '#web/features/lab/lab-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { OnePointFinding } from './one-point-finding.tsx'
import { SpecimenFields, SpecimenMoisture } from './one-point-fields.tsx'
import { emptyOnePoint, readOnePoint, sheetOf, type OnePointForm } from './one-point-form.ts'

type OnePointEntryProps = {
  curves: readonly Curve[]
  /** the curve in use, where it is known already */
  curveId: string | null
  /** the field test the soil is from */
  testId: string | null
  onSaved: (check: OnePointCheck) => void
  onLeave: () => void
}

/** One specimen, with the family and what follows shown while it is typed. */
export function OnePointEntry({ curves, curveId, testId, onSaved, onLeave }: OnePointEntryProps) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const [id] = useState(() => crypto.randomUUID())
  const usable = curves.filter((curve) => curve.pair !== null && curve.status !== 'draft')
  const [form, setForm] = useState(() => emptyOnePoint(usable.find((curve) => curve.id === curveId), testId ?? '', units.field.instant(now()), site.unitSystem === 'us'))
  const [asked, setAsked] = useState(false)
  const record = useRecordOnePoint(site.id, { saysOwnErrors: true })
  const set = (change: Partial<OnePointForm>) => setForm((last) => ({ ...last, ...change }))
  const inUse = usable.find((curve) => curve.id === form.curveId)
  const reduced = useMemo(() => reduceOnePoint(sheetOf(form, units)), [form, units])
  const finding = useMemo(() => findingOf(inUse, curves, form, reduced, site.waterDensity), [inUse, curves, form, reduced, site.waterDensity])
  const read = readOnePoint(id, form, units)
  const problems = reduced.ok ? [] : reduced.problems
  const errorOf = (path: string) => problems.find((problem) => problem.field === path && (asked || problem.code !== 'missing') && (asked || isTyped(form, path)))?.message
  const formError = (path: string) => (asked && !read.ok ? read.errors[path] : undefined)
  const otherMethod = inUse !== undefined && (inUse.method !== form.method || inUse.procedure !== form.procedure)
  const send = () => {
    setAsked(true)
    if (!read.ok || !reduced.ok || otherMethod) return
    record.mutate(read.input, {
      onSuccess: (check) => {
        toast(`${check.number} is recorded.`)
        onSaved(check)
      },
    })
  }
  return (
    <form
      noValidate
      className="grid gap-x-10 gap-y-6 xl:grid-rows-[auto_1fr] xl:grid-cols-[minmax(0,1fr)_minmax(440px,600px)]"
      onSubmit={(event) => {
        event.preventDefault()
        send()
      }}
    >
      <div className="min-w-0">
        <SectionHead aside={inUse?.materialName}>Curve in use</SectionHead>
        <div className="grid gap-x-[14px] gap-y-3 sm:grid-cols-2">
          <SelectField
            label="Curve"
            value={form.curveId}
            error={formError('curveId')}
            onChange={(event) => {
              const curve = usable.find((each) => each.id === event.target.value)
              set({ curveId: curve?.id ?? '', testId: '', ...(curve === undefined ? {} : { method: curve.method, procedure: curve.procedure }) })
            }}
          >
            <option value="">Choose the curve in use</option>
            {usable.map((curve) => (
              <option key={curve.id} value={curve.id}>
                {curve.code}, {pairWords(curve.pair, units)}
                {curve.status === 'superseded' && ' (superseded)'}
              </option>
            ))}
          </SelectField>
          <TestChoice curve={inUse} value={form.testId} onChange={(next) => set({ testId: next })} />
          <div className="grid grid-cols-2 gap-3">
            <SelectField label="Compacted by" value={form.method} onChange={(event) => set({ method: METHODS.find((method) => method === event.target.value) ?? form.method })}>
              {METHODS.map((method) => (
                <option key={method}>{method}</option>
              ))}
            </SelectField>
            <SelectField
              label="Letter"
              value={form.procedure}
              error={otherMethod ? `The family is by ${inUse.method} ${inUse.procedure}: compact the point so` : undefined}
              onChange={(event) => set({ procedure: LETTERS.find((letter) => letter === event.target.value) ?? form.procedure })}
            >
              {LETTERS.map((letter) => (
                <option key={letter}>{letter}</option>
              ))}
            </SelectField>
          </div>
          <TextField label="Sampled" type="datetime-local" value={form.sampledAt} error={formError('sampledAt')} onChange={(event) => set({ sampledAt: event.target.value })} />
        </div>
        <SpecimenFields form={form} set={set} errorOf={errorOf} />
        <SpecimenMoisture form={form} set={set} errorOf={errorOf} />
        <div className="mt-4 grid grid-cols-2 gap-[14px]">
          <CalculatedField label="Dry unit weight" unit={units.marks.density} value={reduced.ok ? units.densityNumber(reduced.dryDensity) : null} />
          <CalculatedField label="Moisture" unit="%" value={reduced.ok ? units.number(reduced.moisture, 1) : null} />
        </div>
      </div>
      <div className="min-w-0 xl:row-span-2 xl:border-l xl:border-rule-2 xl:pl-10">
        {finding === null ? <p className="m-0 text-ink-2">Choose the curve in use: its family is drawn here.</p> : <OnePointFinding result={finding} point={reduced.ok ? reduced : null} curves={curves} />}
      </div>
      <div className="min-w-0">
        <TextArea label="Remarks" rows={2} maxLength={2_000} value={form.remarks} onChange={(event) => set({ remarks: event.target.value })} />
        {issuesOf(record.error).map((message) => (
          <Banner key={message} tone="bad" className="mt-3" title={message} />
        ))}
        <div className="mt-4 flex flex-wrap gap-2">
          <Button type="submit" kind="primary" size="touch" busyLabel={record.isPending && 'Saving'}>
            Save the check
          </Button>
          <Button size="touch" onClick={onLeave}>
            Leave it
          </Button>
        </div>
      </div>
    </form>
  )
}

/** A field that nothing was typed in yet is not wrong. */
function isTyped(form: OnePointForm, path: string): boolean {
  const text: Readonly<Record<string, string>> = { 'moisture.readingPercent': form.reading, 'moisture.percent': form.percent, 'moisture.wetAndTin': form.wetAndTin, 'moisture.dryAndTin': form.dryAndTin, 'moisture.tin': form.tin, mould: form.mould, mouldAndSoil: form.mouldAndSoil, mouldVolume: form.mouldVolume, wetDensity: form.wetDensity }
  return (text[path] ?? '').trim() !== ''
}

function findingOf(inUse: Curve | undefined, curves: readonly Curve[], form: OnePointForm, reduced: ReturnType<typeof reduceOnePoint>, waterDensity: number): OnePointResult | null {
  if (inUse === undefined || inUse.pair === null) return null
  const point = reduced.ok ? { moisture: reduced.moisture, dryDensity: reduced.dryDensity } : { moisture: Number.NaN, dryDensity: Number.NaN }
  const { members, fit, off } = checkCurve(inUse, curves, { point, compacted: form, waterDensity })
  const frozen = fit.ok ? { ...fit, members: [...fit.members], warnings: [...fit.warnings], drawn: [...fit.drawn] } : { ...fit, warnings: [...fit.warnings] }
  return { family: members.map(({ id, code, pair }) => ({ id, code, pair })), inUse: { id: inUse.id, code: inUse.code, pair: inUse.pair }, fit: frozen, off }
}

const MOST_TESTS = 200

/** The field test the soil was taken at: the latest ones judged by the curve. */
function TestChoice({ curve, value, onChange }: { curve: Curve | undefined; value: string; onChange: (id: string) => void }) {
  const { site, label, units } = useSite()
  const tests = useQuery({ ...testQueries.list(site.id, { limit: MOST_TESTS }), enabled: curve !== undefined })
  const own = tests.data?.tests.filter((test) => test.curveId === curve?.id && !test.voided) ?? []
  const listed = own.some((test) => test.id === value) || value === ''
  const single = useQuery({ ...testQueries.detail(site.id, value), enabled: !listed && tests.data !== undefined }).data
  const options = listed || single === undefined ? own : [single, ...own]
  return (
    <SelectField label="At field test" hint="It is flagged where the curve is off" value={value} disabled={curve === undefined} onChange={(event) => onChange(event.target.value)}>
      <option value="">None</option>
      {options.map((test) => (
        <option key={test.id} value={test.id}>
          {test.number}, {label(test.cell)}, {units.dateTime(test.sampledAt)}
        </option>
      ))}
    </SelectField>
  )
}
