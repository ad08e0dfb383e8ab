import type { Curve } from '#shared/schemas/lab.ts'
import { sieveWords } from '#web/features/lab/lab-words.ts'

const WRITTEN = { dry: 'dry unit weights', wet: 'wet unit weights', masses: 'mould masses' } as const

const given = (value: number | string | null | undefined, words: string): string[] => (value === null || value === undefined ? [] : [`${value} ${words}`])

/** How the curve was compacted and written down, and where that departs from its method. */
export function CurveNotes({ curve }: { curve: Curve }) {
  const { entry, apparatus, flags, withdrawReason } = curve
  const facts = [
    ...(entry === null ? [] : [`Entered as ${WRITTEN[entry.kind]} of ${entry.specimens.length} specimens`]),
    ...given(apparatus?.mould?.replace('-', ' '), 'mould'),
    ...given(apparatus?.layers, 'layers'),
    ...given(apparatus?.blows, 'blows a layer'),
    ...given(apparatus?.oversizePercent, `% retained on the ${sieveWords(curve.method, curve.procedure)}`),
  ]
  return (
    <>
      {withdrawReason !== null && <p className="mt-1 mb-0 font-medium">Withdrawn: {withdrawReason}</p>}
      {facts.length > 0 && <p className="mt-1 mb-0 text-ink-2">{facts.join(', ')}.</p>}
      {flags.map(({ code, message }) => (
        <p key={`${code} ${message}`} className="mt-1 mb-0 font-medium text-warn">
          {message}
        </p>
      ))}
    </>
  )
}
