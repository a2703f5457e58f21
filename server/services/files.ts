import { createHash, randomUUID } from 'node:crypto'
import { mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises'
import { dirname, join } from 'node:path'

/** What is kept as files: pictures of lessons, photos of pieces. Who may see one is decided by the database row, never by its name. */
export type FileKind = 'pictures' | 'photos'
export interface Files {
  /** Keeps bytes under their own SHA-256 and returns it. The same bytes twice are one file. */
  put(kind: FileKind, bytes: Uint8Array): Promise<string>
  /** The bytes of that hash, or null. */
  get(kind: FileKind, sha: string): Promise<Buffer | null>
  /** Takes the file away. Nothing happens when there is none. */
  erase(kind: FileKind, sha: string): Promise<void>
}

const SHA = /^[0-9a-f]{64}$/

/** Files below a folder, two levels deep by the first digits of the hash. Whole or not there: written aside, then renamed. */
export function openFiles(folder: string): Files {
  const pathOf = (kind: FileKind, sha: string) => {
    if (!SHA.test(sha)) throw new TypeError('A file is named by its SHA-256.')
    return join(folder, kind, sha.slice(0, 2), sha)
  }
  return {
    async put(kind, bytes) {
      const sha = createHash('sha256').update(bytes).digest('hex')
      const path = pathOf(kind, sha)
      await mkdir(dirname(path), { recursive: true })
      const aside = `${path}.${randomUUID()}`
      await writeFile(aside, bytes)
      await rename(aside, path)
      return sha
    },
    async get(kind, sha) {
      return await readFile(pathOf(kind, sha)).catch((error: NodeJS.ErrnoException) => {
        if (error.code === 'ENOENT') return null
        throw error
      })
    },
    async erase(kind, sha) {
      await rm(pathOf(kind, sha), { force: true })
    },
  }
}
