export interface LineTops {
  /** Pixels from the top of the text to a line, by its number from 1. */
  topOf: (line: number) => number
  height: Ref<number>
}

/** Where each line of a wrapped text stands, measured on the element that has one child for each. */
export function useLineTops(mirror: Readonly<Ref<HTMLElement | null>>, lines: Ref<string[]>): LineTops {
  const tops = shallowRef<number[]>([])
  const height = ref(0)

  function measure(): void {
    const box = mirror.value
    if (!box) return
    tops.value = Array.from(box.children, child => (child instanceof HTMLElement ? child.offsetTop - box.offsetTop : 0))
    height.value = box.offsetHeight
  }

  watch(lines, measure, { flush: 'post' })
  useResizeObserver(mirror, measure)
  onMounted(() => {
    measure()
    // The letters' own widths come with their font.
    void document.fonts?.ready.then(measure)
  })
  return { topOf: line => tops.value[Math.min(line, tops.value.length) - 1] ?? 0, height }
}
