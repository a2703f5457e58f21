import { keptDown, KEY_WAYS, type KeyAct, letGo, NO_KEYS, press, release, walk } from '#shared/bench/keys'

/** One thing that can be lit and said. */
export interface BenchStop { key: string, /** What saying it says, in words. */ says: string, act: () => void }
interface Walked { id: () => string, stops: () => readonly BenchStop[], unlit: () => void, unlitSays: () => string | null }
export interface BenchKeys {
  /** The stop that is lit. */
  lit: Ref<string | null>
  /** How far a press that says the lit one has come, while it would count. */
  kept: Ref<{ part: number, inTime: boolean } | null>
  light: (key: string) => void
  /** Says the lit one, as a tap on the answer does. */
  say: () => void
  walks: ComputedRef<boolean>
  litStop: ComputedRef<BenchStop | null>
  /** What saying says while nothing is lit, or null where it says nothing. */
  unlitSays: ComputedRef<string | null>
  stack: Ref<Walked[]>
}
export interface OnKeys { next: () => void, back: () => void, help: () => void }

const KEYS: InjectionKey<BenchKeys> = Symbol('keys of the bench')
const TYPED_INTO = 'input, textarea, select, [contenteditable="true"]'

/** Listens to pedals and keys for a page of the bench. `screen` names what is on it. */
export function provideBenchKeys(on: OnKeys, screen: MaybeRefOrGetter<string>): BenchKeys {
  const stack = shallowRef<Walked[]>([])
  const lit = ref<string | null>(null)
  const kept = ref<{ part: number, inTime: boolean } | null>(null)
  const top = computed(() => stack.value.at(-1) ?? null)
  const now = computed(() => ({ id: top.value ? `walk ${top.value.id()}` : `step ${toValue(screen)}`, walks: top.value !== null }))
  let state = NO_KEYS

  const litStop = computed(() => top.value?.stops().find(one => one.key === lit.value) ?? null)
  const light = (key: string): void => { lit.value = key }
  function say(): void {
    if (litStop.value) litStop.value.act()
    else top.value?.unlit()
  }
  const walkBy = (way: 1 | -1): void => { lit.value = walk(top.value?.stops().map(stop => stop.key) ?? [], lit.value, way) }
  const acts: Record<KeyAct, () => void> = { 'next': on.next, 'back': on.back, 'help': on.help, 'say': say, 'walk-on': () => walkBy(1), 'walk-back': () => walkBy(-1) }

  const codeOf = (event: KeyboardEvent): string => event.code || (event.key.toLowerCase() === 'h' ? 'KeyH' : event.key)
  function isOurs(event: KeyboardEvent): boolean {
    if (event.isComposing || event.ctrlKey || event.metaKey || event.altKey || !KEY_WAYS[codeOf(event)]) return false
    const { target } = event
    if (!(target instanceof Element)) return true
    if (target.closest(TYPED_INTO)) return false
    // Enter on a control of its own presses that control.
    return KEY_WAYS[codeOf(event)] !== 'say' || (now.value.walks && !target.closest('button:not([data-stop]), a[href], summary'))
  }

  useEventListener(window, 'keydown', (event) => {
    if (!isOurs(event)) return
    event.preventDefault()
    const done = press(state, { code: codeOf(event), at: event.timeStamp, repeat: event.repeat }, now.value)
    state = done.state
    if (done.act) acts[done.act]()
  }, { capture: true })
  useEventListener(window, 'keyup', (event) => {
    const done = release(state, { code: codeOf(event), at: event.timeStamp }, now.value)
    state = done.state
    kept.value = null
    if (done.act) acts[done.act]()
  }, { capture: true })
  useEventListener(window, 'blur', () => { state = letGo(state); kept.value = null })
  useRafFn(() => { kept.value = state.down ? keptDown(state, performance.now(), now.value) : null })
  watch(() => now.value.id, () => { lit.value = null })

  const keys: BenchKeys = { lit, kept, light, say, litStop, unlitSays: computed(() => top.value?.unlitSays() ?? null), walks: computed(() => now.value.walks), stack }
  provide(KEYS, keys)
  return keys
}

/** The keys of the page this stands in. */
export function useBenchKeys(): BenchKeys {
  const keys = inject(KEYS, null)
  if (!keys) throw new Error('Keys are listened to by the page around this.')
  return keys
}

/** Makes the page walk between these stops while the component is there. `unlit` is what saying does while nothing is lit. */
export function useBenchStops(id: MaybeRefOrGetter<string>, stops: MaybeRefOrGetter<readonly BenchStop[]>, unlit: () => void = () => undefined, unlitSays: () => string | null = () => null): BenchKeys {
  const keys = useBenchKeys()
  const own: Walked = { id: () => toValue(id), stops: () => toValue(stops), unlit, unlitSays }
  keys.stack.value = [...keys.stack.value, own]
  onScopeDispose(() => { keys.stack.value = keys.stack.value.filter(one => one !== own) })
  return keys
}
