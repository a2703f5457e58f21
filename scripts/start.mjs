/** `npm start`: from nothing to a running studio. Until the packages are installed only Node's own modules are used. */
import { existsSync, rmSync } from 'node:fs'
import { foldersOf } from './lib/folders.mjs'
import { placeOf } from './lib/host.mjs'
import { checkNode, installPackages, installPrograms } from './lib/install.mjs'
import { startMariadb } from './lib/mariadb.mjs'
import { endLeftOver, noteChild, takeFolder } from './lib/locks.mjs'
import { endAll, startNoMore, until, whyNot } from './lib/run.mjs'
import { say, Trouble, trouble } from './lib/say.mjs'
import { secretsOf } from './lib/secrets.mjs'
import { build, startCatcher, startServer, step } from './lib/services.mjs'

const stops = []
let stopping = null

/** Stops all that was started, the last first; the database cleanly. */
function stopAll() {
  stopping ??= (async () => {
    startNoMore()
    for (const stop of stops.splice(0).reverse()) await stop()
    await endAll()
  })()
  return stopping
}

async function main() {
  checkNode()
  const place = placeOf(process.env)
  // Another folder than .data, for measuring beside a running studio.
  const folders = foldersOf(process.env.THIRDHAND_DATA ?? '.data')
  stops.push(await takeFolder(folders))
  await endLeftOver(folders, until)
  await checkPort(place)
  await installPrograms(['mariadb-server-core'])
  await installPackages()
  const secrets = secretsOf(folders)
  const database = await startMariadb(folders, secrets)
  stops.push(() => database.stop())
  if (existsSync(folders.loading)) {
    say('The demo was not loaded to its end last time. It is made anew.')
    await database.clear()
    rmSync(folders.files, { recursive: true, force: true })
    rmSync(folders.loading)
  }
  await step('scripts/migrate.ts', [], { OWNER_DATABASE_URL: database.owner })
  const mail = await mailOf(place, folders)
  if (place.isLocal) {
    await database.patience(false)
    await step('scripts/seed.ts', ['--if-empty'], { NUXT_DATABASE_URL: database.app, NUXT_FILES_DIR: folders.files, SEED_LOADING: folders.loading })
    await database.patience(true)
  }
  else if ((await step('scripts/has-demo.ts', [], { NUXT_DATABASE_URL: database.app }, true)).trim() !== 'no') {
    trouble(`The demo studio is in ${folders.data}, and everyone knows its password: it is not served to other machines. Start the real studio with an empty folder: npm run reset removes the demo.`)
  }
  await build('.output', '.nuxt')
  const server = await startServer('.output', {
    NUXT_DATABASE_URL: database.app, NUXT_SESSION_PASSWORD: process.env.NUXT_SESSION_PASSWORD ?? secrets.session, NUXT_SMTP_URL: mail.smtpUrl, NUXT_CATCHER_URL: mail.url, NUXT_PUBLIC_URL: place.url, NUXT_FILES_DIR: folders.files,
    NITRO_PORT: String(place.port), NITRO_HOST: place.listen, PORT: String(place.port), HOST: place.listen, ...place.isLocal ? { NUXT_SESSION_COOKIE_SECURE: 'false' } : { NUXT_SESSION_NAME: '__Host-thirdhand' },
  }, `${place.here}/api/ready`)
  stops.push(() => server.stop())
  noteChild(folders, 'server.pid', server.pid)
  server.onExit(() => end(stopping ? 0 : 1))
  database.onExit(() => { if (!stopping) { say('The database ended by itself. Start again: it recovers.'); end(1) } })
  await welcome(place)
}

/** Listening is tried before anything is made. */
async function checkPort({ port, listen }) {
  const why = await whyNot(port, listen)
  if (why === 'EACCES') trouble(`Port ${port} is for the administrator: those under 1024 are. Take another, PORT=3000 npm start, and let a proxy listen there.`)
  if (why === 'EADDRNOTAVAIL' || why === 'ENOTFOUND') trouble(`HOST ${listen} is no address of this machine.`)
  if (why) trouble(`Port ${port} is taken by another program. Stop it, or choose another: PORT=${port + 1} npm start`)
}

/** On loopback without a mail server of one's own, letters go to the catcher, to be read at /mail. */
async function mailOf(place, folders) {
  const own = process.env.NUXT_SMTP_URL
  if (own || !place.isLocal) return { smtpUrl: own ?? '', url: '' }
  const catcher = await startCatcher(folders.mail)
  stops.push(() => catcher.stop())
  noteChild(folders, 'catcher.pid', catcher.pid)
  return catcher
}

async function welcome(place) {
  say(`\nThirdhand is at ${place.url}`)
  if (place.isLocal) say(await step('scripts/demo-people.ts', [], {}, true))
  say('Ctrl-C stops it.')
}

async function end(code) {
  await stopAll().catch(error => say(String(error.message ?? error)))
  process.exit(code)
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => end(0))
main().catch(async (error) => {
  // What was stopped on the way did not fail.
  if (!stopping) say(error instanceof Trouble ? error.message : `Something went wrong: ${error.stack ?? error}`)
  await end(1)
})
