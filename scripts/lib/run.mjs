import { spawn } from 'node:child_process'
import { request as httpRequest } from 'node:http'
import { request as httpsRequest } from 'node:https'
import { createServer } from 'node:net'
import { ROOT } from './folders.mjs'
import { isLeft } from './processes.mjs'
import { trouble } from './say.mjs'

/** Everything started here and not ended yet, the last one last. */
const children = new Set()
let isEnding = false

/** Starts a program in a process group of its own and remembers it, so that nothing outlives us whenever we are stopped. */
export function start(command, args, options) {
  if (isEnding) trouble('It was stopped.')
  const child = spawn(command, args, { ...options, detached: true })
  children.add(child)
  child.on('exit', () => children.delete(child))
  child.on('error', () => children.delete(child))
  return child
}

/** Asks a program and all it started to end, and waits for the last of them; what does not end in that many seconds is ended. */
export async function end(child, seconds = 10) {
  if (!child.pid) return
  const last = Date.now() + seconds * 1000
  tell(child.pid, 'SIGTERM')
  while (isLeft(child.pid)) {
    if (Date.now() > last) tell(child.pid, 'SIGKILL')
    await new Promise(resolve => setTimeout(resolve, 30))
  }
}

/** Sends a signal to a process group that may have ended meanwhile. */
function tell(group, signal) {
  try {
    process.kill(-group, signal)
  }
  catch { /* nobody is left in it */ }
}

/** From here on nothing more is started: who goes on with the next thing while the last one ends gets a sentence. */
export function startNoMore() { isEnding = true }

/** Ends all that is left, the last started first. A database gets a minute to write what it holds. */
export async function endAll() {
  for (const child of [...children].reverse()) await end(child, 60)
}

/** Runs a command to its end. Returns its code and, when kept, what it printed. */
export function run(command, args, { env = {}, cwd = ROOT, keep = false, input = null } = {}) {
  return new Promise((resolve, reject) => {
    // What start() throws rejects this promise.
    const child = start(command, args, { cwd, env: { ...process.env, ...env }, stdio: [input === null ? 'ignore' : 'pipe', keep ? 'pipe' : 'inherit', keep ? 'pipe' : 'inherit'] })
    let out = ''
    child.stdout?.on('data', (chunk) => { out += chunk })
    child.stderr?.on('data', (chunk) => { out += chunk })
    child.on('error', reject)
    child.on('close', code => resolve({ code: code ?? 1, out }))
    if (input !== null) child.stdin.end(input)
  })
}

/** A port on loopback that nothing listens on. */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.on('error', reject)
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address()
      server.close(() => resolve(port))
    })
  })
}

/** Why it cannot be listened on there: EADDRINUSE, EACCES, EADDRNOTAVAIL ...; null where it can. */
export function whyNot(port, host) {
  return new Promise((resolve) => {
    const server = createServer()
    server.on('error', error => resolve(error.code ?? 'unknown'))
    server.listen(port, host, () => server.close(() => resolve(null)))
  })
}

/** Does our own server answer there? The certificate is for the name others call it by, so it is not looked at: this asks loopback only. */
export function answers(url) {
  const [ask, more] = url.startsWith('https:') ? [httpsRequest, { rejectUnauthorized: false }] : [httpRequest, {}]
  return new Promise((resolve) => {
    ask(url, { ...more, timeout: 5000 }, (response) => { response.resume(); resolve(true) })
      .on('error', () => resolve(false)).on('timeout', () => resolve(false)).end()
  })
}

/** Asks again until `test` is true, or ends with a sentence after `seconds`. */
export async function until(test, seconds, says) {
  const last = Date.now() + seconds * 1000
  while (Date.now() < last) {
    if (await test()) return
    await new Promise(resolve => setTimeout(resolve, 100))
  }
  trouble(says)
}
