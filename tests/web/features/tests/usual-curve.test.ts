import { describe, expect, it } from 'vitest'
import type { Curve } from '#shared/schemas/lab.ts'
import { buildCurve, MATERIAL } from '#tests/factories/curve-view.ts'
import { usualCurve } from '#web/features/tests/record/usual-curve.ts'

const curve = (id: string, testsJudged: number, change: Partial<Curve> = {}) => buildCurve({ id, code: id, status: 'approved', testsJudged, ...change })
const supersededBy = (id: string): Partial<Curve> => ({ status: 'superseded', superseded: { by: { id, code: id }, at: '2026-11-30T16:00:00.000Z', who: 'Ines Marsh', reason: 'New pit' } })

describe('the usual curve of a material', () => {
  it('is the only approved one', () => {
    expect(usualCurve([curve('a', 0), curve('b', 9, { status: 'draft' })], MATERIAL.id)?.id).toBe('a')
    expect(usualCurve([curve('a', 0)], 'another')).toBeUndefined()
  })

  it('is the one most tests were judged by, a superseded curve’s counting for its last successor', () => {
    expect(usualCurve([curve('a', 4), curve('b', 7)], MATERIAL.id)?.id).toBe('b')
    expect(usualCurve([curve('a', 40, supersededBy('b')), curve('b', 0, supersededBy('c')), curve('c', 1), curve('d', 20)], MATERIAL.id)?.id).toBe('c')
  })

  it('is not guessed where nothing speaks for one of them', () => {
    expect(usualCurve([curve('a', 0), curve('b', 0)], MATERIAL.id)).toBeUndefined()
    expect(usualCurve([curve('a', 3), curve('b', 3)], null)).toBeUndefined()
    expect(usualCurve([curve('a', 3), curve('b', 9, { materialId: 'another' })], null)).toBeUndefined()
  })
})
