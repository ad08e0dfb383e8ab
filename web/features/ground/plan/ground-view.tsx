import { createContext, useContext, useMemo, useState, type ReactNode } from 'react'
import { useSearchParams } from 'react-router-dom'
import { readAddress, writeAddress, type GroundAddress } from './ground-address.ts'
import type { GroundPlan } from './ground-plan.ts'
import type { GroundTask } from './ground-task.ts'
import { useGroundPlan } from './use-ground-plan.ts'

/** What is looked at and worked on: the address, the task in the panel, the cells chosen and shown. */
export interface GroundView {
  readonly plan: GroundPlan
  readonly address: GroundAddress
  /** @param how `replace` leaves no step for the browser's back button */
  readonly go: (change: Partial<GroundAddress>, how?: 'push' | 'replace') => void
  readonly task: GroundTask | null
  readonly start: (task: GroundTask, cells: readonly number[]) => void
  readonly end: () => void
  readonly chosen: readonly number[]
  readonly choose: (cells: readonly number[]) => void
  /** cells drawn out by "Show" */
  readonly shown: readonly number[]
  readonly show: (cells: readonly number[]) => void
  readonly panelOpen: boolean
  readonly openPanel: (open: boolean) => void
}

const GroundViewContext = createContext<GroundView | null>(null)

const NO_CELLS: readonly number[] = []

export function GroundViewProvider({ children }: { children: ReactNode }) {
  const plan = useGroundPlan()
  const [params, setParams] = useSearchParams()
  const [task, setTask] = useState<GroundTask | null>(null)
  const [chosen, choose] = useState(NO_CELLS)
  const [shown, setShown] = useState(NO_CELLS)
  const [panelOpen, openPanel] = useState(false)
  const address = useMemo(() => readAddress(params, plan), [params, plan])
  const view = useMemo<GroundView>(
    () => ({
      plan,
      address,
      go: (change, how = 'push') => setParams((before) => writeAddress(before, change, plan), { replace: how === 'replace' }),
      task,
      start: (next, cells) => {
        setTask(next)
        choose(cells)
        setShown(NO_CELLS)
        openPanel(true)
      },
      end: () => {
        setTask(null)
        choose(NO_CELLS)
        setShown(NO_CELLS)
      },
      chosen,
      choose,
      shown,
      show: (cells) => {
        setShown((before) => (before === cells ? NO_CELLS : cells))
        openPanel(false)
      },
      panelOpen,
      openPanel,
    }),
    [plan, address, setParams, task, chosen, shown, panelOpen],
  )
  return <GroundViewContext value={view}>{children}</GroundViewContext>
}

/** @throws Error outside the Ground page */
export function useGroundView(): GroundView {
  const view = useContext(GroundViewContext)
  if (view === null) throw new Error('useGroundView() is for parts of the Ground page')
  return view
}
