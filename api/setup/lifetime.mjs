import { stopRunningCommands } from './commands.mjs'
import { describeFailure, say, SetupError } from './say.mjs'

// npm passes Ctrl-C on to a program that has had it from the terminal already: only a later one is a second Ctrl-C.
const ONE_CTRL_C_MS = 1000
const EXIT_CODES = { SIGINT: 130, SIGTERM: 143, SIGHUP: 129 }

/**
 * Runs a command from start to clean end: what it started is stopped in reverse order when it returns, fails, or is told to end
 * by Ctrl-C, kill or a closed terminal. The process then exits with the code that says which.
 * @param {(lifetime: Lifetime) => Promise<number>} main its result is the exit code
 */
export async function runLifetime(main) {
  const lifetime = new Lifetime()
  for (const [signal, code] of Object.entries(EXIT_CODES)) process.on(signal, () => void lifetime.end(code))
  let code = 1
  try {
    code = await main(lifetime)
  } catch (error) {
    if (!lifetime.ending) process.stderr.write(`${describeFailure(error)}\n`)
  }
  await lifetime.end(code)
}

/** What must be stopped before the command may exit. */
export class Lifetime {
  ending = false
  #endingSince = 0
  /** @type {(() => unknown)[]} */
  #stops = []
  /** @type {(() => void)[]} */
  #hurries = []

  /** Registers a stop; refused once the end has begun. @param {() => unknown} stop */
  onEnd(stop) {
    this.#stops.push(stop)
  }

  /** What a second Ctrl-C does to something slow to stop. @param {() => void} hurry */
  onHurry(hurry) {
    this.#hurries.push(hurry)
  }

  /** Call before each step: after Ctrl-C nothing new may start. */
  check() {
    if (this.ending) throw new SetupError('Stopped.')
  }

  /** @param {number} code */
  async end(code) {
    if (this.ending) {
      if (Date.now() - this.#endingSince > ONE_CTRL_C_MS) for (const hurry of this.#hurries) hurry()
      return
    }
    this.ending = true
    this.#endingSince = Date.now()
    await stopRunningCommands()
    for (let stop = this.#stops.pop(); stop !== undefined; stop = this.#stops.pop()) {
      try {
        await stop()
      } catch (error) {
        say(describeFailure(error))
        code ||= 1
      }
    }
    process.exit(code)
  }
}
