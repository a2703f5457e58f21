/**
 * `npm run bench`: how fast, as ratios in one run and never as a test. Everything is made anew under .data-bench: an empty
 * Nuxt application of the same versions, the demo studio, and the built application over it. Loopback only.
 */
import { mkdirSync, rmSync, symlinkSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { gzipSync } from 'node:zlib'
import { foldersOf, ROOT } from './lib/folders.mjs'
import { installPackages, installPrograms } from './lib/install.mjs'
import { startMariadb } from './lib/mariadb.mjs'
import { freePort, run, until } from './lib/run.mjs'
import { say } from './lib/say.mjs'
import { secretsOf } from './lib/secrets.mjs'
import { build, startServer, step } from './lib/services.mjs'

const folders = foldersOf('.data-bench')
const stops = []
const median = values => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0
const ratio = (what, own, bare, unit) => say(`${what}: ${(own / bare).toFixed(2)} (${own.toFixed(2)} ${unit} against ${bare.toFixed(2)} ${unit})`)

/** An application with nothing in it: one page, one route. */
async function emptyApplication() {
  const folder = join(folders.data, 'empty')
  rmSync(folder, { recursive: true, force: true })
  mkdirSync(join(folder, 'server/routes'), { recursive: true })
  writeFileSync(join(folder, 'package.json'), '{ "name": "empty", "private": true, "type": "module" }')
  writeFileSync(join(folder, 'nuxt.config.ts'), 'export default defineNuxtConfig({ compatibilityDate: \'2026-05-01\', telemetry: false, devtools: { enabled: false } })\n')
  writeFileSync(join(folder, 'app.vue'), '<template><p>Nothing</p></template>\n')
  writeFileSync(join(folder, 'server/routes/bare.get.ts'), 'export default defineEventHandler(() => ({ bare: true }))\n')
  symlinkSync(join(ROOT, 'node_modules'), join(folder, 'node_modules'))
  const { code, out } = await run('npx', ['nuxt', 'build'], { cwd: folder, keep: true, env: { NUXT_TELEMETRY_DISABLED: '1' } })
  if (code !== 0) throw new Error(`The empty application could not be built.\n${out.slice(-2000)}`)
  const port = await freePort()
  const server = await startServer(join('.data-bench', 'empty', '.output'), { NITRO_PORT: String(port), NITRO_HOST: '127.0.0.1', PORT: String(port), HOST: '127.0.0.1' }, `http://127.0.0.1:${port}/bare`)
  stops.push(() => server.stop())
  return `http://127.0.0.1:${port}`
}

async function studio() {
  rmSync(folders.mysql, { recursive: true, force: true })
  const secrets = secretsOf(folders)
  const database = await startMariadb(folders, secrets, { hurry: true })
  stops.push(() => database.stop())
  mkdirSync(folders.files, { recursive: true })
  await step('scripts/migrate.ts', [], { OWNER_DATABASE_URL: database.owner })
  await step('scripts/seed.ts', [], { NUXT_DATABASE_URL: database.app, NUXT_FILES_DIR: folders.files, SEED_SCRYPT_LOG2: '12' })
  const port = await freePort()
  const server = await startServer('.output-bench', {
    NUXT_DATABASE_URL: database.app, NUXT_SESSION_PASSWORD: secrets.session, NUXT_FILES_DIR: folders.files, NUXT_SCRYPT_LOG2: '12', NUXT_SESSION_COOKIE_SECURE: 'false', NUXT_PUBLIC_URL: `http://localhost:${port}`,
    NITRO_PORT: String(port), NITRO_HOST: '127.0.0.1', PORT: String(port), HOST: '127.0.0.1',
  }, `http://127.0.0.1:${port}/api/ready`)
  stops.push(() => server.stop())
  return { database, url: `http://127.0.0.1:${port}` }
}

/** Gzipped bytes of all scripts a page asks for. */
async function scriptsOf(url, before = async () => undefined) {
  const { chromium } = await import('@playwright/test')
  const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'] })
  try {
    const context = await browser.newContext()
    await before(context)
    const page = await context.newPage()
    let bytes = 0
    const reading = []
    page.on('response', (response) => {
      if (response.request().resourceType() === 'script') reading.push(response.body().then((body) => { bytes += gzipSync(body).length }))
    })
    await page.goto(url, { waitUntil: 'networkidle' })
    await Promise.all(reading)
    return bytes / 1024
  }
  finally {
    await browser.close()
  }
}

async function comeIn(url) {
  const answer = await fetch(`${url}/api/come-in`, { method: 'POST', headers: { 'content-type': 'application/json', 'sec-fetch-site': 'same-origin' }, body: JSON.stringify({ email: 'amy@tallow-yard.example', password: 'third hand bench' }) })
  return answer.headers.getSetCookie().map(line => line.split(';')[0]).join('; ')
}

async function timed(work) {
  const began = performance.now()
  await work()
  return performance.now() - began
}

/** Both in turn, so that what else the machine does falls on both alike. */
async function inTurn(times, own, bare) {
  const taken = { own: [], bare: [] }
  for (let i = 0; i < times + 5; i++) {
    const [a, b] = [await timed(own), await timed(bare)]
    if (i >= 5) { taken.own.push(a); taken.bare.push(b) }
  }
  return { own: median(taken.own), bare: median(taken.bare) }
}

async function main() {
  await installPrograms(['mariadb-server-core', 'chromium'])
  await installPackages()
  await build('.output-bench', '.nuxt-bench')
  const empty = await emptyApplication()
  const { database, url } = await studio()
  const cookie = await comeIn(url)
  const script = { own: await scriptsOf(`${url}/bench`, context => context.addCookies(cookie.split('; ').map(pair => ({ name: pair.split('=')[0], value: pair.slice(pair.indexOf('=') + 1), url })))), bare: await scriptsOf(empty) }
  ratio('Script of the bench, gzip, against an empty application', script.own, script.bare, 'KiB')
  const page = await inTurn(60, () => fetch(`${url}/api/me`, { headers: { cookie } }).then(answer => answer.text()), () => fetch(`${empty}/bare`).then(answer => answer.text()))
  ratio('An answer (who is here, from the database) against a bare route', page.own, page.bare, 'ms')
  say((await step('scripts/bench-table.ts', [], { NUXT_DATABASE_URL: database.app }, true)).trim())
  await secondStart()
}

/** `npm start` twice, on a data folder of its own; the second in seconds. */
async function secondStart() {
  const { spawn } = await import('node:child_process')
  for (const which of ['first', 'second']) {
    const port = await freePort()
    const began = Date.now()
    const child = spawn(process.execPath, ['scripts/start.mjs'], { cwd: ROOT, env: { ...process.env, PORT: String(port), THIRDHAND_DATA: '.data-bench-start' }, stdio: 'ignore' })
    await until(() => fetch(`http://127.0.0.1:${port}/api/ready`).then(answer => answer.ok, () => false), 600, 'npm start did not answer.')
    if (which === 'second') say(`A second npm start: ${((Date.now() - began) / 1000).toFixed(1)} s`)
    child.kill('SIGINT')
    await new Promise(resolve => child.on('exit', resolve))
  }
}

main().catch((error) => {
  say(String(error.stack ?? error))
  process.exitCode = 1
}).finally(async () => {
  for (const stop of stops.reverse()) await stop()
})
