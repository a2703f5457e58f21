/**
 * `npm run lessons:import -- <folder> --studio <slug> [--by email] [--use "what changed"] [--effect words]`
 * The folder of one lesson (lesson.md and its pictures) or a folder of such folders. Exit code 1 where a lesson could not
 * be taken in or put into use; the others are.
 */
import { basename, resolve } from 'node:path'
import { parseArgs } from 'node:util'
import { ulid } from 'ulid'
import { openDatabase } from '#server/db/client'
import { openFiles } from '#server/services/files'
import { importLesson } from '#server/services/import'
import { authorOf } from '#server/services/import-author'
import { lessonFolders, readLesson } from '#server/services/import-folder'
import { putIntoUse, useView } from '#server/services/into-use'
import { EFFECTS } from '#shared/schemas/lists'
import { databaseHere } from './lib/database-here'

const { values, positionals } = parseArgs({ allowPositionals: true, options: { studio: { type: 'string' }, by: { type: 'string' }, use: { type: 'string' }, effect: { type: 'string' } } })
const [folder] = positionals
const effect = EFFECTS.find(one => one === values.effect)

function usageFault(): string | null {
  if (!folder || positionals.length > 1) return 'Say which folder: npm run lessons:import -- <folder> --studio <slug>'
  if (!values.studio) return 'Say which studio: --studio <slug>'
  if (values.effect !== undefined && !effect) return `--effect is one of ${EFFECTS.join(', ')}`
  return null
}

const sentenceOf = (error: unknown): string => (error instanceof Error ? error.message : String(error))

async function run(from: string): Promise<boolean> {
  const here = databaseHere()
  const { db, pool } = openDatabase(here.url, 2)
  const files = openFiles(here.files)
  let isWell = true
  try {
    const who = await authorOf(db, values.studio ?? '', values.by)
    for (const path of await lessonFolders(resolve(from))) {
      try {
        console.log(await one(db, files, who, path))
      }
      catch (error) {
        isWell = false
        console.error(`${basename(path)}: ${sentenceOf(error)}`)
      }
    }
  }
  finally {
    await pool.end()
  }
  return isWell
}

async function one(db: ReturnType<typeof openDatabase>['db'], files: ReturnType<typeof openFiles>, who: Awaited<ReturnType<typeof authorOf>>, path: string): Promise<string> {
  const now = new Date()
  const taken = await importLesson(db, who, await readLesson(path), now, files)
  const intake = `${taken.slug}: ${taken.isNew ? 'new' : 'draft replaced'}, ${taken.pictures.length} pictures`
  if (values.use === undefined) return intake
  const view = await useView(db, who.studioId, taken.lessonId)
  for (const { line, severity, message } of view.findings) if (severity === 'error') console.error(`${taken.slug} line ${line}: ${message}`)
  const used = await putIntoUse(db, who, taken.lessonId, { id: ulid(now.getTime()), etag: taken.etag, effect: effect ?? view.effect, note: values.use }, now)
  return `${intake}; revision ${used.revision.number} ${used.same ? 'is in use already' : 'is in use'}`
}

const fault = usageFault()
if (fault) {
  console.error(fault)
  process.exitCode = 2
}
else {
  const isWell = await run(folder ?? '').catch((error: unknown) => {
    console.error(sentenceOf(error))
    return false
  })
  process.exitCode = isWell ? 0 : 1
}
