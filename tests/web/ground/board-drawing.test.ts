import { describe, expect, test } from 'vitest'
import { fitCamera } from '#web/features/ground/board/board-camera.ts'
import { contourInterval, contourSegments } from '#web/features/ground/board/board-contours.ts'
import { cellsInArea } from '#web/features/ground/board/board-gestures.ts'
import { chooseScale, northTurn } from '#web/features/ground/board/map-furniture.tsx'
import { createBoardProjection, mercatorOf } from '#web/features/ground/board/board-projection.ts'
import { marginLabels } from '#web/features/ground/board/sheet-margins.tsx'
import { BOARD_GRID, BOARD_SITE, boardCellAt } from '#tests/fixtures/board-site.ts'

const projection = createBoardProjection(BOARD_GRID, BOARD_SITE.system)

describe('fitting the site', () => {
  test('puts every corner of the boundary inside the free part of the window, and two sides on its edge', () => {
    const size = { width: 938, height: 770 }
    const free = { top: 60, right: 40, bottom: 80, left: 50 }
    const camera = fitCamera(projection, BOARD_SITE.boundary, size, free)
    const world = 512 * 2 ** camera.zoom
    const turn = (camera.bearing * Math.PI) / 180
    const middle = mercatorOf(camera.center)
    const pixels = BOARD_SITE.boundary.map((point) => {
      const { x, y } = mercatorOf(projection.siteToLonLat(point))
      const [dx, dy] = [(x - middle.x) * world, (y - middle.y) * world]
      return { x: size.width / 2 + dx * Math.cos(turn) + dy * Math.sin(turn), y: size.height / 2 - dx * Math.sin(turn) + dy * Math.cos(turn) }
    })
    const xs = pixels.map((pixel) => pixel.x)
    const ys = pixels.map((pixel) => pixel.y)
    expect(Math.min(...xs)).toBeGreaterThan(free.left - 0.5)
    expect(Math.max(...xs)).toBeLessThan(size.width - free.right + 0.5)
    expect(Math.min(...ys)).toBeGreaterThan(free.top - 0.5)
    expect(Math.max(...ys)).toBeLessThan(size.height - free.bottom + 0.5)
    const slack = Math.min(938 - 90 - (Math.max(...xs) - Math.min(...xs)), 770 - 140 - (Math.max(...ys) - Math.min(...ys)))
    expect(slack).toBeLessThan(1)
  })
})

describe('sheet margins', () => {
  const range = { origin: 52, step: 34, count: 24, length: 938, gap: 20, selected: undefined }

  test('name every column while there is room, in the middle of the cell', () => {
    const labels = marginLabels(range)
    expect(labels).toHaveLength(24)
    expect(labels[0]).toEqual({ index: 0, at: 69 })
  })

  test('thin out to every 2nd, 5th, 10th as cells get small, counted from 1', () => {
    expect(marginLabels({ ...range, step: 11 }).map(({ index }) => index + 1)).toEqual([2, 4, 6, 8, 10, 12, 14, 16, 18, 20, 22, 24])
    expect(marginLabels({ ...range, step: 4 }).map(({ index }) => index + 1)).toEqual([5, 10, 15, 20])
  })

  test('always name the selected one and keep its neighbours from running into it', () => {
    expect(marginLabels({ ...range, step: 4, selected: 10 }).map(({ index }) => index + 1)).toEqual([5, 11, 20])
  })

  test('leave out what has been panned off the sheet', () => {
    expect(marginLabels({ ...range, origin: -200 }).map(({ index }) => index)[0]).toBe(7)
  })
})

describe('scale bar and north arrow', () => {
  test('the bar is the longest round length that fits', () => {
    expect(chooseScale(0.68, 'us-ft', 170)).toEqual({ length: 200, pixels: 136, blocks: 4, unit: 'ft' })
    expect(chooseScale(2.1, 'm', 170)).toEqual({ length: 50, pixels: 105, blocks: 5, unit: 'm' })
    expect(chooseScale(400, 'm', 170)).toMatchObject({ length: 0.2, unit: 'm' })
  })

  test('north stands as far to the right as the grid is turned left, and follows when the map is turned', () => {
    expect(northTurn({ projection }, projection.bearing)).toBeCloseTo(11.2, 9)
    expect(northTurn({ projection }, projection.bearing + 30)).toBeCloseTo(-18.8, 9)
  })
})

describe('contours', () => {
  const cells = (heights: readonly number[]) => ({ column: [0, 1, 2, 0, 1, 2], row: [0, 0, 0, 1, 1, 1], zone: [0, 0, 0, 0, 0, 0], baseUm: heights })
  const metres = (values: readonly number[]) => cells(values.map((value) => value * 1_000_000))

  test('lie where the level lies between the cell centres', () => {
    const segments = contourSegments(metres([0.1, 0.35, 0.4, 0.1, 0.35, 0.4]), { columns: 3, rows: 2 }, 'm')
    expect(segments).toHaveLength(1)
    const [[a, b]] = segments as [[{ column: number; row: number }, { column: number; row: number }]]
    expect(a.column).toBeCloseTo(0.5 + 0.15 / 0.25, 9)
    expect(b.column).toBeCloseTo(a.column, 9)
    expect([a.row, b.row].sort()).toEqual([0.5, 1.5])
  })

  test('are none on level ground and none where a height is unknown', () => {
    expect(contourSegments(metres([2, 2, 2, 2, 2, 2]), { columns: 3, rows: 2 }, 'm')).toEqual([])
    expect(contourSegments(cells([0, NaN, 2e6, 1e6, NaN, 3e6]), { columns: 3, rows: 2 }, 'm')).toEqual([])
  })

  test('keep to at most 16 levels', () => {
    expect(contourInterval(3)).toBe(0.25)
    expect(contourInterval(7)).toBe(0.5)
    expect(contourInterval(30)).toBe(2)
  })
})

test('a drawn rectangle takes the cells it touches and nothing outside the boundary, either way it was drawn', () => {
  const lookup = new Map(Array.from(BOARD_SITE.cells.column, (column, cell) => [`${column} ${BOARD_SITE.cells.row[cell]!}`, cell]))
  const board = { site: BOARD_SITE, cellAt: ({ column, row }: { column: number; row: number }) => lookup.get(`${column} ${row}`) }
  const expected = [boardCellAt(1, 3), boardCellAt(2, 3), boardCellAt(0, 4), boardCellAt(1, 4), boardCellAt(2, 4)]
  expect(cellsInArea(board, { from: { column: -3, row: 3.2 }, to: { column: 2.9, row: 4.1 } })).toEqual(expected)
  expect(cellsInArea(board, { from: { column: 2.9, row: 4.1 }, to: { column: -3, row: 3.2 } })).toEqual(expected)
})
