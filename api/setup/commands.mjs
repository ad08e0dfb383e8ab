import { spawn } from 'node:child_process'
import { accessSync, constants, statSync } from 'node:fs'
import path from 'node:path'
import { ROOT } from './paths.mjs'
import { signalProcess } from './processes.mjs'
import { say, SetupError } from './say.mjs'

/** @typedef {{ end: (signal: NodeJS.Signals) => void, closed: Promise<unknown>, uninterruptible: boolean, name: string }} Running */

/** @type {Set<Running>} */
const running = new Set()
const END_WITHIN_MS = 5_000

/** Full path of a program, also in the sbin folders a plain user's PATH leaves out. @param {string} name @returns {string | null} */
export function findProgram(name) {
  const folders = [...(process.env.PATH ?? '').split(path.delimiter), '/usr/local/sbin', '/usr/sbin', '/sbin', '/usr/bin']
  for (const folder of folders) {
    const file = path.join(folder, name)
    if (isProgram(file)) return file
  }
  return null
}

/** @param {string} file @returns {boolean} */
export function isProgram(file) {
  try {
    accessSync(file, constants.X_OK)
    return statSync(file).isFile()
  } catch {
    return false
  }
}

/**
 * @typedef {object} RunOptions
 * @property {NodeJS.ProcessEnv} [env]
 * @property {string} [input] text for its standard input
 * @property {boolean} [echo] pass its output through as it comes
 * @property {number} [timeoutMs]
 * @property {boolean} [uninterruptible] waited for on Ctrl-C, never broken off
 */

/**
 * Runs a program to its end.
 * @param {string} program
 * @param {string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<{ code: number, output: string, timedOut: boolean }>} code 127: could not be started, 128: ended by a signal
 */
export function run(program, args, { env = process.env, input, echo = false, timeoutMs, uninterruptible = false } = {}) {
  // A process group of its own, so that it can be ended with everything it has started.
  const child = spawn(program, args, { cwd: ROOT, env, detached: true, stdio: [input === undefined ? 'ignore' : 'pipe', 'pipe', 'pipe'] })
  let output = ''
  let timedOut = false
  /** @param {NodeJS.WriteStream} stream */
  const collect = (stream) => (/** @type {Buffer} */ chunk) => {
    output = (output + chunk.toString()).slice(-200_000)
    if (echo) stream.write(chunk)
  }
  child.stdout?.on('data', collect(process.stdout))
  child.stderr?.on('data', collect(process.stderr))
  /** @param {NodeJS.Signals} signal */
  const end = (signal) => {
    if (child.pid !== undefined) signalProcess(-child.pid, signal)
  }
  const timer = timeoutMs === undefined ? undefined : setTimeout(() => {
    timedOut = true
    end('SIGTERM')
    setTimeout(() => end('SIGKILL'), END_WITHIN_MS).unref()
  }, timeoutMs)
  const closed = new Promise((/** @type {(code: number) => void} */ resolve) => {
    child.on('error', (error) => {
      output += `${error.message}\n`
      resolve(127)
    })
    child.on('close', (code) => resolve(code ?? 128))
  })
  const entry = { end, closed, uninterruptible, name: path.basename(program) }
  running.add(entry)
  child.stdin?.on('error', () => undefined)
  child.stdin?.end(input)
  return closed.then((code) => {
    clearTimeout(timer)
    running.delete(entry)
    return { code, output, timedOut }
  })
}

/** As run, for a program that must succeed. @param {string} program @param {string[]} args @param {RunOptions & { failure: string }} options */
export async function runOrFail(program, args, { failure, ...options }) {
  const result = await run(program, args, options)
  if (result.code !== 0) throw new SetupError(`${failure}\n${lastLines(result.output, 20)}`)
  return result.output
}

/** Ends every program started by run and still running, and waits until they are gone. */
export async function stopRunningCommands() {
  await Promise.all([...running].map(async ({ end, closed, uninterruptible, name }) => {
    if (uninterruptible) {
      say(`Waiting for ${name}, so that nothing is left half installed.`)
      return closed
    }
    end('SIGTERM')
    const patience = setTimeout(() => end('SIGKILL'), END_WITHIN_MS)
    await closed
    return clearTimeout(patience)
  }))
}

/** @param {string} text @param {number} count */
export function lastLines(text, count) {
  return text.trimEnd().split('\n').slice(-count).join('\n')
}
