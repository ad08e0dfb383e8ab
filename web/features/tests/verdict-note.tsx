import type { ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'
import { groundOf } from './outcome-words.ts'
import { marginWords, type ShownVerdict } from './verdict-words.ts'

const EDGES = { rework: 'border-rework', suspect: 'border-suspect', 'meets-spec': 'border-meets-spec' } as const

/** Why a result is what it is, and how far from each limit it lies. */
export function VerdictNote({ verdict, children }: { verdict: ShownVerdict; children?: ReactNode }) {
  const ground = groundOf(verdict)
  const edge = ground in EDGES ? EDGES[ground as keyof typeof EDGES] : 'border-rule-2'
  const heads = [...verdict.suspicions.map(({ message }) => message), ...verdict.reasons.map(({ message }) => message)]
  const lines = [...verdict.suspicions.map(({ check }) => check), ...(verdict.outcome === 'pass' ? marginWords(verdict) : []), ...verdict.advice.map(({ message }) => message)]
  return (
    <div className={classNames('mt-[14px] border-l-4 pl-[14px] leading-[1.45]', edge)}>
      {heads.map((head) => (
        <b key={head} className="block font-semibold">
          {head}
        </b>
      ))}
      {lines.map((line) => (
        <p key={line} className="m-0">
          {line}
        </p>
      ))}
      {children}
    </div>
  )
}
