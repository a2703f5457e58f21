import { spawn } from 'node:child_process'
import { createServer } from 'node:net'
import { ROOT } from './folders.mjs'

/** Runs a command to its end. Returns its code and, when kept, what it printed. */
export function run(command, args, { env = {}, cwd = ROOT, keep = false, input = null } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd, env: { ...process.env, ...env }, stdio: [input === null ? 'ignore' : 'pipe', keep ? 'pipe' : 'inherit', keep ? 'pipe' : 'inherit'] })
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

/** Does something listen there already? */
export function isTaken(port, host) {
  return new Promise((resolve) => {
    const server = createServer()
    server.on('error', error => resolve(error.code === 'EADDRINUSE' || error.code === 'EACCES' ? error.code : null))
    server.listen(port, host, () => server.close(() => resolve(null)))
  })
}

/** Asks again until `test` is true, or fails with a sentence after `seconds`. */
export async function until(test, seconds, says) {
  const end = Date.now() + seconds * 1000
  while (Date.now() < end) {
    if (await test()) return
    await new Promise(resolve => setTimeout(resolve, 100))
  }
  throw new Error(says)
}
