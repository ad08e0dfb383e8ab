import { spawn } from 'node:child_process'
import { accessSync, constants, statSync } from 'node:fs'
import path from 'node:path'
import { ROOT } from './paths.mjs'
import { SetupError } from './say.mjs'

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set()

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
 */

/**
 * Runs a program to its end.
 * @param {string} program
 * @param {string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<{ code: number, output: string, timedOut: boolean }>} code 128 or more: ended by a signal
 */
export function run(program, args, { env = process.env, input, echo = false, timeoutMs } = {}) {
  return new Promise((resolve) => {
    const child = spawn(program, args, { cwd: ROOT, env, stdio: [input === undefined ? 'ignore' : 'pipe', 'pipe', 'pipe'] })
    running.add(child)
    let output = ''
    let timedOut = false
    /** @param {NodeJS.WriteStream} stream */
    const collect = (stream) => (/** @type {Buffer} */ chunk) => {
      output = (output + chunk.toString()).slice(-200_000)
      if (echo) stream.write(chunk)
    }
    child.stdout?.on('data', collect(process.stdout))
    child.stderr?.on('data', collect(process.stderr))
    const timer = timeoutMs === undefined ? undefined : setTimeout(() => {
      timedOut = true
      child.kill('SIGTERM')
      setTimeout(() => child.kill('SIGKILL'), 10_000).unref()
    }, timeoutMs)
    /** @param {number} code */
    const end = (code) => {
      clearTimeout(timer)
      running.delete(child)
      resolve({ code, output, timedOut })
    }
    child.on('error', (error) => {
      output += `${error.message}\n`
      end(127)
    })
    child.on('close', (code) => end(code ?? 128))
    child.stdin?.on('error', () => undefined)
    child.stdin?.end(input)
  })
}

/** As run, for a program that must succeed. @param {string} program @param {string[]} args @param {RunOptions & { failure: string }} options */
export async function runOrFail(program, args, { failure, ...options }) {
  const result = await run(program, args, options)
  if (result.code !== 0) throw new SetupError(`${failure}\n${lastLines(result.output, 20)}`)
  return result.output
}

/** Asks every program started by run and still running to end. */
export function stopRunningCommands() {
  for (const child of running) child.kill('SIGTERM')
}

/** @param {string} text @param {number} count */
export function lastLines(text, count) {
  return text.trimEnd().split('\n').slice(-count).join('\n')
}
