/**
 * What a step says may be longer than the sheet, much enlarged: then Next first moves on in the text, so that a pedal alone reads it all.
 * `isMore` tells that there is more below; `moveOn` moves on in it and is true where it did.
 */
export function useUnread(screen: MaybeRefOrGetter<string>): { isMore: Ref<boolean>, moveOn: () => boolean } {
  const isMore = ref(false)
  const boxes = () => ({ main: document.querySelector<HTMLElement>('.bench-main'), say: document.querySelector<HTMLElement>('.bench-say') })
  /** The box that has to be moved, with CSS pixels of text left below. */
  function left(): { box: HTMLElement, below: number } | null {
    const { main, say } = boxes()
    if (!main || !say) return null
    const inSay = say.scrollHeight - say.clientHeight - say.scrollTop
    const inMain = say.getBoundingClientRect().bottom - main.getBoundingClientRect().bottom
    // Less than a line is a margin and no text.
    return inSay > 24 ? { box: say, below: inSay } : inMain > 24 ? { box: main, below: inMain } : null
  }
  const look = (): void => { isMore.value = left() !== null }
  function moveOn(): boolean {
    const there = left()
    // A line stays in sight, to go on reading from.
    there?.box.scrollBy({ top: Math.min(there.below, there.box.clientHeight * 0.8) })
    look()
    return there !== null
  }
  useEventListener('scroll', look, { capture: true, passive: true })
  useEventListener('resize', look)
  watch(() => toValue(screen), () => { void nextTick(look) }, { flush: 'post', immediate: true })
  onMounted(() => {
    look()
    // Letters of another width may take more lines.
    void document.fonts.ready.then(look)
  })
  return { isMore, moveOn }
}
