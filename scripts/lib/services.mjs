import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { ROOT } from './folders.mjs'
import { withLock } from './locks.mjs'
import { answers, end, run, start, until } from './run.mjs'
import { say, trouble } from './say.mjs'

/** Runs a TypeScript step of scripts/ to its end, in one process that a signal ends. */
export async function step(script, args = [], env = {}, keep = false) {
  const { code, out } = await run(process.execPath, ['--import', 'tsx', script, ...args], { env: { ...env, TSX_TSCONFIG_PATH: 'scripts/tsconfig.json' }, keep })
  if (code !== 0) trouble(`${script} did not work.${keep ? `\n${out}` : ''}`)
  return out
}

/** Starts the mail catcher and waits for its ports. */
export async function startCatcher(folder) {
  const child = start(process.execPath, ['--import', 'tsx', 'scripts/catcher.ts'], { cwd: ROOT, env: { ...process.env, CATCHER_FOLDER: folder }, stdio: ['ignore', 'pipe', 'inherit'] })
  let told = ''
  child.stdout.on('data', (chunk) => { told += chunk })
  await until(() => told.includes('\n'), 20, 'The mail catcher did not start.')
  const { smtp, http } = JSON.parse(told)
  return { smtpUrl: `smtp://127.0.0.1:${smtp}`, url: `http://127.0.0.1:${http}`, pid: child.pid, stop: () => end(child) }
}

/** Starts the built application and waits until it answers. */
export async function startServer(output, env, url) {
  const child = start(process.execPath, [join(ROOT, output, 'server', 'index.mjs')], { cwd: ROOT, env: { ...process.env, NODE_ENV: 'production', ...env }, stdio: ['ignore', 'inherit', 'inherit'] })
  let ended = null
  child.on('exit', (code) => { ended = code ?? 1 })
  await until(async () => {
    if (ended !== null) trouble('The application ended at once. What it said stands above.')
    return await answers(url)
  }, 60, 'The application did not answer.')
  return { pid: child.pid, stop: () => end(child), onExit: then => child.on('exit', then) }
}

const SOURCES = ['app', 'server', 'shared', 'public', 'nuxt.config.ts', 'tailwind.config.ts', 'package-lock.json']

/** One hash over all that a build is made from. */
export function sourceHash(root = ROOT, sources = SOURCES) {
  const hash = createHash('sha256')
  const add = (path) => {
    if (!existsSync(path)) return
    if (statSync(path).isDirectory()) { for (const name of readdirSync(path).sort()) add(join(path, name)); return }
    hash.update(path.slice(root.length)).update('\0').update(readFileSync(path)).update('\0')
  }
  for (const source of sources) add(join(root, source))
  return hash.digest('hex')
}

/** Builds into a folder of its own when the sources are not those of the last build there. True when it built. */
export const build = (output, buildDir, keep = true) => withLock(ROOT, `build ${output}`, () => buildNow(output, buildDir, keep))

async function buildNow(output, buildDir, keep) {
  const mark = join(ROOT, output, '.sources')
  const wanted = sourceHash()
  if (existsSync(mark) && readFileSync(mark, 'utf8') === wanted) return false
  say('Building the application ...')
  const { code, out } = await run('npx', ['nuxt', 'build'], { keep, env: { THIRDHAND_OUTPUT_DIR: output, THIRDHAND_BUILD_DIR: buildDir, NUXT_TELEMETRY_DISABLED: '1' } })
  if (code !== 0) {
    say(out.split('\n').slice(-40).join('\n'))
    trouble('The application could not be built. What went wrong stands above.')
  }
  writeFileSync(mark, wanted)
  return true
}
