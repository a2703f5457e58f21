/** `npm run register:verify`: goes along the register of every studio. Exit code 1 where a row does not follow from the one before. */
import { openDatabase } from '#server/db/client'
import { studios } from '#server/db/schema/studio'
import { verify } from '#server/services/register'
import { databaseHere } from './lib/database-here'

const { db, pool } = openDatabase(databaseHere().url, 2)
let isWhole = true
try {
  for (const studio of await db.select().from(studios)) {
    const { rows, broken } = await verify(db, studio.id)
    console.log(`${studio.slug}: ${rows} rows, ${broken === null ? 'whole' : `broken at ${broken}`}`)
    if (broken !== null) isWhole = false
  }
}
finally {
  await pool.end()
}
process.exitCode = isWhole ? 0 : 1
