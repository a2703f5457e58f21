import { drizzle, type MySql2Database } from 'drizzle-orm/mysql2'
import { createPool, type Pool } from 'mysql2/promise'

export type Db = MySql2Database
/** A transaction; every service takes either. */
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0]
export type DbOrTx = Db | Tx

/** A pool whose every connection keeps UTC, and Drizzle over it. Close the pool to end. */
export function openDatabase(url: string, connections = 10): { db: Db, pool: Pool } {
  const pool = createPool({ uri: url, connectionLimit: connections, timezone: 'Z', charset: 'utf8mb4_unicode_ci', supportBigNumbers: true, dateStrings: ['DATE'] })
  pool.pool.on('connection', (connection) => {
    connection.query("SET time_zone = '+00:00'")
  })
  return { db: drizzle(pool), pool }
}
