import { compile } from '#shared/lesson/compile'
import type { CompileAsk, CompileSaid } from '~/utils/author/compiler'

/** Compiles beside the page, so that the hands are never kept waiting. */
addEventListener('message', ({ data: { no, source, pictures, lessons, previous } }: MessageEvent<CompileAsk>) => {
  const said: CompileSaid = { no, ...compile(source, { pictures: new Set(pictures), lessons: new Set(lessons), previous }) }
  postMessage(said)
})
