/** The class table's query through Drizzle against the same SQL through bare mysql2, in turn. Prints the ratio of medians. */
import { eq } from 'drizzle-orm'
import { openDatabase } from '../server/db/client'
import { classes } from '../server/db/schema/studio'
import { tableQuery } from '../server/services/class-table'

const { db, pool } = openDatabase(process.env.NUXT_DATABASE_URL ?? '', 2)
const [evening] = await db.select().from(classes).where(eq(classes.name, 'Tuesday evening'))
if (!evening) throw new Error('The demo studio is not loaded.')
const today = new Date().toISOString().slice(0, 10)
const { sql, params } = tableQuery(db, evening.studioId, evening.id, today).toSQL()
const text = params.map(String)
const taken: { own: number[], bare: number[] } = { own: [], bare: [] }
for (let i = 0; i < 220; i++) {
  const a = performance.now()
  await tableQuery(db, evening.studioId, evening.id, today)
  const b = performance.now()
  await pool.query(sql, text)
  const c = performance.now()
  if (i >= 20) { taken.own.push(b - a); taken.bare.push(c - b) }
}
const median = (values: number[]): number => [...values].sort((x, y) => x - y)[Math.floor(values.length / 2)] ?? 0
const [own, bare] = [median(taken.own), median(taken.bare)]
process.stdout.write(`The class table's query against the same SQL through bare mysql2: ${(own / bare).toFixed(2)} (${own.toFixed(2)} ms against ${bare.toFixed(2)} ms)\n`)
await pool.end()
