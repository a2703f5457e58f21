import { randomBytes } from 'node:crypto'
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'

/** Random secrets of one installation, made once and kept where only its owner may read them. */
export function secretsOf(folders) {
  mkdirSync(folders.data, { recursive: true, mode: 0o700 })
  if (!existsSync(folders.secrets)) {
    const secret = () => randomBytes(24).toString('base64url')
    writeFileSync(folders.secrets, JSON.stringify({ root: secret(), owner: secret(), app: secret(), session: randomBytes(48).toString('base64url') }), { mode: 0o600 })
  }
  chmodSync(folders.secrets, 0o600)
  return JSON.parse(readFileSync(folders.secrets, 'utf8'))
}
