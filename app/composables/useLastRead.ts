/** What was last read, also after reading it again has failed: a page that stands is not emptied because the network went. */
export function useLastRead<T>(read: Readonly<Ref<T | null | undefined>>): Readonly<Ref<T | null | undefined>> {
  const last = shallowRef(read.value)
  watch(read, (now) => { if (now !== null && now !== undefined) last.value = now }, { flush: 'sync' })
  return last
}
