import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef } from 'react'
import { groundStateOf } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import type { Theme } from '#shared/look/theme.ts'
import type { SiteCells } from '#shared/schemas/site.ts'
import { siteQueries } from '#web/data/site/queries.ts'
import { useTheme } from '#web/lib/theme.ts'
import { useGround } from '#web/lib/use-ground.ts'

const WIDTH = 168
const HEIGHT = 104

type Size = { readonly columns: number; readonly rows: number }

/** Below this a line between the cells would hide their colour. */
const SMALLEST_WITH_LINES = 5

function draw(canvas: HTMLCanvasElement, cells: SiteCells, sheet: GroundSheet, { columns, rows }: Size, theme: Theme): void {
  const context = canvas.getContext('2d')
  if (context === null) return
  const scale = window.devicePixelRatio || 1
  canvas.width = WIDTH * scale
  canvas.height = HEIGHT * scale
  context.scale(scale, scale)
  const side = Math.min(WIDTH / columns, HEIGHT / rows)
  const gap = side >= SMALLEST_WITH_LINES ? 0.7 : 0
  const top = (HEIGHT - rows * side) / 2
  sheet.state.forEach((code, cell) => {
    const state = groundStateOf(code)
    const { fill, cellLine } = stateLook(state, theme)
    const x = (cells.column[cell] ?? 0) * side
    const y = top + (cells.row[cell] ?? 0) * side
    context.fillStyle = fill.css
    // a cell without a line reaches a little into the next, so that no seam shows between them
    context.fillRect(x, y, side - gap + (gap === 0 ? 0.4 : 0), side - gap + (gap === 0 ? 0.4 : 0))
    if (state !== 'not-placed' || gap === 0) return
    context.strokeStyle = cellLine.colour.css
    context.lineWidth = 0.7
    context.strokeRect(x + 0.35, y + 0.35, side - 1.4, side - 1.4)
  })
}

/** The working surface of a site as it is now, small, in the grid's own axes. What it shows is said in words beside it. */
export function SitePlan({ siteId, columns, rows }: Size & { siteId: string }) {
  const canvas = useRef<HTMLCanvasElement>(null)
  const theme = useTheme()
  const { data: cells } = useQuery(siteQueries.cells(siteId))
  const { sheet } = useGround(siteId)

  useEffect(() => {
    if (canvas.current !== null && cells !== undefined && sheet !== undefined) draw(canvas.current, cells, sheet, { columns, rows }, theme)
  }, [cells, sheet, columns, rows, theme])

  return <canvas ref={canvas} aria-hidden style={{ width: WIDTH, height: HEIGHT }} className="block bg-sheet" />
}
