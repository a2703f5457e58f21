import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { trouble } from './say.mjs'

/** Is a process of that number running? */
export function isRunning(pid) {
  try {
    process.kill(pid, 0)
    return true
  }
  catch (error) {
    return error.code === 'EPERM'
  }
}

/** Is it really one of ours? A number may have been given to another program since. */
function isOurs(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('scripts/')
  }
  catch {
    return true
  }
}

/** One start at a time in a folder. A number left by one that was killed counts for nothing. */
export function takeLock(folders) {
  mkdirSync(folders.data, { recursive: true, mode: 0o700 })
  try {
    writeFileSync(folders.lock, String(process.pid), { flag: 'wx', mode: 0o600 })
  }
  catch {
    const pid = Number(existsSync(folders.lock) ? readFileSync(folders.lock, 'utf8') : 0)
    if (pid > 0 && pid !== process.pid && isRunning(pid) && isOurs(pid)) trouble(`Thirdhand is running here already (process ${pid}). Stop that one with Ctrl-C first.`)
    writeFileSync(folders.lock, String(process.pid), { mode: 0o600 })
  }
  return () => rmSync(folders.lock, { force: true })
}

/** What a start leaves running when it is killed outright, and how each is known for ours. */
const LEFT = [['server.pid', '/server/index.mjs'], ['catcher.pid', 'scripts/catcher.ts'], ['mysql.pid', 'mariadbd']]

/** Remembers a process of this folder, so that the next start can end it. */
export const noteChild = (folders, file, pid) => writeFileSync(join(folders.data, file), String(pid), { mode: 0o600 })

/** Ends what a killed start left running: the application, the catcher, the database. */
export async function endLeftOver(folders, until) {
  for (const [file, sign] of LEFT) {
    const path = join(folders.data, file)
    const pid = Number(existsSync(path) ? readFileSync(path, 'utf8') : 0)
    if (!(pid > 0) || !isRunning(pid) || !isNamed(pid, sign)) continue
    process.kill(pid, 'SIGTERM')
    await until(() => !isRunning(pid), 60, `A process left from before (${pid}) does not stop.`)
  }
}

/** Is that number really what we think it is? It may have been given to another program since. */
function isNamed(pid, sign) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(sign)
  }
  catch {
    return false
  }
}
