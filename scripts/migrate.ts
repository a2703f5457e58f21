/** Brings the database up to date as its owner, then gives the application its rights table by table. */
import { fileURLToPath } from 'node:url'
import { sql } from 'drizzle-orm'
import { migrate } from 'drizzle-orm/mysql2/migrator'
import { APPEND_ONLY } from '../server/db/append-only'
import { openDatabase } from '../server/db/client'

const url = process.env.OWNER_DATABASE_URL
if (!url) throw new Error('OWNER_DATABASE_URL is missing: the address of the database with its owner.')

const { db, pool } = openDatabase(url, 1)
await migrate(db, { migrationsFolder: fileURLToPath(new URL('../drizzle', import.meta.url)) })
const isNoGrant = (error: unknown): boolean => error instanceof Error && 'errno' in error && (error.errno === 1141 || error.errno === 1147)
const [rows] = await pool.query('SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE() AND table_type = \'BASE TABLE\'')
const tables = Array.isArray(rows) ? rows.flatMap(row => 'name' in row && typeof row.name === 'string' ? [row.name] : []) : []
for (const table of tables.filter(name => name !== '__drizzle_migrations')) {
  const rights = APPEND_ONLY.includes(table) ? 'SELECT, INSERT' : 'SELECT, INSERT, UPDATE, DELETE'
  // What was given before and is not due any more goes first. Error 1141, 1147: it has no rights on this table yet.
  await pool.query(`REVOKE ALL PRIVILEGES ON \`${table}\` FROM app@'127.0.0.1'`).catch((error: unknown) => { if (!isNoGrant(error)) throw error })
  await pool.query(`GRANT ${rights} ON \`${table}\` TO app@'127.0.0.1'`)
}
await db.execute(sql`SELECT 1`)
await pool.end()
