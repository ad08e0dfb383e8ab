import { MARK_INK } from '#shared/look/theme.ts'
import { classNames } from '#web/lib/class-names.ts'

export type TestOutcome = 'passes' | 'near' | 'fails' | 'suspect'

const WORDS: Readonly<Record<TestOutcome, string>> = {
  passes: 'passes',
  near: 'passes, near a limit',
  fails: 'fails',
  suspect: 'suspect',
}

const INK = MARK_INK.css

type ShapeProps = { outcome: TestOutcome; verification?: boolean; x: number; y: number; scale?: number }

function OutcomeShape({ outcome }: { outcome: TestOutcome }) {
  if (outcome === 'fails') {
    return (
      <>
        <path d="M-9 -9h18v18h-18z" fill="#fff" />
        <path d="M-5 -5l10 10m0 -10l-10 10" />
      </>
    )
  }
  if (outcome === 'suspect') {
    return (
      <>
        <path d="M0 -12l11 20h-22z" fill="#fff" />
        <path d="M-2.6 -2.2c0 -3.4 5.2 -3.4 5.2 -0.2c0 2.2 -2.6 2.2 -2.6 4.4" strokeWidth={1.7} />
        <circle cx={0} cy={5.2} r={1.1} fill={INK} stroke="none" />
      </>
    )
  }
  return (
    <>
      <circle r={9} fill="#fff" />
      {outcome === 'near' ? <path d="M-9 0h18" /> : <circle r={3.2} fill={INK} stroke="none" />}
    </>
  )
}

/** The mark of a test for use inside a drawing: ring and dot, ring and bar, crossed square, triangle; owner's tests ringed twice. */
export function TestMarkShape({ outcome, verification = false, x, y, scale = 1 }: ShapeProps) {
  return (
    <g transform={`translate(${x} ${y}) scale(${scale})`} fill="none" stroke={INK} strokeWidth={2}>
      {verification && (
        <>
          <circle r={14} fill="#fff" stroke="none" />
          <circle r={13} strokeWidth={1.4} />
        </>
      )}
      <g transform={verification && (outcome === 'fails' || outcome === 'suspect') ? 'scale(0.82)' : undefined}>
        <OutcomeShape outcome={outcome} />
      </g>
    </g>
  )
}

type TestMarkProps = { outcome: TestOutcome; verification?: boolean; size?: number; className?: string; decorative?: boolean }

export function TestMark({ outcome, verification = false, size = 22, className, decorative = false }: TestMarkProps) {
  const words = `${verification ? 'Verification test' : 'Test'} ${WORDS[outcome]}`
  return (
    <svg
      width={size}
      height={size}
      viewBox="-15 -15 30 30"
      className={classNames('block shrink-0', className)}
      {...(decorative ? { 'aria-hidden': true } : { role: 'img', 'aria-label': words })}
    >
      <TestMarkShape outcome={outcome} verification={verification} x={0} y={0} />
    </svg>
  )
}
