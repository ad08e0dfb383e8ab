import { describe, expect, it } from 'vitest'
import { checkApparatus, compactionEnergy, compactionMethod, methodLetters, nominalEnergy } from '#shared/domain/compaction-method.ts'
import type { UsedApparatus } from '#shared/domain/compaction-method.ts'
import { convertVolume } from '#shared/units/volume.ts'

const used = (change: Partial<UsedApparatus> = {}): UsedApparatus => ({ mouldVolumeCm3: null, layers: null, blows: null, oversizePercent: null, ...change })
const method = (...args: Parameters<typeof compactionMethod>) => {
  const found = compactionMethod(...args)
  if (found === null) throw new Error('no such method')
  return found
}
const flags = (...args: Parameters<typeof checkApparatus>) => {
  const check = checkApparatus(...args)
  return check.ok ? check.flags.map((flag) => flag.code) : [check.reason.code]
}

describe('compactionMethod', () => {
  // layers: kipdf.com m-3-1 (D698), publicdocs.santa-ana.org 110043 page 579 (D1557); rammers and drops: buildingstandards.com.pk proctor-test
  it('knows the two efforts', () => {
    expect(method('D698', 'A')).toMatchObject({ layers: 3, blows: 25, rammerLbf: 5.5, dropIn: 12, mould: '4-in', sieve: 'no-4' })
    expect(method('D1557', 'A')).toMatchObject({ layers: 5, blows: 25, rammerLbf: 10, dropIn: 18, mould: '4-in' })
    expect(method('T 99', 'D')).toMatchObject({ layers: 3, blows: 56, mould: '6-in', sieve: '3/4-in' })
    expect(method('T 180', 'C')).toMatchObject({ layers: 5, blows: 25, mould: '4-in', sieve: '3/4-in' })
  })

  // FM 5-472 page 4 records 0.0333 and 0.075 ft³; 4.000 or 6.000 in across by 4.584 in recomputes to 944 and 2124 cm³
  it('gives the moulds their recorded volumes', () => {
    expect(convertVolume(method('D698', 'A').volumeCm3, 'cm3', 'ft3')).toBeCloseTo(0.0333, 4)
    expect(convertVolume(method('D698', 'C').volumeCm3, 'cm3', 'ft3')).toBeCloseTo(0.075, 4)
  })

  // nominal 12,400 and 56,000 ft·lbf/ft³ (the standards’ titles); recomputed with 1/30 and 0.075 ft³: 12,375, 56,250, 12,320, 56,000
  it('spends the nominal energy to 1 %', () => {
    expect(Math.abs(compactionEnergy(method('D698', 'A')) / 12_375 - 1)).toBeLessThan(0.001)
    expect(Math.abs(compactionEnergy(method('D1557', 'A')) / 56_250 - 1)).toBeLessThan(0.001)
    expect(Math.abs(compactionEnergy(method('D698', 'C')) / 12_320 - 1)).toBeLessThan(0.001)
    expect(Math.abs(compactionEnergy(method('T 180', 'D')) / 56_000 - 1)).toBeLessThan(0.001)
  })

  it('has no method D in D698 and D1557 (edition 07), and four letters in T 99 and T 180', () => {
    expect(compactionMethod('D698', 'D')).toBeNull()
    expect(methodLetters('D1557')).toEqual(['A', 'B', 'C'])
    expect(methodLetters('T 180')).toEqual(['A', 'B', 'C', 'D'])
    expect(checkApparatus('D698', 'D', used())).toMatchObject({ ok: false, field: 'procedure' })
  })
})

describe('checkApparatus', () => {
  // D698-07e1: 25 % on the No. 4 (A) or 3/8 in (B), 30 % on the 3/4 in (C): kipdf.com m-3-1. T 99: 40 % on the No. 4, 30 % on the 3/4 in: scribd.com 423740387
  it('takes up to the method’s share on its sieve, and names a coarser letter beyond', () => {
    expect(checkApparatus('D698', 'A', used({ oversizePercent: 25 }))).toMatchObject({ ok: true })
    expect(checkApparatus('D698', 'A', used({ oversizePercent: 25.1 }))).toMatchObject({ ok: false, field: 'oversizePercent', letter: 'B' })
    expect(checkApparatus('D698', 'B', used({ oversizePercent: 26 }))).toMatchObject({ ok: false, letter: 'C' })
    expect(checkApparatus('D698', 'C', used({ oversizePercent: 30 }))).toMatchObject({ ok: true })
    expect(checkApparatus('D698', 'C', used({ oversizePercent: 31 }))).toMatchObject({ ok: false, letter: null })
    expect(checkApparatus('T 99', 'A', used({ oversizePercent: 40 }))).toMatchObject({ ok: true })
    expect(checkApparatus('T 99', 'B', used({ oversizePercent: 41 }))).toMatchObject({ ok: false, letter: 'C' })
    expect(checkApparatus('T 180', 'D', used({ oversizePercent: 30.5 }))).toMatchObject({ ok: false, letter: null })
  })

  it('flags mould, layers and blows that are another method’s (tolerances from memory)', () => {
    expect(flags('D698', 'A', used({ mouldVolumeCm3: 943.3, layers: 3, blows: 25 }))).toEqual([])
    expect(flags('D698', 'A', used({ mouldVolumeCm3: 958 }))).toEqual([])
    expect(flags('D698', 'A', used({ mouldVolumeCm3: 958.1 }))).toEqual(['mould-volume'])
    expect(flags('D698', 'C', used({ mouldVolumeCm3: 944, layers: 5, blows: 25 }))).toEqual(['mould-volume', 'layers', 'blows', 'energy'])
  })

  // D698-00a: A up to 20 % on the No. 4, then B up to 20 % on the 3/8 in: ru.scribd.com 492051314
  it('reads the limits of the issue that was worked by', () => {
    const older = (oversizePercent: number) => used({ edition: '2000', oversizePercent })
    expect(checkApparatus('D698', 'A', older(20))).toMatchObject({ ok: true })
    expect(checkApparatus('D698', 'A', older(22))).toMatchObject({ ok: false, letter: 'B', reason: { message: expect.stringContaining('D698-00 method A takes at most 20 %') as string } })
    expect(checkApparatus('D698', 'A', used({ oversizePercent: 22 }))).toMatchObject({ ok: true })
    expect(checkApparatus('D698', 'B', older(21))).toMatchObject({ ok: false, letter: 'C' })
    // T 99 asks for no issue
    expect(checkApparatus('T 99', 'A', older(39))).toMatchObject({ ok: true })
  })

  // D698-07: the 6 in mould is not allowed for A and B (kipdf.com m-3-1)
  it('flags a mould of the other size', () => {
    expect(flags('D698', 'A', used({ mould: '6-in' }))).toEqual(['mould'])
    expect(flags('T 99', 'B', used({ mould: '6-in' }))).toEqual([])
    expect(flags('T 99', 'B', used({ mould: '4-in' }))).toEqual(['mould'])
  })

  // 5.5 lbf · 1 ft · 25 · 5 · 30 = 20,625 ft·lbf/ft³, 166 % of the nominal 12,400 (arithmetic)
  it('says where another effort was spent', () => {
    const check = checkApparatus('D698', 'A', used({ layers: 5, blows: 25 }))
    expect(check.ok && check.flags.find((flag) => flag.field === 'energy')?.message).toContain('166 %')
    expect(nominalEnergy('T 180')).toBe(56_000)
    // the methods’ own figures are no departure, nor is a mould at the edge of its tolerance
    for (const method of ['D698', 'D1557', 'T 99', 'T 180'] as const) {
      for (const letter of methodLetters(method)) {
        const own = compactionMethod(method, letter)
        expect(flags(method, letter, used({ layers: own?.layers ?? 0, blows: own?.blows ?? 0, mouldVolumeCm3: (own?.volumeCm3 ?? 0) + (own?.volumeToleranceCm3 ?? 0) }))).toEqual([])
      }
    }
  })
})
