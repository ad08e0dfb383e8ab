import { createHash } from 'node:crypto'
import { seededRandom } from '#shared/domain/seeded-random.ts'

/** One run of seeded chance: the same demo for the same clock. */
export interface Chance {
  uniform(low: number, high: number): number
  /** normal deviate by the polar method, cut at 2.2 standard deviations */
  normal(mean: number, deviation: number): number
  id(): string
  seed(): string
}

export function createChance(name: string): Chance {
  const digest = (text: string) => createHash('sha256').update(`${name} ${text}`).digest('hex')
  const random = seededRandom(digest('numbers').slice(0, 32))
  let count = 0
  const normal = (): number => {
    const [a, b] = [2 * random() - 1, 2 * random() - 1]
    const s = a * a + b * b
    if (s >= 1 || s === 0) return normal()
    const value = a * Math.sqrt((-2 * Math.log(s)) / s)
    return Math.abs(value) > 2.2 ? normal() : value
  }
  return {
    uniform: (low, high) => low + (high - low) * random(),
    normal: (mean, deviation) => mean + deviation * normal(),
    id() {
      const hex = digest(`id ${count++}`)
      return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-4${hex.slice(13, 16)}-a${hex.slice(17, 20)}-${hex.slice(20, 32)}`
    },
    seed: () => digest(`seed ${count++}`).slice(0, 32),
  }
}
