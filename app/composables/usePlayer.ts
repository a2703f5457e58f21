import { ulid } from 'ulid'
import { type Need, needsOf, type Place, placeNow, turnSays, waitSeconds, wireOf } from '#shared/bench/screen'
import { placeIndex, type SetOut, type State, stepOf, type Turn } from '#shared/bench/machine'
import type { Answer, Bodies } from '#shared/bench/events'
import { sha256 } from '#shared/lesson/canonical'
import type { Step } from '#shared/lesson/schema'
import { backFrom, bytesOf, isMet, onFrom, saysNothing } from '~/utils/bench/player'
import type { MadePhoto } from '~/utils/bench/photo'

export interface Player {
  set: ComputedRef<SetOut | null>
  state: ComputedRef<State | null>
  place: ComputedRef<Place | null>
  /** The turn looked back at, or null at the place. */
  viewing: Ref<number | null>
  /** The turn on the screen, with its step and number. */
  shown: ComputedRef<{ turn: Turn, step: Step, at: number, says: string } | null>
  needs: ComputedRef<Need[]>
  /** What the step in hand asks for just now, and whether it is there. */
  open: Ref<Need | null>
  isOpenMet: ComputedRef<boolean>
  next: (early?: boolean) => Promise<void>
  back: () => void
  answer: (answer: Answer) => Promise<void>
  photo: (made: MadePhoto, why: Bodies['photo.taken']['for'], turn: string | null) => Promise<string | null>
  remake: (turn: string, why: string) => Promise<void>
  wire: ComputedRef<ReturnType<typeof wireOf>>
}

/** Goes through a piece: what is shown is the fold of its events; looking back and what is open are the screen's own. */
export function usePlayer(): Player {
  const bench = useBenchStore()
  const viewing = ref<number | null>(null)
  const open = shallowRef<Need | null>(null)
  const now = useNow({ interval: 1000 })
  const set = computed(() => bench.folded?.set ?? null)
  const state = computed(() => bench.folded?.state ?? null)
  const place = computed(() => set.value && state.value ? placeNow(set.value, state.value) : null)
  const placed = computed(() => place.value && 'turn' in place.value ? place.value.turn : null)
  const needs = computed(() => set.value && state.value && placed.value ? needsOf(set.value, state.value, placed.value, now.value.getTime()) : [])
  const shown = computed(() => {
    const turn = viewing.value === null ? placed.value : set.value?.turns[viewing.value] ?? null
    if (!set.value || !turn) return null
    return { turn, step: stepOf(set.value, turn), at: set.value.at.get(turn.address) ?? 0, says: turnSays(set.value, turn) }
  })
  const isOpenMet = computed(() => Boolean(open.value && set.value && state.value && placed.value && isMet(set.value, state.value, placed.value, open.value, now.value.getTime())))
  const wire = computed(() => set.value && state.value ? wireOf(set.value, state.value, viewing.value ?? placeIndex(set.value, state.value)) : [])
  watch(() => `${state.value?.place} ${state.value?.round}`, () => { open.value = null; viewing.value = null })
  // A step that is nothing but what it asks shows that at once, and no empty sheet before it.
  watchEffect(() => {
    const [need] = needs.value
    if (viewing.value === null && !open.value && place.value?.kind === 'step' && need && need.kind !== 'wait' && shown.value && saysNothing(shown.value.step)) open.value = need
  })

  async function next(early = false): Promise<void> {
    if (!set.value || !state.value) return
    if (viewing.value !== null) { viewing.value = onFrom(set.value, state.value, viewing.value); return }
    if (place.value?.kind !== 'step') return
    if (open.value && !isOpenMet.value && !early) return
    const { turn } = place.value
    const left = needs.value.filter(need => !(early && need.kind === 'wait'))
    const [need] = left
    if (!need) { await bench.act('step.done', { turn: turn.address, early: early || needs.value.length > 0 }); return }
    if (need.kind === 'wait' && need.until === null) {
      const until = new Date(Date.now() + waitSeconds(set.value, turn, need.at) * 1000).toISOString()
      if (!await bench.act('wait.started', { turn: turn.address, wait: need.at, until })) return
    }
    open.value = need
  }

  function back(): void {
    if (!set.value || !state.value) return
    if (viewing.value === null && open.value && shown.value && !saysNothing(shown.value.step)) { open.value = null; return }
    viewing.value = backFrom(set.value, state.value, viewing.value) ?? viewing.value
  }

  async function answer(given: Answer): Promise<void> {
    if (place.value?.kind === 'ask') await bench.act('hold.answered', { turn: place.value.turn.address, ask: place.value.index, answer: given })
  }

  async function photo(made: MadePhoto, why: Bodies['photo.taken']['for'], turn: string | null): Promise<string | null> {
    if (!bench.piece) return null
    const id = ulid()
    const bytes = await bytesOf(made.blob)
    const body: Bodies['photo.taken'] = { photo: id, turn, for: why, sha256: sha256(bytes), bytes: bytes.length, type: 'image/jpeg', width: made.width, height: made.height }
    const { id: piece, person } = bench.piece
    return await bench.act('photo.taken', body, { id, piece, person, blob: made.blob, sent: 'no', says: '' }) ? id : null
  }

  async function remake(turn: string, why: string): Promise<void> {
    if (await bench.act('turn.remade', { turn, why })) viewing.value = null
  }

  return { set, state, place, viewing, shown, needs, open, isOpenMet, next, back, answer, photo, remake, wire }
}
