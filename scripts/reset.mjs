/** `npm run reset`: throws everything of this installation away, after asking, and starts anew with the demo. `--yes` does not ask. */
import { existsSync, rmSync } from 'node:fs'
import { createInterface } from 'node:readline/promises'
import { foldersOf } from './lib/folders.mjs'
import { endLeftOver, takeFolder } from './lib/locks.mjs'
import { until } from './lib/run.mjs'
import { say, Trouble } from './lib/say.mjs'

const folders = foldersOf(process.env.THIRDHAND_DATA ?? '.data')
try {
  if (!existsSync(folders.data)) { say('There is nothing here yet. npm start makes the demo.'); process.exit(0) }
  const release = await takeFolder(folders)
  if (!process.argv.includes('--yes')) {
    const ask = createInterface({ input: process.stdin, output: process.stdout })
    // Ctrl-C is a no, and so is an end of what is read (Ctrl-D).
    const answer = await new Promise((resolve) => {
      ask.on('close', () => resolve('')).on('SIGINT', () => { say(''); ask.close() })
      ask.question('Everything of this studio here goes: people, lessons, pieces, records. Write “yes” to do it: ').then(resolve)
    })
    ask.close()
    if (answer.trim() !== 'yes') { await release(); say('Nothing was changed.'); process.exit(0) }
  }
  await endLeftOver(folders, until)
  rmSync(folders.data, { recursive: true, force: true })
  await release()
  say('Gone. It is made anew.')
  await import('./start.mjs')
}
catch (error) {
  say(error instanceof Trouble ? error.message : String(error.stack ?? error))
  process.exit(1)
}
