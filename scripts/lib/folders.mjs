import { fileURLToPath } from 'node:url'
import { join, resolve } from 'node:path'

export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '')

/** Where one installation keeps what it has: the database, its secrets, mail, photos, the pid of who runs it, the mark of a demo half loaded, and the address of a database that runs. */
export function foldersOf(name = '.data') {
  const data = resolve(ROOT, name)
  return { data, mysql: join(data, 'mysql'), secrets: join(data, 'secrets.json'), mail: join(data, 'mail'), files: join(data, 'files'), lock: join(data, 'running.pid'), socket: join(data, 'mysql.sock'), log: join(data, 'mysql.log'), loading: join(data, 'demo-loading'), running: join(data, 'database.json') }
}
