/** Another studio with one person in it who may do everything there. */
import { ulid } from 'ulid'
import { openDatabase } from '../../server/db/client'
import { people, personNames } from '../../server/db/schema/people'
import { memberships, studios } from '../../server/db/schema/studio'
import { passwordsAt } from '../../server/services/passwords'
import { PASSWORD } from './people'

export async function makeStranger(): Promise<string> {
  const { db, pool } = openDatabase(String(process.env.TEST_DATABASE_URL), 2)
  const [studioId, personId, at] = [ulid(), ulid(), new Date()]
  const email = `stranger-${personId.toLowerCase()}@elsewhere.example`
  await db.insert(studios).values({ id: studioId, slug: `else-${studioId.toLowerCase()}`, name: 'Harbour Bench', zone: 'Europe/London', timeMade: at })
  await db.insert(people).values({ id: personId, email, emailKey: email, passwordHash: await passwordsAt(12).make(PASSWORD), wants: {} })
  await db.insert(personNames).values({ personId, version: 1, name: 'Nell Stranger', fromAt: at })
  await db.insert(memberships).values({ studioId, id: ulid(), personId, trailNo: 1001, roles: ['apprentice', 'instructor', 'manager'], joined: at })
  await pool.end()
  return email
}
