import { StateLegend } from '#web/components/drawing/state-legend.tsx'
import { stateFill } from '#web/components/drawing/state-fill.ts'
import { TestMarkShape } from '#web/components/ui/test-mark.tsx'
import { boundaryPath, cellStates, CELL, COLUMNS, contourPath, hachurePath, ROWS, stepPath, TESTS } from './sign-in-plan-cells.ts'

const LEFT = 74
const TOP = 66
const WIDTH = LEFT + COLUMNS * CELL + 60
const HEIGHT = TOP + ROWS * CELL + 60
const LETTERS = Array.from({ length: COLUMNS }, (_, column) => String.fromCharCode(65 + column))
const NUMBERS = Array.from({ length: ROWS }, (_, row) => row + 1)
const CONTOURS = Array.from({ length: 17 }, (_, index) => index)

/** A plan with nothing on it that anybody built: it shows what a sheet looks like. */
export function SignInPlan() {
  return (
    <div aria-hidden className="relative min-h-0 overflow-hidden bg-sheet">
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} preserveAspectRatio="xMinYMin slice" className="absolute inset-0 size-full">
        <g fill="none" stroke="var(--rule)" strokeWidth={1}>
          {CONTOURS.map((index) => (
            <path key={index} d={contourPath(index, WIDTH)} />
          ))}
        </g>
        <g transform={`translate(${LEFT} ${TOP})`}>
          {cellStates().map(({ column, row, state }) => (
            <rect
              key={`${column} ${row}`}
              x={column * CELL}
              y={row * CELL}
              width={CELL}
              height={CELL}
              fill={stateFill(state)}
              stroke={state === 'not-placed' ? 'var(--rule-2)' : state === 'released' ? '#2c7a75' : '#fff'}
              strokeOpacity={state === 'not-placed' ? 1 : 0.55}
              strokeWidth={0.7}
              strokeDasharray={state === 'not-placed' ? '2 3' : undefined}
            />
          ))}
          <g fill="none" stroke="var(--ink)">
            <path d={hachurePath()} strokeWidth={0.7} />
            <path d={stepPath()} strokeWidth={1.3} />
            <path d={boundaryPath()} strokeWidth={2.2} />
          </g>
          {TESTS.map(({ column, row, outcome, verification }) => (
            <TestMarkShape key={`${column} ${row}`} outcome={outcome} verification={verification} x={column * CELL} y={row * CELL} scale={0.58} />
          ))}
        </g>
        <g className="max-lg:hidden">
          <path d={`M0 0H${WIDTH}V30H0zM0 0H30V${HEIGHT}H0z`} fill="var(--sheet)" />
          <path d={`M30 ${HEIGHT}V30H${WIDTH}`} fill="none" stroke="var(--rule-2)" />
          <g fontFamily="var(--font-mono)" fontSize={11} fill="var(--ink-2)" textAnchor="middle">
            {LETTERS.map((letter, column) => (
              <text key={letter} x={LEFT + (column + 0.5) * CELL} y={20}>
                {letter}
              </text>
            ))}
            {NUMBERS.map((number, row) => (
              <text key={number} x={15} y={TOP + (row + 0.5) * CELL + 4}>
                {number}
              </text>
            ))}
          </g>
        </g>
      </svg>
      <StateLegend
        near
        states={['not-placed', 'awaiting-test', 'awaiting-retest', 'meets-spec', 'released', 'recheck', 'rework', 'suspect']}
        className="absolute right-5 bottom-5 left-[50px] max-lg:hidden"
      />
    </div>
  )
}
