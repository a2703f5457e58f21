/** `npm run reset`: makes the demo anew, after asking. Everything of this installation is lost: `--yes` does not ask. */
import { existsSync, rmSync } from 'node:fs'
import { createInterface } from 'node:readline/promises'
import { foldersOf } from './lib/folders.mjs'
import { endLeftOver, takeLock } from './lib/one-at-a-time.mjs'
import { until } from './lib/run.mjs'
import { say, Trouble } from './lib/say.mjs'

const folders = foldersOf()
try {
  if (!existsSync(folders.data)) { say('There is nothing here yet. npm start makes the demo.'); process.exit(0) }
  const release = takeLock(folders)
  if (!process.argv.includes('--yes')) {
    const ask = createInterface({ input: process.stdin, output: process.stdout })
    const answer = await ask.question('Everything of this studio here goes: people, lessons, pieces, records. Write “yes” to do it: ')
    ask.close()
    if (answer.trim() !== 'yes') { release(); say('Nothing was changed.'); process.exit(0) }
  }
  await endLeftOver(folders, until)
  rmSync(folders.data, { recursive: true, force: true })
  say('Gone. npm start makes the demo anew.')
}
catch (error) {
  say(error instanceof Trouble ? error.message : String(error.stack ?? error))
  process.exit(1)
}
