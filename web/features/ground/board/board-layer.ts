import type { CustomLayerInterface, CustomRenderMethodInput, Map as MapLibreMap } from 'maplibre-gl'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { Theme } from '#shared/look/theme.ts'
import { createBoardGpu, type BoardGpu, type BoardFrame } from './board-gpu.ts'
import { createBoardMesh } from './board-mesh.ts'
import type { BoardProjection, SheetPlace } from './board-projection.ts'
import { CHANGE_SLOTS, HIGHLIGHT_BIT, SELECTED_BIT, createBoardTexture } from './board-texture.ts'
import type { BoardCells } from './board-types.ts'

/** How long a change takes to ink in, ms (look.md, Motion). */
export const INK_IN_MS = 600

interface RunningChange {
  readonly startedAt: number
  readonly from: SheetPlace
  /** cells from the origin to the farthest changed one */
  readonly reach: number
}

export interface BoardLayerOptions {
  readonly id: string
  readonly projection: BoardProjection
  readonly cells: BoardCells
  readonly theme: Theme
  readonly now: () => number
  readonly reducedMotion: () => boolean
}

export interface BoardLayer extends CustomLayerInterface {
  /** draws a whole sheet; `from` names where a change came from, undefined draws at once */
  readonly setSheet: (sheet: GroundSheet, from?: SheetPlace | 'middle') => void
  /** redraws the named cells from the sheet, inking in */
  readonly patchCells: (sheet: GroundSheet, cells: readonly number[], from?: SheetPlace) => void
  readonly setChosen: (cells: readonly number[]) => void
  readonly setPreview: (cells: readonly number[]) => void
  readonly setTheme: (theme: Theme) => void
}

/** The cells of the Ground as one MapLibre layer. */
export function createBoardLayer(options: BoardLayerOptions): BoardLayer {
  const { projection, cells } = options
  const texture = createBoardTexture(projection.grid, cells)
  const mesh = createBoardMesh(projection.sheetToMercator, projection.grid)
  const changes: (RunningChange | undefined)[] = Array.from({ length: CHANGE_SLOTS + 1 })
  let theme = options.theme
  let map: MapLibreMap | undefined
  let gpu: BoardGpu | undefined

  const repaint = (): void => map?.triggerRepaint()
  const middleOf = (changed: readonly number[]): SheetPlace => {
    let column = 0
    let row = 0
    for (const cell of changed) {
      column += cells.column[cell]! + 0.5
      row += cells.row[cell]! + 0.5
    }
    return { column: column / changed.length, row: row / changed.length }
  }
  const takeSlot = (): number => {
    let slot = changes.findIndex((change, index) => index > 0 && change === undefined)
    if (slot < 0) {
      slot = 1
      for (let other = 2; other <= CHANGE_SLOTS; other++) {
        if (changes[other]!.startedAt < changes[slot]!.startedAt) slot = other
      }
    }
    texture.settle(slot)
    changes[slot] = undefined
    return slot
  }
  const write = (sheet: GroundSheet, named: readonly number[] | undefined, from: SheetPlace | 'middle' | undefined): void => {
    const slot = from === undefined || options.reducedMotion() ? 0 : takeSlot()
    const changed = texture.write(sheet, slot, named)
    if (slot > 0 && changed.length > 0) {
      const origin = from === 'middle' || from === undefined ? middleOf(changed) : from
      let reach = 1
      for (const cell of changed) {
        reach = Math.max(reach, Math.hypot(cells.column[cell]! + 0.5 - origin.column, cells.row[cell]! + 0.5 - origin.row))
      }
      changes[slot] = { startedAt: options.now(), from: origin, reach: reach + 0.75 }
    }
    repaint()
  }
  /** Fronts of the running changes, and whether any still runs. */
  const advance = (): { fronts: Float32Array; running: boolean } => {
    const fronts = new Float32Array((CHANGE_SLOTS + 1) * 4)
    let running = false
    for (let slot = 1; slot <= CHANGE_SLOTS; slot++) {
      const change = changes[slot]
      if (change === undefined) continue
      const age = (options.now() - change.startedAt) / INK_IN_MS
      if (age >= 1) {
        changes[slot] = undefined
        texture.settle(slot)
        continue
      }
      running = true
      const eased = 1 - (1 - Math.max(0, age)) ** 2
      fronts.set([change.from.column, change.from.row, eased * change.reach, 1], slot * 4)
    }
    return { fronts, running }
  }

  return {
    id: options.id,
    type: 'custom',
    renderingMode: '2d',
    setSheet: (sheet, from) => write(sheet, undefined, from),
    patchCells: (sheet, named, from) => write(sheet, named, from ?? 'middle'),
    setChosen(named) {
      texture.mark(SELECTED_BIT, named)
      repaint()
    },
    setPreview(named) {
      texture.mark(HIGHLIGHT_BIT, named)
      repaint()
    },
    setTheme(next) {
      theme = next
      repaint()
    },
    onAdd(owner, gl) {
      map = owner
      // called again after a lost context, with everything that lived on the card gone
      gpu = createBoardGpu(gl, mesh, texture)
    },
    onRemove() {
      gpu?.dispose()
      gpu = undefined
      map = undefined
    },
    render(_gl, input: CustomRenderMethodInput) {
      if (gpu === undefined || map === undefined) return
      const { fronts, running } = advance()
      const canvas = map.getCanvas()
      const frame: BoardFrame = {
        matrix: input.defaultProjectionData.mainMatrix,
        width: canvas.width,
        height: canvas.height,
        pixelRatio: canvas.width / Math.max(1, canvas.clientWidth),
        theme,
        fronts,
        running,
      }
      gpu.draw(frame)
      if (running) map.triggerRepaint()
    },
  }
}
