import { setTimeout as sleep } from 'node:timers/promises'
import { expect, test } from 'vitest'
import { createTurns } from '#api/files/turns.ts'

test('at most so many run at a time, in the order they came, and a failure gives its turn on', async () => {
  const inTurn = createTurns(2)
  let running = 0
  let most = 0
  const order: number[] = []
  const work = (index: number) =>
    inTurn(async () => {
      most = Math.max(most, ++running)
      order.push(index)
      await sleep(5)
      running--
      if (index === 1) throw new Error('broken')
    })
  const ends = await Promise.allSettled([0, 1, 2, 3, 4, 5].map(work))
  expect([most, running, order]).toEqual([2, 0, [0, 1, 2, 3, 4, 5]])
  expect(ends.map((end) => end.status)).toEqual(['fulfilled', 'rejected', 'fulfilled', 'fulfilled', 'fulfilled', 'fulfilled'])
})
