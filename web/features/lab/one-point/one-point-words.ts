import { CURVE_OFF_LIMIT } from '#shared/domain/family-of-curves.ts'
import type { OnePointResult } from '#shared/schemas/one-point.ts'
import { pairWords } from '#web/features/lab/lab-words.ts'
import type { Units } from '#web/lib/units.ts'

/** Which curve the point lies on: "On RB-3." or "Between RB-2 and RB-3: 119.2 pcf at 11.8 %." */
export function fitWords({ fit, family }: OnePointResult, units: Units): string {
  if (!fit.ok) return fit.reason.message
  const [first = '', second = ''] = fit.members.map((id) => family.find((member) => member.id === id)?.code ?? '')
  const pair = pairWords(fit.pair, units)
  return fit.on === 'curve' ? `On ${first}: ${pair}.` : `Between ${first} and ${second}: ${pair}.`
}

/** Whether the point may be used, and what to mould where it may not. */
export function usableWords({ fit }: OnePointResult): string {
  if (!fit.ok) return ''
  return fit.unusable?.message ?? `At ${fit.shareOfOptimum.toFixed(0)} % of that optimum: it may be used.`
}

/** How far the curve in use is off, and what to do. */
export function offWords({ fit, family, inUse, off }: OnePointResult, units: Units): string {
  if (off === null || !fit.ok) return `It says nothing of ${inUse.code}, the curve in use.`
  const limits = [units.density(CURVE_OFF_LIMIT.dryDensity), units.percent(CURVE_OFF_LIMIT.moisture)]
  if (fit.on === 'curve' && fit.members[0] === inUse.id) return `${inUse.code}, the curve in use, is the right one.`
  const maximum = `${units.density(Math.abs(off.dryDensity))} too ${off.dryDensity > 0 ? 'high' : 'low'}`
  const optimum = `its optimum ${units.percent(Math.abs(off.moisture))} too ${off.moisture > 0 ? 'wet' : 'dry'}`
  const said = `${inUse.code}, the curve in use, is ${maximum}, ${optimum}`
  if (!off.off) return `${said}: within ${limits.join(' and ')}, it may stay.`
  const member = fit.on === 'curve' ? family.find(({ id }) => id === fit.members[0]) : undefined
  return `${said}: beyond ${limits.join(' or ')}. ${member === undefined ? 'Run a full curve of this soil.' : `Judge this soil by ${member.code}.`}`
}

/** The finding in the few words of a register. */
export function shortWords(result: OnePointResult): string {
  const { fit, off, inUse } = result
  if (!fit.ok) return fit.reason.code === 'above-zero-air-voids' ? 'Cannot be right' : 'Outside the family'
  if (!fit.usable) return 'Not usable'
  return off?.off === true ? `${inUse.code} is off` : `${inUse.code} fits`
}
