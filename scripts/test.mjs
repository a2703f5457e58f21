/** `npm test`: everything from nothing, beside a running `npm start`. `--only api|e2e` runs that stage alone; `--long` the whole of what is drawn. */
import { cpSync, existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { counted } from './lib/counted.mjs'
import { foldersOf, ROOT } from './lib/folders.mjs'
import { checkNode, installPackages, installPrograms } from './lib/install.mjs'
import { startMariadb } from './lib/mariadb.mjs'
import { endLeftOver, noteChild, takeFolder, withLock } from './lib/locks.mjs'
import { endAll, freePort, run, startNoMore, until } from './lib/run.mjs'
import { say, Trouble } from './lib/say.mjs'
import { secretsOf } from './lib/secrets.mjs'
import { build, startCatcher, startServer, step } from './lib/services.mjs'

const OUTPUT = '.output-test'
const BUILD = '.nuxt-test'
const only = process.argv.includes('--only') ? process.argv[process.argv.indexOf('--only') + 1] : null
const env = { CI: process.env.CI ?? '', NUXT_TELEMETRY_DISABLED: '1', ...process.argv.includes('--long') ? { TEST_LONG: '1' } : {} }
const folders = foldersOf('.data-test')
const reports = join(folders.data, 'reports')
const counts = { passed: 0, failed: 0 }
const stops = []
let stopped = false

/** One stage with its seconds. What it throws is a failure of its own. */
async function stage(name, work) {
  if (stopped || only && only !== name && name !== 'build') return
  const began = Date.now()
  say(`\n== ${name}`)
  let told
  try {
    told = await work()
  }
  catch (error) {
    say(error instanceof Trouble ? error.message : String(error.stack ?? error))
    told = { passed: 0, failed: 1 }
  }
  counts.passed += told.passed
  counts.failed += told.failed
  say(`== ${name}: ${told.passed} passed, ${told.failed} failed, ${Math.round((Date.now() - began) / 1000)} s`)
}

const one = code => code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 }
const command = (line, args, more = {}) => async () => one((await run(line, args, { env: { ...env, ...more } })).code)

/** Runs one project of the unit runner and counts by its own report. */
function vitest(project, more = {}) {
  return async () => {
    const file = join(reports, `${project}.json`)
    const { code } = await run('npx', ['vitest', 'run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${file}`], { env: { ...env, ...more } })
    if (!existsSync(file)) return { passed: 0, failed: 1 }
    const report = JSON.parse(readFileSync(file, 'utf8'))
    const failed = report.numFailedTests + report.testResults.filter(result => result.status === 'failed' && result.assertionResults.length === 0).length
    return counted({ passed: report.numPassedTests, failed, left: report.numPendingTests + report.numTodoTests }, code)
  }
}

async function playwright(more) {
  const file = join(reports, 'e2e.json')
  const { code } = await run('npx', ['playwright', 'test', '--reporter=list,json'], { env: { ...env, ...more, PLAYWRIGHT_JSON_OUTPUT_FILE: file } })
  if (!existsSync(file)) return { passed: 0, failed: 1 }
  const { stats } = JSON.parse(readFileSync(file, 'utf8'))
  return counted({ passed: stats.expected, failed: stats.unexpected + stats.flaky, left: stats.skipped }, code)
}

const seeded = { mysql: join(folders.data, 'seeded-mysql'), files: join(folders.data, 'seeded-files') }
const files = join(folders.data, 'files')

/** Makes the demo studio once and keeps its folders, so that each stage begins on a fresh copy. */
async function seedOnce() {
  for (const folder of [folders.mysql, seeded.mysql, seeded.files, files]) rmSync(folder, { recursive: true, force: true })
  mkdirSync(files, { recursive: true })
  const database = await startMariadb(folders, secretsOf(folders), { hurry: true })
  try {
    await step('scripts/migrate.ts', [], { OWNER_DATABASE_URL: database.owner })
    await step('scripts/seed.ts', [], { NUXT_DATABASE_URL: database.app, NUXT_FILES_DIR: files, SEED_SCRYPT_LOG2: '12' })
  }
  finally {
    await database.stop()
  }
  cpSync(folders.mysql, seeded.mysql, { recursive: true })
  cpSync(files, seeded.files, { recursive: true })
}

/** A fresh demo studio with the built application over it, for one stage. */
async function withStudio(work) {
  for (const folder of [folders.mysql, files, folders.mail]) rmSync(folder, { recursive: true, force: true })
  cpSync(seeded.mysql, folders.mysql, { recursive: true })
  cpSync(seeded.files, files, { recursive: true })
  const secrets = secretsOf(folders)
  const database = await startMariadb(folders, secrets)
  stops.push(() => database.stop())
  const port = await freePort()
  const catcher = await startCatcher(folders.mail)
  noteChild(folders, 'catcher.pid', catcher.pid)
  stops.push(() => catcher.stop())
  const url = `http://localhost:${port}`
  const server = await startServer(OUTPUT, {
    NUXT_DATABASE_URL: database.app, NUXT_SESSION_PASSWORD: secrets.session, NUXT_SMTP_URL: catcher.smtpUrl, NUXT_CATCHER_URL: catcher.url, NUXT_PUBLIC_URL: url, NUXT_FILES_DIR: files, NUXT_SCRYPT_LOG2: '12', NUXT_TEST_CLOCK: '1',
    NITRO_PORT: String(port), NITRO_HOST: '127.0.0.1', PORT: String(port), HOST: '127.0.0.1', NUXT_SESSION_COOKIE_SECURE: 'false',
  }, `http://127.0.0.1:${port}/api/ready`)
  noteChild(folders, 'server.pid', server.pid)
  stops.push(() => server.stop())
  try {
    return await work({ TEST_BASE_URL: url, TEST_DATABASE_URL: database.app, TEST_OWNER_URL: database.owner, TEST_CATCHER_URL: catcher.url, TEST_FILES_DIR: files })
  }
  finally {
    await server.stop()
    await catcher.stop()
    await database.stop()
  }
}

async function main() {
  checkNode()
  stops.push(await takeFolder(folders))
  await installPrograms(['mariadb-server-core', 'chromium'])
  await installPackages()
  await endLeftOver(folders, until)
  rmSync(reports, { recursive: true, force: true })
  mkdirSync(reports, { recursive: true })
  // Types for the editor's tsconfig live in .nuxt; a running `npm start` is not touched by making them.
  await stage('lint', command('npx', ['eslint', '.', '--max-warnings', '0']))
  await stage('typecheck', () => withLock(ROOT, 'build .output', command('npx', ['nuxt', 'typecheck'])))
  await stage('unit', vitest('unit'))
  await stage('checks', vitest('checks'))
  await stage('nuxt', vitest('nuxt', { THIRDHAND_BUILD_DIR: '.nuxt-vitest' }))
  await stage('build', async () => { await build(OUTPUT, BUILD); return { passed: 1, failed: 0 } })
  if (!only || only === 'api' || only === 'e2e') await seedOnce()
  await stage('api', () => withStudio(more => vitest('api', more)()))
  await stage('e2e', () => withStudio(playwright))
}

async function end(code) {
  startNoMore()
  for (const stop of stops.splice(0).reverse()) await Promise.resolve(stop()).catch(error => say(String(error)))
  await endAll()
  process.exit(code)
}
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => { stopped = true; end(1) })

main().catch((error) => {
  say(error instanceof Trouble ? error.message : String(error.stack ?? error))
  counts.failed++
}).then(() => {
  say(`\n${counts.passed} passed, ${counts.failed} failed`)
  return end(counts.failed > 0 || counts.passed === 0 ? 1 : 0)
})
