import type { Lesson } from '#shared/lesson/schema'

/** Fetches a lesson's pictures into the browser's cache, one after the other, so that they are there when the studio is not. */
export function usePicturesAhead(of: MaybeRefOrGetter<{ lesson: Lesson, at: (name: string) => string } | null>): void {
  let begun = ''
  let isGone = false
  watch(() => toValue(of), async (now) => {
    if (!now || begun === now.at('')) return
    begun = now.at('')
    for (const name of new Set(now.lesson.parts.flatMap(part => part.steps.flatMap(step => step.pictures.map(picture => picture.name))))) {
      if (isGone) return
      const answer = await fetch(now.at(name)).catch(() => null)
      // The body must be read for the answer to be kept.
      await answer?.arrayBuffer().catch(() => undefined)
    }
  }, { immediate: true })
  onScopeDispose(() => { isGone = true })
}
