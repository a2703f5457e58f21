import { readdir, readFile } from 'node:fs/promises'
import { basename, extname, join } from 'node:path'
import type { ImportedLesson } from './import'
import { refuse } from './refuse'

const LESSON = 'lesson.md'
const PICTURES = new Set(['.svg', '.jpg', '.jpeg', '.png', '.webp'])

/** The folders of lessons in a folder, in the order of their names: itself, or each inside it that has a lesson.md. */
export async function lessonFolders(folder: string): Promise<string[]> {
  const inside = await readdir(folder, { withFileTypes: true }).catch(() => refuse(404, 'There is no such folder.'))
  if (inside.some(entry => entry.isFile() && entry.name === LESSON)) return [folder]
  const folders: string[] = []
  for (const entry of inside.filter(one => one.isDirectory()).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const path = join(folder, entry.name)
    if ((await readdir(path)).includes(LESSON)) folders.push(path)
  }
  if (folders.length === 0) refuse(404, 'There is no lesson.md in this folder or in one inside it.')
  return folders
}

/** A lesson as it lies in a folder: the text as UTF-8 to the byte, and the files beside it that are pictures. */
export async function readLesson(folder: string): Promise<ImportedLesson> {
  const bytes = await readFile(join(folder, LESSON))
  const source = bytes.toString('utf8')
  if (!Buffer.from(source, 'utf8').equals(bytes)) refuse(422, 'lesson.md is not UTF-8 text.')
  const pictures = new Map<string, Buffer>()
  for (const entry of await readdir(folder, { withFileTypes: true })) {
    if (entry.isFile() && PICTURES.has(extname(entry.name).toLowerCase())) pictures.set(entry.name, await readFile(join(folder, entry.name)))
  }
  return { slug: basename(folder), source, pictures }
}
