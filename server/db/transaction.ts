import type { Db, Tx } from './client'

const RETRIED = new Set(['ER_LOCK_DEADLOCK', 'ER_LOCK_WAIT_TIMEOUT', 'ER_CHECKREAD'])

/** The code of the database's own fault under a Drizzle error, or null. */
export function databaseCode(error: unknown): string | null {
  const cause = error instanceof Error && error.cause ? error.cause : error
  return typeof cause === 'object' && cause !== null && 'code' in cause && typeof cause.code === 'string' ? cause.code : null
}

export const isDuplicate = (error: unknown): boolean => databaseCode(error) === 'ER_DUP_ENTRY'

/**
 * Runs `work` in one READ COMMITTED transaction, all of it again (at most five times) where the database asks for that.
 * `work` must do nothing but reads and writes on `tx`: no mail, no file.
 */
export async function inTransaction<T>(db: Db, work: (tx: Tx) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await db.transaction(work, { isolationLevel: 'read committed' })
    }
    catch (error) {
      const code = databaseCode(error)
      if (attempt >= 5 || code === null || !RETRIED.has(code)) throw error
      await new Promise(resolve => setTimeout(resolve, 10 + Math.random() * 40 * attempt))
    }
  }
}
