/** `npm run standings:rebuild [-- --mend]`: works every standing out again and says what differs from what is stored. */
import { openDatabase } from '#server/db/client'
import { studios } from '#server/db/schema/studio'
import { inTransaction } from '#server/db/transaction'
import { rebuildStandings } from '#server/services/standings'
import { databaseHere } from './lib/database-here'

const mend = process.argv.includes('--mend')
const { db, pool } = openDatabase(databaseHere().url, 2)
let all = 0
try {
  for (const studio of await db.select().from(studios)) {
    const differences = await inTransaction(db, tx => rebuildStandings(tx, studio.id, mend))
    for (const one of differences) console.log(`${studio.slug}: person ${one.personId}, lesson ${one.lessonId}\n  kept here: ${JSON.stringify(one.stored)}\n  worked out: ${JSON.stringify(one.worked)}`)
    all += differences.length
  }
}
finally {
  await pool.end()
}
console.log(all === 0 ? 'No difference.' : `${all} standings differ${mend ? ', now mended' : '. Run again with --mend to write them'}.`)
process.exitCode = all === 0 || mend ? 0 : 1
