import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { basename, join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { lessonFolders, readLesson } from '#server/services/import-folder'

let folder = ''
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'lessons-'))
})
afterEach(async () => await rm(folder, { recursive: true }))

async function write(path: string, content: string | Buffer): Promise<void> {
  await mkdir(join(folder, path, '..'), { recursive: true })
  await writeFile(join(folder, path), content)
}

describe('lessons in folders', () => {
  it('finds every folder with a lesson.md, by name, and only those', async () => {
    await write('b-ring/lesson.md', 'b')
    await write('a-cap/lesson.md', 'a')
    await write('notes/todo.md', 'x')
    expect((await lessonFolders(folder)).map(path => basename(path))).toEqual(['a-cap', 'b-ring'])
    expect(await lessonFolders(join(folder, 'a-cap'))).toEqual([join(folder, 'a-cap')])
  })

  it('reads the text to the byte and the pictures beside it', async () => {
    const source = '\uFEFF---\r\ntitle: Ring  \n---\n\u00e9 ½\r\n'
    await write('ring/lesson.md', source)
    await write('ring/cut.svg', '<svg/>')
    await write('ring/notes.txt', 'no picture')
    const lesson = await readLesson(join(folder, 'ring'))
    expect(lesson.source).toBe(source)
    expect(lesson.slug).toBe('ring')
    expect([...lesson.pictures.keys()]).toEqual(['cut.svg'])
  })

  it('says what is wrong', async () => {
    await expect(lessonFolders(join(folder, 'none'))).rejects.toThrow('There is no such folder.')
    await expect(lessonFolders(folder)).rejects.toThrow('There is no lesson.md')
    await write('ring/lesson.md', Buffer.from([0xff, 0xfe, 0x41]))
    await expect(readLesson(join(folder, 'ring'))).rejects.toThrow('not UTF-8')
  })
})
