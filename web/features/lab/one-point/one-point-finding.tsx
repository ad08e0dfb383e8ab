import { useMemo } from 'react'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import { shapeOf } from '#shared/domain/family-member.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { OnePointResult } from '#shared/schemas/one-point.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { FamilyPlot, type PlottedMember } from './family-plot.tsx'
import { fitWords, offWords, usableWords } from './one-point-words.ts'

type OnePointFindingProps = {
  result: OnePointResult
  /** null until it can be worked out */
  point: LabPoint | null
  /** every curve of the site, for the lines */
  curves: readonly Curve[]
}

/** The family with the point in it, and in words what follows. */
export function OnePointFinding({ result, point, curves }: OnePointFindingProps) {
  const { units } = useSite()
  const members = useMemo(
    () =>
      result.family.flatMap(({ id, code, pair }): PlottedMember[] => {
        const curve = curves.find((each) => each.id === id)
        return curve === undefined ? [] : [{ id, code, pair, drawn: shapeOf({ ...curve, code, pair }).drawn, inUse: id === result.inUse.id }]
      }),
    [result.family, result.inUse.id, curves],
  )
  const { fit, off } = result
  const gs = Math.max(...members.map((member) => curves.find((curve) => curve.id === member.id)?.gs ?? 0), 0)
  const between = fit.ok && fit.on === 'between' ? { drawn: fit.drawn, pair: fit.pair } : null
  const said = point === null ? 'The family of curves' : `The family of curves with the point at ${units.percent(point.moisture)} and ${units.density(point.dryDensity)}`
  return (
    <div>
      {members.length > 0 && <FamilyPlot label={said} members={members} point={point} between={between} gs={gs === 0 ? 2.7 : gs} />}
      {point !== null && (
        <div aria-live="polite" className={classNames('mt-4 border-l-4 pl-[14px] leading-[1.45]', !fit.ok || !fit.usable || off?.off === true ? 'border-warn' : 'border-meets-spec')}>
          <b className="block font-semibold">{fitWords(result, units)}</b>
          {usableWords(result) !== '' && <p className="m-0">{usableWords(result)}</p>}
          <p className={classNames('m-0', off?.off === true && 'font-semibold text-warn')}>{offWords(result, units)}</p>
          {fit.warnings.map((warning) => (
            <p key={warning.code} className="m-0 text-warn">
              {warning.message}
            </p>
          ))}
        </div>
      )}
    </div>
  )
}
