/** Loads the demo studio. `--if-empty`: only where there is no studio yet. SEED_LOADING: a file that is there while it loads, so that half a demo is known for one. */
import { rmSync, writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { sql } from 'drizzle-orm'
import { openDatabase } from '../server/db/client'
import { mail } from '../server/db/schema/people'
import { studios } from '../server/db/schema/studio'
import { DEMO_PASSWORD } from '../server/db/seed/people'
import { seedDemo } from '../server/db/seed/studio'
import { openFiles } from '../server/services/files'
import { passwordsAt, SHIPPED_LOG2 } from '../server/services/passwords'

const { NUXT_DATABASE_URL: url, NUXT_FILES_DIR: folder, SEED_LOADING: loading } = process.env
if (!url || !folder) throw new Error('NUXT_DATABASE_URL and NUXT_FILES_DIR say where the studio is kept.')
const { db, pool } = openDatabase(url, 4)
const [there] = await db.select({ count: sql<number>`count(*)` }).from(studios)
if (process.argv.includes('--if-empty') && Number(there?.count ?? 0) > 0) {
  await pool.end()
  process.exit(0)
}
process.stdout.write('Loading the demo studio ...\n')
if (loading) writeFileSync(loading, 'While this is here, what is in the database is half a demo and nothing else.\n')
const began = Date.now()
// One hash for all: at the shipped cost each takes the better part of a second.
const passwordHash = await passwordsAt(Number(process.env.SEED_SCRYPT_LOG2 ?? SHIPPED_LOG2)).make(DEMO_PASSWORD)
await seedDemo(db, openFiles(folder), {
  now: new Date(), lessons: fileURLToPath(new URL('../content-src/lessons', import.meta.url)), passwordHash, say: line => process.stdout.write(`  ${line}\n`),
})
// Letters of invented weeks are not sent today.
await db.update(mail).set({ state: 'sent', body: {} })
if (loading) rmSync(loading)
process.stdout.write(`The demo studio is loaded (${Math.round((Date.now() - began) / 1000)} s).\n`)
await pool.end()
