import 'maplibre-gl/dist/maplibre-gl.css'
import './board.css'
import { useEffect, useEffectEvent, useId, useImperativeHandle, useRef, useState, type KeyboardEvent, type Ref } from 'react'
import { attachGestures, pressKey, type SheetArea } from './board-gestures.ts'
import { createBoardMap, type BoardMap } from './board-map.ts'
import { BoardOverlay } from './board-overlay.tsx'
import type { GroundMapHandle, GroundMapProps } from './board-types.ts'
import { MapFurniture } from './map-furniture.tsx'
import { SheetMargins } from './sheet-margins.tsx'

const NO_CELLS: readonly number[] = []

/** The board of `props.site`, built again when the site's object changes. */
function useBoard(props: GroundMapProps): { board: BoardMap | undefined; host: Ref<HTMLDivElement> } {
  const host = useRef<HTMLDivElement>(null)
  const [board, setBoard] = useState<BoardMap>()
  const openStake = useEffectEvent((id: string) => props.onOpenStake?.(id))
  const build = useEffectEvent((container: HTMLElement) =>
    createBoardMap({
      container,
      site: props.site,
      theme: props.theme ?? 'light',
      allowRotation: props.allowRotation ?? false,
      label: props.label ?? 'Ground',
      fitPadding: props.fitPadding,
      onOpenStake: (id) => openStake(id),
    }),
  )
  useEffect(() => {
    if (host.current === null) return
    const made = build(host.current)
    setBoard(made)
    return () => {
      setBoard(undefined)
      made.remove()
    }
  }, [props.site, props.allowRotation])
  return { board, host }
}

/** Hands what changes on to the board. */
function useBoardContents(board: BoardMap | undefined, props: GroundMapProps): void {
  const { sheet, marks, stakes, selectedCells = NO_CELLS, highlightCells = NO_CELLS, theme = 'light', label = 'Ground' } = props
  const from = useEffectEvent(() => props.changeFrom ?? null)
  useEffect(() => {
    if (sheet !== undefined) board?.setSheet(sheet, from())
  }, [board, sheet])
  useEffect(() => board?.setMarks(marks ?? []), [board, marks])
  useEffect(() => board?.setStakes(stakes ?? []), [board, stakes])
  useEffect(() => board?.setChosen(selectedCells), [board, selectedCells])
  useEffect(() => board?.setPreview(highlightCells), [board, highlightCells])
  useEffect(() => board?.setTheme(theme), [board, theme])
  useEffect(() => board?.map.getCanvas().setAttribute('aria-label', label), [board, label])
}

/** The Ground's map: cells, boundary, zones, tests, stakes, margins and furniture. */
export function GroundMap({ ref, ...props }: GroundMapProps & { readonly ref?: Ref<GroundMapHandle> }) {
  const wrapper = useRef<HTMLDivElement>(null)
  const [area, setArea] = useState<SheetArea>()
  const { board, host } = useBoard(props)
  const { mode = 'select', sheet } = props
  const keysId = useId()
  useBoardContents(board, props)

  const given = useEffectEvent(() => props)
  useEffect(() => {
    if (board === undefined || wrapper.current === null) return
    return attachGestures({ board, element: wrapper.current, mode: () => given().mode ?? 'select', props: () => given(), onArea: setArea })
  }, [board])
  useEffect(() => board?.map.getCanvas().setAttribute('aria-describedby', keysId), [board, keysId])

  useImperativeHandle(
    ref,
    () => ({
      fit: () => board?.fit(),
      panToCell: (cell) => board?.panToCell(cell),
      projectCellCenter: (cell) => board?.projectCellCenter(cell),
      patchCells: (cells, from) => {
        if (sheet !== undefined) board?.patchCells(sheet, cells, from ?? null)
      },
    }),
    [board, sheet],
  )

  const handleKeyDown = (event: KeyboardEvent): void => {
    const onCanvas = event.target === board?.map.getCanvas()
    if (board !== undefined && onCanvas && pressKey(board, event, props.onMoveCell)) event.preventDefault()
  }

  return (
    <div ref={wrapper} className="board" data-mode={mode} onKeyDown={handleKeyDown}>
      <div ref={host} className="board-map" />
      <p id={keysId} className="sr-only">
        Arrow keys move the selected cell. Shift and an arrow key pan. Plus and minus zoom. Zero shows the whole site.
      </p>
      {board !== undefined && (
        <>
          <BoardOverlay board={board} selectedCell={props.selectedCell} area={area} point={props.pickedPoint ?? null} />
          <SheetMargins board={board} selectedCell={props.selectedCell} />
          <MapFurniture board={board} />
        </>
      )}
    </div>
  )
}
