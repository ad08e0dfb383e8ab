import { useEffect, useId, useState } from 'react'
import type { GroundState } from '#shared/domain/ground-state.ts'
import type { PlanUnit } from '#shared/domain/site-geometry.ts'
import { OVERLAY_LOOKS, stateLook } from '#shared/look/ground-look.ts'
import { stateFill } from '#web/components/drawing/state-fill.ts'
import { sheetFrame } from './board-camera.ts'
import type { BoardMap } from './board-map.ts'

/** Turns from the map's top to the system's north, degrees clockwise. */
export function northTurn(board: Pick<BoardMap, 'projection'>, mapBearing: number): number {
  const { bearing, grid } = board.projection
  return grid.rotationDeg + bearing - mapBearing
}

export interface ScaleBar {
  /** length of the bar in the site's unit, a round number */
  readonly length: number
  readonly pixels: number
  readonly blocks: number
  readonly unit: string
}

/** The longest round scale bar within a width; its blocks are round numbers too. */
export function chooseScale(pixelsPerUnit: number, unit: PlanUnit, widest: number): ScaleBar {
  const power = 10 ** Math.floor(Math.log10(widest / pixelsPerUnit))
  const step = [5, 2, 1].find((candidate) => candidate * power * pixelsPerUnit <= widest) ?? 1
  const length = step * power
  return { length, pixels: length * pixelsPerUnit, blocks: step === 5 ? 5 : 4, unit: unit === 'm' ? 'm' : 'ft' }
}

interface CameraFigures {
  readonly pixelsPerUnit: number
  readonly bearing: number
}

function readCamera({ map, projection, site }: BoardMap): CameraFigures {
  const frame = sheetFrame(map, projection)
  return { pixelsPerUnit: Math.hypot(frame.columnX, frame.columnY) / site.grid.cellSize, bearing: map.getBearing() }
}

/** Camera figures the furniture needs, read again when the map has zoomed, turned or been resized. */
function useCamera(board: BoardMap): CameraFigures {
  const [camera, setCamera] = useState(() => readCamera(board))
  useEffect(() => {
    const events = ['zoom', 'rotate', 'resize'] as const
    const update = (): void => setCamera(readCamera(board))
    for (const event of events) board.map.on(event, update)
    return () => {
      for (const event of events) board.map.off(event, update)
    }
  }, [board])
  return camera
}

function NorthArrow({ turn }: { turn: number }) {
  return (
    <svg className="board-north" width={50} height={50} viewBox="-25 -25 50 50" role="img" aria-label="North arrow">
      <circle r={23} className="board-north-disc" />
      <g transform={`rotate(${turn})`}>
        <path d="M0 -19L5.5 6L0 2.5z" className="board-north-dark" />
        <path d="M0 -19L-5.5 6L0 2.5z" className="board-north-light" />
        <text y={17} textAnchor="middle">
          N
        </text>
      </g>
    </svg>
  )
}

function ScaleBarDrawing({ scale }: { scale: ScaleBar }) {
  const block = scale.pixels / scale.blocks
  const label = (value: number): string => value.toLocaleString('en-US', { maximumFractionDigits: 3 })
  const middle = scale.blocks === 4 ? [2] : []
  return (
    <svg
      className="board-scale"
      width={scale.pixels + 46}
      height={36}
      viewBox={`-12 -20 ${scale.pixels + 46} 36`}
      role="img"
      aria-label={`Scale: the bar is ${label(scale.length)} ${scale.unit} long`}
    >
      {Array.from({ length: scale.blocks }, (_, index) => (
        <rect key={index} x={index * block} width={block} height={5} className={index % 2 === 0 ? 'board-scale-dark' : 'board-scale-light'} />
      ))}
      <text y={-5}>0</text>
      {middle.map((index) => (
        <text key={index} x={index * block} y={-5} textAnchor="middle">
          {label((scale.length / scale.blocks) * index)}
        </text>
      ))}
      <text x={scale.pixels + 28} y={-5} textAnchor="end">{`${label(scale.length)} ${scale.unit}`}</text>
    </svg>
  )
}

interface LegendEntry {
  readonly key: string
  readonly state: GroundState
  readonly near: boolean
  readonly word: string
}

const LEGEND_STATES: readonly GroundState[] = [
  'not-placed',
  'awaiting-test',
  'awaiting-retest',
  'meets-spec',
  'released',
  'accepted-as-is',
  'recheck',
  'rework',
  'suspect',
]

function legendEntries(): LegendEntry[] {
  const plain: LegendEntry[] = LEGEND_STATES.map((state) => ({ key: state, state, near: false, word: stateLook(state).word }))
  const after = plain.findIndex((entry) => entry.state === 'meets-spec') + 1
  return plain.toSpliced(after, 0, { key: 'near', state: 'meets-spec', near: true, word: OVERLAY_LOOKS.near.word })
}

function Legend() {
  const [open, setOpen] = useState(false)
  const list = useId()
  return (
    <div className="board-legend">
      <button type="button" className="board-legend-toggle" aria-expanded={open} aria-controls={list} onClick={() => setOpen(!open)}>
        Legend
      </button>
      <ul id={list} data-open={open}>
        {legendEntries().map(({ key, state, near, word }) => (
          <li key={key}>
            <svg width={17} height={17} aria-hidden>
              <rect width={17} height={17} fill={stateFill(state, near)} className={state === 'not-placed' ? 'board-legend-bare' : undefined} />
            </svg>
            {word}
          </li>
        ))}
      </ul>
    </div>
  )
}

/** North arrow, scale bar and legend along the lower edge of the map. */
export function MapFurniture({ board }: { board: BoardMap }) {
  const { pixelsPerUnit, bearing } = useCamera(board)
  return (
    <div className="board-furniture">
      <Legend />
      <div className="board-furniture-right">
        <NorthArrow turn={northTurn(board, bearing)} />
        <ScaleBarDrawing scale={chooseScale(pixelsPerUnit, board.site.grid.unit, 170)} />
      </div>
    </div>
  )
}
