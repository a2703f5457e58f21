import { createHash } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { ROOT } from './folders.mjs'
import { withLock } from './locks.mjs'
import { run } from './run.mjs'
import { say, trouble } from './say.mjs'

const MARK = join(ROOT, 'node_modules', '.thirdhand-lock')
/** As `engines` of package.json says. */
const NODE_SAYS = '20.19 or a later 20, or 22.12 and newer'

export function checkNode(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split('.').map(Number)
  if (!(major === 20 && minor >= 19 || major === 22 && minor >= 12 || major > 22)) trouble(`Thirdhand does not run on Node.js ${version}. Install Node.js ${NODE_SAYS}.`)
}

/** What `npm ci` would install, as one hash: the lock file and the flags beside it. */
export const lockHash = (root = ROOT) => createHash('sha256').update(readFileSync(join(root, 'package-lock.json'))).digest('hex')

/** Installs the packages when the lock file is not the one they were installed from. */
export const installPackages = () => withLock(ROOT, 'packages', installNow)

async function installNow() {
  const wanted = lockHash()
  if (existsSync(MARK) && readFileSync(MARK, 'utf8') === wanted) return
  say('Installing the packages of package-lock.json ...')
  const { code, out } = await run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { keep: true })
  if (code !== 0) {
    say(out.trim())
    trouble('npm ci did not work. Look at what it says above; then start again.')
  }
  writeFileSync(MARK, wanted)
}

const PROGRAMS = {
  'mariadb-server-core': ['/usr/sbin/mariadbd', '/usr/libexec/mariadbd'],
  'chromium': ['/usr/bin/chromium'],
}

/** Installs Debian's packages that are missing. Without the right to, says the line that does it. */
export async function installPrograms(names, { isThere = existsSync, mayInstall = process.getuid?.() === 0 } = {}) {
  const missing = names.filter(name => !PROGRAMS[name].some(path => isThere(path)))
  if (missing.length === 0) return
  const line = `apt-get update && apt-get install -y --no-install-recommends ${missing.join(' ')}`
  if (!mayInstall) trouble(`${missing.join(' and ')} ${missing.length > 1 ? 'are' : 'is'} missing, and only the administrator may install ${missing.length > 1 ? 'them' : 'it'}. Run this once, then start again:\n  su -c "${line}"`)
  say(`Installing Debian's ${missing.join(' and ')} ...`)
  const { code, out } = await run('sh', ['-c', line], { keep: true, env: { DEBIAN_FRONTEND: 'noninteractive' } })
  if (code !== 0) {
    say(out.trim().split('\n').slice(-12).join('\n'))
    trouble(`apt-get could not install ${missing.join(' and ')}. Look at what it says above.`)
  }
}

export const mariadbd = () => PROGRAMS['mariadb-server-core'].find(existsSync) ?? 'mariadbd'
