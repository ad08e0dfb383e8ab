import '#web/styles.css'
import { createRef, useState } from 'react'
import { flushSync } from 'react-dom'
import { createRoot } from 'react-dom/client'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { HatchDefs } from '#web/components/drawing/hatch-defs.tsx'
import type { GroundMapHandle, GroundMapProps } from '#web/features/ground/board/board-types.ts'
import { GroundMap } from '#web/features/ground/board/ground-map.tsx'
import { BOARD_MARKS, BOARD_SITE, BOARD_STAKES, buildBoardSheet } from '#tests/fixtures/board-site.ts'

/** The board alone, with handles for the browser test: props are set, calls are written down. */
const sheet = buildBoardSheet()
const calls: unknown[][] = []
const note =
  (name: string) =>
  (...given: unknown[]): void => {
    calls.push([name, ...given])
  }
const plain = new URLSearchParams(location.search).has('plain')
const first: GroundMapProps = {
  site: plain ? { ...BOARD_SITE, zones: [], cells: { ...BOARD_SITE.cells, baseUm: new Float64Array(sheet.state.length) } } : BOARD_SITE,
  sheet,
  marks: plain ? [] : BOARD_MARKS,
  stakes: plain ? [] : BOARD_STAKES,
  onPickCell: note('cell'),
  onPickArea: note('area'),
  onPickPoint: note('point'),
  onMoveCell: note('move'),
  onOpenTest: note('test'),
  onOpenStake: note('stake'),
}
const handle = createRef<GroundMapHandle>()

export interface BoardPage {
  readonly sheet: GroundSheet
  readonly calls: unknown[][]
  readonly handle: { readonly current: GroundMapHandle | null }
  set: (changes: Partial<GroundMapProps>) => void
}

declare global {
  interface Window {
    boardPage: BoardPage
  }
}

window.boardPage = { sheet, calls, handle, set: () => undefined }

function BoardOnly() {
  const [props, setProps] = useState(first)
  window.boardPage.set = (changes) => flushSync(() => setProps((before) => ({ ...before, ...changes })))
  document.documentElement.dataset.theme = props.theme ?? 'light'
  return (
    <div style={{ width: '100vw', height: '100vh' }}>
      <HatchDefs />
      <GroundMap ref={handle} {...props} />
    </div>
  )
}

createRoot(document.querySelector('#root')!).render(<BoardOnly />)
