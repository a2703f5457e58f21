import type { Compiled } from '#shared/lesson/schema'
import { openCompiler, type CompileAsk } from '~/utils/author/compiler'

export interface CompiledText {
  /** The last text that was compiled, with its lesson and findings; null until the first is done. */
  result: Ref<(Compiled & { source: string }) | null>
  /** Compiles now what is there now. */
  refresh: () => Promise<void>
}

/** Milliseconds of rest before a text is compiled. */
const REST = 350

/** The lesson and findings of a text as it is written. */
export function useCompiledText(source: Ref<string>, context: MaybeRefOrGetter<Omit<CompileAsk, 'no' | 'source'>>): CompiledText {
  const result = shallowRef<(Compiled & { source: string }) | null>(null)
  const compiler = openCompiler()
  let asked = 0

  async function refresh(): Promise<void> {
    const mine = ++asked
    const text = source.value
    const { pictures, lessons, previous } = toValue(context)
    // A worker takes plain values only.
    const compiled = await compiler.compile({ source: text, pictures: [...pictures], lessons: [...lessons], previous: toRaw(previous) })
    // Of two answers the later question's stands.
    if (mine === asked) result.value = { ...compiled, source: text }
  }

  watchDebounced([source, () => toValue(context)], refresh, { debounce: REST, maxWait: REST * 4 })
  onMounted(refresh)
  onScopeDispose(compiler.close)
  return { result, refresh }
}
