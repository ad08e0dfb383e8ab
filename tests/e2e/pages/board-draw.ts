import 'maplibre-gl/dist/maplibre-gl.css'
import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import { gridToSite, cellSideMm } from '#shared/domain/grid.ts'
import type { GridDefinition } from '#shared/domain/site-geometry.ts'
import { createBoardMap, type BoardMap } from '#web/features/ground/board/board-map.ts'
import { LAYER } from '#web/features/ground/board/board-style.ts'
import { BOARD_GRID } from '#tests/fixtures/board-site.ts'

/** Boards of a given size, side by side with one whose cell layer draws nothing, to time the same pan on each. */
export interface BoardDrawPage {
  build: (columns: number, rows: number, empty: boolean) => Promise<void>
  /** pans and waits for the pixels of every frame; returns milliseconds */
  pan: (frames: number) => Promise<number>
}

declare global {
  interface Window {
    boardDraw: BoardDrawPage
  }
}

let board: BoardMap | undefined

function buildBoard(columns: number, rows: number): BoardMap {
  const grid: GridDefinition = { ...BOARD_GRID, columns, rows }
  const side = cellSideMm(grid)
  const corner = (column: number, row: number) => gridToSite(grid, { u: column * side, v: row * side })
  const count = columns * rows
  const cells = {
    column: Uint16Array.from({ length: count }, (_, cell) => cell % columns),
    row: Uint16Array.from({ length: count }, (_, cell) => Math.floor(cell / columns)),
    zone: new Int16Array(count),
    baseUm: new Float64Array(count),
  }
  const container = document.querySelector<HTMLElement>('#root')!
  Object.assign(container.style, { width: '1280px', height: '800px' })
  const boundary = [corner(0, 0), corner(columns, 0), corner(columns, rows), corner(0, rows)]
  const made = createBoardMap({
    container,
    site: { grid, system: 'EPSG:2285', boundary, zones: [], cells },
    theme: 'light',
    allowRotation: false,
    label: 'Speed',
    fitPadding: undefined,
    onOpenStake: () => undefined,
  })
  made.setSheet(
    {
      revision: 1,
      cut: { kind: 'surface' },
      state: Uint8Array.from({ length: count }, (_, cell) => 1 + (Math.floor(cell / 7) % (GROUND_STATES.length - 1))),
      flags: Uint8Array.from({ length: count }, (_, cell) => (cell % 5 === 0 ? 1 : 0)),
      lift: Int16Array.from({ length: count }, (_, cell) => 1 + (Math.floor(cell / 11) % 4)),
      top: Int32Array.from({ length: count }, (_, cell) => 10_000 + 2_000 * (Math.floor(cell / 11) % 4)),
      lot: new Uint32Array(count),
      test: new Uint32Array(count),
    },
    null,
  )
  return made
}

window.boardDraw = {
  async build(columns, rows, empty) {
    board?.remove()
    board = buildBoard(columns, rows)
    const { map } = board
    await map.once('idle')
    if (!empty) return
    map.removeLayer(LAYER.cells)
    map.addLayer({ id: 'empty', type: 'custom', render: () => undefined }, LAYER.mask)
    await map.once('idle')
  },
  async pan(frames) {
    const { map } = board!
    const gl = map.getCanvas().getContext('webgl2')!
    const pixel = new Uint8Array(4)
    const start = performance.now()
    for (let frame = 0; frame < frames; frame++) {
      const drawn = new Promise<void>((resolve) => {
        void map.once('render', () => {
          // only reading back waits for the card
          gl.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, pixel)
          resolve()
        })
      })
      map.panBy([frame % 40 < 20 ? 3 : -3, 0], { duration: 0 })
      await drawn
    }
    return performance.now() - start
  },
}
