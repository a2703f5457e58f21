/** Prints “yes” where the demo studio is kept: its password is public, so it is never served to others. */
import { inArray, sql } from 'drizzle-orm'
import { openDatabase } from '../server/db/client'
import { people } from '../server/db/schema/people'
import { emailOf, STAFF } from '../server/db/seed/people'

const url = process.env.NUXT_DATABASE_URL
if (!url) throw new Error('NUXT_DATABASE_URL says where the studio is kept.')
const { db, pool } = openDatabase(url, 1)
const [found] = await db.select({ count: sql<number>`count(*)` }).from(people).where(inArray(people.email, STAFF.map(person => emailOf(person.key))))
process.stdout.write(Number(found?.count ?? 0) > 0 ? 'yes' : 'no')
await pool.end()
