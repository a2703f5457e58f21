import { type Files, openFiles } from '#server/services/files'

let files: Files | null = null

/** The studio's kept files, in the folder the configuration names. */
export function useFiles(): Files {
  files ??= openFiles(useRuntimeConfig().filesDir)
  return files
}
