import { mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { join } from 'node:path'
import { beganAt } from './processes.mjs'
import { trouble } from './say.mjs'

/**
 * Takes a name that only one process of this machine has at a time, or returns null where another has it. The name is an
 * abstract socket of Linux: the kernel lets go of it when its process ends, however it ends, so none is ever stale.
 */
function takeName(name) {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.on('error', error => error.code === 'EADDRINUSE' ? resolve(null) : reject(error))
    server.listen(`\0thirdhand/${name}`, () => { server.unref(); resolve(() => new Promise(done => server.close(done))) })
  })
}

/** The same folder by any path is the same name; the same path in another root is not. */
function nameOf(folder) {
  const { dev, ino } = statSync(folder)
  return `${dev}:${ino}`
}

/** One start at a time in a folder; another gets a sentence that names the process. Returns what lets go. */
export async function takeFolder(folders) {
  mkdirSync(folders.data, { recursive: true, mode: 0o700 })
  const release = await takeName(`folder ${nameOf(folders.data)}`)
  if (!release) trouble(`Thirdhand is running here already (process ${pidIn(folders.lock)}). Stop that one with Ctrl-C first.`)
  writeFileSync(folders.lock, String(process.pid), { mode: 0o600 })
  return async () => {
    rmSync(folders.lock, { force: true })
    await release()
  }
}

const pidIn = (path) => {
  try {
    return readFileSync(path, 'utf8')
  }
  catch {
    return 'not known'
  }
}

/** Does `work` while nobody else does work of that name in this folder: packages and .nuxt are shared by npm start and npm test. */
export async function withLock(folder, what, work) {
  const name = `${what} ${nameOf(folder)}`
  let release
  while (!(release = await takeName(name))) await new Promise(resolve => setTimeout(resolve, 200))
  try {
    return await work()
  }
  finally {
    await release()
  }
}

/** Remembers a process of this folder, so that the next start can end it if this one is killed outright. */
export function noteChild(folders, file, pid) {
  writeFileSync(join(folders.data, file), `${pid} ${beganAt(pid)}`, { mode: 0o600 })
}

const LEFT = ['server.pid', 'catcher.pid', 'database.pid']

/** Ends what a killed start left running: the application, the catcher, the database. What has the number now but is not the same is left alone. */
export async function endLeftOver(folders, until) {
  for (const file of LEFT) {
    const path = join(folders.data, file)
    const [pid, began] = pidIn(path).split(' ')
    if (began && began !== 'null' && beganAt(pid) === began) {
      process.kill(Number(pid), 'SIGTERM')
      await until(() => beganAt(pid) !== began, 60, `A process left from before (${pid}) does not stop. End it: kill -9 ${pid}`)
    }
    rmSync(path, { force: true })
  }
}
