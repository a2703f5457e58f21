/** Compiles the lessons of the folders named and prints what is to be said about them. Ends with 1 when one has an error. */
import { readdirSync, readFileSync } from 'node:fs'
import { basename, join } from 'node:path'
import { compile } from '../shared/lesson/compile'

const folders = process.argv.slice(2)
const slugs = new Set(folders.map(folder => basename(folder)))
let errors = 0
for (const folder of folders) {
  const pictures = new Set(readdirSync(folder).filter(name => name !== 'lesson.md'))
  const { findings } = compile(readFileSync(join(folder, 'lesson.md'), 'utf8'), { pictures, lessons: slugs })
  for (const finding of findings) process.stdout.write(`${basename(folder)}:${finding.line}:${finding.column} ${finding.severity} ${finding.code}: ${finding.message}\n`)
  errors += findings.filter(finding => finding.severity === 'error').length
}
process.stdout.write(`${folders.length} lessons, ${errors} errors\n`)
process.exit(errors > 0 ? 1 : 0)
