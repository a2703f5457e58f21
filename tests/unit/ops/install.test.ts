import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { checkNode, installPrograms } from '../../../scripts/lib/install.mjs'

describe('Node.js', () => {
  it('that is too old, or a kind the packages leave out, gets a sentence', () => {
    for (const version of ['14.21.3', '18.19.0', '20.18.9', '21.7.0', '22.11.0']) expect(() => checkNode(version)).toThrow(`does not run on Node.js ${version}. Install Node.js 20.19`)
    for (const version of ['20.19.0', '20.20.2', '22.12.0', '24.1.0']) expect(() => checkNode(version)).not.toThrow()
    expect(readFileSync('package.json', 'utf8')).toContain('"node": ">=20.19 <21 || >=22.12"')
  })
})

describe('what Debian has to give', () => {
  it('is told with the line that installs it, to who may not install', async () => {
    const asked = installPrograms(['mariadb-server-core', 'chromium'], { isThere: () => false, mayInstall: false })
    await expect(asked).rejects.toThrow('mariadb-server-core and chromium are missing, and only the administrator may install them. Run this once, then start again:\n  su -c "apt-get update && apt-get install -y --no-install-recommends mariadb-server-core chromium"')
  })

  it('is not asked for where it is there', async () => {
    await expect(installPrograms(['mariadb-server-core'], { isThere: path => path === '/usr/sbin/mariadbd', mayInstall: false })).resolves.toBeUndefined()
  })
})
