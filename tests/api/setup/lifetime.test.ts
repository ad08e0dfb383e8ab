import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { expect, test } from 'vitest'

const HEAD = `
  const { runLifetime } = await import('#api/setup/lifetime.mjs')
  const { run } = await import('#api/setup/commands.mjs')
  const { SetupError } = await import('#api/setup/say.mjs')
`

/** Runs a command of the form of npm start; `signal` is sent when it prints "ready". */
async function command(body: string, signal?: NodeJS.Signals): Promise<{ code: number | null; out: string; err: string }> {
  const child = spawn(process.execPath, ['--input-type=module', '-e', `${HEAD}await runLifetime(async (lifetime) => {${body}})`])
  let out = ''
  let err = ''
  child.stdout.on('data', (chunk: Buffer) => {
    out += chunk.toString()
    if (signal !== undefined && /ready\n$/.test(out)) child.kill(signal)
  })
  child.stderr.on('data', (chunk: Buffer) => (err += chunk.toString()))
  const [code] = (await once(child, 'close')) as [number | null]
  return { code, out, err }
}

const STARTED = `
  lifetime.onEnd(() => console.log('database stopped'))
  lifetime.onEnd(async () => { await new Promise((done) => setTimeout(done, 50)); console.log('server stopped') })
`

test.each([['SIGINT', 130], ['SIGTERM', 143], ['SIGHUP', 129]] as const)('%s stops the server first and the database after it', async (signal, code) => {
  const ended = await command(`${STARTED} console.log('ready'); await new Promise((done) => setTimeout(done, 20_000))`, signal)
  expect(ended).toEqual({ code, out: 'ready\nserver stopped\ndatabase stopped\n', err: '' })
})

test('a failure stops what was started and is printed without a stack', async () => {
  const ended = await command(`${STARTED} throw new SetupError('The port is taken.')`)
  expect(ended).toEqual({ code: 1, out: 'server stopped\ndatabase stopped\n', err: 'The port is taken.\n' })
})

test('a program that is running when Ctrl-C comes is ended with everything it has started', async () => {
  const ended = await command(`console.log('ready'); await run('sh', ['-c', 'sleep 30 & sleep 30']); console.log('never printed'.slice(0, lifetime.ending ? 0 : 20))`, 'SIGINT')
  expect([ended.code, ended.out.trim()]).toEqual([130, 'ready'])
})

test('the code of a command that returns is its exit code', async () => {
  expect(await command('return 7')).toMatchObject({ code: 7 })
})
