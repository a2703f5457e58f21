import { fileURLToPath } from 'node:url'
import { join } from 'node:path'

export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '')

/** Where one installation keeps what it has: the database, its secrets, mail, photos, and the pid of who runs it. */
export function foldersOf(name = '.data') {
  const data = join(ROOT, name)
  return { data, mysql: join(data, 'mysql'), secrets: join(data, 'secrets.json'), mail: join(data, 'mail'), files: join(data, 'files'), lock: join(data, 'running.pid'), socket: join(data, 'mysql.sock'), log: join(data, 'mysql.log') }
}
