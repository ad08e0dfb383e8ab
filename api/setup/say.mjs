/** Prints one plain line about what is being done and why. @param {string} line */
export function say(line) {
  process.stdout.write(`${line}\n`)
}

/** A failure the person at the keyboard can act on: its message is printed as it stands, without a stack. */
export class SetupError extends Error {}

/** What to print for a failure. @param {unknown} error @returns {string} */
export function describeFailure(error) {
  if (error instanceof SetupError) return error.message
  return error instanceof Error ? (error.stack ?? error.message) : String(error)
}
