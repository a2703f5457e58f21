/** A private database for trying things: `node scripts/dev-db.mjs NAME`. Prints what the application wants to know and stays. */
import { foldersOf } from './lib/folders.mjs'
import { startMariadb } from './lib/mariadb.mjs'
import { run } from './lib/run.mjs'
import { say } from './lib/say.mjs'
import { secretsOf } from './lib/secrets.mjs'

const folders = foldersOf(`.data-${process.argv[2] ?? 'dev'}`)
const secrets = secretsOf(folders)
const database = await startMariadb(folders, secrets)
await run('npx', ['tsx', '--tsconfig', 'scripts/tsconfig.json', 'scripts/migrate.ts'], { env: { OWNER_DATABASE_URL: database.owner } })
say([`NUXT_DATABASE_URL=${database.app}`, `TEST_OWNER_URL=${database.owner}`, `NUXT_SESSION_PASSWORD=${secrets.session}`, `NUXT_FILES_DIR=${folders.files}`].join('\n'))
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, async () => { await database.stop(); process.exit(0) })
setInterval(() => undefined, 60_000)
