import { type Db, openDatabase } from '#server/db/client'

let open: ReturnType<typeof openDatabase> | null = null

/** The one pool of this process, opened when it is first asked for. */
export function useDatabase(): Db {
  open ??= openDatabase(useRuntimeConfig().databaseUrl)
  return open.db
}

export async function closeDatabase(): Promise<void> {
  await open?.pool.end()
  open = null
}
