import { mkdirSync, rmSync } from 'node:fs'
import path from 'node:path'
import { buildClient } from './client-build.mjs'
import { run } from './commands.mjs'
import { DATABASE_NEEDS, ensureChromium, ensurePrograms } from './debian.mjs'
import { runLifetime } from './lifetime.mjs'
import { checkNode, ensurePackages } from './packages.mjs'
import { BUILD, inRoot } from './paths.mjs'
import { describeFailure, say } from './say.mjs'
import { countReport, Tally } from './tally.mjs'
import { startThrowAwayDatabase } from './throw-away-database.mjs'

const REPORTS = path.join(BUILD, 'test-results')
const TYPESCRIPT_PROJECTS = ['tsconfig.json', 'api/tsconfig.json', 'web/tsconfig.json', 'tests/tsconfig.json']
const STEP_LIMIT_MS = 30 * 60_000

const tally = new Tally()
/** @type {NodeJS.ProcessEnv} */
const env = { ...process.env, NODE_ENV: 'test' }

// On exit, so that it is the last line whatever ended the run, an interruption included.
process.on('exit', (code) => {
  if (code !== 0 && tally.failures.length === 0) tally.addStep('the run was broken off', false)
  if (tally.failures.length > 0) say(`\nNot passed:\n${tally.failures.map((line) => `  ${line}`).join('\n')}`)
  say(tally.lastLine())
})

await runLifetime(async (lifetime) => {
  if (!(await step('set-up', prepare))) return 1
  await inPairs(TYPESCRIPT_PROJECTS.map((project) => () => runTool(`types of ${project}`, ['typescript/bin/tsc', '--noEmit', '-p', project])))
  await runTool('lint', ['eslint/bin/eslint.js', '-c', '.eslint.config.mjs', '--max-warnings', '0', '.'])
  await runVitest('shared')
  const hasDatabase = await step('test database', () => openTestDatabase(lifetime))
  if (hasDatabase) await runVitest('api')
  else tally.addStep('api tests: not run, there is no test database', false)
  await runVitest('web')
  const isBuilt = await step('client build', async () => void (await buildClient()))
  if (hasDatabase && isBuilt) await runVitest('e2e')
  else tally.addStep('e2e tests: not run, the server could not be started', false)
  return tally.failures.length === 0 ? 0 : 1

  /** @param {string} name @param {() => Promise<void>} action */
  async function step(name, action) {
    lifetime.check()
    try {
      await action()
      tally.addStep(name, true)
      say(`ok: ${name}`)
      return true
    } catch (error) {
      say(`FAILED: ${name}\n${describeFailure(error)}`)
      tally.addStep(name, false)
      return false
    }
  }

  /** @param {string} name @param {string[]} args file below node_modules first */
  async function runTool(name, [file = '', ...args]) {
    lifetime.check()
    const { code, output, timedOut } = await run(process.execPath, [inRoot('node_modules', file), ...args], { env, timeoutMs: STEP_LIMIT_MS })
    say(code === 0 ? `ok: ${name}` : `FAILED: ${name}${timedOut ? ' (took too long)' : ''}\n${output.trimEnd()}`)
    tally.addStep(name, code === 0)
  }

  /** @param {string} project */
  async function runVitest(project) {
    lifetime.check()
    say(`\n${project} tests`)
    const report = path.join(REPORTS, `${project}.json`)
    const args = ['run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${report}`]
    const { code } = await run(process.execPath, [inRoot('node_modules/vitest/vitest.mjs'), ...args], { env, echo: true, timeoutMs: STEP_LIMIT_MS })
    tally.addReport(project, countReport(report, code))
  }
})

async function prepare() {
  checkNode(process.versions.node)
  if (!env.TEST_DATABASE_ADMIN_URL) await ensurePrograms(DATABASE_NEEDS)
  await ensureChromium(env)
  await ensurePackages()
  rmSync(REPORTS, { recursive: true, force: true })
  mkdirSync(REPORTS, { recursive: true })
}

/** One server for the API and the browser tests. @param {import('./lifetime.mjs').Lifetime} lifetime */
async function openTestDatabase(lifetime) {
  if (env.TEST_DATABASE_ADMIN_URL) return
  const database = await startThrowAwayDatabase()
  lifetime.onEnd(database.stop)
  env.TEST_DATABASE_ADMIN_URL = database.adminUrl
}

/** Two at a time: a type check fills one core. @param {(() => Promise<void>)[]} actions */
async function inPairs(actions) {
  for (let index = 0; index < actions.length; index += 2) await Promise.all(actions.slice(index, index + 2).map((action) => action()))
}
