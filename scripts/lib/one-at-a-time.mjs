import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
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

/** Ends a database left running by a start that was killed, so that this one may have its folder. */
export async function endLeftOver(folders, until) {
  const file = `${folders.data}/mysql.pid`
  const pid = Number(existsSync(file) ? readFileSync(file, 'utf8') : 0)
  if (!(pid > 0) || !isRunning(pid)) return
  try {
    if (!readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(folders.mysql)) return
  }
  catch {
    return
  }
  process.kill(pid, 'SIGTERM')
  await until(() => !isRunning(pid), 60, 'A database left from before does not stop.')
}
