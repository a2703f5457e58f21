import { sql } from 'drizzle-orm'

/** Says that the application and its database answer; nothing about anyone. Open to everyone. */
export default defineEventHandler(async () => {
  await useDatabase().execute(sql`SELECT 1`)
  return { ready: true }
})
