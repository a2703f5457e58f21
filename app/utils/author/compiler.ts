/** The compiler as the writing page asks it: in a worker where there is one, else on the page itself. */
import type { Compiled, Lesson } from '#shared/lesson/schema'

export interface CompileAsk {
  no: number
  source: string
  /** Names of the pictures beside the text. */
  pictures: string[]
  /** Slugs of the studio's lessons. */
  lessons: string[]
  previous: Lesson | null
}
export type CompileSaid = Compiled & { no: number }
export interface Compiler {
  compile: (ask: Omit<CompileAsk, 'no'>) => Promise<Compiled>
  close: () => void
}

/** The compiler comes only when it is first asked: no other page needs it. */
async function compileHere({ source, pictures, lessons, previous }: Omit<CompileAsk, 'no'>): Promise<Compiled> {
  const { compile } = await import('#shared/lesson/compile')
  return compile(source, { pictures: new Set(pictures), lessons: new Set(lessons), previous })
}

/** Opens a compiler. Where the worker fails, what was asked of it is compiled on the page, and so is all that follows. */
export function openCompiler(): Compiler {
  const waiting = new Map<number, { ask: Omit<CompileAsk, 'no'>, done: (compiled: Compiled) => void, failed: (error: unknown) => void }>()
  let worker = typeof Worker === 'function' ? new Worker(new URL('../../workers/compile.worker.ts', import.meta.url), { type: 'module' }) : null
  let last = 0

  function giveUp(): void {
    worker?.terminate()
    worker = null
    for (const { ask, done, failed } of waiting.values()) compileHere(ask).then(done, failed)
    waiting.clear()
  }
  worker?.addEventListener('error', giveUp)
  worker?.addEventListener('messageerror', giveUp)
  worker?.addEventListener('message', ({ data: { no, lesson, findings } }: MessageEvent<CompileSaid>) => {
    waiting.get(no)?.done({ lesson, findings })
    waiting.delete(no)
  })

  return {
    compile(ask) {
      if (!worker) return compileHere(ask)
      const no = ++last
      return new Promise((done, failed) => {
        waiting.set(no, { ask, done, failed })
        worker?.postMessage({ no, ...ask } satisfies CompileAsk)
      })
    },
    close: () => worker?.terminate(),
  }
}
