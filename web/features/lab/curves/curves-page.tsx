import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useSearchParams } from 'react-router-dom'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CurveSheet } from './curve-sheet.tsx'
import { LabFrame } from '#web/features/lab/lab-frame.tsx'
import { pairWords, STATUS_WORDS } from '#web/features/lab/lab-words.ts'
import { MaterialDialog } from './material-dialog.tsx'

function MaterialsTable({ materials, onChoose }: { materials: readonly Material[]; onChoose: ((material: Material) => void) | undefined }) {
  const { units } = useSite()
  return (
    <Table caption="Borrow materials">
      <thead>
        <tr>
          <HeadCell className="pl-0">Material</HeadCell>
          <HeadCell>Source</HeadCell>
          <HeadCell>Classification</HeadCell>
          <HeadCell numeric>Gs</HeadCell>
          <HeadCell numeric>Swell</HeadCell>
          <HeadCell numeric>Shrink</HeadCell>
          <HeadCell numeric>Loose to compacted</HeadCell>
        </tr>
      </thead>
      <tbody>
        {materials.map((material) => (
          <Row key={material.id}>
            <RowHead className="pl-0">
              {onChoose === undefined ? (
                material.name
              ) : (
                <button type="button" aria-label={`Edit ${material.name}`} onClick={() => onChoose(material)} className="link-ink pointer-coarse:min-h-11">
                  {material.name}
                </button>
              )}
            </RowHead>
            <Cell>{material.source}</Cell>
            <Cell>{material.classification}</Cell>
            <Cell numeric>{material.gs === null ? '–' : `${units.number(material.gs, 2)}${material.gsMeasured ? '' : ', assumed'}`}</Cell>
            <Cell numeric>{units.percent(material.swellPercent)}</Cell>
            <Cell numeric>{units.percent(material.shrinkPercent)}</Cell>
            <Cell numeric>× {units.number(material.looseToCompacted, 3)}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  )
}

function CurvesTable({ curves, chosen, onChoose }: { curves: readonly Curve[]; chosen: string | undefined; onChoose: (id: string) => void }) {
  const { units } = useSite()
  return (
    <Table caption="Reference curves">
      <thead>
        <tr>
          <HeadCell className="pl-0">Curve</HeadCell>
          <HeadCell>Material</HeadCell>
          <HeadCell>Method</HeadCell>
          <HeadCell numeric>Maximum and optimum</HeadCell>
          <HeadCell>Status</HeadCell>
          <HeadCell numeric>Tests judged</HeadCell>
        </tr>
      </thead>
      <tbody>
        {curves.map((curve) => (
          <Row key={curve.id} selected={curve.id === chosen}>
            <RowHead className="pl-0">
              <button type="button" aria-pressed={curve.id === chosen} onClick={() => onChoose(curve.id)} className="link-ink pointer-coarse:min-h-11">
                {curve.code}
              </button>
            </RowHead>
            <Cell>{curve.materialName}</Cell>
            <Cell className="whitespace-nowrap">
              {curve.method} {curve.procedure}
            </Cell>
            <Cell numeric>{pairWords(curve.pair, units)}</Cell>
            <Cell className={curve.status === 'draft' ? 'font-semibold text-warn' : ''}>{STATUS_WORDS[curve.status]}</Cell>
            <Cell numeric>{curve.testsJudged}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  )
}

/** Borrow materials and their reference curves: what every field test is judged against. */
export function CurvesPage() {
  const { site, can } = useSite()
  const [search, setSearch] = useSearchParams()
  const [asked, setAsked] = useState(false)
  const [editing, setEditing] = useState<Material | null>(null)
  const materials = useQuery(materialQueries.list(site.id))
  const curves = useQuery(curveQueries.list(site.id))
  const choose = (id: string) => setSearch({ curve: id }, { replace: true })
  const failed = materials.error ?? curves.error
  const waiting = curves.data?.filter((curve) => curve.status === 'draft').length ?? 0
  const chosen = curves.data?.find((curve) => curve.id === search.get('curve')) ?? curves.data?.[0]
  const ready = materials.data !== undefined && curves.data !== undefined
  const summary = ready
    ? `${materials.data.length} ${materials.data.length === 1 ? 'material' : 'materials'}, ${curves.data.length} ${curves.data.length === 1 ? 'curve' : 'curves'}${waiting > 0 ? `, ${waiting} waiting for the lead’s approval` : ''}`
    : undefined
  const actions = (
    <>
      {can('material.record') && <Button className="pointer-coarse:min-h-11" onClick={() => setAsked(true)}>New material</Button>}
      {can('curve.record') && ready && materials.data.length > 0 && (
        <Link to={paths.newCurve(site.id)} className={buttonClasses('primary', 'regular', 'pointer-coarse:min-h-11')}>
          New curve
        </Link>
      )}
    </>
  )
  return (
    <LabFrame summary={summary} actions={actions} failed={failed} onRetry={() => void Promise.all([materials.refetch(), curves.refetch()])}>
      {!ready ? (
        failed === null && (
          <div className="px-4 sm:px-[26px]">
            <Skeleton label="The laboratory’s sheets are on their way" lines={[60, 72, 66, 40]} />
          </div>
        )
      ) : materials.data.length === 0 ? (
        <div className="max-w-[640px] px-4 sm:px-[26px]">
          <EmptyState title="No material yet" action={can('material.record') ? <Button onClick={() => setAsked(true)}>New material</Button> : undefined}>
            Record the borrow material first, then its compaction curve. Fill can be placed and tests judged once both stand here.
          </EmptyState>
        </div>
      ) : (
        <div className="grid gap-x-10 gap-y-8 px-4 pb-10 sm:px-[26px] xl:grid-cols-[minmax(0,1fr)_minmax(440px,600px)]">
          <div className="grid min-w-0 content-start gap-8">
            <section>
              <SectionHead>Reference curves</SectionHead>
              {curves.data.length === 0 ? <p className="m-0 text-ink-2">No curve yet. A field test needs one to be judged by.</p> : <CurvesTable curves={curves.data} chosen={chosen?.id} onChoose={choose} />}
            </section>
            <section>
              <SectionHead>Borrow materials</SectionHead>
              <MaterialsTable materials={materials.data} onChoose={can('material.record') ? setEditing : undefined} />
            </section>
          </div>
          {chosen !== undefined && (
            <div className="min-w-0 xl:border-l xl:border-rule-2 xl:pl-10">
              <CurveSheet key={chosen.id} curve={chosen} />
            </div>
          )}
        </div>
      )}
      {editing !== null && <MaterialDialog material={editing} onClose={() => setEditing(null)} />}
      {asked && <MaterialDialog onClose={() => setAsked(false)} />}
    </LabFrame>
  )
}
