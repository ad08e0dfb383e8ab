import { useQuery } from '@tanstack/react-query'
import { useEffect, useMemo, useRef } from 'react'
import { useNavigate } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { testQueries } from '#web/data/test/queries.ts'
import type { BoardMark, GroundMapHandle } from '#web/features/ground/board/board-types.ts'
import { GroundMap } from '#web/features/ground/board/ground-map.tsx'
import { useStakes } from '#web/features/ground/panel/use-panel-data.ts'
import { moveCell, pickCells } from '#web/features/ground/plan/cell-choice.ts'
import { newTestLink } from '#web/features/ground/plan/ground-links.ts'
import { choosesCells } from '#web/features/ground/plan/ground-task.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import type { GroundView as LiveGround } from '#web/lib/ground-store.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useTheme } from '#web/lib/theme.ts'
import { CURRENT_TESTS, shownMarks, shownStakes } from './shown-marks.ts'

const NO_MARKS: readonly BoardMark[] = []

/** The live sheet on the map, with its tests and stakes; picks go to the selected cell or to the task. */
export function GroundSheetMap({ ground, label }: { ground: LiveGround; label: string }) {
  const { site, plan: boardSite, can } = useSite()
  const view = useGroundView()
  const { plan, address, go, task, chosen, choose, shown, openPanel } = view
  const navigate = useNavigate()
  const theme = useTheme()
  const handle = useRef<GroundMapHandle>(null)
  const { sheet } = ground
  const tests = useQuery({ ...testQueries.list(site.id, CURRENT_TESTS), enabled: can('registers.see') }).data
  const stakes = useStakes()
  const marks = useMemo(() => (tests === undefined ? NO_MARKS : shownMarks(tests.tests, sheet)), [tests, sheet])
  const pins = useMemo(() => shownStakes(stakes, sheet), [stakes, sheet])
  const picking = choosesCells(task)

  useEffect(() => {
    if (address.cell !== undefined) handle.current?.panToCell(address.cell)
  }, [address.cell])

  const handleOpenStake = (id: string): void => {
    if (can('test.record-qc')) void navigate(newTestLink(site.id, { stake: id }))
    else go({ cell: stakes.find((stake) => stake.id === id)?.cell })
  }
  return (
    <GroundMap
      ref={handle}
      site={boardSite}
      sheet={sheet}
      changeFrom={ground.from}
      marks={marks}
      stakes={pins}
      selectedCell={address.cell}
      selectedCells={chosen.length > 0 ? chosen : shown}
      mode={picking ? 'area' : 'select'}
      theme={theme}
      label={label}
      onPickCell={(cell) => {
        go({ cell })
        openPanel(true)
      }}
      onPickArea={(cells, how) => choose(pickCells(chosen, cells, how))}
      onMoveCell={(columns, rows) => go({ cell: moveCell(plan, address.cell, columns, rows) }, 'replace')}
      onOpenStake={handleOpenStake}
      {...(can('registers.see') ? { onOpenTest: (id: string) => void navigate(paths.test(site.id, id)) } : {})}
    />
  )
}
