import { execFile } from 'node:child_process'
import { promisify } from 'node:util'
import { sql } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { APPEND_ONLY } from '#server/db/append-only'
import { openDatabase } from '#server/db/client'
import { openTest, told } from './harness'

const RowsSchema = z.array(z.object({ name: z.string(), rights: z.string() }))

/** Rights of the application’s account by table, as the database itself tells that account. */
async function rights(): Promise<Map<string, string>> {
  const { db, close } = openTest()
  const [rows] = await db.execute(sql`SELECT table_name AS name, GROUP_CONCAT(privilege_type ORDER BY privilege_type) AS rights FROM information_schema.table_privileges GROUP BY table_name`)
  await close()
  return new Map(RowsSchema.parse(rows).map(row => [row.name, row.rights]))
}

describe('the application’s account', () => {
  it('has after a migration exactly what is due, also where it had more before', async () => {
    const { db, pool } = openDatabase(told('TEST_OWNER_URL'), 1)
    await db.execute(sql`GRANT UPDATE, DELETE ON register TO app@'127.0.0.1'`)
    expect((await rights()).get('register')).toBe('DELETE,INSERT,SELECT,UPDATE')
    await promisify(execFile)('npx', ['tsx', '--tsconfig', 'scripts/tsconfig.json', 'scripts/migrate.ts'], { env: { ...process.env, OWNER_DATABASE_URL: told('TEST_OWNER_URL') } })
    const tables = z.array(z.object({ name: z.string() })).parse((await db.execute(sql`SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE()`))[0]).map(row => row.name).filter(name => name !== '__drizzle_migrations')
    await pool.end()
    expect(tables.length).toBeGreaterThan(20)
    const due = new Map(tables.map(name => [name, APPEND_ONLY.includes(name) ? 'INSERT,SELECT' : 'DELETE,INSERT,SELECT,UPDATE']))
    expect(new Map([...await rights()].sort())).toEqual(new Map([...due].sort()))
  })
})
