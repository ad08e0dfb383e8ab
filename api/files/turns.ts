/** Lets at most `atOnce` of the works it is given run; the others wait in the order they came. */
export function createTurns(atOnce: number): <T>(work: () => Promise<T>) => Promise<T> {
  const waiting: (() => void)[] = []
  let running = 0
  return async (work) => {
    if (running >= atOnce) await new Promise<void>((resolve) => waiting.push(resolve))
    else running++
    try {
      return await work()
    } finally {
      const next = waiting.shift()
      if (next) next()
      else running--
    }
  }
}
