import type { Compiled, Lesson } from '#shared/lesson/schema'

export interface CompileWith {
  /** Names of the pictures beside the text. */
  pictures: string[]
  /** Slugs of the studio's lessons. */
  lessons: string[]
  previous: Lesson | null
}
export interface CompiledText {
  /** The last text that was compiled, with its lesson and findings; null until the first is done. */
  result: Ref<(Compiled & { source: string }) | null>
  /** Compiles now what is there now. */
  refresh: () => Promise<void>
}

/** Milliseconds of rest before a text is compiled. */
const REST = 350

/** The lesson and findings of a text as it is written. The compiler comes only with this page: no other needs it. */
export function useCompiledText(source: Ref<string>, context: MaybeRefOrGetter<CompileWith>): CompiledText {
  const result = shallowRef<(Compiled & { source: string }) | null>(null)

  async function refresh(): Promise<void> {
    const { compile } = await import('#shared/lesson/compile')
    const text = source.value
    const { pictures, lessons, previous } = toValue(context)
    result.value = { ...compile(text, { pictures: new Set(pictures), lessons: new Set(lessons), previous }), source: text }
  }

  watchDebounced([source, () => toValue(context)], refresh, { debounce: REST, maxWait: REST * 4 })
  onMounted(refresh)
  return { result, refresh }
}
