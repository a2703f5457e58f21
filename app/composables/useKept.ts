import type { Ref } from 'vue'
import type { Me } from '#shared/types/entry'

/**
 * A form's draft that outlives a closed tab, an ended session and a lost network: kept on this device until it is sent.
 * Each person has their own: the device may be anybody's next. `key` names the form, `make` an empty one. `forget` clears it and begins anew.
 */
export function useKept<T extends object>(key: () => string, make: () => T): { value: Ref<T>, forget: () => void } {
  const value = ref(make()) as Ref<T>
  const { data: me } = useNuxtData<Me>('me')
  const place = () => `kept:${me.value?.person.id ?? ''}:${key()}`
  const read = () => {
    try {
      const text = localStorage.getItem(place())
      return text === null ? null : JSON.parse(text) as Partial<T>
    }
    catch {
      return null
    }
  }
  onMounted(() => {
    const kept = read()
    if (kept) value.value = { ...value.value, ...kept }
    watch(value, (now) => {
      try {
        localStorage.setItem(place(), JSON.stringify(now))
      }
      catch { /* A full or closed store keeps nothing; what is on the page stays. */ }
    }, { deep: true })
  })
  return {
    value,
    forget() {
      value.value = make()
      nextTick(() => localStorage.removeItem(place()))
    },
  }
}
