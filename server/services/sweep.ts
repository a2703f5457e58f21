import { and, eq, lt } from 'drizzle-orm'
import type { Db } from '../db/client'
import { attempts, mail, securityLog, sessions, tokens } from '../db/schema/people'

const DAY_MS = 86_400_000
/** How long each thing is kept after it is of no more use. */
export const KEPT_DAYS = { attempts: 1, sessions: 30, tokens: 30, sentMail: 90, securityLog: 180 } as const

/** Throws away what has run out: counts of tries, ended sessions, used links, sent letters, old lines of the security log. */
export async function sweep(db: Db, now: Date): Promise<void> {
  const before = (kind: keyof typeof KEPT_DAYS) => new Date(now.getTime() - KEPT_DAYS[kind] * DAY_MS)
  await db.delete(attempts).where(lt(attempts.ends, before('attempts')))
  await db.delete(sessions).where(lt(sessions.ends, before('sessions')))
  await db.delete(tokens).where(lt(tokens.ends, before('tokens')))
  await db.delete(mail).where(and(eq(mail.state, 'sent'), lt(mail.sentAt, before('sentMail'))))
  await db.delete(securityLog).where(lt(securityLog.at, before('securityLog')))
}
